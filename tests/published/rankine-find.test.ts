import { describe, expect, it } from 'vitest';
import { dot, length, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';
import type { ForceDiagram } from '../../src/model/force-diagram.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { reciprocalOf } from '../../src/statics/reciprocal/reciprocal.js';
import { mapped, trussOf } from '../helpers/truss.js';
import { K5, NESTED_CUBES, NESTED_TETRAHEDRA, type RankineCase, SIXTEEN_CELL, TWISTED_CUBE } from './rankine-cases.js';

type Wishes = Partial<Job['forces']>;
const job = (wishes: Wishes): Job => ({ ...defaultJob(), forces: { ...defaultJob().forces, ...wishes } });

/** The case with its bounded cells and no forces. */
function bare(c: Pick<RankineCase, 'nodes' | 'edges' | 'faces' | 'cells'>, outside = 0): Truss {
  const truss = trussOf({ nodes: c.nodes, edges: c.edges, faces: c.faces, cells: c.cells });
  return { ...truss, cells: truss.cells.filter((_, i) => i !== outside) };
}
const find = (truss: Truss, wishes: Wishes = {}, analysed: number[] | null = null) =>
  reciprocalOf(topologyOf(truss), job(wishes), analysed && Float64Array.from(analysed));
const near = (a: ArrayLike<number>, b: readonly number[], digits = 9): void => {
  expect(a.length).toBe(b.length);
  b.forEach((v, i) => {
    expect(a[i]).toBeCloseTo(v, digits);
  });
};
const largest = (forces: readonly number[]): number => Math.max(...forces.map(Math.abs));

describe.each([K5, NESTED_TETRAHEDRA, NESTED_CUBES])('$name', (c) => {
  it('has one function over its cells and one state of self-stress, which it reaches', () => {
    const { counts } = find(bare(c), { sign: 1, largest_N: 1 });
    expect(counts).toMatchObject({ dimension: c.dimension, selfStressStates: c.selfStress, reached: 1 });
  });

  it('finds the published forces from faces and cells alone, by sign and scale', () => {
    const result = find(bare(c), { sign: 1, largest_N: largest(c.forces) });
    expect(result.findings).toEqual([]);
    near(result.forces!, c.forces);
    expect(result.residuals!.maxResidual).toBeLessThan(1e-12 * largest(c.forces) * 100);
  });

  it('keeps the other sign when the job says so', () => {
    near(
      find(bare(c), { sign: -1, largest_N: largest(c.forces) }).forces!,
      c.forces.map((t) => -t),
    );
  });

  it('takes sign and scale from one fixed force', () => {
    const result = find(bare(c), { fix: [{ strut: 'S0', force_N: 5 * c.forces[0]! }] });
    near(
      result.forces!,
      c.forces.map((t) => 5 * t),
      7,
    );
    expect(result.decidedBy).toBe('fixed forces');
  });

  it('stops without a sign, and without a scale', () => {
    expect(find(bare(c)).findings).toMatchObject([{ code: 'reciprocal-unsigned', level: 'stop' }]);
    expect(find(bare(c), { sign: 1 }).findings).toMatchObject([{ code: 'reciprocal-unscaled', level: 'stop' }]);
  });

  it('keeps force densities up to one factor under an affine map of the form', () => {
    // Self-stress as force densities t / L is an affine invariant (linear equations in the coordinates), and an affine image
    // of a plane-faced figure is plane-faced.
    const affine = (p: Vec3): Vec3 => [
      2 * p[0] + 0.3 * p[1] - p[2] + 5,
      0.7 * p[1] + 0.2 * p[0],
      1.5 * p[2] - 0.4 * p[1],
    ];
    const density = (truss: Truss): number[] => {
      const topology = topologyOf(truss);
      const { forces } = reciprocalOf(topology, job({ sign: 1, largest_N: 1 }));
      return [...forces!].map((t, i) => t / topology.axisLength[i]!);
    };
    const [a, b] = [density(bare(c)), density(mapped(bare(c), affine))];
    const ratio = b[0]! / a[0]!;
    near(
      b,
      a.map((v) => v * ratio),
      9,
    );
  });
});

describe('the 16-cell: a family of diagrams', () => {
  const topology = topologyOf(bare(SIXTEEN_CELL));

  it('has 4 independent functions, 6 states of self-stress, all of which its diagrams span', () => {
    const { counts, findings, forces } = find(bare(SIXTEEN_CELL), { sign: 1, largest_N: 1 });
    expect(counts).toMatchObject({ dimension: 4, selfStressStates: 6, reached: 6 });
    expect(forces).toBeNull();
    expect(findings).toMatchObject([{ code: 'reciprocal-undecided', level: 'stop', value: 4 }]);
  });

  it('comes back to the published forces when they are given', () => {
    const given = { ...bare(SIXTEEN_CELL), members: trussOf(SIXTEEN_CELL).members };
    const result = find(given, { source: 'reciprocal' });
    expect(result.findings).toEqual([]);
    expect(result.decidedBy).toBe('given forces');
    near(result.forces!, SIXTEEN_CELL.forces, 8);
    near(
      result.comparisons[0]!.difference,
      SIXTEEN_CELL.forces.map(() => 0),
      8,
    );
  });

  it('is not moved off a diagram by noise that no diagram has, more than that noise', () => {
    const noisy = SIXTEEN_CELL.forces.map((t, i) => t + 0.01 * Math.sin(7 * i));
    const result = find(bare(SIXTEEN_CELL), {}, noisy);
    expect(result.decidedBy).toBe('analysed forces');
    const miss = [...result.forces!].map((t, i) => t - noisy[i]!);
    const published = SIXTEEN_CELL.forces.map((t, i) => t - noisy[i]!);
    expect(Math.hypot(...miss)).toBeLessThanOrEqual(Math.hypot(...published) * (1 + 1e-9));
    expect(result.residuals!.maxResidual).toBeLessThan(1e-12);
  });

  it('meets forces that the job fixes', () => {
    const fix = [0, 9, 17, 21].map((i) => ({ strut: `S${i}`, force_N: SIXTEEN_CELL.forces[i]! }));
    const { forces, findings } = find(bare(SIXTEEN_CELL), { fix });
    expect(findings).toEqual([]);
    for (const { strut, force_N } of fix) expect(forces![topology.memberIndex.get(strut)!]).toBeCloseTo(force_N, 8);
  });
});

it('the twisted cube has no diagram: dimension 0, twisted faces named, forces left to others', () => {
  const { counts, findings, forces } = find(bare(TWISTED_CUBE), { sign: 1, largest_N: 1 });
  expect(counts).toMatchObject({ dimension: 0, selfStressStates: 0, reached: 0 });
  // Independent solution: rank 32 of 32 struts, so s = 0.
  expect(forces).toBeNull();
  const last = findings.at(-1)!;
  expect(last).toMatchObject({ code: 'no-reciprocal', value: 0 });
  expect(findings.filter((f) => f.code === 'face-too-twisted').length).toBeGreaterThan(0);
});

/** Whether the vertices of a found diagram are those published, up to a move, a turn by half and a scale of their own. */
function shapeOf(diagram: ForceDiagram): number[] {
  const at = diagram.vertices.map((v) => v.at);
  return at.flatMap((p, i) => at.slice(i + 1).map((q) => length(subtract(p, q))));
}

it('the diagram of a point in a regular tetrahedron is a regular tetrahedron with its centre', () => {
  const { diagram } = find(bare(K5), { sign: 1, largest_N: 2 * Math.sqrt(3) });
  // Edges sqrt 8 and radii sqrt 3, as the gradients (+-1, +-1, +-1) of the four inner cells say.
  const sizes = shapeOf(diagram!).sort((a, b) => a - b);
  near(sizes, [...Array(4).fill(Math.sqrt(3)), ...Array(6).fill(Math.sqrt(8))]);
});

describe('loads as cells open to the outside', () => {
  // The inner cube of a cube in a cube, its eight spokes read as loads of 2 sqrt 3 along the diagonals: +2 in every edge
  // (resolve a corner: 3 equal edges square to each other carry (2, 2, 2)).
  const corner = [0, 1, 2, 3, 4, 5, 6, 7].map(
    (i): Vec3 => [i & 4 ? 0.5 : -0.5, i & 2 ? 0.5 : -0.5, i & 1 ? 0.5 : -0.5],
  );
  const cube = (loads: readonly (readonly [number, Vec3])[]): Truss =>
    trussOf({
      nodes: corner,
      edges: [
        [0, 1],
        [0, 2],
        [0, 4],
        [1, 3],
        [1, 5],
        [2, 3],
        [2, 6],
        [3, 7],
        [4, 5],
        [4, 6],
        [5, 7],
        [6, 7],
      ],
      faces: [
        [0, 1, 3, 2],
        [4, 5, 7, 6],
        [0, 1, 5, 4],
        [2, 3, 7, 6],
        [0, 2, 6, 4],
        [1, 3, 7, 5],
      ],
      cells: [[0, 1, 2, 3, 4, 5]],
      loads,
    });

  it('a cube pulled at its corners along the diagonals', () => {
    const result = find(cube(corner.map((p, i) => [i, scale(p, 4)] as const)));
    expect(result.findings).toEqual([]);
    near(result.forces!, Array(12).fill(2));
    expect(result.decidedBy).toBe('loads');
    // One bounded cell and six open ones.
    expect(result.counts!.cells).toBe(7);
    // Each corner's polyhedron: three strut polygons and the load's, whose area is the load, along it.
    for (const [i, node] of result.diagram!.nodes.entries()) {
      const load = node.faces.find((f) => f.strut === null)!;
      expect(node.faces.length).toBe(4);
      expect(length(load.area)).toBeCloseTo(2 * Math.sqrt(3), 9);
      expect(Math.abs(dot(load.area, scale(corner[i]!, 1 / length(corner[i]!))))).toBeCloseTo(2 * Math.sqrt(3), 9);
      expect(length(node.closure)).toBeLessThan(1e-12);
      expect(length(node.residual)).toBeLessThan(1e-9);
    }
  });

  it('pressed instead of pulled, every edge is in compression: loads fix the sign', () => {
    near(find(cube(corner.map((p, i) => [i, scale(p, -4)] as const))).forces!, Array(12).fill(-2));
  });

  it('loads that the cube cannot carry are missed, and said to be', () => {
    const result = find(cube([[0, [0, 0, -1]]]));
    expect(result.findings.map((f) => f.code)).not.toEqual([]);
  });
});
