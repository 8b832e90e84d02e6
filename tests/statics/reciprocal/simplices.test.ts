import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { topologyOf } from '../../../src/model/topology.js';
import type { Truss } from '../../../src/model/truss.js';
import { complexOf, givenCells } from '../../../src/statics/reciprocal/complex.js';
import { functionSpace } from '../../../src/statics/reciprocal/function-space.js';
import { quadraticForces } from '../../../src/statics/reciprocal/quadratic-forces.js';
import { reciprocalOf } from '../../../src/statics/reciprocal/reciprocal.js';
import { trussOf } from '../../helpers/truss.js';

/** A cube of n³ cells, each cut into six tetrahedra about its long diagonal, its inner nodes shaken. */
function kuhn(n: number): Truss {
  const random = seededRandom(n);
  const id = (i: number, j: number, k: number): number => (i * (n + 1) + j) * (n + 1) + k;
  const nodes: number[][] = [];
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++)
      for (let k = 0; k <= n; k++) {
        const inner = [i, j, k].every((v) => v > 0 && v < n);
        nodes.push([i, j, k].map((v) => 100 * (v + (inner ? 0.4 * (random() - 0.5) : 0))));
      }
  const [faceOf, edgeOf] = [new Map<string, number>(), new Map<string, number>()];
  const [faces, edges, cells]: number[][][] = [[], [], []];
  const put = (list: number[][], index: Map<string, number>, item: number[]): number => {
    const key = [...item].sort((a, b) => a - b).join(' ');
    if (!index.has(key)) {
      index.set(key, list.length);
      list.push(item);
    }
    return index.get(key)!;
  };
  const orders = ['012', '021', '102', '120', '201', '210'].map((o) => [...o].map(Number));
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++)
      for (let k = 0; k < n; k++)
        for (const order of orders) {
          const at = [i, j, k];
          const t = [id(i, j, k)];
          for (const axis of order) {
            at[axis]!++;
            t.push(id(at[0]!, at[1]!, at[2]!));
          }
          const corner = (...c: number[]): number[] => c.map((v) => t[v]!);
          cells!.push(
            [
              [0, 1, 2],
              [0, 1, 3],
              [0, 2, 3],
              [1, 2, 3],
            ].map((f) => put(faces!, faceOf, corner(...f))),
          );
          for (const e of [
            [0, 1],
            [0, 2],
            [0, 3],
            [1, 2],
            [1, 3],
            [2, 3],
          ])
            put(edges!, edgeOf, corner(...e));
        }
  return trussOf({ nodes, edges: edges!, faces: faces!, cells: cells! });
}

it.each([2, 3, 4, 5])('over tetrahedra a function is its heights at the inner nodes: a cube of %i', (n) => {
  // Outside one linear function, which may be taken as nought; so (n - 1)³ heights are free, few or many.
  const topology = topologyOf(kuhn(n));
  const { complex, findings } = complexOf(topology, givenCells(topology));
  expect(findings).toEqual([]);
  const space = functionSpace(topology, complex!);
  expect(space.dimension).toBe((n - 1) ** 3);
  // Every diagram of the space balances every node: the forces of an arbitrary one.
  const q = quadraticForces(topology, complex!, space.basis);
  const a = q.gradients(Float64Array.from({ length: q.size }, (_, m) => Math.sin(m + 1)));
  const t = q.polarised(a, a);
  const sums = new Float64Array(3 * topology.truss.nodes.length);
  let largest = 0;
  complex!.member.forEach((m, e) => {
    largest = Math.max(largest, Math.abs(t[e]!));
    const { ends } = topology.truss.members[m]!;
    ends.forEach((mark, end) => {
      const i = topology.nodeIndex.get(mark)!;
      const bar = topology.barsAt[i]!.find((b) => b.memberIndex === m && b.end === end)!;
      for (let k = 0; k < 3; k++) sums[3 * i + k]! += t[e]! * bar.direction[k]!;
    });
  });
  expect(Math.max(...sums.map(Math.abs))).toBeLessThan(1e-9 * largest);
});

it('a point anywhere in any tetrahedron: forces are the null vector of the equilibrium matrix (dense, ml-matrix)', () => {
  const random = seededRandom(17);
  for (let round = 0; round < 25; round++) {
    const hull = Array.from({ length: 4 }, () => [random(), random(), random()].map((v) => 900 * v));
    const weights = Array.from({ length: 4 }, () => 0.1 + random());
    const total = weights.reduce((a, b) => a + b, 0);
    const inside = [0, 1, 2].map((k) => hull.reduce((sum, p, i) => sum + (weights[i]! * p[k]!) / total, 0));
    const truss = trussOf({
      nodes: [...hull, inside],
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
      faces: [
        [0, 1, 2],
        [0, 1, 3],
        [0, 2, 3],
        [1, 2, 3],
        [0, 1, 4],
        [0, 2, 4],
        [0, 3, 4],
        [1, 2, 4],
        [1, 3, 4],
        [2, 3, 4],
      ],
      cells: [
        [0, 4, 5, 7],
        [1, 4, 6, 8],
        [2, 5, 6, 9],
        [3, 7, 8, 9],
      ],
    });
    const topology = topologyOf(truss);
    const job = { ...defaultJob(), forces: { ...defaultJob().forces, sign: 1 as const, largest_N: 1 } };
    const forces = [...reciprocalOf(topology, job).forces!];
    const a = Matrix.zeros(15, 10);
    topology.barsAt.forEach((bars, i) => {
      for (const bar of bars) for (let k = 0; k < 3; k++) a.set(3 * i + k, bar.memberIndex, bar.direction[k]!);
    });
    const v = new SingularValueDecomposition(a).rightSingularVectors.getColumn(9);
    const scale = forces.reduce((sum, t, m) => sum + t * v[m]!, 0);
    forces.forEach((t, m) => {
      expect(t).toBeCloseTo(scale * v[m]!, 8);
    });
    // Hull and spokes pull against each other, whichever way.
    expect(Math.sign(forces[0]!)).toBe(-Math.sign(forces[6]!));
  }
});
