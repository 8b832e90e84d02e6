import type { Random } from '../../maths/random.js';
import { isSpent } from './budget.js';
import {
  type Layout,
  obstacleDepth,
  put,
  refreshDepths,
  restore,
  type Snapshot,
  snapshot,
  totalDepth,
} from './layout.js';
import { bestPlace } from './search.js';

/** How long a separation is pursued. */
export interface Patience {
  /** Rounds without a better total before the best is taken up again. */
  readonly rounds: number;
  /** Times the best is taken up again without having become better. */
  readonly strikes: number;
  /** Evaluations at which it ends in any case. */
  readonly limit: number;
}

/** A total this share below the best counts as progress. */
const PROGRESS = 0.98;

/**
 * Moves pieces until nothing overlaps: true. Each overlapping piece in turn goes to its best place by weighted depth;
 * after each round the weights of pairs that still overlap grow with their depth (guided local search: Voudouris
 * and Tsang 1999; on nesting Egeblad et al. 2007, Umetani et al. 2009). False: given up, the layout with the least
 * total depth is left standing.
 */
export function separate(
  layout: Layout,
  fieldsOf: (piece: number) => readonly number[],
  random: Random,
  patience: Patience,
): boolean {
  const n = layout.shapes.length;
  layout.weight.fill(1);
  for (let i = 0; i < n; i++) refreshDepths(layout, i);
  let least = totalDepth(layout);
  if (least === 0) return true;
  let kept: Snapshot = snapshot(layout);
  for (let strike = 0; strike < patience.strikes; strike++) {
    const before = least;
    for (let idle = 0; idle < patience.rounds; idle++) {
      if (isSpent(layout.budget, patience.limit)) {
        restore(layout, kept);
        return false;
      }
      moveEach(layout, fieldsOf, random);
      const total = totalDepth(layout);
      if (total === 0) return true;
      if (total < least) {
        if (total < PROGRESS * least) idle = 0;
        least = total;
        kept = snapshot(layout);
      }
      growWeights(layout);
    }
    restore(layout, kept);
    if (least < PROGRESS * before) strike = -1;
  }
  return false;
}

function moveEach(layout: Layout, fieldsOf: (piece: number) => readonly number[], random: Random): void {
  const n = layout.shapes.length;
  const rowCost = (i: number): number => {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += layout.depth[i * n + j]! * layout.weight[i * n + j]!;
    return sum;
  };
  const solid = (i: number): number =>
    layout.fields[layout.field[i]!]!.obstacles.length > 0 ? obstacleDepth(layout, i) : 0;
  const order: number[] = [];
  for (let i = 0; i < n; i++) if (rowCost(i) > 0 || solid(i) > 0) order.push(i);
  for (let k = order.length - 1; k > 0; k--) {
    const r = Math.floor(random() * (k + 1));
    [order[k], order[r]] = [order[r]!, order[k]!];
  }
  for (const i of order) {
    if (rowCost(i) === 0 && solid(i) === 0) continue;
    const place = bestPlace(layout, i, fieldsOf(i), random);
    if (!place) continue;
    put(layout, i, place.pose, place.x, place.y, place.field);
    refreshDepths(layout, i);
  }
}

/** Weights of overlapping pairs grow by 1.2 to 2, the deepest most; the others fall back towards 1. */
function growWeights(layout: Layout): void {
  const { depth, weight } = layout;
  let deepest = 0;
  for (let k = 0; k < depth.length; k++) if (depth[k]! > deepest) deepest = depth[k]!;
  if (deepest === 0) return;
  for (let k = 0; k < depth.length; k++) {
    const d = depth[k]!;
    if (d > 0) weight[k] = weight[k]! * (1.2 + 0.8 * (d / deepest));
    else if (weight[k]! > 1) weight[k] = Math.max(1, weight[k]! * 0.95);
  }
}
