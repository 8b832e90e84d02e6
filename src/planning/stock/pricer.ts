import type { Meter } from './effort.js';
import { branchKnapsack, rankItems } from './knapsack-branch.js';
import { KnapsackTable } from './knapsack-table.js';

export interface Priced {
  /** Profit of `counts`. */
  readonly value: number;
  /** No bar of this capacity carries more profit than this. */
  readonly upper: number;
  /** Dense, one entry a weight. */
  readonly counts: Int32Array;
}

/** Tables up to this many cells cost less than a branch-and-bound search. */
const SMALL_TABLE = 400_000;
/** Largest table that fits in memory with its trace (bytes). */
const LARGE_TABLE = 200_000_000;
/** Nodes a capacity before branch and bound gives up (findings on truss jobs: 5 to 20 thousand). */
const QUICK_NODES = 8_000;
const THOROUGH_NODES = 3_000_000;
/** Work units (microseconds) of one table cell and of one node. */
const CELL = 0.0015;
const NODE = 0.12;

/** Finds the pattern of most profit for one or several capacities: the pricing problem of column generation. */
export class Pricer {
  private readonly table = new KnapsackTable();

  constructor(private readonly weights: Int32Array) {}

  /**
   * For each capacity the best bounded knapsack. `exact` false: branch and bound with few nodes, whose `upper` may be Infinity.
   */
  best(
    profits: Float64Array,
    bounds: Int32Array,
    capacities: readonly number[],
    exact: boolean,
    meter: Meter,
  ): Priced[] {
    const largest = Math.max(...capacities);
    const cells = KnapsackTable.cells(this.weights, bounds, profits, largest);
    if (cells <= SMALL_TABLE) return this.tabulated(profits, bounds, capacities, largest, cells, meter);
    const quick = this.branched(profits, bounds, capacities, QUICK_NODES, meter);
    if (!exact || quick.every((q) => q.upper < Infinity)) return quick;
    if (cells <= LARGE_TABLE) return this.tabulated(profits, bounds, capacities, largest, cells, meter);
    return this.branched(profits, bounds, capacities, THOROUGH_NODES, meter);
  }

  /** Most profit that each capacity can carry, for integer profits; Infinity where it could not be settled. */
  values(profits: Float64Array, bounds: Int32Array, capacities: readonly number[], meter: Meter): number[] {
    const largest = Math.max(...capacities);
    const cells = KnapsackTable.cells(this.weights, bounds, profits, largest);
    if (cells > LARGE_TABLE * 10) {
      return this.branched(profits, bounds, capacities, THOROUGH_NODES, meter).map((p) => p.upper);
    }
    meter.spend(cells * CELL);
    this.table.fill(this.weights, bounds, profits, largest, false);
    return capacities.map((c) => this.table.best(c));
  }

  private tabulated(
    profits: Float64Array,
    bounds: Int32Array,
    capacities: readonly number[],
    largest: number,
    cells: number,
    meter: Meter,
  ): Priced[] {
    meter.spend(cells * CELL);
    this.table.fill(this.weights, bounds, profits, largest, true);
    return capacities.map((c) => {
      const value = this.table.best(c);
      return { value, upper: value, counts: this.table.counts(this.weights, c) };
    });
  }

  private branched(
    profits: Float64Array,
    bounds: Int32Array,
    capacities: readonly number[],
    nodeLimit: number,
    meter: Meter,
  ): Priced[] {
    return capacities.map((capacity) => {
      const ranked = rankItems(this.weights, bounds, profits, capacity);
      const { value, counts, complete, nodes } = branchKnapsack(ranked, capacity, 0, nodeLimit);
      meter.spend(nodes * NODE + ranked.item.length * 0.1);
      const dense = new Int32Array(this.weights.length);
      if (counts) for (let j = 0; j < counts.length; j++) dense[ranked.item[j]!] = counts[j]!;
      return { value, upper: complete ? value : Infinity, counts: dense };
    });
  }
}
