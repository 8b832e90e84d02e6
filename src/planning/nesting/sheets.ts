import type { Random } from '../../maths/random.js';
import { type Budget, goneOf, isSpent } from './budget.js';
import { construct } from './construct.js';
import { emptiest, reduceSheets } from './fewer-sheets.js';
import { type Field, fitsField, type Layout, newLayout, put, restore, snapshot } from './layout.js';
import type { NoFitStore } from './no-fit.js';
import type { Pose, Shape } from './pose.js';
import { shorten } from './strip.js';

/** A size of sheet: its usable field, its whole area in mm², how many there are. */
export interface SheetKind {
  readonly field: Field;
  readonly area: number;
  readonly available: number;
}

export interface PlacedPiece {
  readonly piece: number;
  readonly pose: Pose;
  readonly x: number;
  readonly y: number;
}

type PlacedSheet = { readonly kind: number; readonly placed: readonly PlacedPiece[] };

export interface SheetPlan {
  readonly sheets: readonly PlacedSheet[];
  readonly left: readonly { readonly piece: number; readonly reason: 'too-large' | 'no-sheet-left' }[];
  readonly lowerBound: number;
  /** Area of the sheets less what is free right of the panels on the one that was shortened, mm². */
  readonly taken: number;
  /** Share of a length that the next step would take away; null: nothing was shortened. */
  readonly step: number | null;
}

export interface SheetTask {
  readonly shapes: readonly Shape[];
  readonly kinds: readonly SheetKind[];
  readonly spacing: number;
  readonly store: NoFitStore;
  readonly budget: Budget;
  readonly random: Random;
  readonly boundOf: (shapes: readonly Shape[]) => number;
  /** A plan to go on from, with the step it ended with; null: from nothing. */
  readonly start: readonly PlacedSheet[] | null;
  readonly step: number | null;
  /** Whether what is left of the budget ends with small steps. */
  readonly last: boolean;
}

/** Overlap in mm that a finished plan may have: half of what spacing and margin promise. */
const TOLERANCE = 5e-4;

/**
 * The way: fill sheets by first fit in several orders; then try to do without one sheet after another, its pieces
 * pressed onto the others and the overlaps worked out; then shorten the last sheet's used length.
 */
export function planSheets(task: SheetTask): SheetPlan {
  const { shapes, kinds, spacing, store, budget, random, start } = task;
  const tooLarge = (s: Shape): boolean =>
    !kinds.some((k) => k.available > 0 && s.poses.some((p) => fitsField(k.field, p, TOLERANCE)));
  const left: { piece: number; reason: 'too-large' | 'no-sheet-left' }[] = [];
  const fit: number[] = [];
  shapes.forEach((s, i) => {
    if (tooLarge(s)) left.push({ piece: i, reason: 'too-large' });
    else fit.push(i);
  });
  const chosen = fit.map((i) => shapes[i]!);
  const lowerBound = task.boundOf(chosen);
  if (fit.length === 0) return { sheets: [], left, lowerBound, taken: 0, step: null };

  const begun = start
    ? layoutFrom(start, fit, chosen, kinds, spacing, store, budget)
    : filled(chosen, kinds, spacing, store, budget, lowerBound);
  const layout = reduceSheets(begun, kinds, lowerBound, random, budget);
  const last = emptiest(layout, kinds);
  const short = last >= 0 ? shortenOne(layout, last, task) : null;
  const whole = layout.fields.reduce((sum, f) => sum + kinds[f.kind]!.area, 0);

  const sheets = layout.fields.map((f, k) => ({
    kind: f.kind,
    placed: [...layout.on[k]!]
      .sort((a, b) => a - b)
      .map((i) => ({ piece: fit[i]!, pose: layout.pose[i]!, x: layout.x[i]!, y: layout.y[i]! })),
  }));
  layout.field.forEach((f, i) => {
    if (f < 0) left.push({ piece: fit[i]!, reason: 'no-sheet-left' });
  });
  return { sheets, left, lowerBound, taken: whole - (short?.free ?? 0), step: short?.step ?? null };
}

/** The best of first fit in several orders of sheets and pieces. */
function filled(
  chosen: readonly Shape[],
  kinds: readonly SheetKind[],
  spacing: number,
  store: NoFitStore,
  budget: Budget,
  lowerBound: number,
): Layout {
  let best: Layout | null = null;
  for (const sizes of sizeOrders(kinds))
    for (const order of orders(chosen)) {
      if (best && isSpent(budget, budget.limit / 4)) break;
      const layout = fill(chosen, order, sizes, kinds, spacing, store, budget);
      if (!best || better(layout, best, kinds)) best = layout;
      if (best.fields.length <= lowerBound && best.field.every((f) => f >= 0)) break;
    }
  return best!;
}

/** The layout that a plan describes. */
function layoutFrom(
  start: readonly PlacedSheet[],
  fit: readonly number[],
  chosen: readonly Shape[],
  kinds: readonly SheetKind[],
  spacing: number,
  store: NoFitStore,
  budget: Budget,
): Layout {
  const fields = start.map((s) => ({ ...kinds[s.kind]!.field }));
  const layout = newLayout(store, chosen, fields, spacing, TOLERANCE, budget);
  const place = new Map(fit.map((piece, i) => [piece, i]));
  start.forEach((s, f) => {
    for (const p of s.placed) put(layout, place.get(p.piece)!, p.pose, p.x, p.y, f);
  });
  return layout;
}

/** Sizes of sheets in the order in which new ones are opened: as given, largest first, smallest first. */
function sizeOrders(kinds: readonly SheetKind[]): number[][] {
  const given = kinds.map((_, k) => k);
  if (kinds.length === 1) return [given];
  const large = [...given].sort((a, b) => kinds[b]!.area - kinds[a]!.area || a - b);
  return [large, given, [...large].reverse()];
}

/** Orders of pieces, most demanding first by different measures. */
function orders(shapes: readonly Shape[]): number[][] {
  const size = (s: Shape): [number, number] => {
    const b = s.poses[0]!.box;
    return [b[2] - b[0], b[3] - b[1]];
  };
  const by = (measure: (s: Shape) => number): number[] =>
    shapes.map((_, i) => i).sort((a, b) => measure(shapes[b]!) - measure(shapes[a]!) || a - b);
  return [
    by((s) => s.area),
    by((s) => Math.max(...size(s))),
    by((s) => size(s)[0] * size(s)[1]),
    by((s) => size(s)[1]),
    by((s) => size(s)[0]),
  ];
}

function fill(
  shapes: readonly Shape[],
  order: readonly number[],
  sizes: readonly number[],
  kinds: readonly SheetKind[],
  spacing: number,
  store: NoFitStore,
  budget: Budget,
): Layout {
  const layout = newLayout(store, shapes, [], spacing, TOLERANCE, budget);
  const used = kinds.map(() => 0);
  let left = [...order];
  while (left.length > 0) {
    // A new sheet of the first size that takes the most demanding piece that is left.
    const next = left.find((i) =>
      sizes.some(
        (k) => used[k]! < kinds[k]!.available && shapes[i]!.poses.some((p) => fitsField(kinds[k]!.field, p, TOLERANCE)),
      ),
    );
    if (next === undefined) break;
    let opened = false;
    for (const k of sizes) {
      if (used[k]! >= kinds[k]!.available) continue;
      if (!shapes[next]!.poses.some((p) => fitsField(kinds[k]!.field, p, TOLERANCE))) continue;
      layout.fields.push({ ...kinds[k]!.field });
      layout.on.push([]);
      const rest = construct(layout, left, layout.fields.length - 1);
      if (rest.length === left.length) {
        layout.fields.pop();
        layout.on.pop();
        continue;
      }
      used[k] = used[k]! + 1;
      left = rest;
      opened = true;
      break;
    }
    if (!opened) break;
  }
  return layout;
}

function better(a: Layout, b: Layout, kinds: readonly SheetKind[]): boolean {
  const placed = (l: Layout): number => l.field.reduce((s, f) => s + (f >= 0 ? 1 : 0), 0);
  const area = (l: Layout): number => l.fields.reduce((s, f) => s + kinds[f.kind]!.area, 0);
  const tail = (l: Layout): number => Math.min(...l.on.map((on) => on.reduce((s, i) => s + l.shapes[i]!.area, 0)));
  return (placed(b) - placed(a) || a.fields.length - b.fields.length || area(a) - area(b) || tail(a) - tail(b)) < 0;
}

/** Shortens one field of a layout with the others left as they are: the area free right of its pieces, and the step it ended with. */
function shortenOne(
  layout: Layout,
  f: number,
  task: SheetTask,
): { readonly free: number; readonly step: number } | null {
  const { budget } = task;
  const pieces = [...layout.on[f]!];
  if (pieces.length === 0) return null;
  const alone = newLayout(
    layout.store,
    pieces.map((i) => layout.shapes[i]!),
    [{ ...layout.fields[f]! }],
    layout.spacing,
    layout.tolerance,
    budget,
  );
  pieces.forEach((i, k) => {
    put(alone, k, layout.pose[i]!, layout.x[i]!, layout.y[i]!, 0);
  });
  restore(alone, snapshot(alone));
  const gone = goneOf(budget);
  // Where more sheets than one are full, how the last one ends is worth less than a minute's search.
  const share = layout.fields.length > 1 ? SHORTEN_SHARE : 1;
  const limit = Math.min(budget.limit, gone + share * budget.limit);
  const { length, step } = shorten(alone, 0, task.random, { limit, step: task.step, last: task.last });
  pieces.forEach((i, k) => {
    put(layout, i, alone.pose[k]!, alone.x[k]!, alone.y[k]!, f);
  });
  const field = layout.fields[f]!;
  return { free: (field.x1 - field.x0 - length) * (field.y1 - field.y0), step };
}

/** Share of the whole budget that shortening the last of several sheets may take. */
const SHORTEN_SHARE = 0.3;
