import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { tributaryShares } from '../../../src/statics/loads/tributary.js';
import { anyRotation, turned } from '../../published/motions.js';

const turnedLoop = (loop: readonly Vec3[], seed: number): { loop: Vec3[]; normal: Vec3 } => {
  const r = seed === 0 ? [1, 0, 0, 0, 1, 0, 0, 0, 1] : anyRotation(seed);
  return {
    loop: loop.map((p) => [...turned(r, p)] as unknown as Vec3),
    normal: [...turned(r, [0, 0, 1])] as unknown as Vec3,
  };
};

describe.each([0, 1, 2])('shares of the edges of a panel (rotation %i)', (seed) => {
  it('a square gives each edge a triangle: a quarter, with a moment a third above the even load (by hand, W L / 6 against W L / 8)', () => {
    const { loop, normal } = turnedLoop(
      [
        [0, 0, 0],
        [400, 0, 0],
        [400, 400, 0],
        [0, 400, 0],
      ],
      seed,
    );
    for (const s of tributaryShares(loop, normal, 160000, true)) {
      expect(s.area).toBeCloseTo(40000, 6);
      expect(s.excess).toBeCloseTo(1 / 3, 3);
    }
  });

  it('a rectangle a x b gives its short edges triangles a²/4, its long ones trapezia (by hand)', () => {
    const [a, b] = [300, 900];
    const { loop, normal } = turnedLoop(
      [
        [0, 0, 0],
        [b, 0, 0],
        [b, a, 0],
        [0, a, 0],
      ],
      seed,
    );
    const shares = tributaryShares(loop, normal, a * b, true);
    expect(shares[1].area / ((a * a) / 4)).toBeCloseTo(1, 3);
    expect(shares[0].area / ((a * b) / 2 - (a * a) / 4)).toBeCloseTo(1, 3);
    expect(shares.reduce((sum, s) => sum + s.area, 0)).toBeCloseTo(a * b, 6);
    // Trapezium of height w with ramps c = a/2: M = w (3 b² - 4 c²) / 24, load w (b - c).
    const c = a / 2;
    expect(shares[0].excess).toBeCloseTo((3 * b * b - 4 * c * c) / 24 / (((b - c) * b) / 8) - 1, 3);
  });

  it('a right triangle is shared along its bisectors: areas as the edges times the inradius', () => {
    const { loop, normal } = turnedLoop(
      [
        [0, 0, 0],
        [400, 0, 0],
        [0, 300, 0],
      ],
      seed,
    );
    const shares = tributaryShares(loop, normal, 60000, true);
    [400, 500, 300].forEach((l, i) => {
      expect(shares[i].area / ((l * 100) / 2)).toBeCloseTo(1, 3);
    });
  });
});
