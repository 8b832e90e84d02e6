import { seededRandom } from '../../maths/random.js';
import { creditedBound, creditedProblem, creditOf } from './credit.js';
import { Effort } from './effort.js';
import { requestFaults } from './faults.js';
import { layOut } from './lay-out.js';
import { type Prepared, prepare } from './prepare.js';
import { type CuttingProblem, type Pattern, patternLoad, type Run } from './problem.js';
import { recover } from './recover.js';
import { refine } from './refine.js';
import type { StockAnswer, StockRequest } from './request.js';
import { solveCutting } from './solve.js';
import { linearSolver } from './solver.js';
import { STEPS_PER_MM } from './steps.js';
import { withSubstitute } from './substitute.js';

/**
 * Work of the usual search, in microseconds of a desk computer of 2020; most jobs end in less than a second. One kind of
 * bar: half a minute at the hardest. Several: a quarter of a minute, and more for more pieces.
 */
const ONE_KIND_EFFORT = 25e6;
const EFFORT = 6e6;
const EFFORT_A_PIECE = 30e3;
const MOST_EFFORT = 70e6;
/** Work spent on fewer patterns and larger offcuts at the same cost. */
const REFINE_EFFORT = 2e6;

/** Costs are sums of some thousand doubles: nearer than this share, they are the same. */
const SAME_COST = 1e-9;

/**
 * Cuts pieces from bars at the least total price, with a proven lower bound of that price.
 *
 * In whole steps of 0.1 mm (pieces, kerf and trim up, bars down), n pieces fit a bar when their lengths and n - 1 kerfs do.
 * The same request gives the same plan on every machine unless a time limit cuts it short, which it then says; `clock`
 * gives ms from any start, and without it a time limit is not heeded. Pieces with a fault, too long for every bar, or left
 * when the bars run out are named. With a fault outside the pieces no plan is made.
 */
export async function planStock(request: StockRequest, clock?: () => number): Promise<StockAnswer> {
  const faults = requestFaults(request);
  const nothing = { bars: [], cost: 0, lowerBound: 0, credit: 0, proven: false, uncut: [] };
  if (faults.some((f) => !f.place.startsWith('pieces['))) return { ...nothing, faults };
  const bad = new Set(faults.map((f) => f.place));
  const end = request.timeLimitMs !== undefined && clock ? clock() + request.timeLimitMs : undefined;
  const expired = end !== undefined && clock ? () => clock() >= end : undefined;
  const prepared = prepare(request, bad);
  const { kinds, kerf, groups, problem, prices, divisor, longest } = prepared;
  const uncut = [...prepared.tooLong];
  if (groups.length === 0) return { ...nothing, uncut, faults, proven: uncut.length === 0 && faults.length === 0 };

  const real = problem.bins.length;
  const seed = request.seed ?? 1;
  const factor = request.effort ?? 1;
  const work = factor * usualEffort(problem);
  const effort = new Effort(work, expired);
  const highs = await linearSolver();
  const solve = (of: CuttingProblem) => {
    const solved = solveCutting(highs, withSubstitute(of), seed, effort);
    const runs = recover(of, solved.runs);
    const complete = runs.every((r) => r.pattern.bin < real);
    const spare = new Effort(REFINE_EFFORT * factor, expired);
    return { ...solved, complete, runs: complete ? refine(of, runs, seededRandom(seed), spare) : runs };
  };

  const bought = kinds.map(({ kind: { price = 1, length, available = Infinity } }) => ({ price, length, available }));
  const worth = request.offcuts ?? { least: 0, share: 0 };
  const priceOf = (runs: readonly Run[]): number =>
    prices.exact
      ? runs.reduce((sum, r) => sum + prices.whole[r.pattern.bin]! * r.times, 0) / prices.perUnit
      : runs.reduce((sum, r) => sum + bought[r.pattern.bin]!.price * r.times, 0);
  // The problem's bars lost what is less than its step; their offcuts have it.
  const offcutOf = (p: Pattern): number =>
    Math.max(0, kinds[p.bin]!.room - patternLoad(problem.weights, p) * divisor) / STEPS_PER_MM;
  const creditFor = (runs: readonly Run[]): number => (worth.share > 0 ? creditOf(runs, bought, offcutOf, worth) : 0);

  const cheapest = solve(problem);
  let chosen = cheapest.runs;
  if (worth.share > 0 && cheapest.complete && !effort.stopped) {
    effort.extend(work);
    const other = solve(creditedProblem(problem, bought, worth));
    const net = (runs: readonly Run[]): number => priceOf(runs) - creditFor(runs);
    if (other.complete && net(other.runs) < net(chosen)) chosen = other.runs;
  }

  const rooms = kinds.map((k) => k.room);
  const laid = layOut(chosen, groups, rooms, kerf, real);
  for (const { piece, quantity } of laid.left)
    uncut.push({ mark: piece.mark, length: piece.length, quantity, reason: 'no-stock-left', longest });
  const existing = chosen.filter((r) => r.pattern.bin < real);
  const credit = creditFor(existing);
  const cost = priceOf(existing) - credit;
  const claimed = laid.left.length === 0;
  const least =
    cheapest.cost <= cheapest.lowerBound
      ? priceOf(cheapest.runs.filter((r) => r.pattern.bin < real))
      : cheapest.lowerBound / prices.perUnit;
  const bound = worth.share > 0 ? creditedBound(least, lengthOf(groups), bought, worth) : least;
  const proven = claimed && cost - bound <= SAME_COST * Math.max(1, cost);
  return {
    bars: laid.bars.map(({ bin, cuts, offcut }) => ({ stock: kinds[bin]!.kind.name, cuts, offcut })),
    cost,
    lowerBound: !claimed ? 0 : proven ? cost : Math.min(bound, cost),
    credit,
    proven: proven && uncut.length === 0 && faults.length === 0,
    uncut,
    faults,
    ...(effort.stopped ? { stopped: 'time' as const } : {}),
  };
}

function usualEffort(problem: CuttingProblem): number {
  if (problem.bins.length === 1) return ONE_KIND_EFFORT;
  const pieces = problem.demand.reduce((sum, d) => sum + d, 0);
  return Math.min(EFFORT + EFFORT_A_PIECE * pieces, MOST_EFFORT);
}

const lengthOf = (groups: Prepared['groups']): number => {
  let sum = 0;
  for (const { pieces } of groups) for (const p of pieces) sum += p.length * p.quantity;
  return sum;
};
