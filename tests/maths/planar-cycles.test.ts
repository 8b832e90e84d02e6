import { describe, expect, it } from 'vitest';
import { planarCycles } from '../../src/maths/planar-cycles.js';
import type { Vec3 } from '../../src/maths/vec3.js';

type Figure = { points: Vec3[]; edges: [number, number][] };
const cube: Figure = {
  points: [0, 1, 2, 3, 4, 5, 6, 7].map((i) => [i & 1, (i >> 1) & 1, (i >> 2) & 1]),
  edges: [0, 1, 2, 3, 4, 5, 6, 7].flatMap((i) =>
    [1, 2, 4].filter((b) => !(i & b)).map((b): [number, number] => [i, i | b]),
  ),
};
const grid = (n: number): Figure => ({
  points: Array.from({ length: n * n }, (_, i): Vec3 => [i % n, Math.floor(i / n), 0]),
  edges: Array.from({ length: n * n }, (_, i) => i).flatMap((i) => [
    ...(i % n < n - 1 ? [[i, i + 1] as [number, number]] : []),
    ...(i < n * n - n ? [[i, i + n] as [number, number]] : []),
  ]),
});
const golden = (1 + Math.sqrt(5)) / 2;
/** Vertices by the even permutations of (0, ±1, ±golden); edges are the pairs at distance 2 (Coxeter, Regular Polytopes). */
const icosahedron: Figure = (() => {
  const points = [0, 1, 2].flatMap((k) =>
    [-1, 1].flatMap((a) =>
      [-1, 1].map((b) => [0, 1, 2].map((i) => [0, a, b * golden][(i + k) % 3]!) as unknown as Vec3),
    ),
  );
  const edges: [number, number][] = [];
  const near = (p: Vec3, q: Vec3): boolean => Math.abs(Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]) - 2) < 1e-9;
  for (let j = 0; j < points.length; j++)
    for (let i = 0; i < j; i++) if (near(points[i]!, points[j]!)) edges.push([i, j]);
  return { points, edges };
})();

const sides = (f: Figure): Record<number, number> => {
  const count: Record<number, number> = {};
  for (const loop of planarCycles(f.points, f.edges, 1e-4)) count[loop.length] = (count[loop.length] ?? 0) + 1;
  return count;
};

describe('planar minimal cycles', () => {
  it('of a cube are its six squares', () => expect(sides(cube)).toEqual({ 4: 6 }));
  it('of a grid of 6 by 6 points are its 25 cells, not the unions of cells', () =>
    expect(sides(grid(6))).toEqual({ 4: 25 }));
  // 20 triangles, and the 12 pentagons round its vertices (the planes that cut it, as of a pentagonal antiprism).
  it('of an icosahedron are its 20 triangles and the 12 pentagons under its points', () =>
    expect(sides(icosahedron)).toEqual({ 3: 20, 5: 12 }));
  it('of a tree, a straight run, nothing are none', () => {
    expect(
      planarCycles(
        [
          [0, 0, 0],
          [1, 0, 0],
          [2, 0, 0],
        ],
        [
          [0, 1],
          [1, 2],
        ],
        1e-4,
      ),
    ).toEqual([]);
    expect(planarCycles([], [], 1e-4)).toEqual([]);
  });
  it('with a dead end inside are still there; a node that is tied in divides them', () => {
    const square: Vec3[] = [
      [0, 0, 0],
      [4, 0, 0],
      [4, 4, 0],
      [0, 4, 0],
      [2, 1, 0],
    ];
    const round: [number, number][] = [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
    ];
    expect(planarCycles(square, [...round, [0, 4]], 1e-4)).toEqual([[0, 1, 2, 3]]);
    expect(planarCycles(square, [...round, [0, 4], [1, 4]], 1e-4)).toEqual([
      [0, 1, 4],
      [0, 3, 2, 1, 4],
    ]);
  });
  it('do not depend on the place, the size or the numbering of the figure', () => {
    const order = [3, 7, 0, 5, 1, 6, 2, 4];
    const moved: Figure = {
      points: order.map((i) => {
        const [x, y, z] = cube.points[i]!;
        return [1e4 + 300 * (0.6 * x - 0.8 * z), 300 * y - 7, 300 * (0.8 * x + 0.6 * z)];
      }),
      edges: cube.edges.map(([a, b]) => [order.indexOf(b), order.indexOf(a)]),
    };
    expect(sides(moved)).toEqual({ 4: 6 });
  });
});
