import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { capacity, type Loop, miss } from './loops.js';

/** What a lower bound on the chance of closing rests on, and what it asks of each strut. */
export interface SureChance {
  /** At least this share of all cases closes. */
  readonly chance: number;
  /** Play that each strut needs, mm, for the wanted chance by the same rule; 0: in no loop. */
  readonly needed: Float64Array;
}

/** Tail of a sum of independent errors of total deviation 1 beyond x on both sides, or a bound on it. */
export type Tail = (x: number) => number;

/**
 * A lower bound on P(some p with |p_i| <= play_i and S' (e + p) = 0), S the loops, e independent errors of the given
 * deviations. The largest of three:
 * - every strut takes up its own error: the product of P(|e_i| <= play_i);
 * - of one loop alone: P(|S' e| <= sum |S_i| play_i), exact as far as the tail is;
 * - a linear rule p = -W S (S' W S)^-1 S' e, W the squares of the play: it closes every loop, and each p_i has the deviation
 *   sd_i = W_i sqrt(S_i H S_i'), H = A^-1 (S' D S) A^-1, A = S' W S, D the variances; so 1 - sum of P(|p_i| > play_i)
 *   (Boole's inequality) is a bound, whatever the loops share.
 */
export function sureChance(
  loops: readonly Loop[],
  play: Float64Array,
  deviation: Float64Array,
  tails: { readonly single: Tail; readonly sum: Tail },
  wanted: number,
): SureChance {
  const tail = tails.sum;
  const n = play.length;
  const needed = new Float64Array(n);
  if (loops.length === 0) return { chance: 1, needed };
  let own = 1;
  const inLoops = new Uint8Array(n);
  for (const l of loops) for (const i of l.indices) inLoops[i] = 1;
  for (let i = 0; i < n; i++)
    if (inLoops[i]) own *= Math.max(0, 1 - tails.single(deviation[i]! > 0 ? play[i]! / deviation[i]! : Infinity));
  const alone =
    loops.length === 1 ? 1 - tail(capacity(loops[0]!, play) / Math.max(deviationOf(loops[0]!, deviation), 1e-12)) : 0;
  const ruled = ruleDeviations(loops, play, deviation);
  let missed = 0;
  const used = ruled.reduce((count, sd) => count + (sd > 0 ? 1 : 0), 0);
  // Each strut may use up an equal part of the cases that may fail.
  const factor = inverseTail(tail, (1 - wanted) / Math.max(used, 1));
  ruled.forEach((sd, i) => {
    if (sd > 0) missed += tail(play[i]! / sd);
    needed[i] = sd * factor;
  });
  return { chance: Math.min(1, Math.max(0, own, alone, 1 - missed)), needed };
}

/** Deviation of S' e. */
export function deviationOf(loop: Loop, deviation: ArrayLike<number>): number {
  let sum = 0;
  for (let p = 0; p < loop.indices.length; p++) sum += (loop.values[p]! * deviation[loop.indices[p]!]!) ** 2;
  return Math.sqrt(sum);
}

/** Deviation of what the linear rule asks of each strut's play. */
function ruleDeviations(loops: readonly Loop[], play: Float64Array, deviation: Float64Array): Float64Array {
  const s = loops.length;
  const [a, b] = [Matrix.zeros(s, s), Matrix.zeros(s, s)];
  const weighed = new Float64Array(play.length);
  const spread = new Float64Array(play.length);
  // Struts without play give nothing; a share of the largest keeps the equations solvable.
  const least = LEAST_PLAY * play.reduce((m, v) => Math.max(m, v), 0);
  const weights = play.map((v) => Math.max(v, least) ** 2);
  loops.forEach((l, k) => {
    l.indices.forEach((i, p) => {
      weighed[i] = weights[i]! * l.values[p]!;
      spread[i] = deviation[i]! ** 2 * l.values[p]!;
    });
    for (let j = 0; j <= k; j++) {
      const [va, vb] = [miss(loops[j]!, weighed), miss(loops[j]!, spread)];
      a.set(k, j, va);
      a.set(j, k, va);
      b.set(k, j, vb);
      b.set(j, k, vb);
    }
    l.indices.forEach((i) => {
      weighed[i] = 0;
      spread[i] = 0;
    });
  });
  const solver = new CholeskyDecomposition(a);
  const h = solver.solve(solver.solve(b).transpose());
  const rows: { loop: number; value: number }[][] = Array.from({ length: play.length }, () => []);
  loops.forEach((l, loop) => {
    l.indices.forEach((i, p) => {
      rows[i]!.push({ loop, value: l.values[p]! });
    });
  });
  return Float64Array.from(rows, (row, i) => {
    let sum = 0;
    for (const p of row) for (const q of row) sum += p.value * q.value * h.get(p.loop, q.loop);
    return weights[i]! * Math.sqrt(Math.max(0, sum));
  });
}

const LEAST_PLAY = 1e-6;

/** x with tail(x) = p, by halving; tails fall. */
function inverseTail(tail: Tail, p: number): number {
  let [low, high] = [0, 1];
  while (tail(high) > p && high < 100) high *= 2;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (tail(middle) > p) low = middle;
    else high = middle;
  }
  return high;
}
