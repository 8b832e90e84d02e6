import type { Highs } from 'highs';
import { seededRandom } from '../../maths/random.js';
import type { Effort } from './effort.js';
import { generate } from './generate.js';
import { firstFitDecreasing, ValueCorrection } from './greedy.js';
import { Master } from './master.js';
import { mixBound, type Requirement } from './mix.js';
import { Packer } from './pack.js';
import { Pricer } from './pricer.js';
import { type CuttingProblem, type Pattern, type Run, runsCost } from './problem.js';
import { materialRequirement, requirementFrom } from './requirement.js';
import { SolverFailed } from './solver.js';

export interface CuttingSolution {
  readonly runs: readonly Run[];
  readonly cost: number;
  readonly lowerBound: number;
}

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b));

/** Value-correction rounds before column generation. */
const QUICK_ROUNDS = 12;
/** Dives a mix in the first round, and dead ends from which each goes back. */
const FIRST_DIVES = 1;
const BACKTRACKS = 12;
/** Work of a turn apart from what it calls. */
const TURN = 1e3;
/** First growth of the spare room after a mix that could not be packed. */
const FIRST_STRIDE = 0.05;

/**
 * Least-cost plan and a proven lower bound of its cost.
 *
 * 1. bounds by material, plans by first-fit decreasing and sequential value correction: most jobs end here;
 * 2. column generation over all kinds of bar;
 * 3. its duals, as whole numbers, bound the mix of bars;
 * 4. the cheapest mix that the bounds allow is packed exactly; a mix that even fractions cannot fill is a new bound.
 */
export function solveCutting(highs: Highs, problem: CuttingProblem, seed: number, effort: Effort): CuttingSolution {
  const { bins } = problem;
  const random = seededRandom(seed);
  const pricer = new Pricer(problem.weights);
  const unit = bins.reduce((g, b) => gcd(g, b.cost), 0) || 1;
  const requirements: Requirement[] = [materialRequirement(problem, pricer, effort)];
  let bound = mixBound(highs, problem, requirements, unit, effort);
  let lowerBound = bound.cost;

  let best: Run[] | undefined;
  let cost = Infinity;
  const offer = (plan: { runs: Run[]; complete: boolean }): void => {
    if (!plan.complete) return;
    const c = runsCost(problem, plan.runs);
    if (c < cost) {
      cost = c;
      best = plan.runs;
    }
  };
  const done = (): boolean => cost <= lowerBound || effort.exhausted;
  const pool: Pattern[] = [];
  const first = firstFitDecreasing(problem);
  offer(first);
  for (const r of first.runs) pool.push(r.pattern);
  const correction = new ValueCorrection(problem, random);
  for (let round = 0; round < QUICK_ROUNDS && !done(); round++) {
    const plan = correction.round(effort);
    offer(plan);
    for (const r of plan.runs) pool.push(r.pattern);
  }
  const answer = (): CuttingSolution => ({ runs: best ?? [], cost, lowerBound: Math.min(lowerBound, cost) });
  if (done()) return answer();
  try {
    search();
  } catch (error) {
    if (!(error instanceof SolverFailed)) throw error;
  }
  return answer();

  function search(): void {
    const costs = bins.map((b) => b.cost);
    const largest = Math.max(1, ...costs);
    const penalty = Float64Array.from(problem.weights, () => largest * 10);
    const master = new Master(
      highs,
      problem,
      'cost',
      penalty,
      bins.map((b) => b.available),
    );
    try {
      master.add(pool);
      const root = generate(
        master,
        pricer,
        problem,
        problem.demand,
        bins.map((b) => b.available),
        {
          lagrangian: (worth, carry) => relaxedMix(problem, worth, carry),
          reached: (objective, lower) => Math.ceil(lower / unit - 1e-7) >= Math.ceil(objective / unit - 1e-7),
          refuted: () => false,
          scale: largest,
        },
        costs,
        effort,
      );
      requirements.push(requirementFrom(problem, root.boundDuals, pricer, effort));
      requirements.push(requirementFrom(problem, root.solution.duals, pricer, effort));
      bound = mixBound(highs, problem, requirements, unit, effort);
      lowerBound = Math.max(lowerBound, bound.cost);
      pool.length = 0;
      pool.push(...master.patterns);
    } finally {
      master.dispose();
    }

    // Each round packs the cheapest mix, then mixes with more and more room, each with a few dives; a plan found sends the
    // search back half-way to the last mix that failed. Later rounds dive more often.
    for (let dives = FIRST_DIVES; !done(); dives *= 2) {
      let spare = 0;
      let failed = 0;
      let stride = FIRST_STRIDE;
      while (!done()) {
        // A turn that finds nothing to do must still come to an end.
        effort.spend(TURN);
        const ceiling = cost - unit;
        const cheapest = mixBound(highs, problem, requirements, unit, effort, { spare, ceiling });
        if (spare === 0) lowerBound = Math.max(lowerBound, Math.min(cheapest.cost, cost));
        if (!cheapest.mix || done()) break;
        const mixCost = costOf(problem, cheapest.mix);
        if (mixCost >= cost) break;
        // Of the mixes at that cost, the one with most room is the easiest to pack.
        const roomiest =
          bins.length > 1 &&
          mixBound(highs, problem, requirements, unit, effort, { spare, ceiling: mixCost, roomiest: true }).mix;
        const mix = roomiest || cheapest.mix;
        const room = slack(problem, mix);
        const packer = new Packer(highs, problem, pricer, mix, pool);
        try {
          const relaxed = packer.relax(effort);
          if (relaxed.state === 'exhausted') break;
          if (relaxed.state !== 'reached') {
            const duals = relaxed.state === 'refuted' ? relaxed.boundDuals : relaxed.solution.duals;
            const reason = requirementFrom(problem, duals, pricer, effort);
            const held = reason.carry.reduce((sum, v, b) => sum + (mix[b]! > 0 ? v * mix[b]! : 0), 0);
            if (held < reason.worth) requirements.push(reason);
            // Whole numbers blurred the reason: ask for a little more room instead.
            else spare = Math.max(room, spare) + 1;
            continue;
          }
          let runs: Run[] | undefined;
          for (let dive = 0; dive < dives && !runs && !effort.exhausted; dive++) {
            runs = packer.dive(random, dive === 0, BACKTRACKS, effort);
          }
          if (runs) {
            offer({ runs, complete: true });
            spare = Math.max(failed + 1, Math.floor((failed + room) / 2));
            if (room <= failed + 1) break;
          } else {
            failed = Math.max(failed, room);
            spare = room + 1 + Math.floor(room * stride);
            stride *= 1.6;
          }
        } finally {
          pool.length = 0;
          pool.push(...packer.patterns);
          packer.dispose();
        }
      }
    }
  }
}

const costOf = (problem: CuttingProblem, mix: readonly number[]): number =>
  mix.reduce((sum, n, b) => sum + n * problem.bins[b]!.cost, 0);

/** Steps of capacity beyond the weight of all pieces. */
function slack(problem: CuttingProblem, mix: readonly number[]): number {
  let s = 0;
  for (let b = 0; b < mix.length; b++) s += mix[b]! * problem.bins[b]!.capacity;
  for (let i = 0; i < problem.weights.length; i++) s -= problem.weights[i]! * problem.demand[i]!;
  return s;
}

/** min sum c n with sum carry n >= worth, 0 <= n <= available, n real: cheapest carriers first. */
function relaxedMix(problem: CuttingProblem, worth: number, carry: readonly number[]): number {
  const order = carry.map((_, b) => b).filter((b) => carry[b]! > 0);
  order.sort((a, b) => problem.bins[a]!.cost / carry[a]! - problem.bins[b]!.cost / carry[b]! || a - b);
  let left = worth;
  let cost = 0;
  for (const b of order) {
    if (carry[b] === Infinity) return cost;
    const n = Math.min(left / carry[b]!, problem.bins[b]!.available);
    cost += n * problem.bins[b]!.cost;
    left -= n * carry[b]!;
    if (left <= 0) break;
  }
  return cost;
}
