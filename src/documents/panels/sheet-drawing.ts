import { withArcs } from '../../maths/polygon/arcs.js';
import { clearanceAt } from '../../maths/polygon/clearance.js';
import { boundsOf, movedRing, type Ring, toPoints, toRing } from '../../maths/polygon/ring.js';
import type { Job } from '../../model/job/index.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { PlannedSheet } from '../../model/plan.js';
import { type Drawing, type DrawingLine, straightLine } from '../kit/drawing.js';
import { bevelNotes } from './bevel-notes.js';
import { cutterPath, kerfOffset } from './kerf.js';
import { type IsFree, withLeadIn } from './lead-in.js';
import { sharedCuts } from './shared-cuts.js';
import { tabSpans } from './tabs.js';
import { withoutSpans } from './without-spans.js';

/** Chords within this of one circle are drawn as its arc, mm: twice the chord error that arcs are made with. */
const ARC_FIT = 0.004;
/** Side of the check square, mm. */
const CHECK_SIDE = 100;

/**
 * The machine drawing of one sheet: engraving, inside cuts, outside cuts, in that order, and what is not to cut: the
 * sheet's edge, a check square of 100 mm and the tilt of bevelled edges, whose outline is the larger face's. Kerf is taken up here or not at all (see kerf.ts). Panels that are not
 * makeable, or withheld, are left out.
 */
export function sheetDrawing(
  sheet: PlannedSheet,
  size: { readonly width: number; readonly height: number; readonly outline?: readonly Point2[] | undefined },
  panels: ReadonlyMap<string, PanelPart>,
  cutter: Job['cutter'],
  title: string,
  withheld: ReadonlySet<string> = new Set(),
): Drawing {
  const offset = kerfOffset(cutter);
  const engrave: DrawingLine[] = [];
  const inside: DrawingLine[] = [];
  const outside: DrawingLine[] = [];
  const paths: Ring[] = [];
  const notes: DrawingLine[] = [];
  for (const placed of cuttingOrder(sheet.placements)) {
    const panel = panels.get(placed.mark);
    if (!panel || panel.outline.length === 0 || withheld.has(placed.mark)) continue;
    const angle = (placed.rotation_deg * Math.PI) / 180;
    const move = (points: readonly Point2[]): Ring => movedRing(toRing(points), angle, placed.x, placed.y);
    for (const stroke of panel.engraving) engrave.push(straightLine(toPoints(move(stroke)), false));
    for (const hole of panel.holes) {
      const path = cutterPath(move(hole), offset, 'inside');
      if (path) inside.push({ corners: withArcs(path, ARC_FIT), closed: true });
    }
    const path = cutterPath(move(panel.outline), offset, 'outside');
    if (!path) continue;
    outside.push({ corners: withArcs(path, ARC_FIT), closed: true });
    paths.push(path);
    for (const stroke of bevelNotes(panel)) notes.push(straightLine(toPoints(move(stroke)), false));
  }
  const { layers } = cutter;
  const lead = cutter.kind === 'router' ? cutter.leadIn_mm : 0;
  const width = cutter.kind === 'router' ? Math.max(cutter.tool_mm, cutter.kerf_mm) : cutter.kerf_mm;
  const isFree = freeOf(paths, width / 2 - offset + BESIDE, size);
  const begun = (lines: readonly DrawingLine[]): readonly DrawingLine[] =>
    lead > 0 ? lines.map((line) => withLeadIn(line, lead, 'outside', isFree)) : lines;
  const gaps = outside.map((line) => (cutter.tabs_mm > 0 ? tabSpans(line, cutter.tabs_mm, width) : []));
  const interrupted = cutter.sharedCuts
    ? sharedCuts(outside, gaps.flat())
    : outside.flatMap((line, i) => withoutSpans(line, gaps[i]!));
  const edge: readonly Point2[] = size.outline ?? [
    [0, 0],
    [size.width, 0],
    [size.width, size.height],
    [0, size.height],
  ];
  const side = Math.min(CHECK_SIDE, size.width, size.height);
  const square: readonly Point2[] = [
    [0, 0],
    [side, 0],
    [side, side],
    [0, side],
  ];
  return {
    title,
    width: size.width,
    height: size.height,
    layers: [
      {
        ...layers.keep,
        purpose: 'keep',
        lines: [straightLine(edge, true), ...(side === CHECK_SIDE ? [checkSquare(square)] : []), ...notes],
      },
      { ...layers.engrave, purpose: 'engrave', lines: engrave },
      {
        ...layers.inside,
        purpose: 'inside',
        lines: inside.map((line) => (lead > 0 ? withLeadIn(line, lead, 'inside', ALWAYS) : line)),
      },
      { ...layers.outside, purpose: 'outside', lines: begun(interrupted) },
    ],
  };
}

/** Inside a hole all is waste. */
const ALWAYS: IsFree = () => true;

/** Whether a run of the cutter stays on the sheet and `clear` mm outside every panel's path; where it meets its own it is on it. */
function freeOf(
  paths: readonly Ring[],
  clear: number,
  size: { readonly width: number; readonly height: number },
): IsFree {
  const boxes = paths.map(boundsOf);
  return (from, to) => {
    const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
    const steps = Math.ceil(length / LEAD_STEP);
    for (let k = 0; k <= steps; k++) {
      const t = k / steps;
      const [x, y] = [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])];
      if (x < 0 || y < 0 || x > size.width || y > size.height) return false;
      // Near its end the run comes to its own path, whose panel is as far away as it should be.
      const need = Math.min(clear, (1 - t) * length * Math.SQRT1_2) - LEAD_SLACK;
      for (const [i, path] of paths.entries()) {
        const [x0, y0, x1, y1] = boxes[i]!;
        if (x < x0 - clear || y < y0 - clear || x > x1 + clear || y > y1 + clear) continue;
        if (-clearanceAt([path], x, y) < need) return false;
      }
    }
    return true;
  };
}

/** A run in keeps this much beside other cuts, mm: never along one. */
const BESIDE = 0.05;
/** Steps along a run, and what it may come too near by round-off, mm. */
const [LEAD_STEP, LEAD_SLACK] = [0.25, 1e-3] as const;

/** Two sides of the square alone where it stands in the sheet's corner: the other two are the sheet's own edge. */
const checkSquare = (square: readonly Point2[]): DrawingLine =>
  straightLine([square[1]!, square[2]!, square[3]!], false);

/**
 * Panels in the order of cutting: columns from the left, up and down in turn, so that the head travels little and
 * what is cut lies behind it.
 */
function cuttingOrder(placements: PlannedSheet['placements']): PlannedSheet['placements'] {
  if (placements.length === 0) return placements;
  const xs = placements.map((p) => p.x);
  const [left, right] = [Math.min(...xs), Math.max(...xs)];
  const columns = Math.max(1, Math.round(Math.sqrt(placements.length / 2)));
  const column = (x: number): number => Math.min(columns - 1, Math.floor(((x - left) / (right - left || 1)) * columns));
  return [...placements].sort((a, b) => {
    const [p, q] = [column(a.x), column(b.x)];
    return p - q || (p % 2 === 0 ? a.y - b.y : b.y - a.y) || a.x - b.x || (a.mark < b.mark ? -1 : 1);
  });
}
