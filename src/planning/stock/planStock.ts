import { seededRandom } from '../../maths/random.js';
import { creditedBound, creditedProblem, creditOf } from './credit.js';
import { Effort } from './effort.js';
import { requestFaults } from './faults.js';
import { layOut } from './layOut.js';
import { type Bin, type CuttingProblem, type Pattern, patternLoad, type Run } from './problem.js';
import { recover } from './recover.js';
import { refine } from './refine.js';
import type { StockAnswer, StockKind, StockPiece, StockRequest, UncutPiece } from './request.js';
import { solveCutting } from './solve.js';
import { linearSolver } from './solver.js';
import { STEPS_PER_MM, stepsDown, stepsUp, wholePrices } from './steps.js';

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

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b));

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
  const kerf = stepsUp(request.kerf);
  const room = (s: StockKind): number =>
    stepsDown(s.length) - stepsUp(request.endTrim ?? 0) * (s.trimmedEnds ?? request.trimmedEnds ?? 1);
  const kinds = request.stock
    .map((kind) => ({ kind, room: room(kind) }))
    .filter(({ kind, room }) => room > 0 && (kind.available ?? 1) > 0);
  const longestRoom = kinds.reduce((most, k) => Math.max(most, k.room), 0);
  const longest = longestRoom / STEPS_PER_MM;

  const uncut: UncutPiece[] = [];
  const byWeight = new Map<number, StockPiece[]>();
  request.pieces.forEach((piece, i) => {
    if (bad.has(`pieces[${i}] ${piece.mark}`) || piece.quantity === 0) return;
    const steps = stepsUp(piece.length);
    if (steps > longestRoom) {
      const { mark, length, quantity } = piece;
      uncut.push({ mark, length, quantity, reason: 'too-long', longest });
      return;
    }
    const group = byWeight.get(steps + kerf);
    if (group) group.push(piece);
    else byWeight.set(steps + kerf, [piece]);
  });
  const weights = [...byWeight.keys()].sort((a, b) => b - a);
  if (weights.length === 0) return { ...nothing, uncut, faults, proven: uncut.length === 0 && faults.length === 0 };

  const { whole, perUnit, exact } = wholePrices(kinds.map(({ kind }) => kind.price ?? 1));
  const divisor = weights.reduce(gcd, 0);
  const problem = shrink(
    weights,
    divisor,
    weights.map((w) => byWeight.get(w)!.reduce((sum, p) => sum + p.quantity, 0)),
    kinds.map(({ kind, room }, k) => ({
      capacity: room + kerf,
      cost: whole[k]!,
      available: kind.available ?? Infinity,
    })),
  );
  const real = problem.bins.length;
  const count = problem.demand.reduce((sum, d) => sum + d, 0);
  const usual = real === 1 ? ONE_KIND_EFFORT : Math.min(EFFORT + EFFORT_A_PIECE * count, MOST_EFFORT);
  const expired = end !== undefined && clock ? () => clock() >= end : undefined;
  const effort = new Effort(usual * (request.effort ?? 1), expired);
  const highs = await linearSolver();
  const seed = request.seed ?? 1;
  const solve = (of: CuttingProblem) => {
    const solved = solveCutting(highs, withSubstitute(of), seed, effort);
    const runs = recover(of, solved.runs);
    const complete = runs.every((r) => r.pattern.bin < real);
    const spare = new Effort(REFINE_EFFORT * (request.effort ?? 1), expired);
    return { ...solved, complete, runs: complete ? refine(of, runs, seededRandom(seed), spare) : runs };
  };
  const cheapest = solve(problem);
  const bought = kinds.map(({ kind }) => ({
    price: kind.price ?? 1,
    length: kind.length,
    available: kind.available ?? Infinity,
  }));
  const worth = { least: request.offcuts?.least ?? 0, share: request.offcuts?.share ?? 0 };
  const priced = (runs: readonly Run[]): number =>
    exact
      ? runs.reduce((sum, r) => sum + whole[r.pattern.bin]! * r.times, 0) / perUnit
      : runs.reduce((sum, r) => sum + bought[r.pattern.bin]!.price * r.times, 0);
  // Bars lost what is less than the weights' divisor; their offcuts have it.
  const offcutOf = (p: Pattern): number =>
    Math.max(0, kinds[p.bin]!.room - patternLoad(problem.weights, p) * divisor) / STEPS_PER_MM;
  const credit = (runs: readonly Run[]): number => creditOf(runs, bought, offcutOf, worth);
  let chosen = cheapest.runs;
  if (worth.share > 0 && cheapest.complete && !effort.stopped) {
    effort.extend(usual * (request.effort ?? 1));
    const other = solve(creditedProblem(problem, bought, worth));
    const net = (runs: readonly Run[]): number => priced(runs) - credit(runs);
    if (other.complete && net(other.runs) < net(chosen)) chosen = other.runs;
  }
  const laid = layOut(
    chosen,
    weights.map((w) => ({ steps: w - kerf, pieces: byWeight.get(w)! })),
    kinds.map((k) => k.room),
    kerf,
    real,
  );
  for (const { piece, quantity } of laid.left) {
    uncut.push({ mark: piece.mark, length: piece.length, quantity, reason: 'no-stock-left', longest });
  }
  const bars = laid.bars.map(({ bin, cuts, offcut }) => ({ stock: kinds[bin]!.kind.name, cuts, offcut }));
  const claimed = laid.left.length === 0;
  const existing = chosen.filter((r) => r.pattern.bin < real);
  const saved = worth.share > 0 ? credit(existing) : 0;
  const cost = priced(existing) - saved;
  const least = cheapest.cost <= cheapest.lowerBound ? priced(cheapest.runs) : cheapest.lowerBound / perUnit;
  const bound = !claimed
    ? 0
    : worth.share > 0
      ? Math.min(cost, creditedBound(least, sumOfLengths(byWeight), bought, worth))
      : least;
  const proven = claimed && cost - bound <= 1e-9 * Math.max(1, cost);
  return {
    bars,
    cost,
    lowerBound: proven ? cost : bound,
    credit: saved,
    proven: proven && uncut.length === 0 && faults.length === 0,
    uncut,
    faults,
    ...(effort.stopped ? { stopped: 'time' as const } : {}),
  };
}

/** Divides all weights by a common divisor; bars lose what is less than one. */
function shrink(
  weights: readonly number[],
  divisor: number,
  demand: readonly number[],
  bins: readonly Bin[],
): CuttingProblem {
  return {
    weights: Int32Array.from(weights, (w) => w / divisor),
    demand: Int32Array.from(demand),
    bins: bins.map((b) => ({ ...b, capacity: Math.floor(b.capacity / divisor) })),
  };
}

/**
 * Where pieces could run out of bars: the longest bar once more, without limit, at a price above any saving that one such
 * bar can bring, so that a plan leaves as little uncut as it can. Bars of it are what is missing.
 */
function withSubstitute(problem: CuttingProblem): CuttingProblem {
  const endless = problem.bins.reduce((most, b) => (b.available === Infinity ? Math.max(most, b.capacity) : most), 0);
  if (problem.weights[0]! <= endless) return problem;
  const longest = problem.bins.reduce((a, b) => (b.capacity > a.capacity ? b : a));
  const dearest = Math.max(1, ...problem.bins.map((b) => b.cost));
  const pieces = Math.floor(longest.capacity / problem.weights[problem.weights.length - 1]!);
  return {
    ...problem,
    bins: [...problem.bins, { capacity: longest.capacity, cost: dearest * (pieces + 1), available: Infinity }],
  };
}

const sumOfLengths = (groups: ReadonlyMap<number, readonly StockPiece[]>): number => {
  let sum = 0;
  for (const pieces of groups.values()) for (const p of pieces) sum += p.length * p.quantity;
  return sum;
};
