import type { Random } from '../../maths/random.js';
import type { Effort, Meter } from './effort.js';
import { Exchange } from './exchange.js';
import { firstFitDecreasing, ValueCorrection } from './greedy.js';
import { type CuttingProblem, type Run, runsCost } from './problem.js';
import { merge } from './recover.js';

/** Factors tried, most repetition first: numbers of alike parts that symmetry brings. */
const FACTORS = [24, 20, 18, 16, 15, 12, 10, 9, 8, 6, 5, 4, 3, 2, 1];
/** Value-correction rounds for one part of a repeated plan. */
const PART_ROUNDS = 6;
/** Exchanges without gain before offcuts are as large as they get. */
const PATIENCE = 600;

/**
 * Among plans of the same cost: fewer patterns, since each is a new set of stops, then larger offcuts.
 *
 * Fewer patterns by repetition: a plan for one f-th of each demand is sawn f times over, and what is left over is
 * planned for itself. Larger offcuts by exchange between the bars that stand alone, which makes no pattern more.
 */
export function refine(problem: CuttingProblem, runs: readonly Run[], random: Random, effort: Effort): readonly Run[] {
  const cost = runsCost(problem, runs);
  let best: readonly Run[] = merge(runs);
  for (const factor of FACTORS) {
    if (effort.exhausted) break;
    const plan = repeated(problem, factor, random, effort);
    if (plan && plan.length < best.length && runsCost(problem, plan) <= cost) best = plan;
  }
  return gather(problem, best, random, effort);
}

function repeated(problem: CuttingProblem, factor: number, random: Random, meter: Meter): readonly Run[] | undefined {
  const share = problem.demand.map((d) => Math.floor(d / factor));
  if (share.every((d) => d === 0)) return undefined;
  const part = subProblem(
    problem,
    share,
    problem.bins.map((b) => Math.floor(b.available / factor)),
  );
  if (!part) return undefined;
  const first = quick(part.problem, random, meter).map((r) => ({
    pattern: part.original(r.pattern),
    times: r.times * factor,
  }));
  const rest = problem.demand.slice();
  const left = problem.bins.map((b) => b.available);
  for (const { pattern, times } of first) {
    pattern.items.forEach((item, j) => {
      rest[item]! -= pattern.counts[j]! * times;
    });
    left[pattern.bin]! -= times;
  }
  if (rest.every((d) => d === 0)) return merge(first);
  const other = subProblem(problem, rest, left);
  if (!other || first.length === 0) return undefined;
  const second = quick(other.problem, random, meter).map((r) => ({
    pattern: other.original(r.pattern),
    times: r.times,
  }));
  const covered = rest.slice();
  for (const { pattern, times } of second) {
    pattern.items.forEach((item, j) => {
      covered[item]! -= pattern.counts[j]! * times;
    });
  }
  return covered.every((d) => d === 0) ? merge([...first, ...second]) : undefined;
}

/** The cheapest of first-fit and a few rounds of value correction, of equal ones that with fewest patterns; empty where none is whole. */
function quick(problem: CuttingProblem, random: Random, meter: Meter): readonly Run[] {
  let best: readonly Run[] = [];
  let cost = Infinity;
  const offer = (plan: { readonly runs: Run[]; readonly complete: boolean }): void => {
    if (!plan.complete) return;
    const runs = merge(plan.runs);
    const c = runsCost(problem, runs);
    if (c > cost || (c === cost && runs.length >= best.length)) return;
    best = runs;
    cost = c;
  };
  offer(firstFitDecreasing(problem));
  const correction = new ValueCorrection(problem, random);
  for (let round = 0; round < PART_ROUNDS && !meter.exhausted; round++) offer(correction.round(meter));
  return best;
}

/** The problem with other demands, without the pieces and bars of which there are none. */
function subProblem(problem: CuttingProblem, demand: Int32Array, available: readonly number[]) {
  const items = [...demand.keys()].filter((i) => demand[i]! > 0);
  const lightest = items.reduce((least, i) => Math.min(least, problem.weights[i]!), Infinity);
  const bins = [...available.keys()].filter((b) => available[b]! > 0 && problem.bins[b]!.capacity >= lightest);
  if (bins.length === 0 || items.length === 0) return undefined;
  return {
    problem: {
      weights: Int32Array.from(items, (i) => problem.weights[i]!),
      demand: Int32Array.from(items, (i) => demand[i]!),
      bins: bins.map((b) => ({ ...problem.bins[b]!, available: available[b]! })),
    } satisfies CuttingProblem,
    original: (p: Run['pattern']): Run['pattern'] => ({
      bin: bins[p.bin]!,
      items: p.items.map((i) => items[i]!),
      counts: p.counts,
    }),
  };
}

/** Moves room between bars that stand alone until as much as can be is in one piece. */
function gather(problem: CuttingProblem, runs: readonly Run[], random: Random, effort: Effort): readonly Run[] {
  const alone = runs.filter((r) => r.times === 1);
  if (alone.length < 2) return runs;
  const exchange = new Exchange(problem, alone, undefined, [], random, effort);
  let highest = exchange.spread;
  for (let idle = 0; idle < PATIENCE && !effort.exhausted; idle++) {
    exchange.move(0);
    if (exchange.spread > highest) {
      idle = 0;
      highest = exchange.spread;
    }
  }
  return merge([...runs.filter((r) => r.times > 1), ...exchange.runs()]);
}
