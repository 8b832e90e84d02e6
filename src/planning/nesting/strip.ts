import type { Random } from '../../maths/random.js';
import { goneOf, isSpent } from './budget.js';
import { type Field, type Layout, put, refreshDepths, restore, type Snapshot, snapshot } from './layout.js';
import type { Pose } from './pose.js';
import { separate } from './separate.js';

/** Share of the budget for bold shortening with exchanges; the rest squeezes the best layout in small steps. */
const BOLD_SHARE = 0.6;
/** Shares of the length that one bold step takes away, at first and at last; misses before a smaller one; near misses kept. */
const FIRST_SHARE = 0.03;
const LEAST_SHARE = 0.004;
const MISSES = 3;
const POOL = 8;
/** Shares of the length that one small step takes away, at first and at last. */
const FIRST_STEP = 0.001;
const LAST_STEP = 1e-5;
const BOLD_PATIENCE = { rounds: 60, strikes: 2 } as const;
const SQUEEZE_PATIENCE = { rounds: 40, strikes: 1 } as const;
/** A length this share above a bound is the bound: round-off of sums. */
const CLOSED = 1e-9;

/** How far a shortening goes. */
export interface Shortening {
  /** Evaluations at which it ends. */
  readonly limit: number;
  /** Share that the first bold step takes away; null: the usual. */
  readonly step: number | null;
  /** Whether the budget ends with small steps. */
  readonly last: boolean;
}

/**
 * Shortens the used length of field f from the right, again and again, and leaves the shortest layout without
 * overlaps standing. The layout must start without overlaps.
 *
 * @returns length: from x0 to the rightmost piece; step: the share that a further search should take away first
 */
export function shorten(layout: Layout, f: number, random: Random, how: Shortening): { length: number; step: number } {
  const { limit } = how;
  const field = layout.fields[f]!;
  const full = field.x1;
  const start = goneOf(layout.budget);
  const boldLimit = how.last ? start + BOLD_SHARE * (limit - start) : limit;
  const fieldsOf = (): readonly number[] => [f];
  let best: Snapshot = snapshot(layout);
  let length = usedLength(layout, f);
  const area = layout.on[f]!.reduce((sum, i) => sum + layout.shapes[i]!.area, 0);
  const least = area / (field.y1 - field.y0);
  const widest = Math.max(0, ...layout.on[f]!.map((i) => width(narrowest(layout, i, field))));
  const done = (): boolean => length <= Math.max(least, widest) * (1 + CLOSED);
  const aim = (share: number): number => Math.max(length * (1 - share), widest, least);

  // Every try is counted by its pieces: on a sheet where none has a neighbour, no pair is ever looked at.
  // Boldly: to a shorter length at once, and where that fails with pieces exchanged in one of the near misses.
  let share = how.step ?? FIRST_SHARE;
  let misses = 0;
  let pool: { shot: Snapshot; total: number }[] = [];
  while (!isSpent(layout.budget, boldLimit) && !done()) {
    layout.budget.spent += layout.on[f]!.length;
    field.x1 = field.x0 + aim(share);
    if (pool.length === 0) pullIn(layout, f);
    else {
      const pick = Math.min(pool.length - 1, Math.floor(Math.abs(random() + random() - 1) * pool.length));
      restore(layout, pool[pick]!.shot);
      exchange(layout, f, random);
    }
    if (separate(layout, fieldsOf, random, { ...BOLD_PATIENCE, limit: boldLimit })) {
      best = snapshot(layout);
      length = usedLength(layout, f);
      pool = [];
      misses = 0;
      share = Math.min(FIRST_SHARE, 2 * share);
      continue;
    }
    pool.push({ shot: snapshot(layout), total: sumDepth(layout) });
    pool.sort((p, q) => p.total - q.total);
    pool.length = Math.min(pool.length, POOL);
    if (++misses >= MISSES && share > LEAST_SHARE) {
      // Near misses of a length that is out of reach are no good start for a longer one: begin from the best again.
      share = Math.max(LEAST_SHARE, share / 2);
      misses = 0;
      pool = [];
      field.x1 = field.x0 + length;
      restore(layout, best);
    }
  }

  // Then in small steps from the best alone, smaller as the budget runs out.
  const squeezeStart = goneOf(layout.budget);
  while (how.last && !isSpent(layout.budget, limit) && !done()) {
    layout.budget.spent += layout.on[f]!.length;
    const gone = (goneOf(layout.budget) - squeezeStart) / Math.max(1, limit - squeezeStart);
    const target = aim(FIRST_STEP * (LAST_STEP / FIRST_STEP) ** gone);
    field.x1 = field.x0 + target;
    restore(layout, best);
    squeeze(layout, f, length - target, random);
    if (separate(layout, fieldsOf, random, { ...SQUEEZE_PATIENCE, limit })) {
      best = snapshot(layout);
      length = usedLength(layout, f);
    }
  }
  field.x1 = full;
  restore(layout, best);
  return { length, step: share };
}

const sumDepth = (layout: Layout): number => layout.depth.reduce((a, b) => a + b, 0) / 2;

/** From the field's left to the rightmost piece on it. */
export function usedLength(layout: Layout, f: number): number {
  let right = layout.fields[f]!.x0;
  for (const i of layout.on[f]!) right = Math.max(right, layout.x[i]! + layout.pose[i]!.box[2]);
  return right - layout.fields[f]!.x0;
}

const width = (pose: Pose): number => pose.box[2] - pose.box[0];

/** The narrowest pose that is not too tall for the field. */
function narrowest(layout: Layout, i: number, field: Field): Pose {
  const low = layout.shapes[i]!.poses.filter((p) => p.box[3] - p.box[1] <= field.y1 - field.y0 + layout.tolerance);
  return low.reduce((a, b) => (width(b) < width(a) ? b : a), layout.pose[i]!);
}

function pullIn(layout: Layout, f: number): void {
  const field = layout.fields[f]!;
  for (const i of layout.on[f]!) {
    const pose = layout.pose[i]!;
    if (pose.box[2] - pose.box[0] > field.x1 - field.x0) {
      const narrow = narrowest(layout, i, field);
      put(layout, i, narrow, field.x0 - narrow.box[0], layout.y[i]!, f);
    }
    const p = layout.pose[i]!;
    const x = Math.max(field.x0 - p.box[0], Math.min(layout.x[i]!, field.x1 - p.box[2]));
    const y = Math.max(field.y0 - p.box[1], Math.min(layout.y[i]!, field.y1 - p.box[3]));
    put(layout, i, p, x, y, f);
  }
}

/** Everything right of a line drawn at random moves left by d. */
function squeeze(layout: Layout, f: number, d: number, random: Random): void {
  const field = layout.fields[f]!;
  const line = field.x0 + random() * (field.x1 - field.x0);
  for (const i of layout.on[f]!) {
    const p = layout.pose[i]!;
    if (layout.x[i]! + (p.box[0] + p.box[2]) / 2 > line) layout.x[i] = layout.x[i]! - d;
  }
  pullIn(layout, f);
}

/** Two of the larger pieces of different shape change places, those near them staying where they are. */
function exchange(layout: Layout, f: number, random: Random): void {
  const byArea = [...layout.on[f]!].sort((a, b) => layout.shapes[b]!.area - layout.shapes[a]!.area || a - b);
  if (byArea.length < 2) return;
  // The pieces that make up three quarters of the area.
  const total = byArea.reduce((s, i) => s + layout.shapes[i]!.area, 0);
  let sum = 0;
  let large = 0;
  while (large < byArea.length && sum < 0.75 * total) sum += layout.shapes[byArea[large++]!]!.area;
  large = Math.max(2, large);
  const a = byArea[Math.floor(random() * large)]!;
  const others = byArea.slice(0, large).filter((j) => layout.shapes[j] !== layout.shapes[a]);
  const b = others.length > 0 ? others[Math.floor(random() * others.length)]! : byArea[Math.floor(random() * large)]!;
  if (a === b) return;
  const middle = (i: number): [number, number] => {
    const p = layout.pose[i]!;
    return [layout.x[i]! + (p.box[0] + p.box[2]) / 2, layout.y[i]! + (p.box[1] + p.box[3]) / 2];
  };
  const [ma, mb] = [middle(a), middle(b)];
  const moveTo = (i: number, m: [number, number]): void => {
    const p = layout.pose[i]!;
    put(layout, i, p, m[0] - (p.box[0] + p.box[2]) / 2, m[1] - (p.box[1] + p.box[3]) / 2, f);
  };
  moveTo(a, mb);
  moveTo(b, ma);
  pullIn(layout, f);
  refreshDepths(layout, a);
  refreshDepths(layout, b);
}
