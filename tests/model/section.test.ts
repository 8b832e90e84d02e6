import { describe, expect, it } from 'vitest';
import { sectionProperties } from '../../src/model/section.js';
import { resistanceOf } from '../../src/strength/resistance.js';

/** Ratio of the sides, J / (long short³), T / (stress long short²): Timoshenko and Goodier, Theory of Elasticity, 3rd ed. 1970, table of section 109 (from memory). */
const TWISTED: readonly (readonly [number, number, number])[] = [
  [1, 0.1406, 0.208],
  [1.2, 0.166, 0.219],
  [1.5, 0.196, 0.231],
  [2, 0.229, 0.246],
  [2.5, 0.249, 0.258],
  [3, 0.263, 0.267],
  [4, 0.281, 0.282],
  [5, 0.291, 0.291],
  [10, 0.312, 0.312],
];

/** Saint-Venant's series for J of a rectangle, of which the table is the rounded sum. */
function series(long: number, short: number): number {
  let sum = 0;
  for (let n = 1; n < 200; n += 2) sum += Math.tanh((n * Math.PI * long) / (2 * short)) / n ** 5;
  return ((long * short ** 3) / 3) * (1 - ((192 * short) / (Math.PI ** 5 * long)) * sum);
}

describe.each(TWISTED)('a rectangle of %f : 1 in torsion', (ratio, k1, k2) => {
  const [short, long] = [20, 20 * ratio];
  const upright = { kind: 'rectangle', width: short, height: long } as const;
  const flat = { kind: 'rectangle', width: long, height: short } as const;

  it('has the constant of the table, within half a percent of the series, upright or flat', () => {
    for (const shape of [upright, flat]) {
      const { torsion } = sectionProperties(shape);
      expect(Math.abs(torsion / (long * short ** 3) / k1 - 1)).toBeLessThan(6e-3);
      expect(Math.abs(torsion / series(long, short) - 1)).toBeLessThan(5e-3);
    }
  });

  it('has the modulus of the table, upright or flat', () => {
    for (const shape of [upright, flat])
      expect(Math.abs(resistanceOf(shape).wt / (long * short ** 2) / k2 - 1)).toBeLessThan(6e-3);
  });
});

it('a round bar has pi d⁴ / 32 and pi d³ / 16, a tube the difference', () => {
  const bar = { kind: 'round', diameter: 20 } as const;
  expect(sectionProperties(bar).torsion).toBeCloseTo((Math.PI * 20 ** 4) / 32, 8);
  expect(resistanceOf(bar).wt).toBeCloseTo((Math.PI * 20 ** 3) / 16, 8);
  const tube = { kind: 'tube', diameter: 20, wall: 2 } as const;
  expect(sectionProperties(tube).torsion).toBeCloseTo((Math.PI * (20 ** 4 - 16 ** 4)) / 32, 8);
  expect(resistanceOf(tube).wt).toBeCloseTo((Math.PI * (20 ** 4 - 16 ** 4)) / 32 / 10, 8);
});
