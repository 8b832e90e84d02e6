import { expect, it } from 'vitest';
import { type Job, jobSchema } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { trussOf } from '../helpers/truss.js';

const jobWith = (more: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });
/** Invented: a triangle of 400 mm with one strut that pulls hard. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [400, 0, 0],
    [200, 350, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
  forces: [340, 10, 10],
});

it('sockets that must carry more are made deeper, at both ends of that strut alone, and then pass', () => {
  const job = jobWith({ nodes: { bondStrength_MPa: 3 } });
  const { parts, utilisations, findings } = assess(truss, job);
  const depths = parts.hubs.flatMap((h) => h.sockets.map((s) => [s.strut, s.depth] as const));
  for (const [strut, depth] of depths) {
    if (strut === 'S0') expect(depth).toBeGreaterThan(14);
    else expect(depth).toBe(14);
  }
  const sockets = utilisations.filter((u) => u.kind === 'socket');
  for (const u of sockets) expect(u.utilisation).toBeLessThanOrEqual(1);
  expect(findings.find((f) => f.code === 'sockets-deepened')).toMatchObject({ level: 'note', value: 2 });
  expect(findings.some((f) => f.code === 'socket-over-stressed')).toBe(false);
  // The cut length does not depend on the depth.
  const plain = assess({ ...truss, members: truss.members.map((m) => ({ ...m, force: 10 })) }, job);
  expect(parts.struts[0]!.cutLength).toBe(plain.parts.struts[0]!.cutLength);
});

it('a depth that the job fixes stays, and the socket is flagged with the depth it needs', () => {
  const job = jobWith({ nodes: { bondStrength_MPa: 3, depth_mm: 14 } });
  const { parts, findings } = assess(truss, job);
  for (const hub of parts.hubs) for (const s of hub.sockets) expect(s.depth).toBe(14);
  const stops = findings.filter((f) => f.code === 'socket-over-stressed');
  expect(stops.length).toBe(2);
  expect(stops[0]!.about!['depth_mm']).toBeGreaterThan(14);
});
