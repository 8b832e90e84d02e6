import type { Point2 } from '../../model/parts.js';
import { type DxfThing, dxfSections, numberOf, textOf } from '../geometry/dxf-groups.js';
import { walkDxf } from '../geometry/dxf-walk.js';
import { LineFaults, plainNumber } from '../geometry/text-lines.js';
import { chain, panelsOf } from './contours.js';
import { arcPoints, bulgePoints } from './flatten.js';
import type { OutlinesReading } from './outline.js';

/** mm in one unit of $INSUNITS; 0, unitless, counts as mm. */
const UNITS: Readonly<Record<number, number>> = { 0: 1, 1: 25.4, 2: 304.8, 4: 1, 5: 10, 6: 1000 };
const DEGREE = Math.PI / 180;
/** What our own sheets mark as not to cut. */
const KEEP_LAYER = 'DO-NOT-CUT';

/**
 * Outlines of a DXF text file: closed LWPOLYLINE and POLYLINE with their bulges, CIRCLE, and LINE, ARC and open
 * polylines joined end to end; blocks opened. Text, points and what stands in paper space are left out and counted.
 */
export function readDxfOutlines(text: string, name: string): OutlinesReading {
  const log = new LineFaults(name);
  const leftOut = new Map<string, number>();
  const sections = log.tooLarge(text) ? null : dxfSections(text, log);
  if (!sections) return { outlines: [], faults: log.faults, leftOut };
  const unit = unitOf(sections.get('HEADER'));
  if (unit === null) log.tell(1, 'has a unit that outlines are not read in', 'export it in mm, cm, m, inches or feet');
  const scale = unit ?? 1;
  const closed: Point2[][] = [];
  const open: Point2[][] = [];
  const count = (what: string, by = 1): void => void leftOut.set(what, (leftOut.get(what) ?? 0) + by);
  walkDxf(sections, log, count, ({ thing, vertices, layer, place, scale: larger }) => {
    if (layer === KEEP_LAYER) return count(`${thing.type} on ${KEEP_LAYER}`);
    const real = vertices.filter((v) => !(numberOf(v, 70) & 16));
    const drawn = contourOf(thing, real, scale * larger);
    if (drawn === null) return count(thing.type);
    const points = drawn.points.map(([x, y]): Point2 => {
      const [px, py] = place([x / (scale * larger), y / (scale * larger), 0]);
      return [px * scale, py * scale];
    });
    if (!points.every((p) => Number.isFinite(p[0]) && Number.isFinite(p[1])))
      log.tell(thing.line, `${thing.type} has a coordinate that is not there or not finite`, 'export it again');
    else (drawn.closed ? closed : open).push(points);
  });
  const joined = chain(open);
  if (joined.open > 0) count('open contour', joined.open);
  if (log.faults.length > 0) return { outlines: [], faults: log.faults, leftOut };
  const outlines = panelsOf([...closed, ...joined.closed]);
  if (outlines.length === 0) log.tell(1, 'holds no closed contour', 'draw each panel as a closed polyline');
  return { outlines, faults: log.faults, leftOut };
}

function unitOf(header: readonly DxfThing[] | undefined): number | null {
  const groups = header?.flatMap((t) => t.groups) ?? [];
  const at = groups.findIndex((g) => g.code === 9 && g.text === '$INSUNITS');
  const value = at < 0 ? 0 : Number(groups[at + 1]?.text ?? 0);
  return UNITS[value] ?? null;
}

/** The contour of an entity in mm: scaled before it is flattened, so that the chord error is in mm too; null: none. */
function contourOf(
  thing: DxfThing,
  vertices: readonly DxfThing[],
  scale: number,
): { points: Point2[]; closed: boolean } | null {
  const length = (of: DxfThing, code: number): number => numberOf(of, code, Number.NaN) * scale;
  const point = (of: DxfThing, k: 0 | 1): Point2 => [length(of, 10 + k), length(of, 20 + k)];
  const isClosed = (numberOf(thing, 70) & 1) === 1;
  if (thing.type === 'LINE') return { closed: false, points: [point(thing, 0), point(thing, 1)] };
  if (thing.type === 'CIRCLE' || thing.type === 'ARC') {
    const centre = point(thing, 0);
    const r = length(thing, 40);
    if (!(r > 0)) return { closed: true, points: [[Number.NaN, Number.NaN]] };
    if (thing.type === 'CIRCLE') return { closed: true, points: arcPoints(centre, r, r, 0, 2 * Math.PI).slice(0, -1) };
    const from = numberOf(thing, 50, Number.NaN) * DEGREE;
    const to = numberOf(thing, 51, Number.NaN) * DEGREE;
    const sweep = (((to - from) % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI) || 2 * Math.PI;
    return { closed: false, points: arcPoints(centre, r, r, from, sweep) };
  }
  if (thing.type === 'LWPOLYLINE')
    return bulged(
      lightCorners(thing).map((c) => ({ at: [c.at[0] * scale, c.at[1] * scale], bulge: c.bulge })),
      isClosed,
    );
  if (thing.type === 'POLYLINE' && !(numberOf(thing, 70) & (16 | 64)))
    return bulged(
      vertices.map((v) => ({ at: point(v, 0), bulge: numberOf(v, 42) })),
      isClosed,
    );
  return null;
}

function lightCorners(thing: DxfThing): { at: Point2; bulge: number }[] {
  const corners: { at: Point2; bulge: number }[] = [];
  let x = Number.NaN;
  for (const { code, text } of thing.groups) {
    if (code === 10) x = plainNumber(text);
    if (code === 20) corners.push({ at: [x, plainNumber(text)], bulge: 0 });
    if (code === 42 && corners.length > 0) corners.at(-1)!.bulge = plainNumber(text);
  }
  // Mirrored by its extrusion: the drawing program shows it turned over, and so it is read.
  const mirrored = Number(textOf(thing, 230) ?? 1) < 0;
  return mirrored ? corners.map((c) => ({ at: [-c.at[0], c.at[1]], bulge: -c.bulge })) : corners;
}

function bulged(
  corners: readonly { at: Point2; bulge: number }[],
  closed: boolean,
): { points: Point2[]; closed: boolean } | null {
  const first = corners[0];
  if (!first) return null;
  const points: Point2[] = [first.at];
  const sides = closed ? corners.length : corners.length - 1;
  for (let i = 0; i < sides; i++)
    points.push(...bulgePoints(corners[i]!.at, corners[(i + 1) % corners.length]!.at, corners[i]!.bulge));
  if (closed) points.pop();
  return { points, closed };
}
