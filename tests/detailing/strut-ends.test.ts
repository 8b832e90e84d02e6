import { expect, it } from 'vitest';
import { jobSchema } from '../../src/model/job/index.js';
import { endChoice, withDetail } from '../../src/model/strut-end.js';
import { assess } from '../../src/pipeline/assess.js';
import { sayFault } from '../../src/readers/fault.js';
import { readJob } from '../../src/readers/job.js';
import { trussOf } from '../helpers/truss.js';

/** Invented: a triangle of tubes. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [1200, 0, 0],
    [600, 1039.23, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
  forces: [150, 150, 150],
});
const job = (ends: object, nodes: object = {}) =>
  jobSchema.parse({
    format: 'strutwright-job/1',
    title: 'T',
    truss: 't.json',
    struts: { section: 'alu-25x2', ends },
    nodes: { system: 'spigot', ...nodes },
  });
const socketOf = (ends: object, strut: string, node: string, nodes: object = {}) =>
  assess(truss, job(ends, nodes))
    .parts.hubs.find((h) => h.mark === node)!
    .sockets.find((s) => s.strut === strut)!;
const [S1, S2] = truss.members.map((m) => m.mark) as [string, string];
const N1 = truss.nodes[0]!.mark;

it('gives one end another joint and another hold than its node, and the others what the node has', () => {
  const key = `${S1}@${N1}`;
  const usual = socketOf({}, S1, N1);
  expect(usual).toMatchObject({ form: 'spigot', joint: 'glued', detail: 'plain' });
  const own = socketOf({ [key]: { hold: 'socket', joint: 'pinned', detail: 'slide' } }, S1, N1);
  expect(own.form).toBeUndefined();
  // A sleeve round the tube of 25 mm.
  expect(own.bore as number).toBeGreaterThan(25);
  expect(own).toMatchObject({ joint: 'pinned', detail: 'slide', pin: 2 });
  expect(own.travel).toBeGreaterThan(0);
  const other = truss.members[0]!.ends.find((n) => n !== N1)!;
  expect(socketOf({ [key]: { hold: 'socket' } }, S1, other).form).toBe('spigot');
  expect(S2).not.toBe(S1);
});

it('keeps what else an end asks for when a closing detail is given to it', () => {
  const ends = withDetail({ 'S1@N1': { joint: 'pinned' }, 'S2@N1': 'drop-in' }, 'S1@N1', 'slide');
  expect(endChoice(job(ends), 'S1', 'N1')).toEqual({ detail: 'slide', joint: 'pinned', hold: null });
  expect(endChoice(job(ends), 'S2', 'N1')).toEqual({ detail: 'drop-in', joint: null, hold: null });
  // No name stands for something that every object has.
  expect(endChoice(job({}), 'constructor', 'N1').detail).toBe('plain');
});

it('says of a detail that is none what there is', () => {
  const text = JSON.stringify({
    format: 'strutwright-job/1',
    title: 'T',
    truss: 't.json',
    struts: { ends: { 'S1@N1': { detail: 'bayonet' } } },
  });
  const said = readJob(text, 'job.json').faults.map(sayFault);
  expect(said).toHaveLength(1);
  expect(said[0]).toMatch(/drop-in/);
});
