import { areaOf, differenceOf, unionOf } from '../../maths/polygon/boolean.js';
import { type Ring, signedArea, toRing } from '../../maths/polygon/ring.js';
import type { Point2 } from '../../model/parts.js';

/**
 * The face's polygon with every edge moved in by its own inset (out where negative), anticlockwise; several rings
 * where the insets cut it apart, none where nothing is left.
 */
export function movedEdges(corners: readonly Point2[], insets: readonly number[]): Ring[] {
  const outward = insets.map((d) => Math.min(d, 0));
  const rings = outward.some((d) => d < 0) ? grown(corners, outward) : [toRing(corners)];
  const strips = insets.flatMap((d, i) => [
    ...(d > 0 ? [strip(corners, i, d)] : []),
    ...[-1, 1].flatMap((end) => ear(corners, insets, i, end) ?? []),
  ]);
  return outer(strips.length > 0 ? differenceOf(rings, strips) : rings);
}

/** Boundaries alone, largest first. */
export const outer = (rings: readonly Ring[]): Ring[] =>
  rings.filter((r) => signedArea(r) > 0).sort((a, b) => signedArea(b) - signedArea(a));

/** The strip between edge i and its line moved in by d, lengthened past the corners by a mitre of its own. */
function strip(corners: readonly Point2[], i: number, d: number): Ring {
  const n = corners.length;
  const [a, b] = [corners[i]!, corners[(i + 1) % n]!];
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
  const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
  const [ex, ey] = [-uy * d, ux * d];
  // Outside the face nothing is lost by a longer strip; at an inward corner it would bite into the panel.
  const before = bulges(corners, i) ? d : 0;
  const after = bulges(corners, (i + 1) % n) ? d : 0;
  return toRing([
    [a[0] - ux * before - ex * OUTSIDE, a[1] - uy * before - ey * OUTSIDE],
    [b[0] + ux * after - ex * OUTSIDE, b[1] + uy * after - ey * OUTSIDE],
    [b[0] + ux * after + ex, b[1] + uy * after + ey],
    [a[0] - ux * before + ex, a[1] - uy * before + ey],
  ]);
}

/**
 * What an edge moved out farther than its neighbour i leaves beyond the neighbour's own line, past the corner that they
 * share: a box from that line outwards. At the first end of edge i (-1) or its last (1); null: nothing is left there.
 */
function ear(corners: readonly Point2[], insets: readonly number[], i: number, end: number): Ring | null {
  const n = corners.length;
  const [at, beside] = end < 0 ? [i, (i + n - 1) % n] : [(i + 1) % n, (i + 1) % n];
  const [d, out] = [insets[i]!, -insets[beside]!];
  if (out <= Math.max(0, -d) || !bulges(corners, at)) return null;
  const [a, b] = [corners[i]!, corners[(i + 1) % n]!];
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
  const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
  const far = 4 * (out + Math.abs(d));
  const corner = corners[at]!;
  const place = (s: number, h: number): Point2 => [
    corner[0] + end * ux * s - uy * h,
    corner[1] + end * uy * s + ux * h,
  ];
  return ccw([place(0, -far), place(far, -far), place(far, d), place(0, d)]);
}

/** A strip starts this share of its width outside the edge, so that no sliver stays along it. */
const OUTSIDE = 0.1;

function bulges(corners: readonly Point2[], i: number): boolean {
  const n = corners.length;
  const [a, b, c] = [corners[(i + n - 1) % n]!, corners[i]!, corners[(i + 1) % n]!];
  return (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0]) > 0;
}

/** Edges moved out, met again where the moved lines cross; a spike longer than four insets is cut off by its own square end. */
function grown(corners: readonly Point2[], insets: readonly number[]): Ring[] {
  const n = corners.length;
  const quads: Ring[] = [toRing(corners)];
  const lines = corners.map((a, i) => {
    const b = corners[(i + 1) % n]!;
    const l = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
    const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
    const d = -insets[i]!;
    return {
      u: [ux, uy] as const,
      a: [a[0] + uy * d, a[1] - ux * d] as const,
      b: [b[0] + uy * d, b[1] - ux * d] as const,
    };
  });
  corners.forEach((corner, i) => {
    const line = lines[i]!;
    if (insets[i]! < 0) quads.push(ccw([corner, line.a, line.b, corners[(i + 1) % n]!]));
    const last = lines[(i + n - 1) % n]!;
    if (!bulges(corners, i)) return;
    const det = last.u[0] * line.u[1] - last.u[1] * line.u[0];
    const most = 4 * Math.max(-insets[i]!, -insets[(i + n - 1) % n]!);
    if (Math.abs(det) < 1e-9 || most === 0) return;
    const t = ((line.a[0] - last.b[0]) * line.u[1] - (line.a[1] - last.b[1]) * line.u[0]) / det;
    const tip: Point2 = [last.b[0] + t * last.u[0], last.b[1] + t * last.u[1]];
    if (Math.hypot(tip[0] - corner[0], tip[1] - corner[1]) <= most) quads.push(ccw([corner, last.b, tip, line.a]));
  });
  return unionOf(quads.filter((q) => areaOf([q]) > 1e-9));
}

const ccw = (points: readonly Point2[]): Ring => {
  const ring = toRing(points);
  return signedArea(ring) < 0 ? toRing([...points].reverse()) : ring;
};
