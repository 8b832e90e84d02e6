import { withArcs } from '../../maths/polygon/arcs.js';
import { movedRing, type Ring, toPoints, toRing } from '../../maths/polygon/ring.js';
import type { Job } from '../../model/job/index.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { PlannedSheet } from '../../model/plan.js';
import { type Drawing, type DrawingLine, straightLine } from '../kit/drawing.js';
import { sharedCuts, withLeadIn, withTabs } from './cut-lines.js';
import { cutterPath, kerfOffset } from './kerf.js';

/** Chords within this of one circle are drawn as its arc, mm: twice the chord error that arcs are made with. */
const ARC_FIT = 0.004;
/** Side of the check square, mm. */
const CHECK_SIDE = 100;

/**
 * The machine drawing of one sheet: engraving, inside cuts, outside cuts, in that order, and what is not to cut: the
 * sheet's edge and a check square of 100 mm. Kerf is taken up here or not at all (see kerf.ts). Panels that are not
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
    if (path) outside.push({ corners: withArcs(path, ARC_FIT), closed: true });
  }
  const { layers } = cutter;
  const lead = cutter.kind === 'router' ? cutter.leadIn_mm : 0;
  const begun = (lines: DrawingLine[], side: 'outside' | 'inside'): DrawingLine[] =>
    lead > 0 ? lines.map((line) => withLeadIn(line, lead, side)) : lines;
  // Shared sides, tabs and lead-ins each open the contour, so a sheet has one of them: the first that the job asks for.
  const outsideCuts = cutter.sharedCuts
    ? sharedCuts(outside)
    : cutter.tabs_mm > 0
      ? outside.flatMap((line) => withTabs(line, cutter.tabs_mm))
      : begun(outside, 'outside');
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
        lines: [straightLine(edge, true), ...(side === CHECK_SIDE ? [checkSquare(square)] : [])],
      },
      { ...layers.engrave, purpose: 'engrave', lines: engrave },
      { ...layers.inside, purpose: 'inside', lines: begun(inside, 'inside') },
      { ...layers.outside, purpose: 'outside', lines: outsideCuts },
    ],
  };
}

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
