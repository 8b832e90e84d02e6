import { add, addScaled, cross, dot, length, negate, normalise, scale, subtract, type Vec3 } from './vec3.js';

/** A convex body: its farthest point in a direction (any length but 0). */
export interface Convex {
  readonly support: (direction: Vec3) => Vec3;
}

/** The hull of points. */
export const hullOf = (points: readonly Vec3[]): Convex => ({
  support: (d) => {
    let [best, most] = [points[0]!, Number.NEGATIVE_INFINITY];
    for (const p of points) {
      const h = p[0] * d[0] + p[1] * d[1] + p[2] * d[2];
      if (h > most) [best, most] = [p, h];
    }
    return best;
  },
});

/** A round bar with flat ends from a to b. */
export function cylinderOf(a: Vec3, b: Vec3, radius: number): Convex {
  const axis = normalise(subtract(b, a));
  return {
    support: (d) => {
      const along = dot(d, axis);
      const across = addScaled(d, axis, -along);
      const size = length(across);
      const end = along >= 0 ? b : a;
      return size > 1e-12 * length(d) ? addScaled(end, across, radius / size) : end;
    },
  };
}

/** What a body passes through on a straight way. */
export const sweptBy = (body: Convex, move: Vec3): Convex => ({
  support: (d) => {
    const p = body.support(d);
    return dot(d, move) > 0 ? add(p, move) : p;
  },
});

/** The distance counts as found when its lower bound is this near, as a share. */
const CONVERGED = 1e-7;
/** More rounds than any polytope needs; round bodies come to the bound above in some twenty. */
const ROUNDS = 100;

/**
 * min |p - q| over p in a, q in b; 0 where they overlap (Gilbert, Johnson and Keerthi, IEEE J. Robotics and Automation 4
 * (1988) 193-203, with the nearest point of a simplex from Ericson, Real-Time Collision Detection, 2005, 5.1). In the unit of the points.
 */
export function convexDistance(a: Convex, b: Convex): number {
  const point = (d: Vec3): Vec3 => subtract(a.support(d), b.support(negate(d)));
  let v = point([1, 0, 0]);
  let simplex: readonly Vec3[] = [v];
  let extent = length(v);
  for (let round = 0; round < ROUNDS; round++) {
    const size = dot(v, v);
    if (size <= (1e-12 * extent) ** 2) return 0;
    const w = point(negate(v));
    extent = Math.max(extent, length(w));
    // v.w / |v| bounds the distance from below.
    if (size - dot(v, w) <= CONVERGED * size) break;
    const near = nearestOf([...simplex, w]);
    if (near.inside) return 0;
    if (dot(near.point, near.point) >= size) break;
    v = near.point;
    simplex = near.simplex;
  }
  return length(v);
}

interface Nearest {
  readonly point: Vec3;
  /** The corners that the nearest point lies between. */
  readonly simplex: readonly Vec3[];
  readonly inside: boolean;
}

/** The point of a simplex of one to four corners that is nearest to the origin. */
function nearestOf(p: readonly Vec3[]): Nearest {
  if (p.length === 1) return { point: p[0]!, simplex: p, inside: false };
  if (p.length === 2) return onSegment(p[0]!, p[1]!);
  if (p.length === 3) return onTriangle(p[0]!, p[1]!, p[2]!);
  const [a, b, c, d] = p as [Vec3, Vec3, Vec3, Vec3];
  let best: Nearest | null = null;
  let inside = true;
  for (const [q, r, s, other] of [
    [a, b, c, d],
    [a, b, d, c],
    [a, c, d, b],
    [b, c, d, a],
  ] as const) {
    const n = cross(subtract(r, q), subtract(s, q));
    const own = dot(n, subtract(other, q));
    const origin = -dot(n, q);
    // A flat tetrahedron has no inside.
    if (own * origin > 0 && Math.abs(own) > 1e-14 * length(n) * length(subtract(other, q))) continue;
    inside = false;
    const found = onTriangle(q, r, s);
    if (!best || dot(found.point, found.point) < dot(best.point, best.point)) best = found;
  }
  return inside || !best ? { point: [0, 0, 0], simplex: p, inside: true } : best;
}

function onSegment(a: Vec3, b: Vec3): Nearest {
  const ab = subtract(b, a);
  const t = dot(ab, ab) > 0 ? -dot(a, ab) / dot(ab, ab) : 0;
  if (t <= 0) return { point: a, simplex: [a], inside: false };
  if (t >= 1) return { point: b, simplex: [b], inside: false };
  return { point: addScaled(a, ab, t), simplex: [a, b], inside: false };
}

function onTriangle(a: Vec3, b: Vec3, c: Vec3): Nearest {
  const n = cross(subtract(b, a), subtract(c, a));
  const nn = dot(n, n);
  if (nn > 0) {
    const within = (p: Vec3, q: Vec3): boolean => dot(cross(subtract(q, p), n), p) >= 0;
    if (within(a, b) && within(b, c) && within(c, a))
      return { point: scale(n, dot(n, a) / nn), simplex: [a, b, c], inside: false };
  }
  return [onSegment(a, b), onSegment(b, c), onSegment(c, a)].reduce((best, s) =>
    dot(s.point, s.point) < dot(best.point, best.point) ? s : best,
  );
}
