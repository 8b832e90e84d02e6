import type { Analysis } from './analyse.js';
import type { SparseMatrix } from './csc.js';
import { diagonalOf, type Factor } from './factorise.js';
import { eliminateFront, OVERSHOOT } from './front-kernel.js';
import { frontWorkspace } from './front-workspace.js';

/**
 * Factors of a row of matrices on one analysed pattern, each from the one before: only supernodes whose entries have changed,
 * and those above them in the elimination tree, are eliminated again (Liu, SIAM Review 34 (1992) 82-109, section 3: a front
 * depends on its own entries and its children's updates alone). The factor is the same as `factorise` gives, to round-off in
 * the order of the children. It is only good until the next call, which writes into the same numbers.
 */
export function refactoriser(analysis: Analysis): (lower: SparseMatrix) => Factor {
  const { starts, rowStarts, rows, parent, entryStarts, entry, entryAt, factorStarts } = analysis;
  const count = parent.length;
  const side = analysis.largestFront + OVERSHOOT;
  const front = frontWorkspace(side * side, side * Math.max(1, analysis.largestWidth));
  const values = new Float64Array(factorStarts[count]);
  const children: number[][] = Array.from({ length: count }, () => []);
  for (let s = 0; s < count; s++) if (parent[s] >= 0) children[parent[s]].push(s);
  const updates = Array.from({ length: count }, (_, s) => {
    const size = rowStarts[s + 1] - rowStarts[s] - (starts[s + 1] - starts[s]);
    return new Float64Array((size * (size + 1)) / 2);
  });
  const local = new Int32Array(analysis.size);
  const map = new Int32Array(analysis.largestFront);
  const negatives = new Int32Array(count);
  const ratios = new Float64Array(count).fill(Infinity);
  const dirty = new Uint8Array(count).fill(1);
  let before: Float64Array | null = null;

  /** Assembles front s from its entries and its children's updates and eliminates it; the pivot that stopped it, or -1. */
  const eliminate = (s: number, lower: SparseMatrix, diagonal: Float64Array): number => {
    const width = starts[s + 1] - starts[s];
    const height = rowStarts[s + 1] - rowStarts[s];
    const stride = height + OVERSHOOT;
    const f = front.values;
    f.fill(0, 0, stride * stride);
    for (let k = entryStarts[s]; k < entryStarts[s + 1]; k++) f[entryAt[k]] += lower.values[entry[k]];
    for (let r = 0; r < height; r++) local[rows[rowStarts[s] + r]] = r;
    for (const c of children[s]) {
      const first = rowStarts[c] + starts[c + 1] - starts[c];
      const size = rowStarts[c + 1] - first;
      for (let i = 0; i < size; i++) map[i] = local[rows[first + i]];
      const update = updates[c];
      let at = 0;
      for (let i = 0; i < size; i++) {
        const row = map[i] * stride;
        for (let j = 0; j <= i; j++) f[row + map[j]] += update[at++];
      }
    }
    const stopped = eliminateFront(front, stride, height, width, width);
    if (stopped >= 0) return stopped;
    let out = factorStarts[s];
    for (let i = 0; i < height; i++, out += width) {
      const stop = Math.min(i + 1, width);
      for (let k = 0; k < stop; k++) values[out + k] = f[i * stride + k];
    }
    negatives[s] = 0;
    ratios[s] = Infinity;
    for (let k = 0; k < width; k++) {
      const d = f[k * stride + k];
      if (d < 0) negatives[s]++;
      const own = Math.abs(diagonal[analysis.order[starts[s] + k]]);
      if (own > 0) ratios[s] = Math.min(ratios[s], Math.abs(d) / own);
    }
    let at = 0;
    for (let i = width; i < height; i++) for (let j = width; j <= i; j++) updates[s][at++] = f[i * stride + j];
    return -1;
  };

  return (lower) => {
    if (lower.columns !== analysis.size || lower.values.length !== entry.length)
      throw new RangeError('another pattern was analysed');
    if (before)
      for (let s = 0; s < count; s++)
        for (let k = entryStarts[s]; k < entryStarts[s + 1] && !dirty[s]; k++)
          if (lower.values[entry[k]] !== before[entry[k]]) dirty[s] = 1;
    before = lower.values.slice();
    const diagonal = diagonalOf(lower);
    let stoppedAt = -1;
    for (let s = 0; s < count; s++) {
      if (!dirty[s]) continue;
      if (parent[s] >= 0) dirty[parent[s]] = 1;
      // What lies above a front that stopped stays to be done: the next matrix may let it through.
      if (stoppedAt >= 0) continue;
      const stopped = eliminate(s, lower, diagonal);
      if (stopped >= 0) stoppedAt = analysis.order[starts[s] + stopped];
      else dirty[s] = 0;
    }
    const negative = negatives.reduce((sum, n) => sum + n, 0);
    return stoppedAt >= 0
      ? { analysis, state: 'zero pivot', stoppedAt, values, negative, pivotRatio: 0 }
      : {
          analysis,
          state: 'factorised',
          stoppedAt: -1,
          values,
          negative,
          pivotRatio: count === 0 ? 1 : ratios.reduce((a, b) => Math.min(a, b), Infinity),
        };
  };
}
