import { expect, it } from 'vitest';
import { crossingFindings } from '../../src/detailing/crossings.js';
import { segmentDistance } from '../../src/maths/segment-distance.js';
import { topologyOf } from '../../src/model/topology.js';
import { trussOf } from '../helpers/truss.js';

const crossings = (nodes: number[][], edges: number[][], radii?: number[]) =>
  crossingFindings(topologyOf(trussOf({ nodes, edges })), radii ? Float64Array.from(radii) : null).map((f) => [
    f.code,
    f.subject,
    f.about?.['other'] ?? f.about?.['strut'] ?? null,
    f.value,
  ]);

const X = [
  [0, 0, 0],
  [100, 100, 0],
  [100, 0, 0],
  [0, 100, 0],
];

it('two diagonals of a square cross in its middle', () => {
  expect(
    crossings(X, [
      [0, 1],
      [2, 3],
    ]),
  ).toEqual([['struts-cross', 'S0', 'S1', 0]]);
});

it('diagonals 5 mm apart cross only for rods thick enough to touch', () => {
  const lifted = X.map(([x, y], i) => [x!, y!, i < 2 ? 0 : 5]);
  expect(
    crossings(lifted, [
      [0, 1],
      [2, 3],
    ]),
  ).toEqual([]);
  expect(
    crossings(
      lifted,
      [
        [0, 1],
        [2, 3],
      ],
      [2, 2],
    ),
  ).toEqual([]);
  expect(
    crossings(
      lifted,
      [
        [0, 1],
        [2, 3],
      ],
      [3, 3],
    ),
  ).toEqual([['struts-cross', 'S0', 'S1', 5]]);
});

it('a node on a strut is named as such, once, and a node without struts as free', () => {
  const nodes = [
    [0, 0, 0],
    [100, 0, 0],
    [50, 0, 0],
    [50, 80, 0],
    [7, 7, 7],
  ];
  expect(
    crossings(nodes, [
      [0, 1],
      [2, 3],
    ]),
  ).toEqual([
    ['node-free', 'N4', null, null],
    ['node-on-strut', 'N2', 'S0', 0],
  ]);
});

it('struts that share a node do not cross', () => {
  expect(
    crossings(
      X.slice(0, 3),
      [
        [0, 1],
        [1, 2],
        [2, 0],
      ],
      [8, 8, 8],
    ),
  ).toEqual([]);
});

it('distance of two segments agrees with a fine sampling of both', () => {
  // The oracle is brute force over a grid of pairs of points; it can only find larger distances.
  const cases = [
    [
      [0, 0, 0],
      [10, 1, 2],
      [3, 8, 1],
      [9, -4, 6],
    ],
    [
      [0, 0, 0],
      [10, 0, 0],
      [12, 3, 0],
      [20, 3, 4],
    ],
    [
      [0, 0, 0],
      [10, 0, 0],
      [2, 1, 0],
      [8, 1, 0],
    ],
  ] as const;
  for (const [a, b, c, d] of cases) {
    let least = Number.POSITIVE_INFINITY;
    for (let i = 0; i <= 400; i++) {
      for (let j = 0; j <= 400; j++) {
        const [s, t] = [i / 400, j / 400];
        least = Math.min(
          least,
          Math.hypot(...[0, 1, 2].map((k) => a[k]! + s * (b[k]! - a[k]!) - c[k]! - t * (d[k]! - c[k]!))),
        );
      }
    }
    const found = segmentDistance(a, b, c, d).distance;
    expect(found).toBeLessThanOrEqual(least + 1e-12);
    expect(found).toBeGreaterThan(least - 0.02);
  }
});
