import type { SparseMatrix } from './csc.js';

/** A symmetric element matrix, by rows, and the unknown of each of its rows; -1: not an unknown. */
export interface Element {
  readonly unknowns: ArrayLike<number>;
  readonly matrix: Float64Array;
}

/**
 * K(s) = sum of s_e K_e on the pattern of a lower triangle that holds every pair of an element's unknowns: the places are
 * found once, the returned function only adds up.
 */
export function elementSum(
  pattern: SparseMatrix,
  elements: readonly Element[],
): (factors: ArrayLike<number>) => SparseMatrix {
  const { starts, indices } = pattern;
  const places: number[] = [];
  const entries: number[] = [];
  const elementStarts = new Int32Array(elements.length + 1);
  elements.forEach(({ unknowns: f, matrix }, e) => {
    const n = f.length;
    for (let i = 0; i < n; i++)
      for (let j = 0; j <= i; j++) {
        const k = matrix[n * i + j];
        if (f[i] < 0 || f[j] < 0 || k === 0) continue;
        places.push(placeOf(starts, indices, Math.max(f[i], f[j]), Math.min(f[i], f[j])));
        entries.push(k);
      }
    elementStarts[e + 1] = places.length;
  });
  const place = Int32Array.from(places);
  const entry = Float64Array.from(entries);
  return (factors) => {
    const values = new Float64Array(pattern.values.length);
    for (let e = 0; e < elements.length; e++) {
      if (factors[e] === 0) continue;
      for (let p = elementStarts[e]; p < elementStarts[e + 1]; p++) values[place[p]] += factors[e] * entry[p];
    }
    return { ...pattern, values };
  };
}

/** Where the pattern holds an entry: rows ascend within a column. */
function placeOf(starts: Int32Array, indices: Int32Array, row: number, column: number): number {
  let [low, high] = [starts[column], starts[column + 1] - 1];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (indices[middle] < row) low = middle + 1;
    else high = middle;
  }
  return low;
}
