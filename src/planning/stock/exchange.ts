import type { Random } from '../../maths/random.js';
import type { Meter } from './effort.js';
import { type CuttingProblem, patternOf, type Run } from './problem.js';
import { merge } from './recover.js';

/** One bar of a plan while pieces move between bars; room in steps. */
export interface Bar {
  readonly bin: number;
  readonly counts: Int32Array;
  room: number;
}

/** Nodes of one search for the fullest bar; a bar of a dozen pieces is nearly always filled to the last step or two. */
const FILL_NODES = 500;

/**
 * Pieces on bars and pieces left over, changed by exchange: a few bars at a time are emptied, together with the pieces left
 * over, and filled again one after another as full as can be, so that room gathers on few bars
 * (the idea of minimum bin slack: Fleszar and Hindi, Computers & OR 29, 2002).
 */
export class Exchange {
  readonly bars: Bar[] = [];
  readonly left: Int32Array;
  leftWeight = 0;
  /** Sum of the squares of all rooms: high when room is gathered. */
  spread: number;
  private readonly list: Int32Array;
  private readonly pool: Int32Array;
  private readonly fills: readonly Int32Array[];

  constructor(
    private readonly problem: CuttingProblem,
    runs: readonly Run[],
    over: Int32Array | undefined,
    spareBars: readonly number[],
    private readonly random: Random,
    private readonly meter: Meter,
  ) {
    const { weights, bins } = problem;
    for (const { pattern, times } of runs) {
      for (let t = 0; t < times; t++) {
        const counts = new Int32Array(weights.length);
        let room = bins[pattern.bin]!.capacity;
        pattern.items.forEach((item, j) => {
          counts[item] = pattern.counts[j]!;
          room -= weights[item]! * pattern.counts[j]!;
        });
        this.bars.push({ bin: pattern.bin, counts, room });
      }
    }
    spareBars.forEach((n, bin) => {
      for (let t = 0; t < n; t++) {
        this.bars.push({ bin, counts: new Int32Array(weights.length), room: bins[bin]!.capacity });
      }
    });
    this.left = over?.slice() ?? new Int32Array(weights.length);
    for (let i = 0; i < this.left.length; i++) this.leftWeight += this.left[i]! * weights[i]!;
    this.spread = this.bars.reduce((sum, b) => sum + b.room * b.room, 0);
    this.list = new Int32Array(weights.length);
    this.pool = new Int32Array(weights.length);
    this.fills = [0, 1, 2].map(() => new Int32Array(weights.length));
  }

  /**
   * One exchange. `warmth`: losses of squared room that pass with a fair chance, as a share of the largest room's square
   * (simulated annealing at one temperature); nought: none pass. True where fewer pieces are left over than before.
   */
  move(warmth: number): boolean {
    const { problem, bars, left, list, pool, fills, random, meter } = this;
    const { weights, bins } = problem;
    const few = Math.min(bars.length, random() < 0.5 ? 2 : 3);
    const chosen: Bar[] = [];
    // Half the time the bar with most room takes part, since that is where the rest has to go, and half the time one of
    // those that still have some to give.
    const roomiest = bars.reduce((most, b) => (b.room > most.room ? b : most));
    const heat = warmth * roomiest.room ** 2;
    if (random() < 0.5) chosen.push(roomiest);
    if (random() < 0.5) {
      const roomy = bars.filter((b) => b.room > 0 && !chosen.includes(b));
      if (roomy.length > 0) chosen.push(roomy[Math.floor(random() * roomy.length)]!);
    }
    while (chosen.length < few) {
      const b = bars[Math.floor(random() * bars.length)]!;
      if (!chosen.includes(b)) chosen.push(b);
    }
    chosen.sort((a, b) => a.room - b.room);
    const withLeft = this.leftWeight > 0 && random() < 0.5;
    let before = 0;
    for (let i = 0; i < pool.length; i++) {
      pool[i] = withLeft ? left[i]! : 0;
      for (const b of chosen) pool[i]! += b.counts[i]!;
    }
    for (const b of chosen) before += b.room * b.room;
    let after = 0;
    const rooms: number[] = [];
    for (let c = 0; c < chosen.length; c++) {
      const fill = fills[c]!;
      const capacity = bins[chosen[c]!.bin]!.capacity;
      // The first bars are filled to the brim; what remains must go on the last.
      const room = fullest(weights, pool, capacity, fill, list, random, meter);
      for (let i = 0; i < pool.length; i++) pool[i]! -= fill[i]!;
      rooms.push(room);
      after += room * room;
    }
    let rest = 0;
    for (let i = 0; i < pool.length; i++) rest += pool[i]! * weights[i]!;
    const limit = withLeft ? this.leftWeight : 0;
    if (rest > limit) return false;
    if (rest === limit && after < before && (heat === 0 || random() >= Math.exp((after - before) / heat))) return false;
    this.spread += after - before;
    chosen.forEach((b, c) => {
      b.counts.set(fills[c]!);
      b.room = rooms[c]!;
    });
    if (withLeft) {
      left.set(pool);
      this.leftWeight = rest;
    }
    return rest < limit;
  }

  /** The plan as runs of equal bars, empty bars left out. */
  runs(): Run[] {
    return merge(
      this.bars
        .filter((b) => b.counts.some((n) => n > 0))
        .map((b) => ({ pattern: patternOf(b.bin, b.counts), times: 1 })),
    );
  }
}

/** Fills `fill` from `pool` as full as the search finds, longer pieces first in a shuffled order; returns the room left. */
function fullest(
  weights: Int32Array,
  pool: Int32Array,
  capacity: number,
  fill: Int32Array,
  list: Int32Array,
  random: Random,
  meter: Meter,
): number {
  let n = 0;
  for (let i = 0; i < pool.length; i++) if (pool[i]! > 0) list[n++] = i;
  for (let k = n - 1; k > 0; k--) {
    if (random() < 0.5) {
      const other = Math.floor(random() * (k + 1));
      const t = list[k]!;
      list[k] = list[other]!;
      list[other] = t;
    }
  }
  const taken = new Int32Array(n);
  const after = new Float64Array(n + 1);
  for (let k = n - 1; k >= 0; k--) after[k] = after[k + 1]! + pool[list[k]!]! * weights[list[k]!]!;
  let best = capacity + 1;
  let room = capacity;
  let nodes = 0;
  const search = (k: number): boolean => {
    if (room < best) {
      best = room;
      fill.fill(0);
      for (let j = 0; j < k; j++) fill[list[j]!] = taken[j]!;
      if (room === 0) return true;
    }
    if (k === n || ++nodes > FILL_NODES) return nodes > FILL_NODES;
    // Even all the rest would not fill the bar better.
    if (room - after[k]! >= best) return false;
    const w = weights[list[k]!]!;
    for (let t = Math.min(pool[list[k]!]!, Math.floor(room / w)); t >= 0; t--) {
      taken[k] = t;
      room -= t * w;
      const found = search(k + 1);
      room += t * w;
      if (found) {
        taken[k] = 0;
        return true;
      }
    }
    taken[k] = 0;
    return false;
  };
  search(0);
  meter.spend(1 + nodes * 0.04 + weights.length * 0.04);
  return best;
}
