import { distance, dot, normalise, type Vec3 } from './vec3.js';

/** A direction along which points of grids and planes seldom coincide. */
const SWEEP = normalise([0.4832, 0.6127, 0.6254]);

/**
 * Pairs [i, j], i < j, of points no farther apart than `within`, in the order of j, then i.
 * A sweep along one line (Shamos and Hoey, 1976): O(n log n) unless many points share one plane square to it.
 */
export function closePairs(points: readonly Vec3[], within: number): (readonly [number, number])[] {
  const along = points.map((p) => dot(p, SWEEP));
  const order = points.map((_, i) => i).sort((a, b) => along[a]! - along[b]! || a - b);
  const pairs: [number, number][] = [];
  order.forEach((i, k) => {
    for (let m = k + 1; m < order.length; m++) {
      const j = order[m]!;
      // The projections of close points are no farther apart than they are, but for rounding.
      if (along[j]! - along[i]! > within * (1 + 1e-9) + 1e-12 * Math.abs(along[i]!)) break;
      if (distance(points[i]!, points[j]!) <= within) pairs.push(i < j ? [i, j] : [j, i]);
    }
  });
  return pairs.sort((a, b) => a[1] - b[1] || a[0] - b[0]);
}
