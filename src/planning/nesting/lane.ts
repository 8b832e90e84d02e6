import { boundsOf, type Ring, signedArea, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import { seededRandom } from '../../maths/random.js';
import { grownArea, sheetBound } from './bound.js';
import { budgetOf } from './budget.js';
import { OUTLINE_ROUND_OFF } from './faults.js';
import { type Field, fitsField } from './layout.js';
import { noFitStore } from './no-fit.js';
import { obstaclesOf } from './offcut.js';
import { angleThatFits, poseMaker, type Shape } from './pose.js';
import type { NestingPanel, NestingSheet } from './request.js';
import { planSheets } from './sheets.js';

/** One of the searches that a plan is the best of: plain records in and out, so that any thread can do it. */
export interface Lane {
  readonly panels: readonly NestingPanel[];
  readonly sheets: readonly NestingSheet[];
  readonly spacing: number;
  readonly margin: number;
  readonly seed: number;
  readonly evaluations: number;
  /** The plan to better; null: from nothing. */
  readonly start: LanePlan | null;
  /** Whether this is the last turn, in which the best is squeezed in small steps. */
  readonly last: boolean;
  /** Whether panels that may turn freely are turned to any angle: finer, and slower. */
  readonly turning: boolean;
  /** On the caller's clock, ms, between which the search may run; null: no limit. */
  readonly time: { readonly from: number; readonly to: number } | null;
}

/** A plan by the pieces' numbers: panel after panel, each as often as its quantity. */
export interface LanePlan {
  readonly sheets: readonly {
    readonly kind: number;
    readonly placed: readonly LanePiece[];
  }[];
  readonly left: readonly { readonly piece: number; readonly reason: 'too-large' | 'no-sheet-left' }[];
  readonly lowerBound: number;
  /** Area of the sheets less what is left free right of the panels on the one that was shortened, mm². */
  readonly taken: number;
  /** Share of a length that the next step takes away. */
  readonly step: number | null;
  /** Whether time decided anything. */
  readonly hurried: boolean;
}

export interface LanePiece {
  readonly piece: number;
  readonly degrees: number;
  readonly x: number;
  readonly y: number;
}

/** Marks of the pieces in the order of their numbers. */
export const piecesOf = (panels: readonly NestingPanel[]): string[] =>
  panels.flatMap((p) => Array.from({ length: p.quantity }, () => p.mark));

/** Searches from nothing or from a plan, for as many evaluations as it is given or as long as its time. `clock` in ms. */
export function nestLane(lane: Lane, clock: (() => number) | null): LanePlan {
  const maker = poseMaker(lane.turning);
  const byOutline = new Map<string, Shape>();
  const pieces: Shape[] = [];
  for (const panel of lane.panels) {
    const rotations = panel.rotations ?? null;
    const key = JSON.stringify([panel.outline, rotations]);
    let shape = byOutline.get(key);
    if (!shape) {
      shape = maker.shape(tidyRing(toRing(panel.outline), OUTLINE_ROUND_OFF), rotations);
      byOutline.set(key, shape);
    }
    for (let k = 0; k < panel.quantity; k++) pieces.push(shape);
  }

  const exactly = new Map<Shape, Shape>();
  const { margin, spacing } = lane;
  const kinds = lane.sheets.map((s, kind) => {
    const outline: Ring | null = s.outline ? tidyRing(toRing(s.outline), OUTLINE_ROUND_OFF) : null;
    const [x0, y0, x1, y1] = outline ? boundsOf(outline) : [0, 0, s.width, s.height];
    const obstacles = outline ? obstaclesOf(outline, margin, maker) : [];
    const field: Field = { x0: x0 + margin, y0: y0 + margin, x1: x1 - margin, y1: y1 - margin, kind, obstacles };
    const area = outline ? signedArea(outline) : s.width * s.height;
    const inside = Math.max(0, x1 - x0 - 2 * margin + spacing) * Math.max(0, y1 - y0 - 2 * margin + spacing);
    return {
      field,
      area,
      bound: outline ? Math.min(inside, grownArea(outline, spacing)) : inside,
      available: s.available ?? Infinity,
    };
  });

  // A cover must not keep a panel off a sheet that the panel itself fits.
  for (const [i, shape] of pieces.entries()) {
    const fits = (s: Shape): boolean => kinds.some(({ field }) => s.poses.some((p) => fitsField(field, p, 0)));
    if (shape.exact === null || fits(shape)) continue;
    const exact = exactly.get(shape) ?? maker.shape(shape.exact, shape.rotations, true);
    exactly.set(shape, exact);
    if (fits(exact)) pieces[i] = exact;
  }
  // A long panel may fit a sheet across its diagonal alone.
  for (const shape of new Set(pieces))
    if (shape.rotations === null)
      for (const { field } of kinds) {
        if (shape.poses.some((p) => fitsField(field, p, 0))) continue;
        const angle = angleThatFits(shape.ring, field.x1 - field.x0, field.y1 - field.y0);
        if (angle !== null) for (const half of [0, 180]) shape.poses.push(maker.pose(shape, angle + half));
      }

  const { time } = lane;
  const timeShare = time && clock ? (): number => (clock() - time.from) / Math.max(1, time.to - time.from) : null;
  const budget = budgetOf(lane.evaluations, timeShare);
  const plan = planSheets({
    shapes: pieces,
    kinds,
    spacing,
    store: noFitStore(budget),
    budget,
    random: seededRandom(lane.seed),
    boundOf: (shapes) =>
      sheetBound(
        shapes.map((s) => grownArea(s.exact ?? s.ring, spacing)),
        kinds.map((k) => ({ area: k.bound, available: k.available })),
      ),
    start:
      lane.start &&
      lane.start.sheets.map((s) => ({
        kind: s.kind,
        placed: s.placed.map((p) => ({
          piece: p.piece,
          pose: maker.pose(pieces[p.piece]!, p.degrees),
          x: p.x,
          y: p.y,
        })),
      })),
    step: lane.start?.step ?? null,
    last: lane.last,
  });
  return {
    sheets: plan.sheets.map(({ kind, placed }) => ({
      kind,
      placed: placed.map(({ piece, pose, x, y }) => ({ piece, degrees: pose.degrees, x, y })),
    })),
    left: plan.left,
    lowerBound: plan.lowerBound,
    taken: plan.taken,
    step: plan.step,
    hurried: budget.hurried || budget.stopped,
  };
}
