import { unionOf } from '../../maths/polygon/boolean.js';
import type { Point } from './geometry2.js';
import { INK, LINE } from './ink.js';
import type { Pen } from './pen.js';

/** Chord and height of one arc of a cloud, mm. */
const CHORD = 4;
const HEIGHT = 1.1;
const ROUND = 16;

/** A line and how far the cloud keeps from it, mm; a single point is a circle. */
export interface Clouded {
  readonly points: readonly Point[];
  readonly clear: number;
}

/** Draws one scalloped outline round each group of things whose surroundings touch: what changed since the last issue. */
export function drawRevisionClouds(pen: Pen, things: readonly Clouded[]): void {
  const rings = unionOf(things.flatMap(surroundings));
  for (const ring of rings) {
    const points: Point[] = [];
    for (let i = 0; i < ring.length; i += 2) points.push([ring[i]!, ring[i + 1]!]);
    // Boundaries run anticlockwise and holes clockwise, so outward is to the right of both.
    pen.polyline(scallops(points), { width: LINE.normal, colour: INK.black }, true);
  }
}

function surroundings({ points, clear }: Clouded): Float64Array[] {
  const out: Float64Array[] = [];
  const last = points.length === 1 ? 1 : points.length - 1;
  for (let i = 0; i < last; i++) {
    const [a, b] = [points[i]!, points[i + 1] ?? points[i]!];
    const along = Math.atan2(b[1] - a[1], b[0] - a[0]);
    const ring = new Float64Array(4 * (ROUND + 1));
    for (let k = 0; k <= ROUND; k++) {
      const angle = along - Math.PI / 2 + (Math.PI * k) / ROUND;
      ring.set([b[0] + clear * Math.cos(angle), b[1] + clear * Math.sin(angle)], 2 * k);
      ring.set([a[0] - clear * Math.cos(angle), a[1] - clear * Math.sin(angle)], 2 * (ROUND + 1 + k));
    }
    out.push(ring);
  }
  return out;
}

/** The closed line, walked in chords of equal length, each replaced by an arc that bulges to the right. */
function scallops(points: readonly Point[]): Point[] {
  const lengths = points.map((p, i) =>
    Math.hypot(points[(i + 1) % points.length]![0] - p[0], points[(i + 1) % points.length]![1] - p[1]),
  );
  const whole = lengths.reduce((a, b) => a + b, 0);
  const count = Math.max(6, Math.round(whole / CHORD));
  const stops: Point[] = [];
  let [edge, gone] = [0, 0];
  for (let k = 0; k < count; k++) {
    const want = (k * whole) / count;
    while (gone + lengths[edge]! < want) gone += lengths[edge++]!;
    const [a, b] = [points[edge]!, points[(edge + 1) % points.length]!];
    const share = lengths[edge]! > 0 ? (want - gone) / lengths[edge]! : 0;
    stops.push([a[0] + (b[0] - a[0]) * share, a[1] + (b[1] - a[1]) * share]);
  }
  return stops.flatMap((a, k) => {
    const b = stops[(k + 1) % count]!;
    const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
    const chord = Math.hypot(dx, dy) || 1;
    return [0, 1, 2, 3, 4, 5].map((i): Point => {
      const t = i / 6;
      const bulge = HEIGHT * 4 * t * (1 - t);
      return [a[0] + dx * t + (bulge * dy) / chord, a[1] + dy * t - (bulge * dx) / chord];
    });
  });
}
