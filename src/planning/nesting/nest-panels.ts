import { boundsOf, type Ring, signedArea, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import { seededRandom } from '../../maths/random.js';
import { grownArea, sheetBound } from './bound.js';
import { budgetOf } from './budget.js';
import { OUTLINE_ROUND_OFF, requestFaults } from './faults.js';
import { type Field, fitsField } from './layout.js';
import { noFitStore } from './no-fit.js';
import { obstaclesOf } from './offcut.js';
import { angleThatFits, poseMaker, type Shape } from './pose.js';
import type { NestingAnswer, NestingRequest } from './request.js';
import { planSheets } from './sheets.js';

/** Evaluations that the usual search may spend: about a second on one core for a dozen panels, ten for two hundred. */
const LEAST_EVALUATIONS = 1e6;
const EVALUATIONS_A_PANEL = 4e5;
const MOST_EVALUATIONS = 20e6;

/**
 * Lays panels on sheets: as few sheets as it finds, then the last one filled from its left, so that one offcut
 * stays whole. Nothing is mirrored; spacing and margin hold to 0.001 mm; the same request gives the same plan on
 * every machine unless a time limit cuts it short, which it then says. Panels with a fault, larger than every
 * sheet, or left when the sheets run out are named, never dropped in silence. `clock` gives ms from any start; without
 * it a time limit is not heeded.
 */
export async function nestPanels(request: NestingRequest, clock?: () => number): Promise<NestingAnswer> {
  const faults = requestFaults(request);
  const general = faults.some((f) => !f.place.startsWith('panels['));
  if (general) return { sheets: [], lowerBound: 0, unplaced: [], faults };
  const bad = new Set(faults.map((f) => f.place));

  const maker = poseMaker();
  const byOutline = new Map<string, Shape>();
  const pieces: { mark: string; shape: Shape }[] = [];
  request.panels.forEach((panel, index) => {
    if (bad.has(`panels[${index}] ${panel.mark}`)) return;
    const rotations = panel.rotations ?? null;
    const key = JSON.stringify([panel.outline, rotations]);
    let shape = byOutline.get(key);
    if (!shape) {
      shape = maker.shape(tidyRing(toRing(panel.outline), OUTLINE_ROUND_OFF), rotations);
      byOutline.set(key, shape);
    }
    for (let k = 0; k < panel.quantity; k++) pieces.push({ mark: panel.mark, shape });
  });

  const exactly = new Map<Shape, Shape>();
  const { margin, spacing } = request;
  const kinds = request.sheets.map((s, kind) => {
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
  for (const piece of pieces) {
    const { shape } = piece;
    const fits = (s: Shape): boolean => kinds.some(({ field }) => s.poses.some((p) => fitsField(field, p, 0)));
    if (shape.exact === null || fits(shape)) continue;
    const exact = exactly.get(shape) ?? maker.shape(shape.exact, shape.rotations, true);
    exactly.set(shape, exact);
    if (fits(exact)) piece.shape = exact;
  }
  // A long panel may fit a sheet across its diagonal alone.
  for (const shape of new Set(pieces.map((p) => p.shape)))
    if (shape.rotations === null)
      for (const { field } of kinds) {
        if (shape.poses.some((p) => fitsField(field, p, 0))) continue;
        const angle = angleThatFits(shape.ring, field.x1 - field.x0, field.y1 - field.y0);
        if (angle !== null) for (const half of [0, 180]) shape.poses.push(maker.pose(shape, angle + half));
      }

  const end = request.timeLimitMs !== undefined && clock ? clock() + request.timeLimitMs : null;
  const outOfTime = end !== null && clock ? (): boolean => clock() >= end : null;
  const usual = Math.min(MOST_EVALUATIONS, LEAST_EVALUATIONS + EVALUATIONS_A_PANEL * pieces.length);
  const budget = budgetOf(usual * (request.effort ?? 1), outOfTime);
  const plan = planSheets(
    pieces.map((p) => p.shape),
    kinds,
    spacing,
    noFitStore(budget),
    budget,
    seededRandom(request.seed ?? 1),
    (shapes) =>
      sheetBound(
        shapes.map((s) => grownArea(s.exact ?? s.ring, spacing)),
        kinds.map((k) => ({ area: k.bound, available: k.available })),
      ),
  );

  const unplaced = new Map<string, NestingAnswer['unplaced'][number]>();
  for (const { piece, reason } of plan.left) {
    const mark = pieces[piece]!.mark;
    unplaced.set(mark, { mark, reason, quantity: (unplaced.get(mark)?.quantity ?? 0) + 1 });
  }
  return {
    sheets: plan.sheets.map(({ kind, placed }) => ({
      sheet: request.sheets[kind]!.name,
      placements: placed.map(({ piece, pose, x, y }) => ({
        mark: pieces[piece]!.mark,
        x,
        y,
        rotation_deg: pose.degrees,
      })),
      yield: placed.reduce((sum, p) => sum + p.pose.shape.area, 0) / kinds[kind]!.area,
    })),
    lowerBound: plan.lowerBound,
    unplaced: [...unplaced.values()],
    faults,
    ...(budget.stopped ? { stopped: 'time' as const } : {}),
  };
}
