import type { Highs, Model } from 'highs';
import type { Meter } from './effort.js';
import { type CuttingProblem, type Pattern, patternKey } from './problem.js';
import { SolverFailed } from './solver.js';

export interface MasterSolution {
  readonly objective: number;
  /** Times a pattern, in the order the patterns were added. */
  readonly times: Float64Array;
  /** Worth of one piece of each weight, >= 0. */
  readonly duals: Float64Array;
  /** Worth of one more bar of each kind, <= 0. */
  readonly binDuals: Float64Array;
  /** Sum of the pieces left uncovered. */
  readonly missing: number;
}

/** 'cost': bars at their cost, an uncovered piece at `penalty`; 'fit': bars free, an uncovered piece at its weight. */
export type MasterAim = 'cost' | 'fit';

/**
 * The linear master programme of column generation (Gilmore and Gomory, Operations Research 9, 1961):
 *
 *     min sum c_k(p) t_p + q.s   with   sum a_ip t_p + s_i >= d_i,   sum over p of kind k of t_p <= u_k,   t, s >= 0
 *
 * kept in the solver, so that each solve starts from the last basis. `dispose` must be called.
 */
export class Master {
  readonly patterns: Pattern[] = [];
  private readonly known = new Set<string>();
  private readonly model: Model;
  private readonly m: number;
  private readonly k: number;

  constructor(
    private readonly highs: Highs,
    private readonly problem: CuttingProblem,
    private readonly aim: MasterAim,
    penalty: Float64Array,
    available: readonly number[],
  ) {
    const m = problem.weights.length;
    const k = problem.bins.length;
    this.m = m;
    this.k = k;
    const rowLower = new Float64Array(m + k).fill(-highs.infinity);
    const rowUpper = new Float64Array(m + k).fill(highs.infinity);
    for (let i = 0; i < m; i++) rowLower[i] = problem.demand[i]!;
    for (let b = 0; b < k; b++) if (available[b]! < Infinity) rowUpper[m + b] = available[b]!;
    this.model = highs.createModel({
      numCols: m,
      numRows: m + k,
      colCost: penalty,
      colLower: new Float64Array(m),
      colUpper: new Float64Array(m).fill(highs.infinity),
      rowLower,
      rowUpper,
      matrix: {
        format: 'csc',
        numRows: m + k,
        numCols: m,
        starts: Int32Array.from({ length: m + 1 }, (_, i) => i),
        indices: Int32Array.from({ length: m }, (_, i) => i),
        values: new Float64Array(m).fill(1),
      },
    });
    this.model.options.set({ output_flag: false, presolve: 'off', solver: 'simplex', random_seed: 0 });
  }

  /** Adds those that are new; returns how many were. */
  add(patterns: readonly Pattern[]): number {
    const fresh = patterns.filter((p) => {
      const key = patternKey(p);
      if (this.known.has(key)) return false;
      this.known.add(key);
      return true;
    });
    if (fresh.length === 0) return 0;
    const starts = [0];
    const indices: number[] = [];
    const values: number[] = [];
    for (const p of fresh) {
      for (let j = 0; j < p.items.length; j++) {
        indices.push(p.items[j]!);
        values.push(p.counts[j]!);
      }
      indices.push(this.m + p.bin);
      values.push(1);
      starts.push(indices.length);
    }
    this.model.addCols({
      cost: Float64Array.from(fresh, (p) => (this.aim === 'cost' ? this.problem.bins[p.bin]!.cost : 0)),
      lower: new Float64Array(fresh.length),
      upper: new Float64Array(fresh.length).fill(this.highs.infinity),
      matrix: {
        format: 'csc',
        numRows: this.m + this.k,
        numCols: fresh.length,
        starts: Int32Array.from(starts),
        indices: Int32Array.from(indices),
        values: Float64Array.from(values),
      },
    });
    for (const p of fresh) this.patterns.push(p);
    return fresh.length;
  }

  /** Sets the pieces still to be covered and the bars still to be had. */
  remain(demand: Int32Array, available: readonly number[]): void {
    const lower = new Float64Array(this.m + this.k).fill(-this.highs.infinity);
    const upper = new Float64Array(this.m + this.k).fill(this.highs.infinity);
    for (let i = 0; i < this.m; i++) lower[i] = demand[i]!;
    for (let b = 0; b < this.k; b++) if (available[b]! < Infinity) upper[this.m + b] = available[b]!;
    this.model.changeRowsBounds({ kind: 'range', from: 0, to: this.m + this.k - 1 }, lower, upper);
  }

  /** Throws SolverFailed where the solver gives no optimum: the programme always has one. */
  solve(meter: Meter): MasterSolution {
    this.model.run();
    const status = this.model.getModelStatus();
    if (status !== this.highs.constants.modelStatus.optimal)
      throw new SolverFailed(`linear programme: status ${status}`);
    const { colValue, rowDual } = this.model.getSolution();
    const iterations = Number(this.model.info.get('simplex_iteration_count'));
    meter.spend(300 + Math.max(iterations, 1) * (8 + 0.35 * this.m) + 0.5 * this.patterns.length);
    const duals = new Float64Array(this.m);
    for (let i = 0; i < this.m; i++) duals[i] = Math.max(0, rowDual[i]!);
    const binDuals = new Float64Array(this.k);
    for (let b = 0; b < this.k; b++) binDuals[b] = Math.min(0, rowDual[this.m + b]!);
    let missing = 0;
    for (let i = 0; i < this.m; i++) missing += colValue[i]!;
    return {
      objective: this.model.getObjectiveValue(),
      times: Float64Array.from(colValue.subarray(this.m)),
      duals,
      binDuals,
      missing,
    };
  }

  dispose(): void {
    this.model.dispose();
  }
}
