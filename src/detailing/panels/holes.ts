import { clearanceAt } from '../../maths/polygon/clearance.js';
import { type Ring, toPoints } from '../../maths/polygon/ring.js';
import type { Job } from '../../model/job/index.js';
import type { Point2 } from '../../model/parts.js';
import { circle } from './corner-cut.js';

export interface HoleRow {
  readonly holes: readonly (readonly Point2[])[];
  readonly centres: readonly Point2[];
  /** Least distance of a hole's centre from the outline, mm; null: no holes. */
  readonly nearest: number | null;
  /** Diameter drilled, oversize included, mm. */
  readonly diameter: number;
}

/**
 * Holes along every edge of the face: `edge_mm` in from the panel's own edge, or as far as a hole made oversize needs, evenly spread at no more than the pitch
 * over what the corner cuts leave of it, at least one where it is long enough for one. A hole that would come nearer
 * than its edge distance to another edge is left out.
 *
 * @param corners of the face, @param insets of its edges, in the frame, mm
 */
export function holesAlong(
  outline: Ring,
  corners: readonly Point2[],
  insets: readonly number[],
  holes: Job['panels']['holes'],
  oversize: number,
): HoleRow {
  const diameter = holes.diameter_mm + oversize;
  // A hole that movement makes larger stands farther in, or it would come too near the edge or find no room at all.
  const edge = oversize > 0 ? Math.max(holes.edge_mm, EDGE_OVER_DIAMETER * diameter) : holes.edge_mm;
  const least = Math.min(edge, EDGE_OVER_DIAMETER * diameter) - ON_LINE;
  const centres: Point2[] = [];
  if (holes.diameter_mm > 0)
    corners.forEach((a, i) => {
      const b = corners[(i + 1) % corners.length]!;
      const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
      const u: Point2 = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
      const span = spanOnLine(outline, a, u, insets[i]!);
      if (!span) return;
      const [from, to] = [span[0] + edge, span[1] - edge];
      if (to < from && span[1] - span[0] < 2 * diameter) return;
      const room = Math.max(0, to - from);
      const count = room > 0 ? Math.ceil(room / holes.pitch_mm) + 1 : 1;
      for (let k = 0; k < count; k++) {
        const s = count === 1 ? (span[0] + span[1]) / 2 : from + (room * k) / (count - 1);
        const d = insets[i]! + edge;
        const p: Point2 = [a[0] + u[0] * s - u[1] * d, a[1] + u[1] * s + u[0] * d];
        const clear = clearanceAt([outline], p[0], p[1]);
        const apart = Math.min(Infinity, ...centres.map((c) => Math.hypot(c[0] - p[0], c[1] - p[1])));
        if (clear >= least && apart >= 2 * diameter) centres.push(p);
      }
    });
  return {
    centres,
    diameter,
    holes: centres.map((c) => toPoints(circle(c, diameter / 2))),
    nearest: centres.length > 0 ? Math.min(...centres.map((c) => clearanceAt([outline], c[0], c[1]))) : null,
  };
}

/** Least distance of a hole's middle from the edge over its diameter; common practice for acrylic and plywood, no source. */
export const EDGE_OVER_DIAMETER = 1.5;

/** How far off the moved line a corner of the outline may lie to count as on it: ten steps of the integer grid. mm */
export const ON_LINE = 1e-4;

/** From where to where, measured along the edge from a, the outline runs on the edge's line moved in by d. */
export function spanOnLine(outline: Ring, a: Point2, u: Point2, d: number): [number, number] | null {
  let span: [number, number] | null = null;
  const n = outline.length;
  const place = (i: number): [number, number] => {
    const [x, y] = [outline[i]! - a[0], outline[i + 1]! - a[1]];
    return [x * u[0] + y * u[1], y * u[0] - x * u[1] - d];
  };
  for (let i = 0; i < n; i += 2) {
    const [s, off] = place(i);
    const [t, off2] = place((i + 2) % n);
    if (Math.abs(off) > ON_LINE || Math.abs(off2) > ON_LINE || t <= s) continue;
    span = span ? [Math.min(span[0], s), Math.max(span[1], t)] : [s, t];
  }
  return span;
}
