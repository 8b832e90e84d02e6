import type { Meter } from './effort.js';
import type { Master, MasterSolution } from './master.js';
import type { Pricer } from './pricer.js';
import { type CuttingProblem, type Pattern, patternOf } from './problem.js';

/** Reduced costs nearer to 0 than this share of the largest cost are round-off of the simplex method (its own tolerance is 1e-7). */
const REDUCED = 1e-7;
/** Share of the best duals in the duals that are priced (Wentges, Int. Trans. OR 4, 1997). */
const SMOOTHING = 0.6;

export interface Generation {
  /** 'reached': the objective is at the target; 'refuted': the bound is above the target; 'converged': no pattern improves. */
  readonly state: 'reached' | 'refuted' | 'converged' | 'exhausted';
  readonly solution: MasterSolution;
  /** Best Lagrangian bound seen and its duals. */
  readonly bound: number;
  readonly boundDuals: Float64Array;
}

export interface GenerationAim {
  /** Least total cost of a plan by what each bar can carry at duals y (a lower bound of the master's objective). */
  readonly lagrangian: (worth: number, carry: readonly number[]) => number;
  /** True when the objective is as low as it needs to be, given the bound. */
  readonly reached: (objective: number, bound: number) => boolean;
  /** True when the bound shows that the target cannot be reached. */
  readonly refuted: (bound: number) => boolean;
  /** Size of the costs, for the tolerance on reduced costs. */
  readonly scale: number;
}

/** Column generation: prices patterns at smoothed duals until the aim is reached, refuted, or no pattern improves. */
export function generate(
  master: Master,
  pricer: Pricer,
  problem: CuttingProblem,
  demand: Int32Array,
  available: readonly number[],
  aim: GenerationAim,
  costs: readonly number[],
  meter: Meter,
): Generation {
  const m = problem.weights.length;
  const bins = problem.bins.map((_, b) => b).filter((b) => available[b]! > 0);
  const capacities = bins.map((b) => problem.bins[b]!.capacity);
  let bound = -Infinity;
  let centre = new Float64Array(m);
  let haveCentre = false;
  let exact = false;
  let smooth = true;
  for (;;) {
    const solution = master.solve(meter);
    if (aim.reached(solution.objective, bound)) return { state: 'reached', solution, bound, boundDuals: centre };
    for (;;) {
      const alpha = smooth && haveCentre ? SMOOTHING : 0;
      const y = solution.duals.map((d, i) => (demand[i]! > 0 ? alpha * centre[i]! + (1 - alpha) * d : 0));
      const priced = pricer.best(y, demand, capacities, exact, meter);
      let worth = 0;
      for (let i = 0; i < m; i++) worth += y[i]! * demand[i]!;
      const carry = new Array<number>(problem.bins.length).fill(0);
      priced.forEach((p, j) => {
        carry[bins[j]!] = p.upper;
      });
      const lower = aim.lagrangian(worth, carry);
      if (lower > bound) {
        bound = lower;
        centre = y;
        haveCentre = true;
        if (aim.refuted(bound)) return { state: 'refuted', solution, bound, boundDuals: centre };
        if (aim.reached(solution.objective, bound)) return { state: 'reached', solution, bound, boundDuals: centre };
      }
      const fresh: Pattern[] = [];
      const offer = (b: number, counts: Int32Array): void => {
        let value = solution.binDuals[b]!;
        for (let i = 0; i < m; i++) if (counts[i]! > 0) value += solution.duals[i]! * counts[i]!;
        if (value > costs[b]! + REDUCED * aim.scale) fresh.push(patternOf(b, counts));
      };
      priced.forEach((p, j) => {
        offer(bins[j]!, p.counts);
      });
      if (fresh.length > 0 && bins.length === 1) {
        // Patterns that share no piece with the first one spare later rounds.
        const rest = demand.slice();
        let last = priced[0]!.counts;
        for (let extra = 0; extra < 4; extra++) {
          let times = Infinity;
          for (let i = 0; i < m; i++) if (last[i]! > 0) times = Math.min(times, Math.floor(rest[i]! / last[i]!));
          if (!(times > 0 && times < Infinity)) break;
          for (let i = 0; i < m; i++) rest[i]! -= times * last[i]!;
          last = pricer.best(y, rest, capacities, false, meter)[0]!.counts;
          const before = fresh.length;
          offer(bins[0]!, last);
          if (fresh.length === before) break;
        }
      }
      if (master.add(fresh) > 0) break;
      if (meter.exhausted) return { state: 'exhausted', solution, bound, boundDuals: centre };
      if (alpha > 0) {
        smooth = false;
        continue;
      }
      if (!exact) {
        exact = true;
        continue;
      }
      return { state: 'converged', solution, bound, boundDuals: centre };
    }
    if (meter.exhausted) return { state: 'exhausted', solution, bound, boundDuals: centre };
    smooth = true;
  }
}
