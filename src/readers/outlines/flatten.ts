import type { Point2 } from '../../model/parts.js';
import { CHORD_ERROR } from './outline.js';

/** Chords of one curve at most: with these an arc of 200 m still keeps the chord error, and no file can use up the memory. */
const MOST_CHORDS = 10_000;

/** Points of an arc about `centre` from angle a by `sweep` rad, both ends included, chords within the chord error; not finite where the arc is not. */
export function arcPoints(centre: Point2, rx: number, ry: number, a: number, sweep: number, turn = 0): Point2[] {
  const r = Math.max(rx, ry);
  const step = r > CHORD_ERROR ? 2 * Math.acos(1 - CHORD_ERROR / r) : Math.PI / 4;
  const n = chords(Math.abs(sweep) / Math.min(step, Math.PI / 8), 2);
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  return Array.from({ length: n + 1 }, (_, k): Point2 => {
    const t = a + (sweep * k) / n;
    const [x, y] = [rx * Math.cos(t), ry * Math.sin(t)];
    return [centre[0] + c * x - s * y, centre[1] + s * x + c * y];
  });
}

/** Points after `a` of the side from a to b with a DXF bulge (tan of a quarter of its angle), `b` included. */
export function bulgePoints(a: Point2, b: Point2, bulge: number): Point2[] {
  if (bulge === 0) return [b];
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  // The centre lies beside the chord's middle, (1 - bulge²)/(4 bulge) chords to the left.
  const k = (1 - bulge * bulge) / (4 * bulge);
  const centre: Point2 = [(a[0] + b[0]) / 2 - dy * k, (a[1] + b[1]) / 2 + dx * k];
  const r = Math.hypot(a[0] - centre[0], a[1] - centre[1]);
  const points = arcPoints(centre, r, r, Math.atan2(a[1] - centre[1], a[0] - centre[0]), 4 * Math.atan(bulge)).slice(
    1,
    -1,
  );
  return [...points, b];
}

/** Points after p0 of a cubic Bézier curve, p3 included; chords by the bound of its second differences (Wang 1984). */
export function cubicPoints(p0: Point2, p1: Point2, p2: Point2, p3: Point2, scale: number): Point2[] {
  const dd = Math.max(
    Math.hypot(p0[0] - 2 * p1[0] + p2[0], p0[1] - 2 * p1[1] + p2[1]),
    Math.hypot(p1[0] - 2 * p2[0] + p3[0], p1[1] - 2 * p2[1] + p3[1]),
  );
  const n = chords(Math.sqrt((0.75 * dd * scale) / CHORD_ERROR), 1);
  return Array.from({ length: n }, (_, k): Point2 => {
    const t = (k + 1) / n;
    const u = 1 - t;
    const mix = (i: 0 | 1): number =>
      u * u * u * p0[i] + 3 * u * u * t * p1[i] + 3 * u * t * t * p2[i] + t * t * t * p3[i];
    return [mix(0), mix(1)];
  });
}

/** A whole number of chords, at least `least`; the least where `wanted` is no number, so that there is a point to tell it by. */
const chords = (wanted: number, least: number): number =>
  Number.isNaN(wanted) ? least : Math.min(MOST_CHORDS, Math.max(least, Math.ceil(wanted)));
