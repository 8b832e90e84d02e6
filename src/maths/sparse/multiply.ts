import type { SparseMatrix } from './csc.js';

/** y = A x for any A; x has `columns` numbers, y `rows`. */
export function multiply(a: SparseMatrix, x: ArrayLike<number>): Float64Array {
  const y = new Float64Array(a.rows);
  for (let j = 0; j < a.columns; j++) {
    const xj = x[j];
    if (xj !== 0) for (let p = a.starts[j]; p < a.starts[j + 1]; p++) y[a.indices[p]] += a.values[p] * xj;
  }
  return y;
}

/** y = Aᵀ x for any A; x has `rows` numbers, y `columns`. */
export function multiplyTransposed(a: SparseMatrix, x: ArrayLike<number>): Float64Array {
  const y = new Float64Array(a.columns);
  for (let j = 0; j < a.columns; j++) {
    let sum = 0;
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++) sum += a.values[p] * x[a.indices[p]];
    y[j] = sum;
  }
  return y;
}

/** y = A x for the symmetric A whose lower triangle is stored. */
export function multiplySymmetric(
  lower: SparseMatrix,
  x: ArrayLike<number>,
  y = new Float64Array(lower.rows),
): Float64Array {
  y.fill(0);
  const { starts, indices, values } = lower;
  for (let j = 0; j < lower.columns; j++) {
    const xj = x[j];
    let sum = 0;
    for (let p = starts[j]; p < starts[j + 1]; p++) {
      const i = indices[p];
      const v = values[p];
      y[i] += v * xj;
      if (i !== j) sum += v * x[i];
    }
    y[j] += sum;
  }
  return y;
}

/** Largest row sum of |A| for the symmetric A whose lower triangle is stored: its infinity norm. */
export function symmetricNorm(lower: SparseMatrix): number {
  const sums = new Float64Array(lower.rows);
  for (let j = 0; j < lower.columns; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) {
      const size = Math.abs(lower.values[p]);
      sums[lower.indices[p]] += size;
      if (lower.indices[p] !== j) sums[j] += size;
    }
  return sums.reduce((a, b) => Math.max(a, b), 0);
}

/** Largest |x_i|; 0 of an empty vector. */
export function largest(x: ArrayLike<number>): number {
  let most = 0;
  for (let i = 0; i < x.length; i++) most = Math.max(most, Math.abs(x[i]));
  return most;
}
