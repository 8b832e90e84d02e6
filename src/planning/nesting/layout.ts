import { depthIn } from '../../maths/polygon/depth.js';
import type { Budget } from './budget.js';
import type { NoFitStore } from './no-fit.js';
import type { Pose, Shape } from './pose.js';

/** The part of a sheet that panels may cover, in the one plane in which all sheets lie side by side. */
export interface Field {
  x0: number;
  y0: number;
  x1: number;
  y1: number;
  /** Index of the caller's sheet. */
  readonly kind: number;
  /** Solid areas that panels keep clear of (beyond an offcut's outline), each at 0,0 of the plane. */
  readonly obstacles: readonly { readonly pose: Pose; readonly clear: number }[];
}

/** Every piece somewhere on some field, overlaps allowed: the state of the search. */
export interface Layout {
  readonly store: NoFitStore;
  readonly spacing: number;
  /** Depth that counts as none, mm. */
  readonly tolerance: number;
  readonly budget: Budget;
  readonly fields: Field[];
  readonly shapes: readonly Shape[];
  readonly pose: Pose[];
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly field: Int32Array;
  /** Left, bottom, right, top of each piece where it is. */
  readonly box: Float64Array;
  /** Pieces on each field. */
  readonly on: number[][];
  /** n x n: depth of each pair and its weight. */
  readonly depth: Float64Array;
  readonly weight: Float64Array;
}

export function newLayout(
  store: NoFitStore,
  shapes: readonly Shape[],
  fields: Field[],
  spacing: number,
  tolerance: number,
  budget: Budget,
): Layout {
  const n = shapes.length;
  return {
    store,
    spacing,
    tolerance,
    budget,
    fields,
    shapes,
    pose: shapes.map((s) => s.poses[0]!),
    x: new Float64Array(n),
    y: new Float64Array(n),
    field: new Int32Array(n).fill(-1),
    box: new Float64Array(4 * n),
    on: fields.map(() => []),
    depth: new Float64Array(n * n),
    weight: new Float64Array(n * n).fill(1),
  };
}

/** Whether the pose has any place on the field's rectangle. */
export const fitsField = (field: Field, pose: Pose, slack: number): boolean =>
  pose.box[2] - pose.box[0] <= field.x1 - field.x0 + slack && pose.box[3] - pose.box[1] <= field.y1 - field.y0 + slack;

/** Puts piece i on a field without looking at overlaps. */
export function put(layout: Layout, i: number, pose: Pose, x: number, y: number, field: number): void {
  const before = layout.field[i]!;
  if (before !== field) {
    if (before >= 0) layout.on[before]!.splice(layout.on[before]!.indexOf(i), 1);
    if (field >= 0) layout.on[field]!.push(i);
    layout.field[i] = field;
  }
  layout.pose[i] = pose;
  layout.x[i] = x;
  layout.y[i] = y;
  layout.box[4 * i] = pose.box[0] + x;
  layout.box[4 * i + 1] = pose.box[1] + y;
  layout.box[4 * i + 2] = pose.box[2] + x;
  layout.box[4 * i + 3] = pose.box[3] + y;
}

/**
 * Σ weight x depth of piece i against the others in `among` (all on the field, unless the caller knows which can be
 * reached), were it at (x, y) in `pose`; stops as soon as the sum passes `cutoff`.
 */
export function costAt(
  layout: Layout,
  i: number,
  pose: Pose,
  x: number,
  y: number,
  field: number,
  cutoff: number,
  among: readonly number[] = layout.on[field]!,
): number {
  const { spacing, store, tolerance, budget, box, weight } = layout;
  const row = i * layout.shapes.length;
  const bx0 = pose.box[0] + x - spacing;
  const by0 = pose.box[1] + y - spacing;
  const bx1 = pose.box[2] + x + spacing;
  const by1 = pose.box[3] + y + spacing;
  let cost = 0;
  for (let k = 0; k < among.length; k++) {
    const j = among[k]!;
    const b = 4 * j;
    if (box[b]! >= bx1 || box[b + 2]! <= bx0 || box[b + 1]! >= by1 || box[b + 3]! <= by0 || j === i) continue;
    const other = layout.pose[j]!;
    const ox = layout.x[j]!;
    const oy = layout.y[j]!;
    budget.spent++;
    const d =
      pose.id <= other.id
        ? depthIn(store.region(pose, other), ox - x, oy - y, spacing)
        : depthIn(store.region(other, pose), x - ox, y - oy, spacing);
    if (d <= tolerance) continue;
    cost += d * weight[row + j]!;
    if (cost >= cutoff) return cost;
  }
  if (layout.fields[field]!.obstacles.length === 0) return cost;
  for (const { pose: solid, clear } of layout.fields[field]!.obstacles) {
    budget.spent++;
    const d =
      pose.id <= solid.id
        ? depthIn(store.region(pose, solid), -x, -y, clear)
        : depthIn(store.region(solid, pose), x, y, clear);
    // What lies beyond an offcut's outline never gives way.
    if (d > tolerance) cost += d * OBSTACLE_WEIGHT;
    if (cost >= cutoff) return cost;
  }
  return cost;
}

const OBSTACLE_WEIGHT = 20;

/** Other pieces on the field whose boxes come within `reach` and the spacing of the pose at (x, y). */
export function within(
  layout: Layout,
  i: number,
  pose: Pose,
  x: number,
  y: number,
  field: number,
  reach: number,
): number[] {
  const { box, spacing } = layout;
  const far = spacing + reach;
  const [x0, y0, x1, y1] = [pose.box[0] + x - far, pose.box[1] + y - far, pose.box[2] + x + far, pose.box[3] + y + far];
  return layout.on[field]!.filter((j) => {
    const b = 4 * j;
    return j !== i && box[b]! < x1 && box[b + 2]! > x0 && box[b + 1]! < y1 && box[b + 3]! > y0;
  });
}

/** Depth of piece i into the solid areas of its field. */
export function obstacleDepth(layout: Layout, i: number): number {
  const pose = layout.pose[i]!;
  let sum = 0;
  for (const { pose: solid, clear } of layout.fields[layout.field[i]!]!.obstacles) {
    const d = depthIn(layout.store.region(solid, pose), layout.x[i]!, layout.y[i]!, clear);
    if (d > layout.tolerance) sum += d;
  }
  return sum;
}

/** Works out the depths of piece i against every other again. */
export function refreshDepths(layout: Layout, i: number): void {
  const { depth, spacing, store, tolerance } = layout;
  const n = layout.shapes.length;
  for (let j = 0; j < n; j++) {
    depth[i * n + j] = 0;
    depth[j * n + i] = 0;
  }
  const pose = layout.pose[i]!;
  const x = layout.x[i]!;
  const y = layout.y[i]!;
  for (const j of layout.on[layout.field[i]!]!) {
    if (j === i) continue;
    const other = layout.pose[j]!;
    layout.budget.spent++;
    const d =
      pose.id <= other.id
        ? depthIn(store.region(pose, other), layout.x[j]! - x, layout.y[j]! - y, spacing)
        : depthIn(store.region(other, pose), x - layout.x[j]!, y - layout.y[j]!, spacing);
    if (d <= tolerance) continue;
    depth[i * n + j] = d;
    depth[j * n + i] = d;
  }
}

/** Σ depth over all pairs and solid areas: 0 when nothing overlaps. */
export function totalDepth(layout: Layout): number {
  const n = layout.shapes.length;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) sum += layout.depth[i * n + j]!;
    sum += obstacleDepth(layout, i);
  }
  return sum;
}

/** Where every piece is. */
export interface Snapshot {
  readonly pose: readonly Pose[];
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly field: Int32Array;
}

export const snapshot = (layout: Layout): Snapshot => ({
  pose: layout.pose.slice(),
  x: layout.x.slice(),
  y: layout.y.slice(),
  field: layout.field.slice(),
});

export function restore(layout: Layout, from: Snapshot): void {
  for (let i = 0; i < layout.shapes.length; i++) put(layout, i, from.pose[i]!, from.x[i]!, from.y[i]!, from.field[i]!);
  for (let i = 0; i < layout.shapes.length; i++) refreshDepths(layout, i);
}
