import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { PinFigure } from '../../src/statics/pin-figure.js';
import { countStates } from '../../src/statics/state-counts.js';
import { anyRotation, QUARTER_TURNS, turned, turnedHeld } from './motions.js';

/** A free figure in space. */
function figure(
  points: readonly (readonly number[])[],
  bars: readonly (readonly [number, number])[],
  fixed: readonly number[] = [],
): PinFigure {
  const held = new Uint8Array(3 * points.length);
  for (const f of fixed) held[f] = 1;
  return { nodes: Float64Array.from(points.flat()), ends: Int32Array.from(bars.flat()), fixed: held };
}
const complete = (n: number): [number, number][] =>
  Array.from({ length: n }, (_, i) =>
    Array.from({ length: n - i - 1 }, (_, j) => [i, i + j + 1] as [number, number]),
  ).flat();
const byDistance = (points: readonly (readonly number[])[], most: number): [number, number][] =>
  complete(points.length).filter(([a, b]) => Math.hypot(...points[a].map((v, k) => v - points[b][k])) <= most);

const CUBE = [0, 1].flatMap((x) => [0, 1].flatMap((y) => [0, 1].map((z) => [x, y, z])));
const OCTAHEDRON = [
  [1, 0, 0],
  [-1, 0, 0],
  [0, 1, 0],
  [0, -1, 0],
  [0, 0, 1],
  [0, 0, -1],
];
const G = (1 + Math.sqrt(5)) / 2;
const ICOSAHEDRON = [-1, 1].flatMap((a) =>
  [-G, G].flatMap((b) => [
    [0, a, b],
    [a, b, 0],
    [b, 0, a],
  ]),
);
/** Diagonals of the cube's faces between corners of even parity make the tetrahedron; those of odd parity are the others. */
const even = (p: readonly number[]): boolean => (p[0] + p[1] + p[2]) % 2 === 0;
const faceDiagonals = byDistance(CUBE, 1.5).filter(
  ([a, b]) => Math.hypot(...CUBE[a].map((v, k) => v - CUBE[b][k])) > 1.1,
);

const bananas = (() => {
  const [top, bottom] = [
    [0, 0, 2],
    [0, 0, -2],
  ];
  const left = [
    [1, 0.3, 0.1],
    [2, -0.2, -0.1],
    [1.4, 0.9, 0.2],
  ];
  const right = left.map(([x, y, z]) => [-x, y + 0.13, z - 0.07]);
  const points = [top, bottom, ...left, ...right];
  const bars: [number, number][] = [];
  for (const group of [
    [2, 3, 4],
    [5, 6, 7],
  ]) {
    for (const i of group) bars.push([0, i], [1, i]);
    bars.push([group[0], group[1]], [group[1], group[2]], [group[0], group[2]]);
  }
  return figure(points, bars);
})();

const bipartite = (points: readonly (readonly number[])[]): PinFigure =>
  figure(
    points,
    [0, 1, 2, 3].flatMap((a) => [4, 5, 6, 7, 8, 9].map((b) => [a, b] as [number, number])),
  );
const onEllipsoid = Array.from({ length: 10 }, (_, i) => {
  const [u, v] = [1.7 * i + 0.3, 0.9 * i * i + 0.2];
  return [1.5 * Math.cos(u) * Math.cos(v), 1.1 * Math.sin(u) * Math.cos(v), 0.8 * Math.sin(v)];
});
const generic = onEllipsoid.map((p, i) => p.map((x, k) => x * (1 + 0.13 * Math.sin(3 * i + 2 * k + 1))));

/** A prism of n sides with struts, top turned by 90° - 180°/n against the bottom; force densities vertical 1, strut -1, horizontal 1/(2 sin(π/n)). */
function prism(n: number): PinFigure {
  const twist = Math.PI / 2 - Math.PI / n;
  const points = [0, 1].flatMap((top) =>
    Array.from({ length: n }, (_, i) => {
      const a = (2 * Math.PI * i) / n + top * twist;
      return [Math.cos(a), Math.sin(a), 1.3 * top];
    }),
  );
  const bars: [number, number][] = [];
  for (let i = 0; i < n; i++) bars.push([i, (i + 1) % n], [n + i, n + ((i + 1) % n)]);
  for (let i = 0; i < n; i++) bars.push([i, n + i]); // shorter of the two
  for (let i = 0; i < n; i++) bars.push([i, n + ((i + 1) % n)]);
  return figure(points, bars);
}

const trianglesJoined = (concurrent: boolean): PinFigure => {
  const inner = [
    [1, 0, 0],
    [-0.5, 0.8, 0],
    [-0.5, -0.9, 0],
  ];
  const outer = inner.map(([x, y], i) => [
    2 * x + (concurrent ? 0 : 0.2 * (i - 1)),
    2 * y + (concurrent ? 0 : 0.3 * i),
    0,
  ]);
  const fixed = [0, 1, 2, 3, 4, 5].map((i) => 3 * i + 2);
  return figure(
    [...inner, ...outer],
    [
      [0, 1],
      [1, 2],
      [0, 2],
      [3, 4],
      [4, 5],
      [3, 5],
      [0, 3],
      [1, 4],
      [2, 5],
    ],
    fixed,
  );
};

// Derivable by hand unless a source is named; m without rigid-body freedoms.
const CASES: readonly (readonly [string, PinFigure, number, number, number])[] = [
  [
    'tetrahedron',
    figure(
      [
        [0, 0, 0],
        [1, 0, 0],
        [0.2, 1, 0],
        [0.3, 0.3, 1],
      ],
      complete(4),
    ),
    0,
    0,
    6,
  ],
  ['octahedron', figure(OCTAHEDRON, byDistance(OCTAHEDRON, 1.5)), 0, 0, 6],
  ['cube', figure(CUBE, byDistance(CUBE, 1.1)), 0, 6, 6],
  [
    'cube with one diagonal a face, as a tetrahedron',
    figure(CUBE, [...byDistance(CUBE, 1.1), ...faceDiagonals.filter(([a]) => even(CUBE[a]))]),
    0,
    0,
    6,
  ],
  ['cube with both', figure(CUBE, byDistance(CUBE, 1.5)), 6, 0, 6],
  [
    'complete graph on 5 points',
    figure(
      [
        [0, 0, 0],
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
        [0.3, 0.4, 0.2],
      ],
      complete(5),
    ),
    1,
    0,
    6,
  ],
  ["complete graph on the octahedron's 6 points", figure(OCTAHEDRON, complete(6)), 3, 0, 6],
  [
    'icosahedron (Dehn 1916: convex triangulated polyhedra are stiff)',
    figure(ICOSAHEDRON, byDistance(ICOSAHEDRON, 2.1)),
    0,
    0,
    6,
  ],
  ['two bananas that share two nodes', bananas, 1, 1, 6],
  ['complete bipartite 4, 6 in general position (Bolker and Roth 1980)', bipartite(generic), 0, 0, 6],
  ['complete bipartite 4, 6 on an ellipsoid (Bolker and Roth 1980)', bipartite(onEllipsoid), 1, 1, 6],
  ['two plane triangles joined by three concurrent bars', trianglesJoined(true), 1, 1, 3],
  ['two plane triangles joined by three other bars', trianglesJoined(false), 0, 0, 3],
  ['prism of 3 sides (Tibert and Pellegrino 2003)', prism(3), 1, 1, 6],
  ['prism of 4 sides', prism(4), 1, 3, 6],
  ['prism of 6 sides', prism(6), 1, 7, 6],
];

describe.each(CASES)('%s', (_name, f, s, m, rigid) => {
  it.each([0, 1, 2])('has these states whether turned, scaled or renumbered (way %i)', (seed) => {
    // Plane cases are held out of plane along z and stay so.
    const turn = seed === 0 || rigid < 6 ? [1, 0, 0, 0, 1, 0, 0, 0, 1] : anyRotation(seed);
    const n = f.nodes.length / 3;
    const place = Array.from({ length: n }, (_, i) => (seed === 2 ? (i * 7 + 3) % n : i));
    const distinct = new Set(place).size === n ? place : place.map((_, i) => n - 1 - i);
    const moved = turned(turn, f.nodes, seed === 1 ? 304.8 : 1);
    const nodes = new Float64Array(moved.length);
    const fixed = new Uint8Array(moved.length);
    for (let i = 0; i < n; i++)
      for (let k = 0; k < 3; k++) {
        nodes[3 * distinct[i] + k] = moved[3 * i + k] + (seed === 2 ? 50 : 0);
        fixed[3 * distinct[i] + k] = f.fixed[3 * i + k];
      }
    const c = countStates({ nodes, ends: f.ends.map((e) => distinct[e]), fixed });
    expect([c.selfStressStates, c.mechanisms, c.rigidBody]).toEqual([s, m, rigid]);
    expect(c.mechanismShapes.length).toBe(m);
    for (const z of c.mechanismShapes) expect(z.singularValue).toBeLessThan(1e-9);
    expect(c.rank).toBe(c.bars - s);
  });
});

describe('figures with counts of their own', () => {
  it.each([
    [2, 2, 2],
    [3, 4, 5],
    [4, 4, 4],
  ])('cubic lattice of %i x %i x %i nodes: s = 0, nullity ab + bc + ca with the rigid freedoms', (a, b, c) => {
    const points: number[][] = [];
    for (let i = 0; i < a; i++) for (let j = 0; j < b; j++) for (let k = 0; k < c; k++) points.push([i, j, k]);
    const counts = countStates(figure(points, byDistance(points, 1.1)));
    expect(counts.selfStressStates).toBe(0);
    expect(counts.mechanisms + counts.rigidBody).toBe(a * b + b * c + c * a);
    expect(counts.mechanismShapes.length).toBe(counts.mechanisms);
  });

  it('octahedron with one body diagonal at force 1: eight struts -0.353553, four round the equator +0.353553 as force densities', () => {
    const bars = [...byDistance(OCTAHEDRON, 1.5), [4, 5] as [number, number]];
    const counts = countStates(figure(OCTAHEDRON, bars));
    expect([counts.selfStressStates, counts.mechanisms]).toEqual([1, 0]);
    const t = new Float64Array(13);
    const v = counts.selfStress(0);
    v.indices.forEach((e, k) => {
      t[e] = v.values[k];
    });
    // Node 4: t_d + 4 t / sqrt2 = 0 with t_d = 1 gives t = -sqrt2 / 4 = -0.353553 in its four struts.
    bars.forEach(([a, b], e) => {
      const wanted = e === 12 ? 1 : a < 4 && b < 4 ? 0.353553 : -0.353553;
      expect(t[e] / t[12]).toBeCloseTo(wanted, 6);
    });
  });

  it('prism of 3 sides: force densities vertical : diagonal : horizontal = 1 : -1 : 1/(2 sin(π/n))', () => {
    for (const n of [3, 4, 6]) {
      const f = prism(n);
      const v = countStates(f).selfStress(0);
      const q = new Float64Array(4 * n);
      v.indices.forEach((e, k) => {
        const [a, b] = [3 * f.ends[2 * e], 3 * f.ends[2 * e + 1]];
        q[e] = v.values[k] / Math.hypot(...[0, 1, 2].map((i) => f.nodes[a + i] - f.nodes[b + i]));
      });
      const unit = q[2 * n];
      for (let i = 0; i < n; i++) {
        expect(q[2 * n + i] / unit).toBeCloseTo(1, 9);
        expect(q[3 * n + i] / unit).toBeCloseTo(-1, 9);
        expect(Math.abs(q[2 * i] / unit)).toBeCloseTo(1 / (2 * Math.sin(Math.PI / n)), 9);
      }
    }
  });

  it('two struts of half-span 1 and rise h: least singular value about √2 h; h = 0 gives (1, 1)', () => {
    const strut = (h: number): PinFigure =>
      figure(
        [
          [-1, 0, 0],
          [0, 0, h],
          [1, 0, 0],
        ],
        [
          [0, 1],
          [1, 2],
        ],
        [0, 1, 2, 4, 6, 7, 8],
      );
    const flat = countStates(strut(0));
    expect([flat.selfStressStates, flat.mechanisms, flat.rigidBody]).toEqual([1, 1, 0]);
    for (const h of [1e-2, 1e-4, 1e-6]) {
      const c = countStates(strut(h));
      expect([c.selfStressStates, c.mechanisms]).toEqual([0, 0]);
      expect(c.leastSingularValue! / (Math.SQRT2 * h)).toBeCloseTo(1, 3);
      expect(c.nearMechanisms.length).toBe(h < 5e-4 ? 1 : 0);
    }
  });
});

describe('the standard plane and space cases (Pellegrino and Calladine 1986; Calladine 1978; counts computed with numpy)', () => {
  const cases = JSON.parse(readFileSync(new URL('./cases/counts_maxwell_calladine.json', import.meta.url), 'utf8'));
  // Drawn in mm and in inches, as it stands and turned; a plane case stays in a plane of the axes, so that its supports do.
  const ways = [1, 1 / 25.4].flatMap((mm) => QUARTER_TURNS.map((r) => ({ mm, r })));
  it.each(Object.keys(cases))('%s', (name) => {
    const c = cases[name];
    const plane = c.nodes[0].length === 2;
    const fixed: number[] = c.fixed.map(([n, k]: [number, number]) => 3 * n + k);
    if (plane) fixed.push(...c.nodes.map((_: unknown, n: number) => 3 * n + 2));
    const drawn = figure(
      c.nodes.map((p: number[]) => [p[0], p[1], p[2] ?? 0]),
      c.bars,
      fixed,
    );
    for (const { mm, r } of ways) {
      const counts = countStates({ ...drawn, nodes: turned(r, drawn.nodes, mm), fixed: turnedHeld(r, drawn.fixed) });
      expect(counts.rank).toBe(c.counts.rank);
      expect(counts.selfStressStates).toBe(c.expected.s);
      expect(counts.mechanisms).toBe(c.counts.internal_mechanisms);
      if (c.expected.m !== undefined) expect(counts.mechanisms).toBe(c.expected.m);
      if (c.expected.int !== undefined) expect(counts.mechanisms).toBe(c.expected.int);
      expect(counts.freedoms).toBe(c.counts.dof);
    }
  });
});
