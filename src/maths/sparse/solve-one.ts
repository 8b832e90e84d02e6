import type { Factor } from './factorise.js';

/** x with L D Lᵀ x = b for one right-hand side, from a factor that did not stop; no refinement. */
export function solveOne(factor: Factor, right: ArrayLike<number>): Float64Array {
  const { analysis, values: l } = factor;
  const { size, order, starts, rowStarts, rows, factorStarts, parent } = analysis;
  const y = Float64Array.from(order, (u) => right[u]);
  for (let s = 0; s < parent.length; s++) {
    const first = starts[s];
    const width = starts[s + 1] - first;
    const height = rowStarts[s + 1] - rowStarts[s];
    let at = factorStarts[s];
    for (let i = 0; i < height; i++, at += width) {
      const stop = Math.min(i, width);
      let sum = 0;
      for (let k = 0; k < stop; k++) sum += l[at + k] * y[first + k];
      y[rows[rowStarts[s] + i]] -= sum;
    }
    for (let k = 0; k < width; k++) y[first + k] /= l[factorStarts[s] + k * width + k];
  }
  for (let s = parent.length - 1; s >= 0; s--) {
    const first = starts[s];
    const width = starts[s + 1] - first;
    const height = rowStarts[s + 1] - rowStarts[s];
    for (let i = height - 1; i >= 0; i--) {
      const v = y[rows[rowStarts[s] + i]];
      const at = factorStarts[s] + i * width;
      const stop = Math.min(i, width);
      for (let k = 0; k < stop; k++) y[first + k] -= l[at + k] * v;
    }
  }
  const x = new Float64Array(size);
  for (let k = 0; k < size; k++) x[order[k]] = y[k];
  return x;
}
