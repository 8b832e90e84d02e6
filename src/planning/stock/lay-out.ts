import type { Run } from './problem.js';
import type { StockPiece } from './request.js';
import { STEPS_PER_MM } from './steps.js';

export interface LaidBar {
  readonly bin: number;
  readonly cuts: readonly { readonly mark: string; readonly length: number }[];
  readonly offcut: number;
}

/** Pieces of one length in steps, with those that share it. */
export interface LengthGroup {
  readonly steps: number;
  readonly pieces: readonly StockPiece[];
}

/**
 * Gives each place in the patterns a piece, in sawing order: in a bar the longest first, equal ones together; equal
 * bars one after another, and bars that start with the longest pieces first, so that a stop is set once and left.
 * Runs of a bin from `real` on are bars that do not exist: their pieces are left.
 */
export function layOut(
  runs: readonly Run[],
  groups: readonly LengthGroup[],
  room: readonly number[],
  kerf: number,
  real: number,
): { bars: LaidBar[]; left: { piece: StockPiece; quantity: number }[] } {
  const order = runs
    .map((run, at) => ({ run, at }))
    .sort((a, b) => {
      const lack = Number(a.run.pattern.bin >= real) - Number(b.run.pattern.bin >= real);
      return (
        lack ||
        compare(a.run.pattern.items, b.run.pattern.items, a.run.pattern.counts, b.run.pattern.counts) ||
        a.run.pattern.bin - b.run.pattern.bin ||
        a.at - b.at
      );
    });
  const next = groups.map(() => ({ piece: 0, taken: 0 }));
  const take = (group: number): StockPiece => {
    const { pieces } = groups[group]!;
    const n = next[group]!;
    while (n.taken >= pieces[n.piece]!.quantity) {
      n.piece++;
      n.taken = 0;
    }
    n.taken++;
    return pieces[n.piece]!;
  };
  const bars: LaidBar[] = [];
  const left = new Map<StockPiece, number>();
  for (const { run } of order) {
    const { bin, items, counts } = run.pattern;
    for (let t = 0; t < run.times; t++) {
      const cuts: { mark: string; length: number }[] = [];
      let used = 0;
      for (let j = 0; j < items.length; j++) {
        for (let c = 0; c < counts[j]!; c++) {
          const piece = take(items[j]!);
          if (bin >= real) left.set(piece, (left.get(piece) ?? 0) + 1);
          else cuts.push({ mark: piece.mark, length: piece.length });
          used += groups[items[j]!]!.steps + kerf;
        }
      }
      if (bin < real) bars.push({ bin, cuts, offcut: Math.max(0, room[bin]! - used) / STEPS_PER_MM });
    }
  }
  return { bars, left: [...left].map(([piece, quantity]) => ({ piece, quantity })) };
}

/** Longest pieces first, then more of them. */
function compare(a: Int32Array, b: Int32Array, timesA: Int32Array, timesB: Int32Array): number {
  for (let j = 0; j < Math.min(a.length, b.length); j++) {
    const d = a[j]! - b[j]! || timesB[j]! - timesA[j]!;
    if (d !== 0) return d;
  }
  return b.length - a.length;
}
