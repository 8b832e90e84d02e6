import { expect, it } from 'vitest';
import { faceForms } from '../../src/detailing/faces.js';
import { add, dot, scale, type Vec3 } from '../../src/maths/vec3.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { mapped, trussOf } from '../helpers/truss.js';

const LIMITS = { flatnessWarn: 0.5, flatnessStop: 1 };
const form = (truss: Truss) => faceForms(topologyOf(truss), LIMITS);
const one = (nodes: Vec3[]): Truss => trussOf({ nodes, edges: [], faces: [nodes.map((_, i) => i)], panels: true });

/** A rotation about an oblique axis and a move. */
const moved = (p: Vec3): Vec3 => {
  const k: Vec3 = scale([1, 2, 2], 1 / 3);
  const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
  const turned: Vec3 = [
    p[0] * c + (k[1] * p[2] - k[2] * p[1]) * s,
    p[1] * c + (k[2] * p[0] - k[0] * p[2]) * s,
    p[2] * c + (k[0] * p[1] - k[1] * p[0]) * s,
  ];
  return add(add(turned, scale(k, dot(k, p) * (1 - c))), [4000, -700, 90]);
};

it('a square with corners alternately h up and h down is out of flat by h, wherever it lies', () => {
  // By symmetry the least-squares plane is the mean plane.
  const h = 0.75;
  const truss = one([
    [0, 0, h],
    [100, 0, -h],
    [100, 100, h],
    [0, 100, -h],
  ]);
  for (const t of [truss, mapped(truss, moved)]) {
    const { forms, findings } = form(t);
    expect(forms[0]!.flatness).toBeCloseTo(h, 9);
    expect(findings).toMatchObject([{ code: 'face-not-flat', level: 'warn', kind: 'panel', limit: 0.5 }]);
  }
  const twice = mapped(truss, (p) => scale(p, 2));
  expect(form(twice).forms[0]!.flatness).toBeCloseTo(2 * h, 9);
  expect(form(twice).findings).toMatchObject([{ code: 'face-not-flat', level: 'stop', limit: 1 }]);
  // Where panels are made it is said what was done about it: not twice.
  const once = (from: number) => faceForms(topologyOf(twice), { ...LIMITS, panelsFrom: from }).findings;
  expect(once(1)).toEqual([]);
  expect(once(2)).toMatchObject([{ code: 'face-not-flat', level: 'stop' }]);
});

it('an upright face is as flat as a level one: distance is square to the plane, not along z', () => {
  const { forms } = form(
    one([
      [0, 0, 0],
      [0, 0, 80],
      [0, 50, 80],
      [0, 50, 0],
    ]),
  );
  expect(forms[0]!.flatness).toBeLessThan(1e-13);
  expect(Math.abs(forms[0]!.normal![0])).toBeCloseTo(1, 14);
  expect(forms[0]!.area).toBeCloseTo(4000, 9);
});

const CUBE = {
  nodes: [0, 1, 2, 3, 4, 5, 6, 7].map((i) => [i & 4 ? 100 : 0, i & 2 ? 100 : 0, i & 1 ? 100 : 0]),
  edges: [],
  // Loops run in either sense on purpose.
  faces: [
    [0, 1, 3, 2],
    [4, 5, 7, 6],
    [0, 4, 5, 1],
    [2, 3, 7, 6],
    [0, 2, 6, 4],
    [1, 3, 7, 5],
  ],
};
const OUTWARD: Vec3[] = [
  [-1, 0, 0],
  [1, 0, 0],
  [0, -1, 0],
  [0, 1, 0],
  [0, 0, -1],
  [0, 0, 1],
];

it('normals point out of a cube, with and without its cell, however the loops run', () => {
  for (const cells of [undefined, [[0, 1, 2, 3, 4, 5]]]) {
    const { forms, findings } = form(trussOf({ ...CUBE, ...(cells ? { cells } : {}) }));
    forms.forEach((f, i) => {
      expect(dot(f.normal!, OUTWARD[i]!)).toBeCloseTo(1, 14);
    });
    expect(findings).toEqual([]);
    expect(forms.every((f) => f.convex)).toBe(true);
  }
});

it('a bow-tie crosses itself, a dart is not convex, a straight corner is both flat and convex', () => {
  const bow = one([
    [0, 0, 0],
    [100, 100, 0],
    [100, 0, 0],
    [0, 100, 0],
  ]);
  expect(form(bow).findings).toMatchObject([{ code: 'face-crosses-itself', level: 'stop' }]);
  expect(form(mapped(bow, moved)).findings).toMatchObject([{ code: 'face-crosses-itself' }]);
  const dart = one([
    [0, 0, 0],
    [100, 0, 0],
    [30, 30, 0],
    [0, 100, 0],
  ]);
  expect(form(dart).findings).toMatchObject([{ code: 'face-not-convex', level: 'note' }]);
  const straight = one([
    [0, 0, 0],
    [50, 0, 0],
    [100, 0, 0],
    [0, 100, 0],
  ]);
  expect(form(straight).findings).toEqual([]);
  expect(form(mapped(straight, moved)).findings).toEqual([]);
});

it('a face whose corners lie on one line has no normal, and says so', () => {
  const { forms, findings } = form(
    one([
      [0, 0, 0],
      [10, 10, 10],
      [30, 30, 30],
    ]),
  );
  expect(forms[0]!.normal).toBeNull();
  expect(findings).toMatchObject([{ code: 'face-has-no-normal' }]);
});
