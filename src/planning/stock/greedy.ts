import type { Random } from '../../maths/random.js';
import type { Meter } from './effort.js';
import { branchKnapsack, rankItems } from './knapsack-branch.js';
import { type CuttingProblem, type Pattern, patternLoad, patternOf, type Run } from './problem.js';

/** Chooses what to cut from a bar of `bin` out of what is left; undefined when nothing fits. */
type Filler = (bin: number, left: Int32Array) => Pattern | undefined;

/** Nodes a bar in sequential value correction: the values are guesses, so an exact knapsack is not worth more. */
const FILL_NODES = 400;

/** Longest first, each piece as often as it fits. */
function longestFirst(problem: CuttingProblem): Filler {
  return (bin, left) => {
    let room = problem.bins[bin]!.capacity;
    const counts = new Int32Array(left.length);
    let any = false;
    for (let i = 0; i < left.length; i++) {
      const t = Math.min(left[i]!, Math.floor(room / problem.weights[i]!));
      if (t > 0) {
        counts[i] = t;
        room -= t * problem.weights[i]!;
        any = true;
      }
    }
    return any ? patternOf(bin, counts) : undefined;
  };
}

/** Fills bar after bar, each time the kind that costs least for what it takes, until nothing is left or nothing fits. */
function fillAll(
  problem: CuttingProblem,
  demand: Int32Array,
  fill: Filler,
  worth: (p: Pattern) => number,
  after?: (p: Pattern, times: number, left: Int32Array) => void,
): { runs: Run[]; complete: boolean } {
  const left = demand.slice();
  const stock = problem.bins.map((b) => b.available);
  const runs: Run[] = [];
  let open = left.reduce((s, d) => s + d, 0);
  while (open > 0) {
    let chosen: Pattern | undefined;
    let rate = Infinity;
    let filled = 0;
    for (let b = 0; b < problem.bins.length; b++) {
      if (stock[b]! <= 0) continue;
      const p = fill(b, left);
      if (!p) continue;
      const r = problem.bins[b]!.cost / worth(p);
      const full = patternLoad(problem.weights, p) / problem.bins[b]!.capacity;
      if (r < rate || (r === rate && full > filled)) {
        rate = r;
        filled = full;
        chosen = p;
      }
    }
    if (!chosen) return { runs, complete: false };
    let times = stock[chosen.bin]!;
    for (let j = 0; j < chosen.items.length; j++) {
      times = Math.min(times, Math.floor(left[chosen.items[j]!]! / chosen.counts[j]!));
    }
    for (let j = 0; j < chosen.items.length; j++) {
      left[chosen.items[j]!]! -= times * chosen.counts[j]!;
      open -= times * chosen.counts[j]!;
    }
    stock[chosen.bin]! -= times;
    runs.push({ pattern: chosen, times });
    after?.(chosen, times, left);
  }
  return { runs, complete: true };
}

/** First-fit decreasing, a bar at a time (Johnson, 1973), over several kinds of bar. */
export function firstFitDecreasing(problem: CuttingProblem): { runs: Run[]; complete: boolean } {
  return fillAll(problem, problem.demand, longestFirst(problem), (p) => patternLoad(problem.weights, p));
}

/**
 * Sequential value correction (Mukhacheva 1993; Belov and Scheithauer, INFORMS J. Computing 19, 2007, section 5): bars
 * are filled with pieces of most value, and a piece that was cut with much waste is worth more in the next round.
 */
export class ValueCorrection {
  private readonly value: Float64Array;

  constructor(
    private readonly problem: CuttingProblem,
    private readonly random: Random,
  ) {
    this.value = Float64Array.from(problem.weights);
  }

  round(meter: Meter): { runs: Run[]; complete: boolean } {
    const { problem, value, random } = this;
    const power = 1 + 0.04 * random();
    const inertia = 0.5 + random();
    return fillAll(
      problem,
      problem.demand,
      (bin, left) => {
        const { capacity } = problem.bins[bin]!;
        const ranked = rankItems(problem.weights, left, value, capacity);
        if (ranked.item.length === 0) return undefined;
        const { counts, nodes } = branchKnapsack(ranked, capacity, 0, FILL_NODES);
        meter.spend(nodes * 0.12 + ranked.item.length * 0.15);
        if (!counts) return undefined;
        const dense = new Int32Array(left.length);
        for (let j = 0; j < counts.length; j++) dense[ranked.item[j]!] = counts[j]!;
        return patternOf(bin, dense);
      },
      (p) => {
        let v = 0;
        for (let j = 0; j < p.items.length; j++) v += value[p.items[j]!]! * p.counts[j]!;
        return v;
      },
      (p, times, left) => {
        const { capacity } = problem.bins[p.bin]!;
        const stretch = capacity / patternLoad(problem.weights, p);
        for (let j = 0; j < p.items.length; j++) {
          const i = p.items[j]!;
          const cut = times * p.counts[j]!;
          const held = inertia * (left[i]! + cut + problem.demand[i]!);
          value[i] = (value[i]! * held + cut * stretch * problem.weights[i]! ** power) / (held + cut);
        }
      },
    );
  }
}
