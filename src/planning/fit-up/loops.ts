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
const ROUNDS = 60;
/** A loop counts as closed when its miss is below this share of what its play makes up. */
const CLOSED = 1e-3;

/** Tells whether errors e can be taken up: some p with |p_i| <= play_i and S' (e + p) = 0. */
export function closer(loops: readonly Loop[], play: Float64Array): (e: Float64Array) => boolean {
  const capacities = loops.map((l) => capacity(l, play));
  if (loops.length <= 1) return (e) => loops.every((l, k) => Math.abs(miss(l, e)) <= capacities[k]!);
  const gram = Matrix.zeros(loops.length, loops.length);
  const dense = loops.map((l) => {
    const v = new Float64Array(play.length);
    l.indices.forEach((i, p) => {
      v[i] = l.values[p]!;
    });
    return v;
  });
  loops.forEach((a, i) => {
    for (let j = 0; j <= i; j++) {
      const v = miss(a, dense[j]!);
      gram.set(i, j, v);
      gram.set(j, i, v);
    }
  });
  const cholesky = new CholeskyDecomposition(gram);
  const p = new Float64Array(play.length);
  return (e) => {
    // Necessary, loop by loop: settles nearly every sample that does not close.
    if (loops.some((l, k) => Math.abs(miss(l, e)) > capacities[k]!)) return false;
    // Sufficient: project in turn on S' (e + p) = 0 and on the box (von Neumann's alternating projections); convex, so they meet where the two sets do.
    p.fill(0);
    for (let round = 0; round < ROUNDS; round++) {
      const right = Matrix.columnVector(loops.map((l) => miss(l, e) + miss(l, p)));
      const open = loops.some((_, k) => Math.abs(right.get(k, 0)) > CLOSED * capacities[k]!);
      if (!open) return true;
      const y = cholesky.solve(right);
      loops.forEach((l, k) => {
        const t = y.get(k, 0);
        for (let q = 0; q < l.indices.length; q++) p[l.indices[q]!]! -= l.values[q]! * t;
      });
      for (let i = 0; i < p.length; i++) p[i] = Math.min(play[i]!, Math.max(-play[i]!, p[i]!));
    }
    return false;
  };
}
