import type { Highs } from 'highs';
import type { Meter } from './effort.js';
import type { CuttingProblem } from './problem.js';

/**
 * What a set of whole-number piece values says of any plan: its bars must carry at least the value of all pieces,
 *
 *     sum over kinds k of carry_k n_k >= worth,   carry_k = the most value that one bar of kind k can hold.
 */
export interface Requirement {
  readonly worth: number;
  readonly carry: readonly number[];
}

export interface MixBound {
  /** No plan costs less; Infinity when no number of bars is enough. */
  readonly cost: number;
  /** Bars of each kind that reach it, where the search found them. */
  readonly mix: readonly number[] | undefined;
}

export interface MixLimits {
  /** Mixes dearer than this are of no interest. */
  readonly ceiling?: number;
  /** Least spare capacity asked for, in steps beyond all pieces' weights (no lower bound then either). */
  readonly spare?: number;
  /** Looks for the mix of most capacity under the ceiling, instead of the cheapest. */
  readonly roomiest?: boolean;
}

/** Nodes of the small integer programme over the mix; past them its own dual bound is used. */
const MIX_NODES = 20_000;

/**
 * Least sum c_k n_k over whole n_k <= available that meets every requirement: the surrogate bound over the mix of bars.
 *
 * Costs are multiples of `unit`, so that the bound is rounded up to one.
 */
export function mixBound(
  highs: Highs,
  problem: CuttingProblem,
  requirements: readonly Requirement[],
  unit: number,
  meter: Meter,
  limits: MixLimits = {},
): MixBound {
  const { bins } = problem;
  const spareRow: Requirement[] = [];
  let load = 0;
  for (let i = 0; i < problem.weights.length; i++) load += problem.weights[i]! * problem.demand[i]!;
  if (limits.spare) spareRow.push({ worth: load + limits.spare, carry: bins.map((b) => b.capacity) });
  const rows = [...requirements, ...spareRow];
  if (bins.length === 1) {
    let n = 0;
    for (const r of rows) n = Math.max(n, r.worth > 0 ? Math.ceil(r.worth / r.carry[0]!) : 0);
    return n <= bins[0]!.available && n * bins[0]!.cost <= (limits.ceiling ?? Infinity)
      ? { cost: n * bins[0]!.cost, mix: [n] }
      : { cost: Infinity, mix: undefined };
  }
  const k = bins.length;
  const widest = Math.max(...bins.map((b) => b.capacity));
  const lower: number[] = [];
  const upper: number[] = [];
  const starts = [0];
  const indices: number[] = [];
  const values: number[] = [];
  for (const { worth, carry } of rows) {
    const scale = Math.max(...carry);
    if (!(scale > 0) || !(scale < Infinity)) continue;
    // A row scaled to 1 loses the last digits; the bound may only get weaker by that.
    lower.push((worth / scale) * (1 - 1e-13));
    upper.push(highs.infinity);
    carry.forEach((v, b) => {
      if (v > 0) {
        indices.push(b);
        values.push(v / scale);
      }
    });
    starts.push(indices.length);
  }
  if (limits.ceiling !== undefined) {
    lower.push(-highs.infinity);
    upper.push(limits.ceiling);
    bins.forEach((bin, b) => {
      indices.push(b);
      values.push(bin.cost);
    });
    starts.push(indices.length);
  }
  return highs.withModel(
    {
      numCols: k,
      numRows: lower.length,
      colCost: Float64Array.from(bins, (b) => (limits.roomiest ? -b.capacity / widest : b.cost)),
      colLower: new Float64Array(k),
      colUpper: Float64Array.from(bins, (b) => (b.available < Infinity ? b.available : highs.infinity)),
      rowLower: Float64Array.from(lower),
      rowUpper: Float64Array.from(upper),
      integrality: new Int32Array(k).fill(1),
      matrix: {
        format: 'csr',
        numRows: lower.length,
        numCols: k,
        starts: Int32Array.from(starts),
        indices: Int32Array.from(indices),
        values: Float64Array.from(values),
      },
    },
    (model): MixBound => {
      model.options.set({
        output_flag: false,
        random_seed: 0,
        mip_rel_gap: 0,
        mip_abs_gap: 1e-6,
        mip_max_nodes: MIX_NODES,
      });
      model.run();
      const status = model.getModelStatus();
      const { infeasible, unboundedOrInfeasible } = highs.constants.modelStatus;
      meter.spend(30e3 + 4e3 * Number(model.info.get('mip_node_count')));
      if (status === infeasible || status === unboundedOrInfeasible) return { cost: Infinity, mix: undefined };
      const dual = model.info.get('mip_dual_bound') as number;
      // Costs are whole multiples of the unit, so a bound within a millionth below one is that one.
      const cost = limits.roomiest ? 0 : Math.ceil(dual / unit - 1e-6) * unit;
      const { colValue } = model.getSolution();
      const mix = Array.from(colValue, (v) => Math.round(v));
      const found = mix.reduce((s, n, b) => s + n * bins[b]!.cost, 0);
      const whole = mix.length === k && found > 0 && mix.every((n) => n >= 0);
      return { cost: Math.max(cost, 0), mix: whole ? mix : undefined };
    },
  );
}
