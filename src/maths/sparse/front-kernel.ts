import type { FastUpdate } from './front-workspace.js';

/** Columns of a front that are eliminated together; a multiple of the tile's side. */
const PANEL = 4;
const TILE = 4;
/** Blocks of the update, sized so that a block of rows stays in the second-level cache. */
const DEPTH = 256;
const STRIP = 64;

/** A dense front: lower triangle by rows, `stride` numbers a row; spare rows and columns take the tiles' overshoot. */
export interface Front {
  readonly values: Float64Array;
  /** L D by rows, as wide as the pivots. */
  readonly scaled: Float64Array;
  /** The compiled update on the memory that holds both; null: none. */
  readonly fast: FastUpdate | null;
}

/** Spare rows and columns that a front's buffer needs beyond its height. */
export const OVERSHOOT = TILE;

/**
 * Partial LDLᵀ of a dense front without pivoting: its first `width` columns become L (unit diagonal not stored) with D on
 * the diagonal, and the rest becomes the update B - L D Lᵀ. Returns the place of a zero or non-finite pivot, or -1.
 */
export function eliminateFront(f: Front, stride: number, height: number, width: number, wide: number): number {
  const { values, scaled } = f;
  for (let from = 0; from < width; from += PANEL) {
    const to = Math.min(from + PANEL, width);
    if (from > 0) update(f, stride, wide, from, height, from, to, 0, from, true);
    for (let i = from; i < height; i++) {
      const row = i * stride;
      const scaledRow = i * wide;
      const last = Math.min(i, to);
      for (let j = from; j < last; j++) {
        let u = values[row + j];
        const other = j * stride;
        for (let k = from; k < j; k++) u -= scaled[scaledRow + k] * values[other + k];
        scaled[scaledRow + j] = u;
      }
      for (let j = from; j < last; j++) values[row + j] = scaled[scaledRow + j] / values[j * stride + j];
      if (i < to) {
        let d = values[row + i];
        for (let k = from; k < i; k++) d -= scaled[scaledRow + k] * values[row + k];
        if (d === 0 || !Number.isFinite(d)) return i;
        values[row + i] = d;
        scaled[scaledRow + i] = d;
      }
    }
  }
  for (let k = 0; k < width; k += DEPTH)
    for (let i = width; i < height; i += STRIP)
      update(
        f,
        stride,
        wide,
        i,
        Math.min(i + STRIP, height),
        width,
        Math.min(i + STRIP, height),
        k,
        Math.min(k + DEPTH, width),
        false,
      );
  return -1;
}

/**
 * values[i, j] -= sum over k of values[i, k] scaled[j, k], for rows i and columns j of the given ranges, in tiles of
 * 4 x 4 whose sums stay in registers. Rows may run up to three past their end, and so may columns unless `exact`.
 */
function update(
  f: Front,
  stride: number,
  wide: number,
  rowFrom: number,
  rowTo: number,
  columnFrom: number,
  columnTo: number,
  depthFrom: number,
  depthTo: number,
  exact: boolean,
): void {
  if (f.fast) {
    const whole = exact ? columnTo - ((columnTo - columnFrom) & 1) : columnTo;
    f.fast(
      f.values.byteOffset,
      f.scaled.byteOffset,
      8 * stride,
      8 * wide,
      rowFrom,
      rowTo,
      columnFrom,
      whole,
      depthFrom,
      depthTo,
    );
    if (whole < columnTo) narrow(f, stride, wide, rowFrom, rowTo, whole, columnTo, depthFrom, depthTo);
    return;
  }
  const a = f.values;
  const b = f.scaled;
  for (let j = columnFrom; j < columnTo; j += TILE) {
    if (exact && columnTo - j < TILE) {
      narrow(f, stride, wide, rowFrom, rowTo, j, columnTo, depthFrom, depthTo);
      return;
    }
    const b0 = j * wide;
    const b1 = b0 + wide;
    const b2 = b1 + wide;
    const b3 = b2 + wide;
    // Tiles wholly above the diagonal are skipped.
    const first = j > rowFrom ? rowFrom + ((j - rowFrom) & ~3) : rowFrom;
    for (let i = first; i < rowTo; i += TILE) {
      const a0 = i * stride;
      const a1 = a0 + stride;
      const a2 = a1 + stride;
      const a3 = a2 + stride;
      let c00 = 0;
      let c01 = 0;
      let c02 = 0;
      let c03 = 0;
      let c10 = 0;
      let c11 = 0;
      let c12 = 0;
      let c13 = 0;
      let c20 = 0;
      let c21 = 0;
      let c22 = 0;
      let c23 = 0;
      let c30 = 0;
      let c31 = 0;
      let c32 = 0;
      let c33 = 0;
      for (let k = depthFrom; k < depthTo; k++) {
        const x = b[b0 + k];
        const y = b[b1 + k];
        const z = b[b2 + k];
        const w = b[b3 + k];
        let v = a[a0 + k];
        c00 += v * x;
        c01 += v * y;
        c02 += v * z;
        c03 += v * w;
        v = a[a1 + k];
        c10 += v * x;
        c11 += v * y;
        c12 += v * z;
        c13 += v * w;
        v = a[a2 + k];
        c20 += v * x;
        c21 += v * y;
        c22 += v * z;
        c23 += v * w;
        v = a[a3 + k];
        c30 += v * x;
        c31 += v * y;
        c32 += v * z;
        c33 += v * w;
      }
      a[a0 + j] -= c00;
      a[a0 + j + 1] -= c01;
      a[a0 + j + 2] -= c02;
      a[a0 + j + 3] -= c03;
      a[a1 + j] -= c10;
      a[a1 + j + 1] -= c11;
      a[a1 + j + 2] -= c12;
      a[a1 + j + 3] -= c13;
      a[a2 + j] -= c20;
      a[a2 + j + 1] -= c21;
      a[a2 + j + 2] -= c22;
      a[a2 + j + 3] -= c23;
      a[a3 + j] -= c30;
      a[a3 + j + 1] -= c31;
      a[a3 + j + 2] -= c32;
      a[a3 + j + 3] -= c33;
    }
  }
}

/** The update for the last one to three columns of a panel, whose neighbours on the right must stay as they are. */
function narrow(
  f: Front,
  stride: number,
  wide: number,
  rowFrom: number,
  rowTo: number,
  columnFrom: number,
  columnTo: number,
  depthFrom: number,
  depthTo: number,
): void {
  const { values, scaled } = f;
  for (let i = rowFrom; i < rowTo; i++)
    for (let j = columnFrom; j < columnTo; j++) {
      let sum = 0;
      for (let k = depthFrom; k < depthTo; k++) sum += values[i * stride + k] * scaled[j * wide + k];
      values[i * stride + j] -= sum;
    }
}
