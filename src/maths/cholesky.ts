/**
 * Solves A x = b for a dense symmetric positive definite A by A = L Lᵀ; null where A is not positive definite.
 *
 * @param lower A row by row, n x n; only the lower triangle is read, and L takes its place; @param b n numbers, which x replaces
 */
export function solveCholesky(lower: Float64Array, b: Float64Array): Float64Array | null {
  const n = b.length;
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j <= i; j++) {
      const other = j * n;
      let sum = lower[row + j]!;
      for (let k = 0; k < j; k++) sum -= lower[row + k]! * lower[other + k]!;
      if (i !== j) lower[row + j] = sum / lower[other + j]!;
      else if (sum > 0) lower[row + i] = Math.sqrt(sum);
      else return null;
    }
  }
  for (let i = 0; i < n; i++) {
    let sum = b[i]!;
    for (let k = 0; k < i; k++) sum -= lower[i * n + k]! * b[k]!;
    b[i] = sum / lower[i * n + i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]!;
    for (let k = i + 1; k < n; k++) sum -= lower[k * n + i]! * b[k]!;
    b[i] = sum / lower[i * n + i]!;
  }
  return b;
}
