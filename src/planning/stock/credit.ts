import type { CuttingProblem, Pattern, Run } from './problem.js';

/** What a kept offcut is worth: `share` of its bar's price per length, where it is at least `least` mm long. */
export interface OffcutWorth {
  readonly least: number;
  readonly share: number;
}

/** A kind of bar as bought: price and length as sold, mm. */
export interface BoughtKind {
  readonly price: number;
  readonly length: number;
}

/** Sum over the bars of share x price / length x offcut, for offcuts long enough to keep; in price. */
export function creditOf(
  runs: readonly Run[],
  kinds: readonly BoughtKind[],
  offcutOf: (p: Pattern) => number,
  worth: OffcutWorth,
): number {
  let credit = 0;
  for (const { pattern, times } of runs) {
    const { price, length } = kinds[pattern.bin]!;
    const offcut = offcutOf(pattern);
    if (offcut >= worth.least) credit += times * worth.share * (price / length) * offcut;
  }
  return credit;
}

/**
 * The problem with each bar's cost less what it would be worth as an offcut at the least price per length, in units so fine
 * that rounding does not matter: the plan to compare with the cheapest, since a longer bar may pay by what it leaves.
 */
export function creditedProblem(
  problem: CuttingProblem,
  kinds: readonly BoughtKind[],
  worth: OffcutWorth,
): CuttingProblem {
  const rate = leastRate(kinds);
  const net = kinds.map((k) => Math.max(0, k.price - worth.share * Math.min(rate, k.price / k.length) * k.length));
  const dearest = Math.max(...net);
  const unit = dearest > 0 ? dearest / FINE : 1;
  return { ...problem, bins: problem.bins.map((b, k) => ({ ...b, cost: Math.round(net[k]! / unit) })) };
}

const FINE = 1e5;

/** Least price of a mm among the bars that cost anything. */
const leastRate = (kinds: readonly BoughtKind[]): number =>
  kinds.reduce((least, k) => (k.price > 0 ? Math.min(least, k.price / k.length) : least), Infinity);

/**
 * No plan costs less than this, offcuts credited, when none has bars for less than `price`.
 *
 * A bar of price c and length L with pieces of length l costs at least c - s c (L - l) / L = (1 - s) c + s (c / L) l; what
 * does not fit on the bars that cost nothing is on bars of at least the least price a mm.
 */
export function creditedBound(
  price: number,
  pieces: number,
  kinds: readonly (BoughtKind & { readonly available: number })[],
  worth: OffcutWorth,
): number {
  const free = kinds.reduce((sum, k) => (k.price > 0 ? sum : sum + k.length * k.available), 0);
  const rate = leastRate(kinds);
  const onBought = Math.max(0, pieces - free);
  return (1 - worth.share) * price + (onBought > 0 && rate < Infinity ? worth.share * rate * onBought : 0);
}
