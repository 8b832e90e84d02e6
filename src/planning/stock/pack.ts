import type { Highs } from 'highs';
import type { Random } from '../../maths/random.js';
import type { Meter } from './effort.js';
import { type Generation, type GenerationAim, generate } from './generate.js';
import { Master } from './master.js';
import type { Pricer } from './pricer.js';
import type { CuttingProblem, Pattern, Run } from './problem.js';

export type Packing =
  | { readonly state: 'packed'; readonly runs: Run[] }
  /** The bars cannot hold the pieces, not even in fractions: `duals` say why. */
  | { readonly state: 'refuted'; readonly duals: Float64Array }
  | { readonly state: 'open' };

/** Share of the total weight under which a linear programme's leftover is round-off. */
const NOTHING_LEFT = 1e-9;
/** A fraction this near to a whole number of bars is that number. */
const WHOLE = 1e-6;

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

  dive(random: Random | undefined, backtracks: number, meter: Meter): Run[] | undefined {
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
    let loose = random !== undefined;
    for (;;) {
      if (left.every((d) => d === 0)) return runs;
      if (meter.exhausted) return undefined;
      this.master.remain(left, stock);
      const g = generate(this.master, this.pricer, problem, left, stock, this.aimFor(stock), this.costs, meter);
      if (g.state !== 'reached') {
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
      const { times } = g.solution;
      let kept = false;
      for (let j = 0; j < times.length; j++) {
        const whole = Math.floor(times[j]! + WHOLE);
        if (whole > 0 && this.keep(this.master.patterns[j]!, whole, left, stock, runs)) kept = true;
      }
      if (!kept) {
        const j = choose(times, loose ? (random ?? halfway) : undefined);
        this.keep(this.master.patterns[j]!, 1, left, stock, runs);
      }
    }
  }

  /** Cuts a pattern up to `most` times as far as bars and pieces last; what is not needed any more is left out. */
  private keep(p: Pattern, most: number, left: Int32Array, stock: number[], runs: Run[]): boolean {
    let times = Math.min(most, stock[p.bin]!);
    for (let j = 0; j < p.items.length; j++) {
      times = Math.min(times, Math.floor(left[p.items[j]!]! / p.counts[j]!));
    }
    let pattern = p;
    if (times === 0) {
      if (stock[p.bin]! <= 0) return false;
      const items: number[] = [];
      const counts: number[] = [];
      for (let j = 0; j < p.items.length; j++) {
        const n = Math.min(p.counts[j]!, left[p.items[j]!]!);
        if (n > 0) {
          items.push(p.items[j]!);
          counts.push(n);
        }
      }
      if (items.length === 0) return false;
      pattern = { bin: p.bin, items: Int32Array.from(items), counts: Int32Array.from(counts) };
      times = 1;
    }
    for (let j = 0; j < pattern.items.length; j++) left[pattern.items[j]!]! -= times * pattern.counts[j]!;
    stock[p.bin]! -= times;
    runs.push({ pattern, times });
    return true;
  }
}

const halfway: Random = () => 0.5;

/** The largest fraction, or one drawn with a chance that grows with the square of its fraction. */
function choose(times: Float64Array, random: Random | undefined): number {
  let largest = 0;
  let sum = 0;
  for (let j = 0; j < times.length; j++) {
    if (times[j]! > times[largest]!) largest = j;
    sum += times[j]! > WHOLE ? times[j]! ** 2 : 0;
  }
  if (!random) return largest;
  let mark = random() * sum;
  for (let j = 0; j < times.length; j++) {
    if (times[j]! > WHOLE) {
      mark -= times[j]! ** 2;
      if (mark <= 0) return j;
    }
  }
  return largest;
}
