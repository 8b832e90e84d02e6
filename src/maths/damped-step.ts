import { dotOf } from './least-squares.js';

/** Least damping, as a share of the largest diagonal entry: keeps the factor regular where columns depend on each other. */
const LEAST = 1e-13;

/**
 * x with least |A x - b|² + damping |x|², A by its columns: normal equations A'A + damping by Cholesky (Golub and Van Loan, Matrix
 * Computations, 4th ed. 2013, 4.2.5 and 5.3.2). For steps of a search, whose next step mends what squaring the condition costs.
 */
export function dampedStep(columns: readonly Float64Array[], b: Float64Array, damping: number): Float64Array {
  const n = columns.length;
  const l = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) l[i * n + j] = dotOf(columns[i], columns[j]);
  let largest = 0;
  for (let i = 0; i < n; i++) largest = Math.max(largest, l[i * n + i]);
  const shift = Math.max(damping, LEAST * largest);
  for (let i = 0; i < n; i++) {
    l[i * n + i] += shift;
    for (let j = 0; j <= i; j++) {
      let sum = l[i * n + j];
      for (let k = 0; k < j; k++) sum -= l[i * n + k] * l[j * n + k];
      if (i === j) l[i * n + i] = Math.sqrt(Math.max(sum, LEAST * shift));
      else l[i * n + j] = sum / l[j * n + j];
    }
  }
  const x = Float64Array.from(columns, (column) => dotOf(column, b));
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) x[i] -= l[i * n + k] * x[k];
    x[i] /= l[i * n + i];
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) x[i] -= l[k * n + i] * x[k];
    x[i] /= l[i * n + i];
  }
  return x;
}
