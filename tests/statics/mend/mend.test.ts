import { describe, expect, it } from 'vitest';
import { fitPlane } from '../../../src/maths/plane-fit.js';
import { add, addScaled, cross, dot, scale, type Vec3 } from '../../../src/maths/vec3.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { topologyOf } from '../../../src/model/topology.js';
import type { Truss } from '../../../src/model/truss.js';
import { equilibriumOf } from '../../../src/statics/equilibrium.js';
import { givenForces } from '../../../src/statics/given-forces.js';
import { mend } from '../../../src/statics/mend/mend.js';
import { reciprocalOf } from '../../../src/statics/reciprocal/reciprocal.js';
import { mapped, trussOf } from '../../helpers/truss.js';
import {
  NESTED_CUBES,
  NESTED_TETRAHEDRA,
  type RankineCase,
  SIXTEEN_CELL,
  TWISTED_CUBE,
} from '../../published/rankine-cases.js';

const SIZE = 250;
/** An oblique turn, so that rounding spares no coordinate. */
const turn = (p: Vec3): Vec3 => {
  const k: Vec3 = scale([2, 3, 6], 1 / 7);
  const [c, s] = [Math.cos(0.8), Math.sin(0.8)];
  return addScaled(add(scale(p, c), scale(cross(k, p), s)), k, dot(k, p) * (1 - c));
};
const round = (x: number, digits: number): number => Math.round(x * 10 ** digits) / 10 ** digits;

/** A published figure, 500 mm across, and the same as a file with few digits has it. */
function exported(c: RankineCase, digits: number): { exact: Truss; rounded: Truss } {
  const base = trussOf({ nodes: c.nodes, edges: c.edges, faces: c.faces, forces: c.forces.map((t) => 50 * t) });
  const exact = mapped(base, (p) => scale(turn(p), SIZE));
  const rounded = {
    ...mapped(exact, (p) => [round(p[0], digits), round(p[1], digits), round(p[2], digits)]),
    members: exact.members.map((m) => ({ ...m, force: round(m.force!, digits) })),
  };
  return { exact, rounded };
}

/** Both conditions measured anew, by none of the equations that the mending used. */
function measure(truss: Truss): { flatness: number; relative: number } {
  const topology = topologyOf(truss);
  return {
    flatness: Math.max(...truss.faces.map((f) => fitPlane(f.nodes.map((n) => topology.at(n)))!.flatness)),
    relative: equilibriumOf(topology, givenForces(truss).forces!, defaultJob().fit).maxRelative,
  };
}

describe.each([NESTED_TETRAHEDRA, NESTED_CUBES, SIXTEEN_CELL])('$name, exported with few digits', (c) => {
  it.each([1, 2, 3])('%i digits: flat and in balance again, by moves no larger than the rounding', (digits) => {
    const { exact, rounded } = exported(c, digits);
    const before = measure(rounded);
    expect(before.relative).toBeGreaterThan(1e-9);
    const result = mend(rounded);
    expect(result.findings).toEqual([]);
    const after = measure(result.truss);
    expect(after.flatness).toBeLessThan(1e-8);
    expect(after.relative).toBeLessThan(1e-9);
    // The exact figure is one that meets the conditions, so the least movement is no larger than the way back to it.
    const squares = (a: Truss, b: Truss): number =>
      a.nodes.reduce((sum, n, i) => sum + [0, 1, 2].reduce((s, k) => s + (n.at[k]! - b.nodes[i]!.at[k]!) ** 2, 0), 0);
    const topology = topologyOf(rounded);
    const unit = topology.axisLength.reduce((a, b) => a + b, 0) / topology.axisLength.length;
    const largest = Math.max(...rounded.members.map((m) => Math.abs(m.force!)));
    const cost = (t: Truss): number =>
      squares(t, rounded) / unit ** 2 +
      t.members.reduce((sum, m, i) => sum + ((m.force! - rounded.members[i]!.force!) / largest) ** 2, 0);
    expect(cost(result.truss)).toBeLessThanOrEqual(cost(exact) * (1 + 1e-4));
  });
});

it('what is exact already does not move', () => {
  const { exact } = exported(SIXTEEN_CELL, 3);
  const result = mend(exact, { tolerance: 1e-10 });
  expect(result.done).toBe(true);
  expect(result.movements).toEqual([]);
  expect(result.truss.nodes).toEqual(exact.nodes);
});

it('supports and chosen nodes stay', () => {
  const { rounded } = exported(NESTED_CUBES, 2);
  const truss: Truss = { ...rounded, supports: [{ node: 'N0', fixed: { x: false, y: false, z: true } }] };
  const result = mend(truss, { keep: ['N3', 'N9'] });
  expect(result.done).toBe(true);
  const moved = result.movements.map((m) => m.node);
  expect(moved.length).toBeGreaterThan(4);
  for (const mark of ['N0', 'N3', 'N9']) expect(moved).not.toContain(mark);
});

it('flatness alone leaves forces, equilibrium alone leaves faces, and forces can be kept', () => {
  const { rounded } = exported(NESTED_TETRAHEDRA, 2);
  const flat = mend(rounded, { what: 'flatness' });
  expect(flat.after.flatness).toBeLessThan(1e-8);
  expect(flat.truss.members).toEqual(rounded.members);
  const balanced = mend(rounded, { what: 'equilibrium' });
  expect(balanced.after.residual).toBeLessThan(1e-8);
  expect(balanced.after.flatness).toBeGreaterThan(1e-4);
  // Forces to be kept must be such as some form near by balances: here the exact ones.
  const { members } = exported(NESTED_TETRAHEDRA, 2).exact;
  const kept = mend({ ...rounded, members }, { forceChange: 'keep' });
  expect(kept.done).toBe(true);
  expect(kept.truss.members).toEqual(members);
  expect(measure(kept.truss).relative).toBeLessThan(1e-9);
});

it('a form that rounding does not explain is refused: it comes back as it was, with the node and the way it would go', () => {
  const truss = mapped(trussOf({ ...TWISTED_CUBE, forces: NESTED_CUBES.forces, cells: [] }), (p) => scale(p, SIZE));
  const result = mend(truss);
  expect(result.done).toBe(false);
  expect(result.truss).toBe(truss);
  expect(result.findings).toMatchObject([{ code: 'mend-not-within-bound', level: 'stop', limit: 0.5 }]);
  const farthest = Math.max(...result.movements.map((m) => m.distance));
  expect(result.findings[0]!.value).toBe(farthest);
  expect(farthest).toBeGreaterThan(10);
  // Allowed, it goes there: the faces come flat and the forces balance.
  const allowed = mend(truss, { bound: 50 });
  expect(allowed.done).toBe(true);
  expect(measure(allowed.truss)).toMatchObject({ flatness: expect.closeTo(0, 7), relative: expect.closeTo(0, 8) });
});

it('forces that no small change balances are refused', () => {
  const { exact } = exported(NESTED_CUBES, 3);
  const wrong = { ...exact, members: exact.members.map((m, i) => (i === 3 ? { ...m, force: -m.force! } : m)) };
  const { done, findings } = mend(wrong);
  expect(done).toBe(false);
  expect(findings.length).toBeGreaterThan(0);
});

it('a twisted square comes flat by a quarter of its warp at each corner', () => {
  // Corners at heights h, 0, 0, 0: the warp is (h, -h, h, -h) / 4, the rest is a tilt.
  const truss = trussOf({
    nodes: [
      [0, 0, 0.4],
      [100, 0, 0],
      [100, 100, 0],
      [0, 100, 0],
    ],
    edges: [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
    ],
    faces: [[0, 1, 2, 3]],
  });
  const { movements, done } = mend(truss);
  expect(done).toBe(true);
  for (const m of movements) expect(m.distance).toBeCloseTo(0.1, 5);
});

it('balances loads on supports: a tripod whose apex was rounded', () => {
  const r = 137.7;
  const truss = trussOf({
    nodes: [
      [0.03, -0.02, 300],
      [r, 0, 0],
      [-r / 2, (r * Math.sqrt(3)) / 2, 0],
      [-r / 2, (-r * Math.sqrt(3)) / 2, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
    // t = -P L / 3 h for the upright tripod.
    forces: Array(3).fill((-30 * Math.hypot(r, 300)) / 900),
    supports: [
      [1, 'xyz'],
      [2, 'xyz'],
      [3, 'xyz'],
    ],
    loads: [[0, [0, 0, -30]]],
  });
  const result = mend(truss, { forceChange: 'keep' });
  expect(result.done).toBe(true);
  const apex = result.truss.nodes[0]!.at;
  expect(apex[0]).toBeCloseTo(0, 6);
  expect(apex[1]).toBeCloseTo(0, 6);
  expect(apex[2]).toBeCloseTo(300, 6);
});

it('the force diagram of the file follows: its polygons are square to the mended struts', () => {
  const { rounded } = exported(NESTED_CUBES, 2);
  const mark = (i: number): string => (i === NESTED_CUBES.outside ? 'outside' : `C${i}`);
  const truss: Truss = {
    ...rounded,
    cells: NESTED_CUBES.cells.map((faces, i) => ({ mark: mark(i), faces: faces.map((f) => `F${f}`) })),
    reciprocal: {
      newtonPerArea: 50,
      vertices: NESTED_CUBES.vertices.map((at, i) => ({ cell: mark(i), at: turn(at) })),
    },
  };
  const angle = (t: Truss): number => reciprocalOf(topologyOf(t), defaultJob()).residuals!.maxAngle;
  expect(angle(truss)).toBeGreaterThan(1e-6);
  const result = mend(truss);
  expect(angle(result.truss)).toBeLessThan(1e-9);
});

it('with every node kept and forces kept there is nothing to change: not reached, said so', () => {
  const { rounded } = exported(NESTED_CUBES, 1);
  const result = mend(rounded, { keep: rounded.nodes.map((n) => n.mark), forceChange: 'keep' });
  expect(result.done).toBe(false);
  expect(result.findings).toMatchObject([{ code: 'mend-not-reached' }]);
  // A strut whose force is nought and an outer force that nothing takes: the equations hold no unknown with a coefficient.
  const lone = trussOf({
    nodes: [
      [0, 0, 0],
      [10, 0, 0],
    ],
    edges: [[0, 1]],
    forces: [0],
    loads: [[0, [0, 0, 1]]],
  });
  expect(mend(lone, { forceChange: 'keep' }).findings).toMatchObject([{ code: 'mend-not-reached' }]);
});
