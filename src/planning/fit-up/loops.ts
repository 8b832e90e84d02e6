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

/** Rounds of projecting between the loops' conditions and the play's box; past these the sample counts as not closed. */
const ROUNDS = 12;
/** A loop counts as closed when its miss is below this share of what its play makes up. */
const CLOSED = 1e-3;

/** Tells whether errors e can be taken up: some p with |p_i| <= play_i and S' (e + p) = 0. */
export function closer(loops: readonly Loop[], play: Float64Array): (e: Float64Array) => boolean {
  const capacities = loops.map((l) => capacity(l, play));
  const correct = projector(loops, play.length);
  const p = new Float64Array(play.length);
  const misses = new Float64Array(loops.length);
  return (e) => {
    // Sufficient: each strut's play takes up its own error. Settles nearly every sample that closes.
    if (e.every((v, i) => Math.abs(v) <= play[i]!)) return true;
    // Necessary, loop by loop, and for a single loop sufficient: settles nearly every sample that does not close.
    if (loops.some((l, k) => Math.abs(miss(l, e)) > capacities[k]!)) return false;
    if (loops.length <= 1) return true;
    // Projecting in turn on S' (e + p) = 0 and on the box (von Neumann's alternating projections): both are convex, so they meet where the sets do.
    for (let i = 0; i < p.length; i++) p[i] = Math.min(play[i]!, Math.max(-play[i]!, -e[i]!));
    for (let round = 0; round < ROUNDS; round++) {
      let open = false;
      loops.forEach((l, k) => {
        misses[k] = miss(l, e) + miss(l, p);
        if (Math.abs(misses[k]!) > CLOSED * capacities[k]!) open = true;
      });
      if (!open) return true;
      correct(misses, p);
      for (let i = 0; i < p.length; i++) p[i] = Math.min(play[i]!, Math.max(-play[i]!, p[i]!));
    }
    return false;
  };
}

/** p -= S (S' S)^-1 misses: the least change of p that meets every loop's condition. */
function projector(loops: readonly Loop[], struts: number): (misses: Float64Array, p: Float64Array) => void {
  const s = loops.length;
  if (s <= 1) return () => {};
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
  return (misses, p) => {
    loops.forEach((l, k) => {
      let t = 0;
      for (let j = 0; j < s; j++) t += inverse[k * s + j]! * misses[j]!;
      for (let q = 0; q < l.indices.length; q++) p[l.indices[q]!]! -= l.values[q]! * t;
    });
  };
}
