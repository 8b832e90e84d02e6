import type { SparseMatrix } from './csc.js';
import type { Factor } from './factorise.js';
import { largest, multiplySymmetric, symmetricNorm } from './multiply.js';

/** Right-hand sides that pass through the factor together: as many as a tile's sums fit the registers. */
const BLOCK = 4;
/** Numbers of the factor in one strip of rows: 16 kB, half of a usual first-level cache. */
const STRIP = 2048;
const LEAST_STRIP = 8;
/** Above this normalised residual a solve is refined, at most REFINEMENTS times: round-off alone stays near 1e-16. */
const REFINE_ABOVE = 1e-15;
const REFINEMENTS = 2;

/** Solutions with what they are worth. */
export interface Solved {
  /** One solution for each right-hand side. */
  readonly x: readonly Float64Array[];
  /** |A x - b| / (|A| |x| + |b|) of each, infinity norms: a backward error (Rigal and Gaches, J. ACM 14 (1967) 543-548). */
  readonly residual: Float64Array;
}

/** X with A X = B from a factor of A, refined; throws RangeError on a factor that stopped at a zero pivot. */
export function solve(factor: Factor, lower: SparseMatrix, right: readonly Float64Array[]): Solved {
  const norm = symmetricNorm(lower);
  const x = backSolve(factor, right);
  const residual = new Float64Array(right.length);
  const errors = x.map((xi, k) => error(lower, norm, xi, right[k], residual, k));
  for (let step = 0; step < REFINEMENTS; step++) {
    const rough = [...residual.keys()].filter((k) => residual[k] > REFINE_ABOVE);
    if (rough.length === 0) break;
    const corrections = backSolve(
      factor,
      rough.map((k) => errors[k]),
    );
    rough.forEach((k, c) => {
      const better = x[k].map((v, i) => v + corrections[c][i]);
      const before = residual[k];
      const left = error(lower, norm, better, right[k], residual, k);
      if (residual[k] < before) {
        x[k] = better;
        errors[k] = left;
      } else residual[k] = before;
    });
  }
  return { x, residual };
}

function error(
  a: SparseMatrix,
  norm: number,
  x: Float64Array,
  b: Float64Array,
  into: Float64Array,
  k: number,
): Float64Array {
  const r = multiplySymmetric(a, x);
  for (let i = 0; i < r.length; i++) r[i] = b[i] - r[i];
  const scale = norm * largest(x) + largest(b);
  const size = largest(r);
  into[k] = scale > 0 ? size / scale : size;
  return r;
}

/** X with A X = B from the factor alone, in blocks of right-hand sides. */
export function backSolve(factor: Factor, right: readonly Float64Array[]): Float64Array[] {
  if (factor.state !== 'factorised')
    throw new RangeError(`the factor stopped at a zero pivot (unknown ${factor.stoppedAt})`);
  const { analysis } = factor;
  const n = analysis.size;
  const out: Float64Array[] = right.map(() => new Float64Array(n));
  const y = new Float64Array(n * BLOCK);
  const work = new Float64Array((analysis.largestFront + BLOCK) * BLOCK);
  for (let from = 0; from < right.length; from += BLOCK) {
    const wide = Math.min(BLOCK, right.length - from);
    y.fill(0);
    for (let c = 0; c < wide; c++) {
      const b = right[from + c];
      for (let k = 0; k < n; k++) y[k * BLOCK + c] = b[analysis.order[k]];
    }
    forward(factor, y);
    backward(factor, y, work);
    for (let c = 0; c < wide; c++) {
      const x = out[from + c];
      for (let k = 0; k < n; k++) x[analysis.order[k]] = y[k * BLOCK + c];
    }
  }
  return out;
}

/** y <- D⁻¹ L⁻¹ y */
function forward(factor: Factor, y: Float64Array): void {
  const { starts, rowStarts, rows, factorStarts, parent } = factor.analysis;
  const l = factor.values;
  for (let s = 0; s < parent.length; s++) {
    const width = starts[s + 1] - starts[s];
    const height = rowStarts[s + 1] - rowStarts[s];
    const first = starts[s] * BLOCK;
    const base = factorStarts[s];
    for (let i = 0; i < width; i++) dotRow(l, base + i * width, i, y, first, y, first + i * BLOCK);
    const rowBase = rowStarts[s];
    let i = width;
    for (; i + 1 < height; i += 2)
      dotTwoRows(l, base + i * width, width, y, first, rows[rowBase + i] * BLOCK, rows[rowBase + i + 1] * BLOCK);
    if (i < height) dotRow(l, base + i * width, width, y, first, y, rows[rowBase + i] * BLOCK);
    for (let k = 0; k < width; k++) {
      const d = l[base + k * width + k];
      const at = first + k * BLOCK;
      y[at] /= d;
      y[at + 1] /= d;
      y[at + 2] /= d;
      y[at + 3] /= d;
    }
  }
}

/** y[to] -= sum over k < count of l[at + k] y[from + k], four right-hand sides. */
function dotRow(
  l: Float64Array,
  at: number,
  count: number,
  y: Float64Array,
  from: number,
  into: Float64Array,
  to: number,
): void {
  let c0 = 0;
  let c1 = 0;
  let c2 = 0;
  let c3 = 0;
  for (let k = 0, q = from; k < count; k++, q += BLOCK) {
    const v = l[at + k];
    c0 += v * y[q];
    c1 += v * y[q + 1];
    c2 += v * y[q + 2];
    c3 += v * y[q + 3];
  }
  into[to] -= c0;
  into[to + 1] -= c1;
  into[to + 2] -= c2;
  into[to + 3] -= c3;
}

function dotTwoRows(
  l: Float64Array,
  at: number,
  count: number,
  y: Float64Array,
  from: number,
  to: number,
  toNext: number,
): void {
  let c0 = 0;
  let c1 = 0;
  let c2 = 0;
  let c3 = 0;
  let e0 = 0;
  let e1 = 0;
  let e2 = 0;
  let e3 = 0;
  const next = at + count;
  for (let k = 0, q = from; k < count; k++, q += BLOCK) {
    const v = l[at + k];
    const w = l[next + k];
    const y0 = y[q];
    const y1 = y[q + 1];
    const y2 = y[q + 2];
    const y3 = y[q + 3];
    c0 += v * y0;
    c1 += v * y1;
    c2 += v * y2;
    c3 += v * y3;
    e0 += w * y0;
    e1 += w * y1;
    e2 += w * y2;
    e3 += w * y3;
  }
  y[to] -= c0;
  y[to + 1] -= c1;
  y[to + 2] -= c2;
  y[to + 3] -= c3;
  y[toNext] -= e0;
  y[toNext + 1] -= e1;
  y[toNext + 2] -= e2;
  y[toNext + 3] -= e3;
}

/** y <- L⁻ᵀ y */
function backward(factor: Factor, y: Float64Array, work: Float64Array): void {
  const { starts, rowStarts, rows, factorStarts, parent } = factor.analysis;
  const l = factor.values;
  for (let s = parent.length - 1; s >= 0; s--) {
    const width = starts[s + 1] - starts[s];
    const height = rowStarts[s + 1] - rowStarts[s];
    const base = factorStarts[s];
    const first = starts[s] * BLOCK;
    for (let i = width; i < height; i++) {
      const q = rows[rowStarts[s] + i] * BLOCK;
      const to = i * BLOCK;
      work[to] = y[q];
      work[to + 1] = y[q + 1];
      work[to + 2] = y[q + 2];
      work[to + 3] = y[q + 3];
    }
    // Columns are strided: rows go in strips that stay in the nearest cache while every pair of columns passes over them.
    const strip = Math.max(LEAST_STRIP, Math.floor(STRIP / width));
    for (let r = width; r < height; r += strip) {
      const count = Math.min(strip, height - r);
      let k = 0;
      for (; k + 1 < width; k += 2)
        twoColumns(l, base + r * width + k, width, count, work, r * BLOCK, y, first + k * BLOCK);
      if (k < width) oneColumn(l, base + r * width + k, width, count, work, r * BLOCK, y, first + k * BLOCK);
    }
    for (let i = width - 1; i >= 0; i--) {
      const at = first + i * BLOCK;
      const y0 = y[at];
      const y1 = y[at + 1];
      const y2 = y[at + 2];
      const y3 = y[at + 3];
      const row = base + i * width;
      for (let j = 0, q = first; j < i; j++, q += BLOCK) {
        const v = l[row + j];
        y[q] -= v * y0;
        y[q + 1] -= v * y1;
        y[q + 2] -= v * y2;
        y[q + 3] -= v * y3;
      }
    }
  }
}

/** y[to] -= sum over rows r of l[at + r width] x[from + r], for this column and the next. */
function twoColumns(
  l: Float64Array,
  at: number,
  width: number,
  count: number,
  x: Float64Array,
  from: number,
  y: Float64Array,
  to: number,
): void {
  let c0 = 0;
  let c1 = 0;
  let c2 = 0;
  let c3 = 0;
  let e0 = 0;
  let e1 = 0;
  let e2 = 0;
  let e3 = 0;
  for (let r = 0, p = at, q = from; r < count; r++, p += width, q += BLOCK) {
    const v = l[p];
    const w = l[p + 1];
    const x0 = x[q];
    const x1 = x[q + 1];
    const x2 = x[q + 2];
    const x3 = x[q + 3];
    c0 += v * x0;
    c1 += v * x1;
    c2 += v * x2;
    c3 += v * x3;
    e0 += w * x0;
    e1 += w * x1;
    e2 += w * x2;
    e3 += w * x3;
  }
  y[to] -= c0;
  y[to + 1] -= c1;
  y[to + 2] -= c2;
  y[to + 3] -= c3;
  y[to + 4] -= e0;
  y[to + 5] -= e1;
  y[to + 6] -= e2;
  y[to + 7] -= e3;
}

function oneColumn(
  l: Float64Array,
  at: number,
  width: number,
  count: number,
  x: Float64Array,
  from: number,
  y: Float64Array,
  to: number,
): void {
  for (let r = 0, p = at, q = from; r < count; r++, p += width, q += BLOCK) {
    const v = l[p];
    y[to] -= v * x[q];
    y[to + 1] -= v * x[q + 1];
    y[to + 2] -= v * x[q + 2];
    y[to + 3] -= v * x[q + 3];
  }
}
