import { expect, it } from 'vitest';
import { defaultJob } from '../../src/model/job/index.js';
import { topologyOf } from '../../src/model/topology.js';
import { equilibriumOf } from '../../src/statics/equilibrium.js';
import { givenForces } from '../../src/statics/given-forces.js';
import { trussOf } from '../helpers/truss.js';

const { fit } = defaultJob();
const balance = (truss: ReturnType<typeof trussOf>) => {
  const topology = topologyOf(truss);
  return equilibriumOf(topology, givenForces(truss).forces!, fit);
};

// Tripod of foot radius r, height h, load P: t = -P L / 3 h by resolving along z and by symmetry (closed form).
const L = Math.sqrt(10);
const tripod = (t: number) =>
  trussOf({
    nodes: [
      [0, 0, 3],
      [1, 0, 0],
      [-0.5, Math.sqrt(3) / 2, 0],
      [-0.5, -Math.sqrt(3) / 2, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
    forces: [t, t, t],
    supports: [
      [1, 'xyz'],
      [2, 'xyz'],
      [3, 'xyz'],
    ],
    loads: [[0, [0, 0, -3]]],
  });

it('a tripod under its closed-form forces balances, and its feet carry a third of the load each', () => {
  const result = balance(tripod((-3 * L) / 9));
  expect(result.maxResidual).toBeLessThan(1e-15);
  expect(result.reactions.map((r) => r.node)).toEqual(['N1', 'N2', 'N3']);
  for (const r of result.reactions) expect(r.force[2]).toBeCloseTo(1, 14);
  expect(result.reactions[0]!.force[0]).toBeCloseTo(-1 / 3, 14);
  expect(result.whole.relative).toBeLessThan(1e-15);
  expect(result.findings).toEqual([]);
});

it('forces one part in five hundred too large warn, one in fifty stop, with the residual of the apex', () => {
  // At the apex 3 (t h / L) (1 + e) against P = 3: residual 3 e, relative 3 e / (t (1 + e)).
  const t = (3 * L) / 9;
  for (const [e, level] of [
    [0.002, 'warn'],
    [0.02, 'stop'],
  ] as const) {
    const result = balance(tripod(-t * (1 + e)));
    expect(result.maxResidual).toBeCloseTo(3 * e, 12);
    expect(result.maxRelative).toBeCloseTo((3 * e) / (t * (1 + e)), 12);
    expect(result.findings.map((f) => [f.code, f.subject, f.level])).toContainEqual([
      'node-out-of-balance',
      'N0',
      level,
    ]);
  }
});

it('a space truss of twelve bars balances on six supports', () => {
  // R. C. Hibbeler, Engineering Mechanics: Statics, 14th ed., problem 6-57: supports, loads, reactions at C and
  // F_BF = F_BC = 0 as published; the other forces from memory, rounded in print to three digits (here unrounded).
  const truss = trussOf({
    nodes: [
      [0, 4, 0],
      [3, 4, 0],
      [3, 0, 3],
      [0, 0, 3],
      [0, 0, 0],
      [3, 0, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
      [0, 4],
      [1, 2],
      [1, 4],
      [1, 5],
      [2, 3],
      [2, 5],
      [3, 4],
      [3, 5],
      [4, 5],
    ],
    forces: [-300, 100 * Math.sqrt(34), 1000 / 3, -2000 / 3, 0, 500, 0, -300, -300, 0, 300 * Math.sqrt(2), -300],
    supports: [
      [2, 'yz'],
      [3, 'xyz'],
      [4, 'y'],
    ],
    loads: [
      [0, [0, 0, -500]],
      [1, [0, 400, 0]],
    ],
  });
  const result = balance(truss);
  expect(result.maxRelative).toBeLessThan(1e-12);
  expect(result.reactions.find((r) => r.node === 'N2')!.force[1]).toBeCloseTo(-400, 9);
  expect(result.reactions.find((r) => r.node === 'N2')!.force[2]).toBeCloseTo(0, 9);
  expect(result.reactions.find((r) => r.node === 'N3')!.force[0]).toBeCloseTo(0, 9);
  expect(result.whole.relative).toBeLessThan(1e-14);
});

it('loads that do not balance are named for the whole truss', () => {
  const truss = trussOf({
    nodes: [
      [0, 0, 0],
      [100, 0, 0],
    ],
    edges: [[0, 1]],
    forces: [10],
    loads: [
      [0, [-10, 0, 0]],
      [1, [10, 1, 0]],
    ],
  });
  const result = balance(truss);
  expect(result.whole.force).toEqual([0, 1, 0]);
  expect(result.findings.find((f) => f.code === 'truss-out-of-balance')?.level).toBe('stop');
});

it('a self-stressed figure whose forces were rounded to three digits is clear of findings on its supports', () => {
  // A point in a regular tetrahedron: hull -sqrt 2, spokes 2 sqrt 3 (equilibrium of a corner, by symmetry).
  const truss = trussOf({
    nodes: [
      [1, 1, 1],
      [1, -1, -1],
      [-1, 1, -1],
      [-1, -1, 1],
      [0, 0, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
      [1, 2],
      [1, 3],
      [2, 3],
      [0, 4],
      [1, 4],
      [2, 4],
      [3, 4],
    ],
    forces: [...Array(6).fill(-Math.SQRT2), ...Array(4).fill(2 * Math.sqrt(3))].map((t) => Math.round(t * 1000) / 1000),
    supports: [
      [0, 'xyz'],
      [1, 'yz'],
      [2, 'z'],
    ],
  });
  const result = balance(truss);
  expect(result.maxResidual).toBeGreaterThan(0);
  expect(result.findings).toEqual([]);
});

it('forces of some struts only are not taken, and each missing one is named', () => {
  const truss = tripod(-1);
  const some = { ...truss, members: truss.members.map((m, i) => (i === 1 ? { ...m, force: null } : m)) };
  expect(givenForces(some)).toMatchObject({ forces: null, findings: [{ code: 'force-missing', subject: 'S1' }] });
  const none = { ...truss, members: truss.members.map((m) => ({ ...m, force: null })) };
  expect(givenForces(none)).toMatchObject({ forces: null, findings: [{ code: 'forces-missing', level: 'note' }] });
});
