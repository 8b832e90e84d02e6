import type { Analysis } from './analyse.js';
import type { SparseMatrix } from './csc.js';
import { eliminateFront, OVERSHOOT } from './front-kernel.js';
import { frontWorkspace } from './front-workspace.js';

/** L and D of P A Pᵀ = L D Lᵀ, with what the pivots say about A. */
export interface Factor {
  readonly analysis: Analysis;
  /** `zero pivot`: the elimination stopped at unknown `stoppedAt`; such a factor must not be solved with. */
  readonly state: 'factorised' | 'zero pivot';
  readonly stoppedAt: number;
  readonly values: Float64Array;
  /** Number of negative pivots: eigenvalues of A below zero (Sylvester's law of inertia). */
  readonly negative: number;
  /** Least |d| / |a| over the unknowns, a the unknown's own diagonal entry: small where A is near singular. */
  readonly pivotRatio: number;
}

/**
 * Multifrontal LDLᵀ without pivoting of a symmetric matrix on an analysed pattern (Liu, SIAM Review 34 (1992) 82-109;
 * Duff and Reid, ACM Trans. Math. Softw. 9 (1983) 302-325). Exact for definite matrices; for indefinite ones the caller reads the residual of its solves.
 */
export function factorise(analysis: Analysis, lower: SparseMatrix): Factor {
  const { starts, rowStarts, rows, parent, entryStarts, entry, entryAt, factorStarts } = analysis;
  const count = parent.length;
  if (lower.columns !== analysis.size || lower.values.length !== entry.length)
    throw new RangeError('another pattern was analysed');
  const side = analysis.largestFront + OVERSHOOT;
  const front = frontWorkspace(side * side, side * Math.max(1, analysis.largestWidth));
  const values = new Float64Array(factorStarts[count]);
  const { stack, local, map } = scratchOf(analysis);
  const pending: number[] = []; // supernodes whose updates wait on the stack, in order
  let top = 0;
  const diagonal = diagonalOf(lower);
  let negative = 0;
  let pivotRatio = Infinity;
  for (let s = 0; s < count; s++) {
    const width = starts[s + 1] - starts[s];
    const height = rowStarts[s + 1] - rowStarts[s];
    const stride = height + OVERSHOOT;
    const f = front.values;
    f.fill(0, 0, stride * stride);
    for (let k = entryStarts[s]; k < entryStarts[s + 1]; k++) f[entryAt[k]] += lower.values[entry[k]];

    if (pending.length > 0 && parent[pending[pending.length - 1]] === s) {
      const base = rowStarts[s];
      for (let r = 0; r < height; r++) local[rows[base + r]] = r;
      while (pending.length > 0 && parent[pending[pending.length - 1]] === s) {
        const c = pending.pop()!;
        const first = rowStarts[c] + starts[c + 1] - starts[c];
        const size = rowStarts[c + 1] - first;
        top -= (size * (size + 1)) / 2;
        for (let i = 0; i < size; i++) map[i] = local[rows[first + i]];
        let at = top;
        for (let i = 0; i < size; i++) {
          const row = map[i] * stride;
          for (let j = 0; j <= i; j++) f[row + map[j]] += stack[at++];
        }
      }
    }

    const stopped = eliminateFront(front, stride, height, width, width);
    if (stopped >= 0)
      return {
        analysis,
        state: 'zero pivot',
        stoppedAt: analysis.order[starts[s] + stopped],
        values,
        negative,
        pivotRatio: 0,
      };

    let out = factorStarts[s];
    for (let i = 0; i < height; i++) {
      const row = i * stride;
      const stop = Math.min(i + 1, width);
      for (let k = 0; k < stop; k++) values[out + k] = f[row + k];
      out += width;
    }
    for (let k = 0; k < width; k++) {
      const d = f[k * stride + k];
      if (d < 0) negative++;
      const own = Math.abs(diagonal[analysis.order[starts[s] + k]]);
      if (own > 0) pivotRatio = Math.min(pivotRatio, Math.abs(d) / own);
    }
    if (height > width) {
      for (let i = width; i < height; i++) {
        const row = i * stride;
        for (let j = width; j <= i; j++) stack[top++] = f[row + j];
      }
      pending.push(s);
    }
  }
  return { analysis, state: 'factorised', stoppedAt: -1, values, negative, pivotRatio: count === 0 ? 1 : pivotRatio };
}

/** Room that every factor of one analysis needs and none keeps. */
interface Scratch {
  readonly stack: Float64Array;
  readonly local: Int32Array;
  readonly map: Int32Array;
}
const scratches = new WeakMap<Analysis, Scratch>();

function scratchOf(analysis: Analysis): Scratch {
  const known = scratches.get(analysis);
  if (known) return known;
  const made = {
    stack: new Float64Array(analysis.stackSize),
    local: new Int32Array(analysis.size),
    map: new Int32Array(analysis.largestFront),
  };
  scratches.set(analysis, made);
  return made;
}

/** The diagonal of a lower triangle. */
export function diagonalOf(lower: SparseMatrix): Float64Array {
  const d = new Float64Array(lower.columns);
  for (let j = 0; j < lower.columns; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) if (lower.indices[p] === j) d[j] += lower.values[p];
  return d;
}
