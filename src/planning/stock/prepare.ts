import type { Bin, CuttingProblem } from './problem.js';
import type { StockKind, StockPiece, StockRequest, UncutPiece } from './request.js';
import { STEPS_PER_MM, stepsDown, stepsUp, wholePrices } from './steps.js';

/** A kind of bar that pieces can be cut from; room in steps, trim taken off. */
export interface UsableKind {
  readonly kind: StockKind;
  readonly room: number;
}

/** A request in whole steps and whole prices. */
export interface Prepared {
  readonly kinds: readonly UsableKind[];
  readonly kerf: number;
  /** Longest piece that any bar gives, mm. */
  readonly longest: number;
  /** Pieces by length in steps, longest first: the order of the problem's weights. */
  readonly groups: readonly { readonly steps: number; readonly pieces: readonly StockPiece[] }[];
  readonly tooLong: readonly UncutPiece[];
  /** Prices as whole numbers, `perUnit` to one of the request's; `exact` where none was rounded. */
  readonly prices: { readonly whole: readonly number[]; readonly perUnit: number; readonly exact: boolean };
  /** The problem's steps are this many of 0.1 mm: the common divisor of all weights. */
  readonly divisor: number;
  readonly problem: CuttingProblem;
}

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b));

/** Puts a request without general faults into integers; pieces at the places in `bad` are left out. */
export function prepare(request: StockRequest, bad: ReadonlySet<string>): Prepared {
  const kerf = stepsUp(request.kerf);
  const trim = stepsUp(request.endTrim ?? 0);
  const kinds = request.stock
    .map((kind) => ({ kind, room: stepsDown(kind.length) - trim * (kind.trimmedEnds ?? request.trimmedEnds ?? 1) }))
    .filter(({ kind, room }) => room > 0 && (kind.available ?? 1) > 0);
  const longestRoom = kinds.reduce((most, k) => Math.max(most, k.room), 0);
  const longest = longestRoom / STEPS_PER_MM;

  const tooLong: UncutPiece[] = [];
  const bySteps = new Map<number, StockPiece[]>();
  request.pieces.forEach((piece, i) => {
    if (bad.has(`pieces[${i}] ${piece.mark}`) || piece.quantity === 0) return;
    const { mark, length, quantity } = piece;
    const steps = stepsUp(length);
    if (steps > longestRoom) {
      tooLong.push({ mark, length, quantity, reason: 'too-long', longest });
      return;
    }
    const group = bySteps.get(steps);
    if (group) group.push(piece);
    else bySteps.set(steps, [piece]);
  });
  const groups = [...bySteps].sort(([a], [b]) => b - a).map(([steps, pieces]) => ({ steps, pieces }));
  const weights = groups.map((g) => g.steps + kerf);
  const divisor = Math.max(1, weights.reduce(gcd, 0));
  const prices = wholePrices(kinds.map(({ kind }) => kind.price ?? 1));
  return {
    kinds,
    kerf,
    longest,
    groups,
    tooLong,
    prices,
    divisor,
    problem: {
      weights: Int32Array.from(weights, (w) => w / divisor),
      demand: Int32Array.from(groups, (g) => g.pieces.reduce((sum, p) => sum + p.quantity, 0)),
      // What is less than a step of the problem can hold nothing.
      bins: kinds.map(
        ({ kind, room }, k): Bin => ({
          capacity: Math.floor((room + kerf) / divisor),
          cost: prices.whole[k]!,
          available: kind.available ?? Infinity,
        }),
      ),
    },
  };
}
