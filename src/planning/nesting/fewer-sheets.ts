import type { Random } from '../../maths/random.js';
import { type Budget, goneOf, isSpent } from './budget.js';
import { fitsField, type Layout, newLayout, put } from './layout.js';
import type { Shape } from './pose.js';
import { separate } from './separate.js';

/** What is asked of a size of sheet: its whole area in mm². */
interface Kind {
  readonly area: number;
}

const load = (layout: Layout, f: number): number => layout.on[f]!.reduce((s, i) => s + layout.shapes[i]!.area, 0);

/** The sheet with the least share of its area taken. */
export function emptiest(layout: Layout, kinds: readonly Kind[]): number {
  let best = -1;
  for (let f = 0; f < layout.fields.length; f++)
    if (
      best < 0 ||
      load(layout, f) / kinds[layout.fields[f]!.kind]!.area <
        load(layout, best) / kinds[layout.fields[best]!.kind]!.area
    )
      best = f;
  return best;
}

/**
 * Takes away a sheet while the rest can take its pieces without overlap: the emptiest first, and after a failure another
 * try from the same plan or from a near miss, until the budget or the patience is spent.
 */
export function reduceSheets(
  start: Layout,
  kinds: readonly Kind[],
  lowerBound: number,
  random: Random,
  budget: Budget,
): Layout {
  let layout = start;
  const gone = goneOf(budget);
  const limit = gone + 0.7 * (budget.limit - gone);
  let tries = 0;
  let near: Layout | null = null;
  while (
    layout.fields.length > Math.max(1, lowerBound) &&
    layout.field.every((f) => f >= 0) &&
    tries < MOST_TRIES &&
    !isSpent(budget, limit)
  ) {
    // From a near miss with some of its worst pieces thrown about, or anew without another sheet.
    const trial: Layout | null =
      near && tries % 3 !== 0
        ? near
        : without(
            layout,
            tries === 0 ? emptiest(layout, kinds) : Math.floor(random() * layout.fields.length),
            random,
            budget,
          );
    if (!trial) break;
    const fieldsOf = fieldsByPiece(trial);
    if (trial === near) throwAbout(trial, fieldsOf, random);
    if (separate(trial, fieldsOf, random, { rounds: 100, strikes: 2, limit })) {
      layout = trial;
      near = null;
      tries = 0;
    } else {
      near = trial;
      tries++;
    }
  }
  return layout;
}

/** Tries at one number of sheets. */
const MOST_TRIES = 400;

/** The layout without one of its sheets, whose pieces lie anywhere on the others; null: they cannot. */
function without(layout: Layout, drop: number, random: Random, budget: Budget): Layout | null {
  const fields = layout.fields.filter((_, f) => f !== drop);
  const trial = newLayout(layout.store, layout.shapes, fields, layout.spacing, layout.tolerance, budget);
  const homeless: number[] = [];
  layout.shapes.forEach((_, i) => {
    const f = layout.field[i]!;
    if (f === drop) homeless.push(i);
    else put(trial, i, layout.pose[i]!, layout.x[i]!, layout.y[i]!, f > drop ? f - 1 : f);
  });
  const fieldsOf = fieldsByPiece(trial);
  if (homeless.some((i) => fieldsOf(i).length === 0)) return null;
  const room = fields.reduce((s, f) => s + (f.x1 - f.x0 + trial.spacing) * (f.y1 - f.y0 + trial.spacing), 0);
  if (trial.shapes.reduce((s, p) => s + p.area, 0) > room * (1 + 1e-9)) return null;
  for (const i of homeless) spread(trial, i, fieldsOf(i), random);
  return trial;
}

/** Pieces that overlap, and as many that do not, go anywhere. */
function throwAbout(layout: Layout, fieldsOf: (i: number) => readonly number[], random: Random): void {
  const n = layout.shapes.length;
  const deep = layout.shapes
    .map((_, i) => i)
    .filter((i) => layout.depth.subarray(i * n, (i + 1) * n).some((d) => d > 0));
  for (const i of deep) {
    spread(layout, i, fieldsOf(i), random);
    const other = Math.floor(random() * n);
    spread(layout, other, fieldsOf(other), random);
  }
}

/** The fields that a piece fits, worked out once. */
function fieldsByPiece(layout: Layout): (i: number) => readonly number[] {
  const known = new Map<Shape, number[]>();
  return (i) => {
    const shape = layout.shapes[i]!;
    let list = known.get(shape);
    if (!list) {
      list = layout.fields
        .map((_, f) => f)
        .filter((f) => shape.poses.some((p) => fitsField(layout.fields[f]!, p, layout.tolerance)));
      known.set(shape, list);
    }
    return list;
  };
}

/** Puts a piece somewhere on a field that it fits; the overlaps are worked out afterwards. */
function spread(layout: Layout, i: number, fields: readonly number[], random: Random): void {
  const f = fields[Math.floor(random() * fields.length)]!;
  const field = layout.fields[f]!;
  const pose = layout.shapes[i]!.poses.find((p) => fitsField(field, p, layout.tolerance))!;
  const x = field.x0 - pose.box[0] + random() * Math.max(0, field.x1 - field.x0 - pose.box[2] + pose.box[0]);
  const y = field.y0 - pose.box[1] + random() * Math.max(0, field.y1 - field.y0 - pose.box[3] + pose.box[1]);
  put(layout, i, pose, x, y, f);
}
