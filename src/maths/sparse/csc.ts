/**
 * A matrix by compressed columns: column j holds `values[p]` at row `indices[p]` for p in [starts[j], starts[j + 1]),
 * rows ascending within a column (Davis, Direct Methods for Sparse Linear Systems, 2006, ch. 2).
 * A symmetric matrix is stored as its lower triangle with the diagonal.
 */
export interface SparseMatrix {
  readonly rows: number;
  readonly columns: number;
  readonly starts: Int32Array;
  readonly indices: Int32Array;
  readonly values: Float64Array;
}

/**
 * The matrix of a list of entries (row, column, value); entries at the same place add up.
 * Throws RangeError on an index outside the matrix.
 */
export function fromTriplets(
  rows: number,
  columns: number,
  rowOf: ArrayLike<number>,
  columnOf: ArrayLike<number>,
  entryOf: ArrayLike<number>,
): SparseMatrix {
  const count = entryOf.length;
  // Two stable bucket passes, by row and then by column, leave each column's rows ascending.
  const byRow = bucketOrder(rowOf, rows, undefined);
  const order = bucketOrder(columnOf, columns, byRow);
  const starts = new Int32Array(columns + 1);
  const indices = new Int32Array(count);
  const values = new Float64Array(count);
  let at = -1;
  let lastColumn = -1;
  for (const t of order) {
    const column = columnOf[t];
    const row = rowOf[t];
    if (column !== lastColumn || indices[at] !== row) {
      at++;
      indices[at] = row;
      starts[column + 1]++;
      lastColumn = column;
    }
    values[at] += entryOf[t];
  }
  for (let j = 0; j < columns; j++) starts[j + 1] += starts[j];
  return { rows, columns, starts, indices: indices.slice(0, at + 1), values: values.slice(0, at + 1) };
}

function bucketOrder(key: ArrayLike<number>, limit: number, before: Int32Array | undefined): Int32Array {
  const next = new Int32Array(limit + 1);
  for (let t = 0; t < key.length; t++) {
    if (!(key[t] >= 0 && key[t] < limit)) throw new RangeError(`entry ${t}: index ${key[t]} is not in 0..${limit - 1}`);
    next[key[t] + 1]++;
  }
  for (let k = 0; k < limit; k++) next[k + 1] += next[k];
  const order = new Int32Array(key.length);
  for (let s = 0; s < key.length; s++) {
    const t = before ? before[s] : s;
    order[next[key[t]]++] = t;
  }
  return order;
}

/** Aᵀ */
export function transpose(a: SparseMatrix): SparseMatrix {
  const starts = new Int32Array(a.rows + 1);
  for (const i of a.indices) starts[i + 1]++;
  for (let i = 0; i < a.rows; i++) starts[i + 1] += starts[i];
  const next = starts.slice();
  const indices = new Int32Array(a.indices.length);
  const values = new Float64Array(a.indices.length);
  for (let j = 0; j < a.columns; j++)
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++) {
      const q = next[a.indices[p]]++;
      indices[q] = j;
      values[q] = a.values[p];
    }
  return { rows: a.columns, columns: a.rows, starts, indices, values };
}
