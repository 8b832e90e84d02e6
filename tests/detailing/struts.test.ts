import { expect, it } from 'vitest';
import { detailStruts } from '../../src/detailing/struts.js';
import { defaultJob } from '../../src/model/job/index.js';
import type { HubPart, Socket } from '../../src/model/parts.js';
import type { Section } from '../../src/model/section.js';
import { topologyOf } from '../../src/model/topology.js';

const section: Section = { name: 'r8', shape: { kind: 'round', diameter: 8 }, material: 'beech-dowel', measured: null };
const topology = topologyOf({
  nodes: [
    { mark: 'A', at: [0, 0, 0] },
    { mark: 'B', at: [300.3, 0, 0] },
  ],
  members: [
    {
      mark: 'S1',
      ends: ['A', 'B'],
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    },
  ],
  faces: [],
  cells: [],
  reciprocal: null,
  supports: [],
  loads: [],
});
const axes = [{ x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] }] as const;

const hub = (mark: string, setback: number, more: Partial<Socket> = {}): HubPart =>
  ({ mark, sockets: [{ strut: 'S1', setback, depth: 14, detail: 'plain', ...more }] }) as unknown as HubPart;

it('a strut that slides in leaves its way free behind that end, and the sum is the axis', () => {
  const job = defaultJob();
  const hubs = [hub('A', 10), hub('B', 12.1, { depth: 29, travel: 15, detail: 'slide' })];
  const [strut] = detailStruts(topology, job, [section], axes, hubs).struts;
  // Between the stops 278.2; less 15 of travel and two floats of 0.75: 261.7, down to half a millimetre: 261.5.
  expect(strut!.cutLength).toBe(261.5);
  expect(strut!.ends[0].float).toBeCloseTo(0.85, 9);
  expect(strut!.ends[1].float).toBeCloseTo(15.85, 9);
  const [from, to] = strut!.ends;
  expect(from.setback! + from.float! + strut!.cutLength! + to.float! + to.setback!).toBeCloseTo(300.3, 9);
  // Pushed all the way in, it is clear of the far socket's mouth.
  expect(from.float! + to.float!).toBeGreaterThan(14);
});
