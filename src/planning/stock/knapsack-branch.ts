/** Pieces worth taking, best profit for their weight first. */
export interface RankedItems {
  readonly item: Int32Array;
  readonly weight: Float64Array;
  readonly profit: Float64Array;
  readonly bound: Int32Array;
  /** lightest[j]: least weight from j on, Infinity at the end. */
  readonly lightest: Float64Array;
}

export function rankItems(
  weights: Int32Array,
  bounds: Int32Array,
  profits: Float64Array,
  capacity: number,
): RankedItems {
  const order: number[] = [];
  for (let i = 0; i < weights.length; i++) {
    if (profits[i]! > 0 && bounds[i]! > 0 && weights[i]! <= capacity) order.push(i);
  }
  order.sort((a, b) => profits[b]! / weights[b]! - profits[a]! / weights[a]! || a - b);
  const lightest = new Float64Array(order.length + 1).fill(Infinity);
  for (let j = order.length - 1; j >= 0; j--) lightest[j] = Math.min(lightest[j + 1]!, weights[order[j]!]!);
  return {
    item: Int32Array.from(order),
    weight: Float64Array.from(order, (i) => weights[i]!),
    profit: Float64Array.from(order, (i) => profits[i]!),
    bound: Int32Array.from(order, (i) => bounds[i]!),
    lightest,
  };
}

export interface BranchResult {
  readonly value: number;
  /** Count a ranked item, or undefined when nothing beat the floor. */
  readonly counts: Int32Array | undefined;
  /** False when the node limit ended the search: value is then a lower bound only. */
  readonly complete: boolean;
  readonly nodes: number;
}

/** Profits nearer than this are equal: far below the reduced cost that matters (1e-7), above the round-off of a sum of ten. */
const SAME_PROFIT = 1e-11;

/**
 * max p.x for w.x <= capacity, 0 <= x <= bound, by depth-first branch and bound over items in order of profit per
 * weight, each as often as it fits first (Gilmore and Gomory, Operations Research 11, 1963), pruned by the fractional bound (Dantzig, 1957).
 */
export function branchKnapsack(items: RankedItems, capacity: number, floor: number, nodeLimit: number): BranchResult {
  const { weight, profit, bound, lightest } = items;
  const n = weight.length;
  const x = new Int32Array(n);
  let bestX: Int32Array | undefined;
  let best = floor;
  let room = capacity;
  let value = 0;
  let j = 0;
  let nodes = 0;

  const promising = (from: number): boolean => {
    let rest = room;
    let sum = value;
    for (let k = from; k < n; k++) {
      const whole = weight[k]! * bound[k]!;
      if (whole >= rest) return sum + (profit[k]! * rest) / weight[k]! > best + SAME_PROFIT;
      rest -= whole;
      sum += profit[k]! * bound[k]!;
      if (sum > best + SAME_PROFIT) return true;
    }
    return sum > best + SAME_PROFIT;
  };

  for (;;) {
    nodes++;
    while (j < n && room >= lightest[j]!) {
      if (room >= weight[j]!) {
        const t = Math.min(bound[j]!, Math.floor(room / weight[j]!));
        x[j] = t;
        room -= t * weight[j]!;
        value += t * profit[j]!;
      }
      j++;
    }
    if (value > best + SAME_PROFIT) {
      best = value;
      bestX = x.slice();
    }
    if (nodes >= nodeLimit) return { value: best, counts: bestX, complete: false, nodes };
    let open = false;
    let i = j - 1;
    for (; i >= 0; i--) {
      if (x[i] === 0) continue;
      x[i]!--;
      room += weight[i]!;
      value -= profit[i]!;
      if (promising(i + 1)) {
        open = true;
        break;
      }
      room += x[i]! * weight[i]!;
      value -= x[i]! * profit[i]!;
      x[i] = 0;
    }
    if (!open) return { value: best, counts: bestX, complete: true, nodes };
    j = i + 1;
  }
}
