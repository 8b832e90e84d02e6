import { SingularValueDecomposition } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { eliminateColumns, type SparseVector } from '../../../src/maths/sparse/column-elimination.js';
import { fromTriplets, type SparseMatrix, transpose } from '../../../src/maths/sparse/csc.js';
import { largest, multiply } from '../../../src/maths/sparse/multiply.js';
import { leftNullSpace, rightNullSpace } from '../../../src/maths/sparse/null-space.js';
import { dense } from './random.js';

/** A seeded sparse matrix of unit-sized columns whose last columns and rows depend on earlier ones. */
function deficient(seed: number): SparseMatrix {
  const random = seededRandom(seed);
  const m = 12 + Math.floor(random() * 40);
  const n = 12 + Math.floor(random() * 40);
  const full = Array.from({ length: m }, () => Array.from({ length: n }, () => (random() < 0.2 ? random() - 0.5 : 0)));
  for (let k = 0; k < 3; k++) {
    const target = Math.floor(random() * n);
    const [p, q] = [Math.floor(random() * n), Math.floor(random() * n)];
    for (let i = 0; i < m; i++) full[i][target] = full[i][p] - 2 * full[i][q];
  }
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  for (let i = 0; i < m; i++)
    for (let j = 0; j < n; j++)
      if (full[i][j] !== 0) {
        rows.push(i);
        columns.push(j);
        values.push(full[i][j]);
      }
  return fromTriplets(m, n, rows, columns, values);
}

const scatter = (v: SparseVector, n: number): Float64Array => {
  const out = new Float64Array(n);
  v.indices.forEach((i, k) => {
    out[i] = v.values[k];
  });
  return out;
};
const natural = (n: number): number[] => Array.from({ length: n }, (_, i) => i);

describe.each(natural(40))('a rank-deficient matrix, seed %i', (seed) => {
  const a = deficient(seed);
  const oracle = new SingularValueDecomposition(dense(a), { autoTranspose: true }).diagonal;
  const rank = oracle.filter((s) => s > 1e-9 * oracle[0]).length;

  it('has the rank that its singular values say, with bases of both null spaces', () => {
    const e = eliminateColumns(a, natural(a.columns), natural(a.rows));
    expect(e.rank).toBe(rank);
    expect(e.dependent.length).toBe(a.columns - rank);
    expect(e.freeRows.length).toBe(a.rows - rank);
    const at = transpose(a);
    e.dependent.forEach((c, k) => {
      const x = scatter(e.columnNull(k), a.columns);
      expect(x[c]).toBe(1);
      expect(largest(multiply(a, x))).toBeLessThan(1e-10 * largest(x));
    });
    e.freeRows.forEach((r, k) => {
      const z = scatter(e.rowNull(k), a.rows);
      expect(z[r]).toBe(1);
      expect(largest(multiply(at, z))).toBeLessThan(1e-10 * largest(z));
    });
  });

  it('inverse iteration finds the same null spaces and the least singular values', () => {
    const left = leftNullSpace(a);
    expect(left.vectors.length).toBe(a.rows - rank);
    expect(rightNullSpace(a).vectors.length).toBe(a.columns - rank);
    const at = transpose(a);
    for (const z of left.vectors) expect(largest(multiply(at, z))).toBeLessThan(1e-12);
    const least = oracle.filter((s) => s > 1e-9 * oracle[0]).at(-1)!;
    // Ritz values come from above; three iterations leave a per cent or two where the next values crowd.
    if (left.next.length > 0) {
      expect(left.next[0].value / least).toBeGreaterThan(1 - 1e-9);
      expect(left.next[0].value / least).toBeLessThan(1.03);
    }
  });
});

it('a matrix of zeros has every row and column in its null spaces', () => {
  const a = fromTriplets(4, 3, [], [], []);
  const e = eliminateColumns(a, natural(3), natural(4));
  expect([e.rank, e.dependent.length, e.freeRows.length]).toEqual([0, 3, 4]);
  expect(leftNullSpace(a).vectors.length).toBe(4);
});

it('a near-dependence is told apart and its singular value reported', () => {
  const a = fromTriplets(2, 2, [0, 0, 1], [0, 1, 1], [1, 1, 1e-6]);
  const { vectors, next } = leftNullSpace(a);
  expect(vectors.length).toBe(0);
  expect(next[0].value).toBeCloseTo(1e-6 / Math.SQRT2, 11);
  expect(eliminateColumns(a, [0, 1], [0, 1]).leastPivot).toBeCloseTo(1e-6, 10);
});
