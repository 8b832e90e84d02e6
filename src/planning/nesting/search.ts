import type { Random } from '../../maths/random.js';
import { costAt, fitsField, type Layout, within } from './layout.js';
import type { Pose } from './pose.js';

/** A place for one piece and its weighted depth there. */
export interface Place {
  pose: Pose;
  x: number;
  y: number;
  field: number;
  cost: number;
}

/** Samples drawn for one move; found by trial on the published strips. */
const WIDE = 8;
const CORNERS = 6;
const NEAR = 8;
/** Places that are refined. */
const KEPT = 2;

/**
 * The least weighted depth found for piece i: places drawn over its fields, at corners of no-fit regions and round
 * the present one; the best few then slide downhill, first in large steps, the winner in small ones.
 */
export function bestPlace(layout: Layout, i: number, fields: readonly number[], random: Random): Place | null {
  const shape = layout.shapes[i]!;
  const best: Place[] = [];
  let cutoff = Infinity;
  const offer = (pose: Pose, x: number, y: number, field: number): void => {
    const f = layout.fields[field]!;
    const cx = Math.min(Math.max(x, f.x0 - pose.box[0]), f.x1 - pose.box[2]);
    const cy = Math.min(Math.max(y, f.y0 - pose.box[1]), f.y1 - pose.box[3]);
    const cost = costAt(layout, i, pose, cx, cy, field, cutoff);
    if (cost >= cutoff) return;
    best.push({ pose, x: cx, y: cy, field, cost });
    best.sort((a, b) => a.cost - b.cost);
    if (best.length > KEPT) best.pop();
    if (best.length === KEPT) cutoff = best[KEPT - 1]!.cost;
  };
  const slack = layout.tolerance;
  const poses = shape.poses;
  const draw = (): Pose => poses[Math.floor(random() * poses.length)]!;

  const home = layout.field[i]!;
  if (home >= 0 && fields.includes(home)) {
    offer(layout.pose[i]!, layout.x[i]!, layout.y[i]!, home);
    for (let k = 0; k < NEAR; k++) {
      const pose = k < NEAR / 2 ? layout.pose[i]! : draw();
      if (!fitsField(layout.fields[home]!, pose, slack)) continue;
      const [dx, dy] = centreShift(layout.pose[i]!, pose);
      const w = (pose.box[2] - pose.box[0]) * 0.5;
      const h = (pose.box[3] - pose.box[1]) * 0.5;
      offer(pose, layout.x[i]! + dx + (random() - 0.5) * w, layout.y[i]! + dy + (random() - 0.5) * h, home);
    }
  }
  for (let k = 0; k < WIDE + CORNERS; k++) {
    const field = fields[Math.floor(random() * fields.length)]!;
    const f = layout.fields[field]!;
    const pose = draw();
    if (!fitsField(f, pose, slack)) continue;
    const on = layout.on[field]!;
    if (k < WIDE || on.length === 0) {
      const x = f.x0 - pose.box[0] + random() * (f.x1 - f.x0 - (pose.box[2] - pose.box[0]));
      const y = f.y0 - pose.box[1] + random() * (f.y1 - f.y0 - (pose.box[3] - pose.box[1]));
      offer(pose, x, y, field);
    } else {
      const j = on[Math.floor(random() * on.length)]!;
      if (j === i) continue;
      const other = layout.pose[j]!;
      const flip = pose.id < other.id;
      const region = flip ? layout.store.region(pose, other) : layout.store.region(other, pose);
      const e = region.edges;
      const at = 4 * Math.floor(random() * (e.length / 4));
      const sign = flip ? -1 : 1;
      offer(pose, layout.x[j]! + sign * e[at]!, layout.y[j]! + sign * e[at + 1]!, field);
    }
  }
  if (best.length === 0) return null;
  const size = Math.min(
    shape.poses[0]!.box[2] - shape.poses[0]!.box[0],
    shape.poses[0]!.box[3] - shape.poses[0]!.box[1],
  );
  for (const place of best) slide(layout, i, place, 0.25 * size, 0.02 * size, random);
  best.sort((a, b) => a.cost - b.cost);
  const winner = best[0]!;
  // Down to below what counts as overlap: a coarser end would leave traces that never go.
  slide(layout, i, winner, 0.01 * size, Math.min(2e-5 * size, layout.tolerance / 2), random);
  return winner;
}

/** The move that keeps the middle of the box where it is when a pose replaces another. */
function centreShift(from: Pose, to: Pose): [number, number] {
  return [
    (from.box[0] + from.box[2] - to.box[0] - to.box[2]) / 2,
    (from.box[1] + from.box[3] - to.box[1] - to.box[3]) / 2,
  ];
}

/** Pattern search (Hooke and Jeeves 1961) along x, y or a slanting line drawn at random, steps from `first` to `last`. */
function slide(layout: Layout, i: number, place: Place, first: number, last: number, random: Random): void {
  const f = layout.fields[place.field]!;
  const { pose, field } = place;
  const [lowX, highX] = [f.x0 - pose.box[0], f.x1 - pose.box[2]];
  const [lowY, highY] = [f.y0 - pose.box[1], f.y1 - pose.box[3]];
  let sx = first;
  let sy = first;
  // Only pieces within reach of the slide are looked at; the reach is renewed when the place nears its end.
  const reach = 4 * first;
  let near = within(layout, i, pose, place.x, place.y, field, reach);
  let [homeX, homeY] = [place.x, place.y];
  while (place.cost > 0 && (sx > last || sy > last)) {
    const r = random();
    const axis = r < 0.4 ? 0 : r < 0.8 ? 1 : r < 0.9 ? 2 : 3;
    const dx = axis === 1 ? 0 : sx;
    const dy = axis === 0 ? 0 : axis === 3 ? -sy : sy;
    let better = false;
    for (let side = -1; side <= 1; side += 2) {
      const x = Math.min(Math.max(place.x + side * dx, lowX), highX);
      const y = Math.min(Math.max(place.y + side * dy, lowY), highY);
      if (x === place.x && y === place.y) continue;
      if (Math.abs(x - homeX) > reach || Math.abs(y - homeY) > reach) {
        near = within(layout, i, pose, place.x, place.y, field, reach);
        homeX = place.x;
        homeY = place.y;
      }
      const cost = costAt(layout, i, pose, x, y, field, place.cost, near);
      if (cost < place.cost) {
        place.x = x;
        place.y = y;
        place.cost = cost;
        better = true;
        break;
      }
    }
    const factor = better ? 1.1 : 0.5;
    const both = axis >= 2 ? Math.sqrt(factor) : factor;
    if (axis !== 1) sx *= both;
    if (axis !== 0) sy *= both;
  }
}
