/**
 * max p.x for w.x <= c, 0 <= x <= bounds, x integer, for every capacity c at once: bounded knapsack by dynamic programming.
 *
 * Bounds are split into powers of two, so that each part is taken or left (Martello and Toth, Knapsack Problems, 1990,
 * section 3.2). Exact for integer profits whose sums stay below 2^53.
 */
export class KnapsackTable {
  private value = new Float64Array(0);
  private taken = new Uint8Array(0);
  private parts: { item: number; count: number }[] = [];
  private width = 0;

  /** Cells that `fill` would visit: its cost in elementary steps. */
  static cells(weights: Int32Array, bounds: Int32Array, profits: Float64Array, capacity: number): number {
    let parts = 0;
    for (let i = 0; i < weights.length; i++) {
      const most = profits[i]! > 0 ? Math.min(bounds[i]!, Math.floor(capacity / weights[i]!)) : 0;
      if (most > 0) parts += Math.floor(Math.log2(most)) + 1;
    }
    return parts * (capacity + 1);
  }

  fill(weights: Int32Array, bounds: Int32Array, profits: Float64Array, capacity: number, traced: boolean): void {
    this.parts = [];
    for (let i = 0; i < weights.length; i++) {
      if (!(profits[i]! > 0)) continue;
      let left = Math.min(bounds[i]!, Math.floor(capacity / weights[i]!));
      for (let size = 1; left > 0; size *= 2) {
        const count = Math.min(size, left);
        this.parts.push({ item: i, count });
        left -= count;
      }
    }
    const width = capacity + 1;
    this.width = width;
    if (this.value.length < width) this.value = new Float64Array(width);
    const value = this.value;
    value.fill(0, 0, width);
    const cells = traced ? this.parts.length * width : 0;
    if (this.taken.length < cells) this.taken = new Uint8Array(cells);
    else this.taken.fill(0, 0, cells);
    const taken = this.taken;
    for (let k = 0; k < this.parts.length; k++) {
      const { item, count } = this.parts[k]!;
      const w = weights[item]! * count;
      const p = profits[item]! * count;
      const row = k * width;
      if (traced) {
        for (let c = capacity; c >= w; c--) {
          const v = value[c - w]! + p;
          if (v > value[c]!) {
            value[c] = v;
            taken[row + c] = 1;
          }
        }
      } else {
        for (let c = capacity; c >= w; c--) {
          const v = value[c - w]! + p;
          if (v > value[c]!) value[c] = v;
        }
      }
    }
  }

  best(capacity: number): number {
    return this.value[capacity]!;
  }

  /** Counts that reach best(capacity), after a traced fill. */
  counts(weights: Int32Array, capacity: number): Int32Array {
    const x = new Int32Array(weights.length);
    let c = capacity;
    for (let k = this.parts.length - 1; k >= 0; k--) {
      if (this.taken[k * this.width + c]) {
        const { item, count } = this.parts[k]!;
        x[item]! += count;
        c -= weights[item]! * count;
      }
    }
    return x;
  }
}
