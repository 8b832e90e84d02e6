import { expect, it } from 'vitest';
import { convexHull2 } from '../../src/maths/convex-hull2.js';
import { seededRandom } from '../../src/maths/random.js';
import { smallestBox } from '../../src/maths/smallest-box.js';

it('finds the box of a turned rectangle', () => {
  const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
  const corners = [
    [0, 0],
    [4, 0],
    [4, 1],
    [0, 1],
  ].map(([x, y]): [number, number] => [c * x! - s * y!, s * x! + c * y!]);
  const box = smallestBox(convexHull2(corners));
  expect(box.width).toBeCloseTo(4, 12);
  expect(box.depth).toBeCloseTo(1, 12);
  expect(Math.abs(box.direction[0] * c + box.direction[1] * s)).toBeCloseTo(1, 12);
});

it('is never larger than the best of 3600 turns', () => {
  const random = seededRandom(1);
  for (let k = 0; k < 20; k++) {
    const hull = convexHull2(Array.from({ length: 12 }, () => [random() * 5, random() * 2] as const));
    const box = smallestBox(hull);
    let least = Number.POSITIVE_INFINITY;
    for (let t = 0; t < 3600; t++) {
      const [c, s] = [Math.cos((t * Math.PI) / 3600), Math.sin((t * Math.PI) / 3600)];
      const u = hull.map(([x, y]) => c * x + s * y);
      const v = hull.map(([x, y]) => c * y - s * x);
      least = Math.min(least, (Math.max(...u) - Math.min(...u)) * (Math.max(...v) - Math.min(...v)));
    }
    expect(box.width * box.depth).toBeLessThan(least + 1e-9);
  }
});
