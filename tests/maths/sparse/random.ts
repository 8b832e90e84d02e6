import { Matrix } from 'ml-matrix';
import { seededRandom } from '../../../src/maths/random.js';
import { fromTriplets, type SparseMatrix } from '../../../src/maths/sparse/csc.js';

/** A seeded sparse symmetric matrix on blocks placed in space: neighbours within reach are coupled. */
export function randomSymmetric(seed: number, blocks: number, definite: boolean) {
  const random = seededRandom(seed);
  const points = Float64Array.from({ length: 3 * blocks }, () => random() * Math.cbrt(blocks));
  const starts = [0];
  for (let b = 0; b < blocks; b++) starts.push(starts[b] + 1 + Math.floor(random() * 4));
  const n = starts[blocks];
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  const sums = new Float64Array(n);
  for (let a = 0; a < blocks; a++)
    for (let b = a; b < blocks; b++) {
      const near = [0, 1, 2].reduce((s, k) => s + (points[3 * a + k] - points[3 * b + k]) ** 2, 0) < 1.5;
      if (!near) continue;
      for (let i = starts[b]; i < starts[b + 1]; i++)
        for (let j = starts[a]; j < starts[a + 1]; j++) {
          if (i <= j) continue;
          const v = random() - 0.5;
          rows.push(i);
          columns.push(j);
          values.push(v);
          sums[i] += Math.abs(v);
          sums[j] += Math.abs(v);
        }
    }
  for (let i = 0; i < n; i++) {
    rows.push(i);
    columns.push(i);
    values.push(definite ? sums[i] + 0.1 : (random() < 0.5 ? -1 : 1) * (sums[i] + 0.1));
  }
  return { lower: fromTriplets(n, n, rows, columns, values), blockStarts: Int32Array.from(starts), points };
}

export function denseSymmetric(lower: SparseMatrix): Matrix {
  const m = Matrix.zeros(lower.rows, lower.columns);
  for (let j = 0; j < lower.columns; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) {
      m.set(lower.indices[p], j, lower.values[p]);
      m.set(j, lower.indices[p], lower.values[p]);
    }
  return m;
}

export function dense(a: SparseMatrix): Matrix {
  const m = Matrix.zeros(a.rows, a.columns);
  for (let j = 0; j < a.columns; j++)
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++) m.set(a.indices[p], j, a.values[p]);
  return m;
}
