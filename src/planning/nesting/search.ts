import type { Random } from '../../maths/random.js';
import { costAt, fitsField, type Layout, within } from './layout.js';
import type { Pose, Shape } from './pose.js';

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
/** Of the wide ones, drawn at any angle where a piece may turn freely. */
const ANY_ANGLE = 2;
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
    const pose = shape.turned && k < ANY_ANGLE ? shape.turned(360 * random()) : draw();
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
  const last = Math.min(2e-5 * size, layout.tolerance / 2);
  slide(layout, i, winner, 0.01 * size, last, random);
  if (winner.cost > 0 && shape.turned && random() < TURN_SHARE) {
    turn(layout, i, winner, shape.turned, size, random);
    slide(layout, i, winner, 0.01 * size, last, random);
  }
  return winner;
}

/** Share of the moves that end with turning, tries of each, largest turn in degrees and how many times it may be halved. */
const TURN_SHARE = 0.25;
const TURN_TRIES = 4;
const [FIRST_TURN, TURN_HALVINGS] = [30, 10] as const;

/**
 * Turns a piece that may turn freely a little either way about its middle, and keeps what lowers its weighted depth; or lays one of its edges
 * against an edge of a piece beside it.
 */
function turn(
  layout: Layout,
  i: number,
  place: Place,
  turned: NonNullable<Shape['turned']>,
  size: number,
  random: Random,
): void {
  const f = layout.fields[place.field]!;
  let step = FIRST_TURN * 0.5 ** (TURN_HALVINGS * random());
  for (let k = 0; k < TURN_TRIES && place.cost > 0; k++) {
    const flush = k === 0 ? flushAngle(layout, i, place, random) : null;
    const sides = flush === null ? [step, -step] : [flush];
    let better = false;
    for (const by of sides) {
      const pose = turned(place.pose.degrees + by);
      if (!fitsField(f, pose, layout.tolerance)) continue;
      const [dx, dy] = centreShift(place.pose, pose);
      const x = Math.min(Math.max(place.x + dx, f.x0 - pose.box[0]), f.x1 - pose.box[2]);
      const y = Math.min(Math.max(place.y + dy, f.y0 - pose.box[1]), f.y1 - pose.box[3]);
      const cost = costAt(layout, i, pose, x, y, place.field, 2 * place.cost);
      if (cost >= 2 * place.cost) continue;
      const trial: Place = { pose, x, y, field: place.field, cost };
      slide(layout, i, trial, 0.04 * size, 0.004 * size, random);
      if (trial.cost >= place.cost) continue;
      Object.assign(place, trial);
      better = true;
      break;
    }
    step *= better ? 1.5 : 0.5;
  }
}

/** The turn in degrees, at most half a right angle, that lays an edge of the piece along an edge of one beside it; null: nobody is near. */
function flushAngle(layout: Layout, i: number, place: Place, random: Random): number | null {
  const near = within(layout, i, place.pose, place.x, place.y, place.field, 0);
  if (near.length === 0) return null;
  const direction = (ring: Pose['ring']): number => {
    const k = 2 * Math.floor((random() * ring.length) / 2);
    const n = ring.length;
    return (Math.atan2(ring[(k + 3) % n]! - ring[k + 1]!, ring[(k + 2) % n]! - ring[k]!) * 180) / Math.PI;
  };
  const other = layout.pose[near[Math.floor(random() * near.length)]!]!;
  const by = direction(other.ring) + 180 - direction(place.pose.ring);
  const turn = ((((by + 180) % 360) + 360) % 360) - 180;
  return Math.abs(turn) <= 45 ? turn : null;
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
