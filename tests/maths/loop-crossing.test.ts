import { describe, expect, it } from 'vitest';
import { loopFailure } from '../../src/maths/loop-crossing.js';
import { type Mat4, transformPoint } from '../../src/maths/mat4.js';
import { normalise, type Vec3 } from '../../src/maths/vec3.js';

const square: Vec3[] = [
  [0, 0, 0],
  [2, 0, 0],
  [2, 2, 0],
  [0, 2, 0],
];
const bow = [square[0]!, square[2]!, square[1]!, square[3]!];
const star = [0, 2, 4, 1, 3].map((k): Vec3 => [Math.cos((2 * Math.PI * k) / 5), Math.sin((2 * Math.PI * k) / 5), 0]);
const cases: [string, Vec3[], 'straight' | 'crossing' | null][] = [
  ['a square', square, null],
  ['a figure of eight, which has no area', bow, 'crossing'],
  ['a pentagram', star, 'crossing'],
  [
    'an arrow head',
    [
      [0, 0, 0],
      [4, 0, 0],
      [1, 1, 0],
      [0, 4, 0],
    ],
    null,
  ],
  [
    'a node in the middle of a side',
    [
      [0, 0, 0],
      [1, 0, 0],
      [2, 0, 0],
      [2, 2, 0],
    ],
    null,
  ],
  [
    'a spike',
    [
      [0, 0, 0],
      [2, 0, 0],
      [2, 3, 0],
      [2, 2, 0],
      [0, 2, 0],
    ],
    'crossing',
  ],
  [
    'a corner that touches a side',
    [
      [0, 0, 0],
      [4, 0, 0],
      [4, 4, 0],
      [2, 0, 0],
      [0, 4, 0],
    ],
    'crossing',
  ],
  [
    'three points of a line',
    [
      [0, 0, 0],
      [1, 1, 1],
      [3, 3, 3],
    ],
    'straight',
  ],
  [
    'a twisted quadrilateral',
    [
      [0, 0, 0],
      [2, 0, 0.4],
      [2, 2, 0],
      [0, 2, 0.4],
    ],
    null,
  ],
];

// A turn about (1,2,3) by 40 degrees (Rodrigues) and a move.
const axis = normalise([1, 2, 3]);
const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
const [x, y, z] = axis;
const motion: Mat4 = [
  c + x * x * (1 - c),
  x * y * (1 - c) - z * s,
  x * z * (1 - c) + y * s,
  1e3,
  y * x * (1 - c) + z * s,
  c + y * y * (1 - c),
  y * z * (1 - c) - x * s,
  -2e3,
  z * x * (1 - c) - y * s,
  z * y * (1 - c) + x * s,
  c + z * z * (1 - c),
  50,
  0,
  0,
  0,
  1,
];

describe.each(cases)('%s', (_, loop, expected) => {
  it.each([1e-3, 1, 1e5])('at scale %d, from every corner, in both senses, turned and moved', (factor) => {
    for (let start = 0; start < loop.length; start++) {
      const turned = [...loop.slice(start), ...loop.slice(0, start)].map(
        (p): Vec3 => [p[0] * factor, p[1] * factor, p[2] * factor],
      );
      expect(loopFailure(turned)).toBe(expected);
      expect(loopFailure([...turned].reverse())).toBe(expected);
      if (factor >= 1) expect(loopFailure(turned.map((p) => transformPoint(motion, p)))).toBe(expected);
    }
  });
});
