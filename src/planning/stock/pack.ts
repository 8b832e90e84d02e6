import type { Highs } from 'highs';
import type { Random } from '../../maths/random.js';
import type { Meter } from './effort.js';
import { type Generation, type GenerationAim, generate } from './generate.js';
import { Master } from './master.js';
import type { Pricer } from './pricer.js';
import { type CuttingProblem, type Pattern, patternLoad, type Run } from './problem.js';
import { repair } from './repair.js';

export type Packing =
  | { readonly state: 'packed'; readonly runs: Run[] }
  /** The bars cannot hold the pieces, not even in fractions: `duals` say why. */
  | { readonly state: 'refuted'; readonly duals: Float64Array }
  | { readonly state: 'open' };

/** Share of the total weight under which a linear programme's leftover is round-off. */
const NOTHING_LEFT = 1e-9;
/** A fraction this near to a whole number of bars is that number. */
const WHOLE = 1e-6;
/** Share of the bars still to be cut that one step of a dive settles. */
const BARS_A_STEP = 0.04;
/** Dead ends from one repair to the next: it costs as much as several dives where bars are few and nearly full. */
const REPAIR_EVERY = 4;

/**
 * Looks for a plan that cuts all pieces from exactly these bars, by diving: the linear programme is solved, its whole bars
 * are kept, else the fullest fraction is, patterns are generated anew on the rest, and so on to the end
 * (Sadykov, Vanderbeck, Pessoa et al., INFORMS J. Computing 31, 2019). A dead end goes back a few choices, then farther.
 */
export class Packer {
  private readonly master: Master;
  private readonly aim: GenerationAim;
  private readonly costs: readonly number[];
  private readonly tolerance: number;

  constructor(
    highs: Highs,
    private readonly problem: CuttingProblem,
    private readonly pricer: Pricer,
    private readonly mix: readonly number[],
    pool: readonly Pattern[],
  ) {
    const total = problem.weights.reduce((s, w, i) => s + w * problem.demand[i]!, 0);
    this.tolerance = total * NOTHING_LEFT;
    this.master = new Master(highs, problem, 'fit', Float64Array.from(problem.weights), mix);
    this.master.add(pool.filter((p) => mix[p.bin]! > 0));
    this.costs = mix.map(() => 0);
    this.aim = this.aimFor(mix);
  }

  get patterns(): readonly Pattern[] {
    return this.master.patterns;
  }

  dispose(): void {
    this.master.dispose();
  }

  private aimFor(available: readonly number[]): GenerationAim {
    return {
      lagrangian: (worth, carry) => {
        let left = worth;
        for (let b = 0; b < carry.length; b++) if (available[b]! > 0) left -= carry[b]! * available[b]!;
        return left;
      },
      reached: (objective) => objective <= this.tolerance,
      refuted: (bound) => bound > this.tolerance * 10,
      scale: 1,
    };
  }

  /** The linear programme alone: can these bars hold the pieces in fractions? */
  relax(meter: Meter): Generation {
    this.master.remain(this.problem.demand, this.mix);
    return generate(this.master, this.pricer, this.problem, this.problem.demand, this.mix, this.aim, this.costs, meter);
  }

  dive(random: Random, first: boolean, backtracks: number, meter: Meter): Run[] | undefined {
    const { problem } = this;
    interface Level {
      readonly left: Int32Array;
      readonly stock: number[];
      readonly runs: number;
    }
    const stack: Level[] = [];
    let left = problem.demand.slice();
    let stock = this.mix.slice();
    const runs: Run[] = [];
    let jump = 1;
    let chances = backtracks;
    let deadEnds = 0;
    let loose = !first;
    for (;;) {
      if (left.every((d) => d === 0)) return runs;
      if (meter.exhausted) return undefined;
      this.master.remain(left, stock);
      const g = generate(this.master, this.pricer, problem, left, stock, this.aimFor(stock), this.costs, meter);
      if (g.state !== 'reached') {
        const mended = deadEnds++ % REPAIR_EVERY === 0 ? repair(problem, runs, left, stock, random, meter) : undefined;
        if (mended) return mended;
        if (chances-- <= 0 || stack.length === 0) return undefined;
        const to = Math.max(0, stack.length - jump);
        jump = Math.min(jump * 2, 64);
        const level = stack[to]!;
        stack.length = to;
        left = level.left.slice();
        stock = level.stock.slice();
        runs.length = level.runs;
        loose = true;
        continue;
      }
      stack.push({ left: left.slice(), stock: stock.slice(), runs: runs.length });
      this.advance(g.solution.times, left, stock, runs, loose ? random : undefined);
    }
  }

  /**
   * Keeps the patterns that the linear programme uses most and that waste least: spare room is worth more at the end,
   * when few pieces are left to fill it. A share of the bars at once, one by one when few are left.
   */
  private advance(
    times: Float64Array,
    left: Int32Array,
    stock: number[],
    runs: Run[],
    random: Random | undefined,
  ): void {
    const { weights, bins } = this.problem;
    let bars = 0;
    let spare = 0;
    for (let b = 0; b < bins.length; b++) {
      bars += stock[b]!;
      spare += stock[b]! * bins[b]!.capacity;
    }
    for (let i = 0; i < left.length; i++) spare -= left[i]! * weights[i]!;
    const usual = Math.max(1, spare) / bars;
    const candidates: { j: number; score: number }[] = [];
    for (let j = 0; j < times.length; j++) {
      if (times[j]! < WHOLE) continue;
      const p = this.master.patterns[j]!;
      const waste = bins[p.bin]!.capacity - patternLoad(weights, p);
      const chance = random ? 0.5 + random() : 1;
      candidates.push({ j, score: Math.min(times[j]!, 1) * Math.exp(-waste / usual) * chance });
    }
    candidates.sort((a, b) => b.score - a.score || a.j - b.j);
    const share = Math.max(1, Math.floor(bars * BARS_A_STEP));
    let kept = 0;
    for (const { j } of candidates) {
      const whole = Math.max(1, Math.floor(times[j]! + WHOLE));
      if (kept > 0 && kept + 1 > share) break;
      kept += this.keep(
        this.master.patterns[j]!,
        Math.min(whole, Math.max(1, share - kept)),
        left,
        stock,
        runs,
        kept > 0,
      );
    }
  }

  /** Cuts a pattern up to `most` times as far as bars and pieces last; what is not needed any more is left out, unless `whole`. */
  private keep(p: Pattern, most: number, left: Int32Array, stock: number[], runs: Run[], whole: boolean): number {
    let times = Math.min(most, stock[p.bin]!);
    for (let j = 0; j < p.items.length; j++) {
      times = Math.min(times, Math.floor(left[p.items[j]!]! / p.counts[j]!));
    }
    let pattern = p;
    if (times === 0) {
      if (whole || stock[p.bin]! <= 0) return 0;
      const items: number[] = [];
      const counts: number[] = [];
      for (let j = 0; j < p.items.length; j++) {
        const n = Math.min(p.counts[j]!, left[p.items[j]!]!);
        if (n > 0) {
          items.push(p.items[j]!);
          counts.push(n);
        }
      }
      if (items.length === 0) return 0;
      pattern = { bin: p.bin, items: Int32Array.from(items), counts: Int32Array.from(counts) };
      times = 1;
    }
    for (let j = 0; j < pattern.items.length; j++) left[pattern.items[j]!]! -= times * pattern.counts[j]!;
    stock[p.bin]! -= times;
    runs.push({ pattern, times });
    return times;
  }
}
