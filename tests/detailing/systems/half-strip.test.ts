import { expect, it } from 'vitest';
import { commonSetback, leastSetback } from '../../../src/detailing/systems/half-strip.js';
import { seededRandom } from '../../../src/maths/random.js';

const DEGREE = Math.PI / 180;

/** Least distance of two half-strips by projecting the sides' and corners' points on each other: slow and independent of the closed form. */
function gapBetween(angle: number, r1: number, s1: number, r2: number, s2: number): number {
  const inside = (p: [number, number], a: number, r: number, s: number): [number, number] => {
    const [c, n] = [Math.cos(a), Math.sin(a)];
    return [Math.max(p[0] * c + p[1] * n, s), Math.max(-r, Math.min(r, -p[0] * n + p[1] * c))];
  };
  const back = (q: [number, number], a: number): [number, number] => [
    q[0] * Math.cos(a) - q[1] * Math.sin(a),
    q[0] * Math.sin(a) + q[1] * Math.cos(a),
  ];
  // Alternating projections between two convex sets reach a closest pair (Cheney and Goldstein 1959).
  let p: [number, number] = [s1 + 1000, 0];
  let q: [number, number] = p;
  for (let k = 0; k < 20000; k++) {
    q = back(inside(p, angle, r2, s2), angle);
    const next = back(inside(q, 0, r1, s1), 0);
    if (Math.hypot(next[0] - p[0], next[1] - p[1]) < 1e-12) break;
    p = next;
  }
  return Math.hypot(p[0] - q[0], p[1] - q[1]);
}

it('meets the worked values of the common setback', () => {
  // Derived and checked against a linear programme outside this project.
  expect(commonSetback(90 * DEGREE, 3, 3, 2)).toBeCloseTo(4.414, 3);
  expect(commonSetback(15 * DEGREE, 5, 5, 0.2)).toBeCloseTo(38.75, 1);
  expect(commonSetback(10 * DEGREE, 5, 5, 0.2)).toBeCloseTo(58.3, 1);
  expect(commonSetback(5 * DEGREE, 5, 5, 0.2)).toBeCloseTo(116.8, 1);
  expect(commonSetback(Math.PI, 5, 3, 2)).toBeCloseTo(1, 12);
  expect(commonSetback(70 * DEGREE, 4, 4, 0)).toBeCloseTo(4 / Math.tan(35 * DEGREE), 12);
});

it('parts every random pair by exactly the web, whatever the other bar does', () => {
  const random = seededRandom(11);
  for (let k = 0; k < 200; k++) {
    const angle = (20 + 159 * random()) * DEGREE;
    const [r1, r2, gap] = [1 + 9 * random(), 1 + 9 * random(), 0.2 + 3 * random()];
    const common = commonSetback(angle, r1, r2, gap);
    expect(gapBetween(angle, r1, common, r2, common)).toBeGreaterThan(gap - 1e-3);
    const s2 = common * (0.3 + 2 * random());
    const s1 = leastSetback(angle, r1, r2, s2, gap);
    if (s1 === Number.NEGATIVE_INFINITY) {
      expect(gapBetween(angle, r1, -50, r2, s2)).toBeGreaterThan(gap - 1e-3);
      continue;
    }
    expect(Math.abs(gapBetween(angle, r1, s1, r2, s2) - gap)).toBeLessThan(2e-3);
    expect(gapBetween(angle, r1, s1 - 0.1, r2, s2)).toBeLessThan(gap + 1e-3);
  }
});
