import { distance, dot, subtract, type Vec3 } from './vec3.js';

/** A point inside a segment: how far along, 0 to 1. */
export interface PointOnSegment {
  readonly point: number;
  readonly segment: number;
  readonly along: number;
}

/**
 * Points no farther than `within` from a segment and from neither of its ends, by segment then along. A sweep along x.
 */
export function pointsOnSegments(
  points: readonly Vec3[],
  ends: readonly (readonly [number, number])[],
  within: number,
): PointOnSegment[] {
  const order = points.map((_, i) => i).sort((i, j) => points[i]![0] - points[j]![0] || i - j);
  const xs = order.map((i) => points[i]![0]);
  const found: PointOnSegment[] = [];
  ends.forEach(([a, b], segment) => {
    const [p, q] = [points[a]!, points[b]!];
    const u = subtract(q, p);
    const uu = dot(u, u);
    const last = Math.max(p[0], q[0]) + within;
    for (let k = firstAtLeast(xs, Math.min(p[0], q[0]) - within); k < order.length && xs[k]! <= last; k++) {
      const point = order[k]!;
      if (point === a || point === b) continue;
      const r = points[point]!;
      const along = dot(subtract(r, p), u) / uu;
      if (!(along > 0 && along < 1)) continue;
      const foot: Vec3 = [p[0] + u[0] * along, p[1] + u[1] * along, p[2] + u[2] * along];
      if (distance(r, foot) <= within && distance(r, p) > within && distance(r, q) > within)
        found.push({ point, segment, along });
    }
  });
  return found.sort((a, b) => a.segment - b.segment || a.along - b.along || a.point - b.point);
}

function firstAtLeast(values: readonly number[], x: number): number {
  let [low, high] = [0, values.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle]! < x) low = middle + 1;
    else high = middle;
  }
  return low;
}
