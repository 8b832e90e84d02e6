/** One kind of bar. All integers: capacity in steps (kerf included), cost in units of account, available pieces (Infinity: unlimited). */
export interface Bin {
  readonly capacity: number;
  readonly cost: number;
  readonly available: number;
}

/**
 * The one-dimensional cutting stock problem in integers: cover `demand` at least cost.
 *
 * `weights` are distinct and descending, piece length + kerf in steps; with bars of capacity length + kerf the count of
 * kerfs is exact, since n pieces need n - 1 cuts between them.
 */
export interface CuttingProblem {
  readonly weights: Int32Array;
  readonly demand: Int32Array;
  readonly bins: readonly Bin[];
}

/** What is cut from one bar of kind `bin`: counts[j] pieces of weight number items[j]; items ascend, counts are positive. */
export interface Pattern {
  readonly bin: number;
  readonly items: Int32Array;
  readonly counts: Int32Array;
}

/** A pattern cut from several equal bars. */
export interface Run {
  readonly pattern: Pattern;
  readonly times: number;
}

export function patternOf(bin: number, dense: ArrayLike<number>): Pattern {
  const items: number[] = [];
  const counts: number[] = [];
  for (let i = 0; i < dense.length; i++) {
    if (dense[i]! > 0) {
      items.push(i);
      counts.push(dense[i]!);
    }
  }
  return { bin, items: Int32Array.from(items), counts: Int32Array.from(counts) };
}

/** A name that two patterns share only if they are equal. */
export function patternKey(p: Pattern): string {
  let key = `${p.bin}`;
  for (let j = 0; j < p.items.length; j++) key += `;${p.items[j]}x${p.counts[j]}`;
  return key;
}

/** Sum of the weights in a pattern. */
export function patternLoad(weights: Int32Array, p: Pattern): number {
  let load = 0;
  for (let j = 0; j < p.items.length; j++) load += weights[p.items[j]!]! * p.counts[j]!;
  return load;
}

export const runsCost = (problem: CuttingProblem, runs: readonly Run[]): number =>
  runs.reduce((sum, r) => sum + problem.bins[r.pattern.bin]!.cost * r.times, 0);
