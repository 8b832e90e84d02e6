import type { SparseMatrix } from './csc.js';

/** A pivot below this share of its column's norm is zero: held on 3,000 random structures against dense singular values. */
const PIVOT_CUT = 1e-9;
/** A row may be pivot when it is at least this share of the largest candidate: bounds growth, leaves room to keep fill low. */
const THRESHOLD = 0.1;

/** L U of the columns of A that depend on no earlier one, in the order they were taken. */
export interface ColumnElimination {
  readonly rank: number;
  /** Columns of A that gave a pivot, in order; and each one's pivot row. */
  readonly basis: Int32Array;
  readonly pivotRows: Int32Array;
  /** Columns that depend on earlier ones, in the order they were met. */
  readonly dependent: Int32Array;
  /** Rows without a pivot. */
  readonly freeRows: Int32Array;
  /** Least kept and largest dropped pivot, as shares of their columns' norms; 1 and 0 where there is none. */
  readonly leastPivot: number;
  readonly largestDropped: number;
  /** x with A x = 0 for each dependent column c: x_c = 1, other entries on the basis. Sparse: columns and values. */
  columnNull(k: number): SparseVector;
  /** z with Aᵀ z = 0 for each free row r: z_r = 1, other entries on the pivot rows. */
  rowNull(k: number): SparseVector;
}

export interface SparseVector {
  readonly indices: Int32Array;
  readonly values: Float64Array;
}

/**
 * Left-looking sparse elimination of the columns of A with row pivoting (Gilbert and Peierls, SIAM J. Sci. Stat. Comput. 9
 * (1988) 862-874): rank and sparse bases of both null spaces. `columnOrder` says in which order columns are taken;
 * `rowRank` (low first) settles which of the acceptable rows is pivot. Sweeping both along an axis keeps the fill low.
 */
export function eliminateColumns(
  a: SparseMatrix,
  columnOrder: ArrayLike<number>,
  rowRank: ArrayLike<number>,
): ColumnElimination {
  const m = a.rows;
  const pivotOfRow = new Int32Array(m).fill(-1);
  const lower = new Columns(); // L without its unit diagonal: rows of A
  const upper = new Columns(); // U by columns of the basis: positions of pivots, the diagonal last
  const combos = new Columns(); // for each dependent column, its entries on L's columns
  const basis: number[] = [];
  const pivotRows: number[] = [];
  const dependent: number[] = [];
  const x = new Float64Array(m);
  const stamp = new Int32Array(m).fill(-1);
  const reach = new Int32Array(m);
  const stack = new Int32Array(m);
  const cursor = new Int32Array(m);
  let leastPivot = 1;
  let largestDropped = 0;

  for (let t = 0; t < columnOrder.length; t++) {
    const j = columnOrder[t];
    // Rows that the column reaches through L, in topological order from `top`.
    let top = m;
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++) {
      if (stamp[a.indices[p]] === t) continue;
      let depth = 0;
      stack[0] = a.indices[p];
      stamp[stack[0]] = t;
      cursor[0] = -1;
      while (depth >= 0) {
        const row = stack[depth];
        const pivot = pivotOfRow[row];
        let descended = false;
        if (pivot >= 0) {
          const stop = lower.end(pivot);
          for (let q = cursor[depth] < 0 ? lower.start(pivot) : cursor[depth]; q < stop; q++) {
            const i = lower.indices[q];
            if (stamp[i] === t) continue;
            stamp[i] = t;
            cursor[depth] = q + 1;
            stack[++depth] = i;
            cursor[depth] = -1;
            descended = true;
            break;
          }
        }
        if (!descended) {
          reach[--top] = row;
          depth--;
        }
      }
    }
    for (let k = top; k < m; k++) x[reach[k]] = 0;
    let norm = 0;
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++) {
      x[a.indices[p]] += a.values[p];
      norm += a.values[p] * a.values[p];
    }
    norm = Math.sqrt(norm);
    for (let k = top; k < m; k++) {
      const pivot = pivotOfRow[reach[k]];
      const v = x[reach[k]];
      if (pivot < 0 || v === 0) continue;
      for (let q = lower.start(pivot); q < lower.end(pivot); q++) x[lower.indices[q]] -= lower.values[q] * v;
    }
    let most = 0;
    for (let k = top; k < m; k++) if (pivotOfRow[reach[k]] < 0) most = Math.max(most, Math.abs(x[reach[k]]));
    if (!(most > PIVOT_CUT * norm)) {
      if (norm > 0) largestDropped = Math.max(largestDropped, most / norm);
      for (let k = top; k < m; k++) {
        const pivot = pivotOfRow[reach[k]];
        if (pivot >= 0 && x[reach[k]] !== 0) combos.push(pivot, x[reach[k]]);
      }
      combos.close();
      dependent.push(j);
      continue;
    }
    let chosen = -1;
    for (let k = top; k < m; k++) {
      const i = reach[k];
      if (pivotOfRow[i] >= 0 || Math.abs(x[i]) < THRESHOLD * most) continue;
      if (chosen < 0 || rowRank[i] < rowRank[chosen] || (rowRank[i] === rowRank[chosen] && i < chosen)) chosen = i;
    }
    const d = x[chosen];
    leastPivot = Math.min(leastPivot, Math.abs(d) / norm);
    for (let k = top; k < m; k++) {
      const i = reach[k];
      const pivot = pivotOfRow[i];
      if (x[i] === 0 || i === chosen) continue;
      if (pivot >= 0) upper.push(pivot, x[i]);
      else lower.push(i, x[i] / d);
    }
    upper.push(basis.length, d);
    upper.close();
    lower.close();
    pivotOfRow[chosen] = basis.length;
    basis.push(j);
    pivotRows.push(chosen);
  }
  const freeRows = Int32Array.from({ length: m }, (_, i) => i).filter((i) => pivotOfRow[i] < 0);
  const work = new Float64Array(Math.max(basis.length, m));
  return {
    rank: basis.length,
    basis: Int32Array.from(basis),
    pivotRows: Int32Array.from(pivotRows),
    dependent: Int32Array.from(dependent),
    freeRows,
    leastPivot,
    largestDropped,
    columnNull: (k) => {
      work.fill(0);
      for (let p = combos.start(k); p < combos.end(k); p++) work[combos.indices[p]] = combos.values[p];
      const columns = [dependent[k]];
      const values = [1];
      for (let c = basis.length - 1; c >= 0; c--) {
        if (work[c] === 0) continue;
        const stop = upper.end(c) - 1;
        const v = work[c] / upper.values[stop];
        for (let p = upper.start(c); p < stop; p++) work[upper.indices[p]] -= v * upper.values[p];
        columns.push(basis[c]);
        values.push(-v);
      }
      return { indices: Int32Array.from(columns), values: Float64Array.from(values) };
    },
    rowNull: (k) => {
      work.fill(0);
      work[freeRows[k]] = 1;
      const rows = [freeRows[k]];
      const values = [1];
      // Lᵀ z = 0, pivot by pivot from the last: a column of L reaches only rows that are pivots later, or free.
      for (let c = basis.length - 1; c >= 0; c--) {
        let v = 0;
        for (let p = lower.start(c); p < lower.end(c); p++) v -= lower.values[p] * work[lower.indices[p]];
        if (v === 0) continue;
        work[pivotRows[c]] = v;
        rows.push(pivotRows[c]);
        values.push(v);
      }
      return { indices: Int32Array.from(rows), values: Float64Array.from(values) };
    },
  };
}

/** Columns that grow at the end. */
class Columns {
  indices = new Int32Array(1024);
  values = new Float64Array(1024);
  private starts = [0];
  private size = 0;

  push(index: number, value: number): void {
    if (this.size === this.indices.length) {
      const indices = new Int32Array(2 * this.size);
      const values = new Float64Array(2 * this.size);
      indices.set(this.indices);
      values.set(this.values);
      this.indices = indices;
      this.values = values;
    }
    this.indices[this.size] = index;
    this.values[this.size++] = value;
  }

  close(): void {
    this.starts.push(this.size);
  }

  start(k: number): number {
    return this.starts[k];
  }

  end(k: number): number {
    return this.starts[k + 1];
  }
}
