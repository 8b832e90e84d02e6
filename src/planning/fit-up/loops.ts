import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { FigureCounts } from '../../statics/state-counts.js';

/** A loop's condition: sum of coefficient x length error = 0. */
export interface Loop {
  readonly indices: Int32Array;
  readonly values: Float64Array;
}

/**
 * Conditions that the struts' lengths must meet to close: S' e = 0, S the states of self-stress (e lies in the range of the
 * compatibility matrix; Pellegrino and Calladine, Int. J. Solids Struct. 22 (1986) 409-428).
 */
export function loopsOf(counts: FigureCounts): readonly Loop[] {
  return Array.from({ length: counts.selfStressStates }, (_, s) => counts.selfStress(s));
}

/** S' e for one loop. */
export function miss(loop: Loop, e: ArrayLike<number>): number {
  let sum = 0;
  for (let p = 0; p < loop.indices.length; p++) sum += loop.values[p]! * e[loop.indices[p]!]!;
  return sum;
}

/** Most that play can make up in one loop: sum of |coefficient| x play. */
export function capacity(loop: Loop, play: ArrayLike<number>): number {
  let sum = 0;
  for (let p = 0; p < loop.indices.length; p++) sum += Math.abs(loop.values[p]!) * play[loop.indices[p]!]!;
  return sum;
}

/** Rounds of projecting between the loops' conditions and the play's box; a sample that is still open then counts as not closed. */
const ROUNDS = 40;
/** Steps on the conditions go beyond them by this factor (relaxation below 2 still meets: Agmon, Canad. J. Math. 6 (1954) 382-392). */
const BEYOND = 1.7;
/** A loop counts as closed when its miss is below this share of what its play makes up. */
const CLOSED = 1e-3;

/**
 * Tells whether errors e can be taken up: some p with |p_i| <= play_i and S' (e + p) = 0. By projecting in turn on the
 * conditions and on the box (von Neumann's alternating projections: both are convex, so they meet where the sets do), until all
 * loops are closed or some combination y of them proves that they cannot be: y' S' e > sum |S y|_i play_i.
 */
export function closer(loops: readonly Loop[], play: Float64Array): (e: Float64Array) => boolean {
  const capacities = loops.map((l) => capacity(l, play));
  const correction = corrector(loops, play.length);
  const p = new Float64Array(play.length);
  const open = new Float64Array(loops.length);
  const step = new Float64Array(play.length);
  return (e) => {
    // Sufficient: each strut's play takes up its own error. Settles nearly every sample that closes.
    if (e.every((v, i) => Math.abs(v) <= play[i]!)) return true;
    // Necessary, loop by loop, and for a single loop sufficient: settles nearly every sample that does not close.
    const own = loops.map((l) => miss(l, e));
    if (own.some((m, k) => Math.abs(m) > capacities[k]!)) return false;
    if (loops.length <= 1) return true;
    for (let i = 0; i < p.length; i++) p[i] = Math.min(play[i]!, Math.max(-play[i]!, -e[i]!));
    for (let round = 0; round < ROUNDS; round++) {
      let closed = true;
      loops.forEach((l, k) => {
        open[k] = own[k]! + miss(l, p);
        if (Math.abs(open[k]!) > CLOSED * capacities[k]!) closed = false;
      });
      if (closed) return true;
      const asked = correction(open, own, step);
      let most = 0;
      for (let i = 0; i < p.length; i++) {
        most += Math.abs(step[i]!) * play[i]!;
        p[i] = Math.min(play[i]!, Math.max(-play[i]!, p[i]! - BEYOND * step[i]!));
      }
      if (asked > most * (1 + CLOSED)) return false;
    }
    return false;
  };
}

/** y = (S' S)^-1 misses; `step` = S y, the least change of p that meets every loop's condition; returns y' own. */
function corrector(
  loops: readonly Loop[],
  struts: number,
): (misses: Float64Array, own: readonly number[], step: Float64Array) => number {
  const s = loops.length;
  if (s <= 1) return () => 0;
  const dense = loops.map((l) => {
    const v = new Float64Array(struts);
    l.indices.forEach((i, q) => {
      v[i] = l.values[q]!;
    });
    return v;
  });
  const gram = Matrix.zeros(s, s);
  loops.forEach((a, i) => {
    for (let j = 0; j <= i; j++) {
      const v = miss(a, dense[j]!);
      gram.set(i, j, v);
      gram.set(j, i, v);
    }
  });
  const inverse = Float64Array.from(new CholeskyDecomposition(gram).solve(Matrix.eye(s)).to1DArray());
  return (misses, own, step) => {
    step.fill(0);
    let asked = 0;
    loops.forEach((l, k) => {
      let t = 0;
      for (let j = 0; j < s; j++) t += inverse[k * s + j]! * misses[j]!;
      asked += t * own[k]!;
      for (let q = 0; q < l.indices.length; q++) step[l.indices[q]!]! += l.values[q]! * t;
    });
    return asked;
  };
}
