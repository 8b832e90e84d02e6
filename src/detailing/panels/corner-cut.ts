import { differenceOf, intersectionOf, offsetRings } from '../../maths/polygon/boolean.js';
import { convexHull } from '../../maths/polygon/convex.js';
import { type Ring, toPoints, toRing } from '../../maths/polygon/ring.js';
import type { Job } from '../../model/job/index.js';
import type { Point2 } from '../../model/parts.js';
import { outer } from './base-outline.js';

/** Chord error of arcs in outlines, mm: below what a cutter's own steps show. */
const ARC_ERROR = 0.002;
/** Corners flatter than this are cut along the hull of what touches: a cut straight across would run along the whole edge. rad */
const FLAT_CORNER = (150 * Math.PI) / 180;

/**
 * The outline with the corner at `corners[i]` cut clear of the hub there: straight across, square to the line that
 * halves the corner; round, about the node; or along the hub's own outline. `hub` holds the hub's outline in the
 * panel's slab, in the panel's frame; `clear` is kept from it.
 */
export function cutCorner(
  rings: readonly Ring[],
  corners: readonly Point2[],
  i: number,
  hub: readonly Ring[],
  clear: number,
  how: Job['panels']['corner'],
): Ring[] {
  if (hub.length === 0) return [...rings];
  // Straight cuts only need the hub's extent; grown with sharp corners it keeps its few corners.
  const solid = clear > 0 ? offsetRings(hub, clear, how === 'straight' ? 'mitre' : 'round') : hub;
  const bite = intersectionOf(rings, solid);
  if (bite.length === 0) return [...rings];
  const node = corners[i]!;
  const touched = bite.flatMap(toPoints);
  if (how === 'round') {
    const radius = Math.max(...touched.map((p) => Math.hypot(p[0] - node[0], p[1] - node[1])));
    return outer(differenceOf(rings, [circle(node, radius)]));
  }
  const across = how === 'straight' ? acrossCorner(corners, i, touched) : null;
  if (across) return outer(differenceOf(rings, [across]));
  const cut = how === 'straight' ? [convexHull(toRing([...touched, node]))] : solid;
  return outer(differenceOf(rings, [...cut, ...beyondStruts(corners, i, bite)]));
}

/**
 * What lies beyond the two struts at a corner as far along each as the hub reaches: of a panel over the struts the hub
 * would leave a tongue there that hangs on nothing but its far end.
 */
function beyondStruts(corners: readonly Point2[], i: number, bite: readonly Ring[]): Ring[] {
  const n = corners.length;
  const node = corners[i]!;
  const [before, after] = [corners[(i + n - 1) % n]!, corners[(i + 1) % n]!];
  const far = 2 * Math.max(...bite.flatMap(toPoints).map((p) => Math.hypot(p[0] - node[0], p[1] - node[1])));
  const bulges = (node[0] - before[0]) * (after[1] - node[1]) - (node[1] - before[1]) * (after[0] - node[0]) > 0;
  return [after, before].flatMap((end, side) => {
    const l = Math.hypot(end[0] - node[0], end[1] - node[1]) || 1;
    const [ux, uy] = [(end[0] - node[0]) / l, (end[1] - node[1]) / l];
    // Outwards is to the right of the edge that leaves the node, to the left of the one that comes to it, seen from the node.
    const [ox, oy] = side === 0 ? [uy, -ux] : [-uy, ux];
    const box = (from: number, to: number): Ring => {
      const at = (s: number, out: number): Point2 => [node[0] + s * ux + out * ox, node[1] + s * uy + out * oy];
      const loop = [at(from, 0), at(to, 0), at(to, far), at(from, far)];
      return toRing(side === 0 ? loop.reverse() : loop);
    };
    const start = bulges ? -far : 0;
    const out = intersectionOf(bite, [box(start, far)]).flatMap(toPoints);
    const reach = Math.max(0, ...out.map((p) => (p[0] - node[0]) * ux + (p[1] - node[1]) * uy));
    return reach > 0 ? [box(start, reach)] : [];
  });
}

/** A polygon round a circle: its corners outside, so that nothing of the circle is left. */
export function circle(centre: Point2, radius: number): Ring {
  const n = Math.max(12, 4 * Math.ceil(Math.PI / Math.acos(1 - Math.min(0.5, ARC_ERROR / radius)) / 4));
  const r = radius / Math.cos(Math.PI / n);
  return toRing(
    Array.from({ length: n }, (_, k): Point2 => {
      const a = (2 * Math.PI * k) / n;
      return [centre[0] + r * Math.cos(a), centre[1] + r * Math.sin(a)];
    }),
  );
}

/** What a straight cut takes off the corner, or null at a flat or inward corner. */
function acrossCorner(corners: readonly Point2[], i: number, touched: readonly Point2[]): Ring | null {
  const n = corners.length;
  const [a, b, c] = [corners[(i + n - 1) % n]!, corners[i]!, corners[(i + 1) % n]!];
  const unit = (p: Point2): Point2 => {
    const l = Math.hypot(p[0] - b[0], p[1] - b[1]) || 1;
    return [(p[0] - b[0]) / l, (p[1] - b[1]) / l];
  };
  const [u, v] = [unit(c), unit(a)];
  const angle = Math.atan2(u[0] * v[1] - u[1] * v[0], u[0] * v[0] + u[1] * v[1]);
  if (angle <= 0 || angle > FLAT_CORNER) return null;
  const l = Math.hypot(u[0] + v[0], u[1] + v[1]);
  const [mx, my] = [(u[0] + v[0]) / l, (u[1] + v[1]) / l];
  const depth = Math.max(...touched.map((p) => (p[0] - b[0]) * mx + (p[1] - b[1]) * my));
  // Wide enough for a panel that reaches past the struts; behind the node far enough for the same.
  const wide = depth * Math.tan(angle / 2) + depth;
  const at = (along: number, across: number): Point2 => [
    b[0] + mx * along - my * across,
    b[1] + my * along + mx * across,
  ];
  return toRing([at(-2 * depth, -wide), at(depth, -wide), at(depth, wide), at(-2 * depth, wide)]);
}
