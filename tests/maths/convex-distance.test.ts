import { describe, expect, it } from 'vitest';
import { convexDistance, cylinderOf, hullOf, sweptBy } from '../../src/maths/convex-distance.js';
import { seededRandom } from '../../src/maths/random.js';
import { segmentDistance } from '../../src/maths/segment-distance.js';
import type { Vec3 } from '../../src/maths/vec3.js';
import { loadKernel } from '../../src/shaping/kernel.js';

const cube = (x: number, y: number, z: number, half = 1): Vec3[] =>
  [-1, 1].flatMap((a) => [-1, 1].flatMap((b) => [-1, 1].map((c): Vec3 => [x + a * half, y + b * half, z + c * half])));

describe('the distance of two convex bodies', () => {
  it('of cubes is what their faces, edges and corners say', () => {
    const at = (x: number, y: number, z: number) => convexDistance(hullOf(cube(0, 0, 0)), hullOf(cube(x, y, z)));
    expect(at(5, 0, 0)).toBeCloseTo(3, 6);
    expect(at(5, 4, 0.5)).toBeCloseTo(Math.hypot(3, 2), 6);
    expect(at(5, 4, -6)).toBeCloseTo(Math.hypot(3, 2, 4), 6);
    expect(at(1.5, 0.5, -0.5)).toBe(0);
    expect(at(0, 0, 0)).toBe(0);
  });

  it('of flat-ended cylinders in line is the gap of their ends, side by side that of their axes less the radii', () => {
    const a = cylinderOf([0, 0, 0], [0, 0, 10], 2);
    expect(convexDistance(a, cylinderOf([1, 0, 13], [1, 0, 20], 2))).toBeCloseTo(3, 5);
    expect(convexDistance(a, cylinderOf([7, 0, 2], [7, 0, 6], 2))).toBeCloseTo(3, 5);
    expect(convexDistance(a, cylinderOf([0, 3, 5], [9, 3, 5], 0.5))).toBeCloseTo(0.5, 5);
  });

  it('of thin long cylinders is that of their axes', () => {
    const random = seededRandom(4);
    const point = (): Vec3 => [100 * random(), 100 * random(), 100 * random()];
    for (let k = 0; k < 200; k++) {
      const [a, b, c, d] = [point(), point(), point(), point()];
      const wanted = segmentDistance(a, b, c, d).distance;
      expect(Math.abs(convexDistance(cylinderOf(a, b, 1e-6), cylinderOf(c, d, 1e-6)) - wanted)).toBeLessThan(1e-4);
    }
  });

  it('a swept body reaches as far as its way', () => {
    const swept = sweptBy(hullOf(cube(0, 0, 0)), [4, 0, 0]);
    expect(convexDistance(swept, hullOf(cube(8, 0, 0)))).toBeCloseTo(2, 6);
    expect(convexDistance(swept, hullOf(cube(2, 5, 0)))).toBeCloseTo(3, 6);
  });

  it('is what the solid kernel measures between meshes of random hulls', async () => {
    const { Manifold } = await loadKernel();
    const random = seededRandom(9);
    let apart = 0;
    for (let k = 0; k < 60; k++) {
      const cloud = (off: number): Vec3[] =>
        Array.from({ length: 12 }, () => [off + 8 * random(), 8 * random(), 8 * random()]);
      const [p, q] = [cloud(0), cloud(3 + 10 * random())];
      const [m, n] = [p, q].map((c) => Manifold.hull(c as unknown as [number, number, number][]));
      const wanted = m!.minGap(n!, 100);
      const found = convexDistance(hullOf(p), hullOf(q));
      expect(Math.abs(found - wanted)).toBeLessThan(1e-4);
      if (wanted > 0) apart += 1;
      m!.delete();
      n!.delete();
    }
    expect(apart).toBeGreaterThan(20);
    expect(apart).toBeLessThan(60);
  });
});
