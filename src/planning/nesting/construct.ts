import { costAt, fitsField, type Layout, put } from './layout.js';
import type { Pose, Shape } from './pose.js';

/**
 * Puts the pieces, in the order given, on the field, each as far left and then as far down as it goes (bottom left).
 * Sheet after sheet this is first fit. Places looked at: the corners of the field's inner-fit rectangle, the
 * corners of no-fit regions, and where their edges cross each other or the rectangle. Pieces that found no place
 * are returned; they stay off the layout.
 */
export function construct(layout: Layout, order: readonly number[], field: number): number[] {
  // Where one outline found no place, no equal one does once the field is fuller.
  const refused = new Set<Shape>();
  return order.filter((i) => {
    const shape = layout.shapes[i]!;
    if (!refused.has(shape) && placeOn(layout, i, field)) return false;
    refused.add(shape);
    return true;
  });
}

/** Poses that filling tries of one outline: the search turns pieces further. */
const FILL_POSES = 8;

/** Puts piece i at its leftmost free place on the field; false: none. */
export function placeOn(layout: Layout, i: number, field: number): boolean {
  const f = layout.fields[field]!;
  let best: { pose: Pose; x: number; y: number; key: number } | null = null;
  for (const pose of layout.shapes[i]!.poses.filter((p) => fitsField(f, p, layout.tolerance)).slice(0, FILL_POSES)) {
    // By the right edge of the piece, then by its top: a turned piece is judged by what it takes up.
    const key = (x: number, y: number): number => x + pose.box[2] - f.x0 + (y + pose.box[3] - f.y0) * HEIGHT_SHARE;
    const at = lowestFree(layout, i, pose, field, key, best ? best.key : Infinity);
    if (at) best = { pose, x: at[0], y: at[1], key: key(at[0], at[1]) };
  }
  if (!best) return false;
  put(layout, i, best.pose, best.x, best.y, field);
  return true;
}

/** A tie-break by height that also pulls pieces down a little before they go right. */
const HEIGHT_SHARE = 0.05;

function lowestFree(
  layout: Layout,
  i: number,
  pose: Pose,
  field: number,
  key: (x: number, y: number) => number,
  bound: number,
): [number, number] | null {
  const f = layout.fields[field]!;
  const [lowX, lowY] = [f.x0 - pose.box[0], f.y0 - pose.box[1]];
  const highX = Math.max(lowX, f.x1 - pose.box[2]);
  const highY = Math.max(lowY, f.y1 - pose.box[3]);
  const slack = layout.tolerance;
  const found: { x: number; y: number; key: number }[] = [];
  const offer = (x: number, y: number): void => {
    if (x < lowX - slack || x > highX + slack || y < lowY - slack || y > highY + slack) return;
    const cx = Math.min(Math.max(x, lowX), highX);
    const cy = Math.min(Math.max(y, lowY), highY);
    const k = key(cx, cy);
    if (k < bound) found.push({ x: cx, y: cy, key: k });
  };
  offer(lowX, lowY);
  offer(lowX, highY);
  offer(highX, lowY);
  const edges: number[] = [];
  const add = (e: readonly number[], dx: number, dy: number, clear: number, sign: number): void => {
    for (let k = 0; k < e.length; k += 4) {
      const [ux, uy] = [e[k + 2]! - e[k]!, e[k + 3]! - e[k + 1]!];
      const length = Math.hypot(ux, uy);
      // The edge moved out by the spacing and lengthened by it, so that neighbours still meet.
      const [nx, ny, tx, ty] = [
        (uy / length) * clear,
        (-ux / length) * clear,
        (ux / length) * clear,
        (uy / length) * clear,
      ];
      edges.push(
        dx + sign * (e[k]! + nx - tx),
        dy + sign * (e[k + 1]! + ny - ty),
        dx + sign * (e[k + 2]! + nx + tx),
        dy + sign * (e[k + 3]! + ny + ty),
      );
    }
  };
  for (const j of layout.on[field]!) {
    const other = layout.pose[j]!;
    const flip = pose.id < other.id;
    const region = flip ? layout.store.region(pose, other) : layout.store.region(other, pose);
    add(region.edges, layout.x[j]!, layout.y[j]!, layout.spacing, flip ? -1 : 1);
  }
  for (const { pose: solid, clear } of f.obstacles) {
    const flip = pose.id < solid.id;
    const region = flip ? layout.store.region(pose, solid) : layout.store.region(solid, pose);
    add(region.edges, 0, 0, clear, flip ? -1 : 1);
  }
  // Nothing right of the best place so far can beat it.
  const farX = Math.min(highX, bound - pose.box[2] + f.x0);
  layout.budget.spent += crossings(edges, lowX, lowY, farX, highX, highY, offer);
  found.sort((a, b) => a.key - b.key);
  for (const c of found) if (costAt(layout, i, pose, c.x, c.y, field, Number.MIN_VALUE) === 0) return [c.x, c.y];
  return null;
}

/** Crossing tests that cost as much as one look at a pair. */
const TESTS_A_LOOK = 8;

/**
 * Offers the ends of the edges, their crossings with each other and with the rectangle, where x <= farX; edges are swept
 * from left to right. Returns the work done, in evaluations.
 */
function crossings(
  e: readonly number[],
  lowX: number,
  lowY: number,
  farX: number,
  highX: number,
  highY: number,
  offer: (x: number, y: number) => void,
): number {
  const order: number[] = [];
  for (let k = 0; k < e.length; k += 4) {
    const [ax, ay, bx, by] = [e[k]!, e[k + 1]!, e[k + 2]!, e[k + 3]!];
    if (Math.max(ax, bx) < lowX || Math.min(ax, bx) > farX || Math.max(ay, by) < lowY || Math.min(ay, by) > highY)
      continue;
    order.push(k);
    offer(ax, ay);
    offer(bx, by);
    const [dx, dy] = [bx - ax, by - ay];
    for (const x of [lowX, highX]) {
      const t = (x - ax) / dx;
      if (t >= 0 && t <= 1) offer(x, ay + t * dy);
    }
    for (const y of [lowY, highY]) {
      const t = (y - ay) / dy;
      if (t >= 0 && t <= 1) offer(ax + t * dx, y);
    }
  }
  const left = (k: number): number => Math.min(e[k]!, e[k + 2]!);
  order.sort((a, b) => left(a) - left(b) || a - b);
  const active: number[] = [];
  let tests = 0;
  for (const k of order) {
    const [ax, ay, bx, by] = [e[k]!, e[k + 1]!, e[k + 2]!, e[k + 3]!];
    const [dx, dy] = [bx - ax, by - ay];
    const minX = Math.min(ax, bx);
    const [minY, maxY] = ay < by ? [ay, by] : [by, ay];
    let kept = 0;
    for (let n = 0; n < active.length; n++) {
      const m = active[n]!;
      const cx = e[m]!;
      const ex = e[m + 2]!;
      if ((cx > ex ? cx : ex) < minX) continue;
      active[kept++] = m;
      const cy = e[m + 1]!;
      const ey = e[m + 3]!;
      tests++;
      if ((cy > ey ? cy : ey) < minY || (cy < ey ? cy : ey) > maxY) continue;
      const fx = ex - cx;
      const fy = ey - cy;
      const det = dx * fy - dy * fx;
      if (det === 0) continue;
      const t = ((cx - ax) * fy - (cy - ay) * fx) / det;
      const s = ((cx - ax) * dy - (cy - ay) * dx) / det;
      if (t >= 0 && t <= 1 && s >= 0 && s <= 1) offer(ax + t * dx, ay + t * dy);
    }
    active.length = kept;
    active.push(k);
  }
  return tests / TESTS_A_LOOK;
}
