import { segmentDistance } from './segment-distance.js';
import type { Vec3 } from './vec3.js';

/** Two segments i < j that come within reach of each other without a shared end, and where along each. */
export interface Meeting {
  readonly i: number;
  readonly j: number;
  readonly distance: number;
  readonly s: number;
  readonly t: number;
}

/**
 * Pairs of segments no farther apart than `within` that share no end, by i then j. A sweep along the longest axis over their
 * boxes: O(n log n) where few boxes overlap. `ends`: indices into `points`.
 */
export function segmentMeetings(
  points: readonly Vec3[],
  ends: readonly (readonly [number, number])[],
  within: number,
): Meeting[] {
  const axis = longestAxis(points);
  const low = ends.map(([a, b]) => Math.min(points[a]![axis], points[b]![axis]) - within);
  const high = ends.map(([a, b]) => Math.max(points[a]![axis], points[b]![axis]));
  const order = ends.map((_, i) => i).sort((i, j) => low[i]! - low[j]! || i - j);
  const found: Meeting[] = [];
  let open: number[] = [];
  for (const j of order) {
    open = open.filter((i) => high[i]! >= low[j]!);
    for (const i of open) {
      const [first, second] = i < j ? [i, j] : [j, i];
      const [[a, b], [c, d]] = [ends[first]!, ends[second]!];
      if (a === c || a === d || b === c || b === d) continue;
      if (!boxesMeet(points, ends[first]!, ends[second]!, within)) continue;
      const near = segmentDistance(points[a]!, points[b]!, points[c]!, points[d]!);
      if (near.distance <= within) found.push({ i: first, j: second, ...near });
    }
    open.push(j);
  }
  return found.sort((a, b) => a.i - b.i || a.j - b.j);
}

function boxesMeet(
  points: readonly Vec3[],
  [a, b]: readonly [number, number],
  [c, d]: readonly [number, number],
  within: number,
): boolean {
  for (const k of [0, 1, 2] as const) {
    const [p, q, r, s] = [points[a]![k], points[b]![k], points[c]![k], points[d]![k]];
    if (Math.min(p, q) - within > Math.max(r, s) || Math.min(r, s) - within > Math.max(p, q)) return false;
  }
  return true;
}

function longestAxis(points: readonly Vec3[]): 0 | 1 | 2 {
  const extent = [0, 1, 2].map((k) => {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const p of points) [low, high] = [Math.min(low, p[k]!), Math.max(high, p[k]!)];
    return high - low;
  });
  return extent[0]! >= extent[1]! && extent[0]! >= extent[2]! ? 0 : extent[1]! >= extent[2]! ? 1 : 2;
}
