import { solve as denseSolve, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { analyse } from '../../../src/maths/sparse/analyse.js';
import { elementSum } from '../../../src/maths/sparse/element-sum.js';
import { factorise } from '../../../src/maths/sparse/factorise.js';
import { refactoriser } from '../../../src/maths/sparse/refactorise.js';
import { solveOne } from '../../../src/maths/sparse/solve-one.js';
import { denseSymmetric, randomSymmetric } from './random.js';

describe.each([3, 5, 6])('a matrix that changes a little at a time, seed %i', (seed) => {
  const random = seededRandom(seed);
  const { lower, blockStarts } = randomSymmetric(seed, 60, true);
  const analysis = analyse(lower, { blockStarts });
  const factorOf = refactoriser(analysis);
  const right = Float64Array.from({ length: lower.columns }, () => random() - 0.5);

  it('solves as the dense library does after each change, and counts the same signs', () => {
    const values = lower.values.slice();
    for (let change = 0; change < 8; change++) {
      const now = { ...lower, values: values.slice() };
      const factor = factorOf(now);
      expect(factor.state).toBe('factorised');
      const x = solveOne(factor, right);
      const wanted = denseSolve(denseSymmetric(now), Matrix.columnVector(right)).to1DArray();
      const scale = wanted.reduce((m, v) => Math.max(m, Math.abs(v)), 0);
      expect(Math.max(...x.map((v, i) => Math.abs(v - wanted[i]!)))).toBeLessThan(1e-9 * scale);
      const whole = factorise(analysis, now);
      expect(factor.negative).toBe(whole.negative);
      expect(factor.pivotRatio / whole.pivotRatio).toBeCloseTo(1, 6);
      for (let k = 0; k < 3; k++) {
        const j = Math.floor(random() * lower.columns);
        values[lower.starts[j]!]! *= 1 + random();
      }
    }
  });

  it('goes on after a matrix that stopped it', () => {
    const singular = { ...lower, values: lower.values.map(() => 0) };
    expect(factorOf(lower).state).toBe('factorised');
    expect(factorOf(singular).state).toBe('zero pivot');
    const x = solveOne(factorOf(lower), right);
    const wanted = denseSolve(denseSymmetric(lower), Matrix.columnVector(right)).to1DArray();
    const scale = wanted.reduce((m, v) => Math.max(m, Math.abs(v)), 0);
    expect(Math.max(...x.map((v, i) => Math.abs(v - wanted[i]!)))).toBeLessThan(1e-9 * scale);
  });
});

it('adds up element matrices with factors, and leaves out rows that are no unknown', () => {
  // Springs 2, 3, 5 in a row from a held wall: the tridiagonal matrix of the textbook.
  const pattern = {
    rows: 3,
    columns: 3,
    starts: Int32Array.from([0, 2, 4, 5]),
    indices: Int32Array.from([0, 1, 1, 2, 2]),
    values: new Float64Array(5),
  };
  const spring = (a: number, b: number, k: number) => ({ unknowns: [a, b], matrix: Float64Array.from([k, -k, -k, k]) });
  const sum = elementSum(pattern, [spring(-1, 0, 2), spring(1, 0, 3), spring(1, 2, 5)]);
  expect([...sum([1, 1, 1]).values]).toEqual([5, -3, 8, -5, 5]);
  expect([...sum([1, 0, 2]).values]).toEqual([2, -0, 10, -10, 10].map((v) => v + 0));
});
