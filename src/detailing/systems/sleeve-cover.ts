import { convexHull2 } from '../../maths/convex-hull2.js';
import { convexHull3, type Hull3 } from '../../maths/convex-hull3.js';
import { cross, dot, subtract, type Vec3 } from '../../maths/vec3.js';
import type { Point2 } from '../../model/parts.js';
import { INTO_PLATE, levelRing } from './base-plate.js';
import type { HubShape } from './hub-shape.js';
import { ringPoints, type Sleeve } from './sleeve.js';
import type { ConvexPiece, Slab } from './system.js';

/** Sides of the polygons that stand for circles in covers: they contain the circle and exceed it by 2 % at most. */
export const COVER_SIDES = 16;

/** Convex hull of the sleeves' rings, relative to the node; null for a lone sleeve. */
export const bodyHull = ({ sleeves, base }: HubShape, sides: number = COVER_SIDES): Hull3 | null =>
  convexHull3([
    ...sleeves.flatMap((s) => s.rings.flatMap(([at, half]) => ringPoints(s.socket, at, half, sides))),
    ...(base ? levelRing(base.top - INTO_PLATE, base.pedestal, sides) : []),
  ]);

/** The body and, for each sleeve, its cone and its tube, as convex pieces. */
export function sleeveCover(shape: HubShape): ConvexPiece[] {
  const { sleeves, base, clamp } = shape;
  const pieces: ConvexPiece[] = [];
  const body = bodyHull(shape);
  if (body) pieces.push({ points: body.points, edges: edgesOf(body) });
  for (const arm of clamp?.arms ?? []) pieces.push({ points: arm.points, edges: edgesOf(arm) });
  if (base)
    pieces.push(
      between(
        levelRing(base.top - base.thickness, base.radius, COVER_SIDES),
        levelRing(base.top, base.radius, COVER_SIDES),
      ),
    );
  for (const s of sleeves) {
    pieces.push(prism(s, s.root, s.coneFoot, s.cone, s.cone));
    if (s.coneTop > s.coneFoot) pieces.push(prism(s, s.coneFoot, s.coneTop, s.cone, s.outer));
    pieces.push(prism(s, s.coneTop, s.mouth, s.outer, s.outer));
  }
  return pieces;
}

function edgesOf(hull: Hull3): [number, number][] {
  const edges: [number, number][] = [];
  for (const [a, b, c] of hull.faces) {
    if (a < b) edges.push([a, b]);
    if (b < c) edges.push([b, c]);
    if (c < a) edges.push([c, a]);
  }
  return edges;
}

function prism(s: Sleeve, from: number, to: number, low: Sleeve['outer'], high: Sleeve['outer']): ConvexPiece {
  return between(ringPoints(s.socket, from, low, COVER_SIDES), ringPoints(s.socket, to, high, COVER_SIDES));
}

/** The convex piece between two rings of as many corners. */
export function between(bottom: readonly Vec3[], top: readonly Vec3[]): ConvexPiece {
  const n = bottom.length;
  const edges = bottom.flatMap((_, k): [number, number][] => [
    [k, (k + 1) % n],
    [n + k, n + ((k + 1) % n)],
    [k, n + k],
  ]);
  return { points: [...bottom, ...top], edges };
}

/**
 * Shadows of convex pieces on a slab's plane, each of the part of the piece that lies between the slab's faces: the hull of the
 * piece's corners inside the slab and of the points where its edges cross the slab's faces. Pieces are given relative to `at`.
 */
export function outlineInSlab(pieces: readonly ConvexPiece[], at: Vec3, slab: Slab): Point2[][] {
  const normal = cross(slab.x, slab.y);
  const offset = subtract(at, slab.origin);
  const base: Vec3 = [dot(offset, slab.x), dot(offset, slab.y), dot(offset, normal)];
  const polygons: Point2[][] = [];
  for (const piece of pieces) {
    const local = piece.points.map(
      (p): Vec3 => [base[0] + dot(p, slab.x), base[1] + dot(p, slab.y), base[2] + dot(p, normal)],
    );
    const inside: [number, number][] = [];
    for (const p of local) if (p[2] >= slab.from && p[2] <= slab.to) inside.push([p[0], p[1]]);
    for (const [i, j] of piece.edges) {
      crossLevel(inside, local[i]!, local[j]!, slab.from);
      crossLevel(inside, local[i]!, local[j]!, slab.to);
    }
    const hull = convexHull2(inside);
    if (hull.length >= 3) polygons.push(hull);
  }
  return polygons;
}

/** Adds the point where the edge from p to q crosses a level, if it does. */
function crossLevel(into: [number, number][], p: Vec3, q: Vec3, level: number): void {
  if (p[2] < level === q[2] < level) return;
  const t = (level - p[2]) / (q[2] - p[2]);
  into.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
}
