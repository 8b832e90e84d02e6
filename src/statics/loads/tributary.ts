import { addScaled, cross, dot, length, normalise, subtract, type Vec3 } from '../../maths/vec3.js';

/** What an edge of a panel takes of an even pressure on it. */
export interface EdgeShare {
  /** Part of the panel that is nearer to this edge than to any other, mm². */
  readonly area: number;
  /**
   * Mid-span moment of a simple beam under the true spread, over that of the same load spread evenly, minus one: 1/3 for a
   * triangle, less for a trapezium.
   */
  readonly excess: number;
}

/** Strips that the spread along an edge is summed over; the moment's error is their number to the power -2. */
const STRIPS = 64;

/**
 * Shares of a plane loop's edges in an even pressure, by nearness: load goes the shortest way to a held edge (yield lines
 * along the bisectors). `normal` is the loop's unit normal, either sense. Exact for convex loops; another loop is shared by
 * the lengths of its edges. Areas sum to the loop's.
 */
export function tributaryShares(loop: readonly Vec3[], normal: Vec3, area: number, convex: boolean): EdgeShare[] {
  const n = loop.length;
  const lengths = loop.map((p, i) => length(subtract(loop[(i + 1) % n]!, p)));
  const round = lengths.reduce((a, b) => a + b, 0);
  if (!convex) return lengths.map((l) => ({ area: round > 0 ? (area * l) / round : 0, excess: 1 / 3 }));
  const middle = loop.reduce<Vec3>((sum, p) => addScaled(sum, p, 1 / n), [0, 0, 0]);
  const inward = loop.map((p, i) => {
    const square = normalise(cross(normal, subtract(loop[(i + 1) % n]!, p)));
    return dot(square, subtract(middle, p)) < 0 ? ([-square[0], -square[1], -square[2]] as Vec3) : square;
  });
  const raw = loop.map((p, i) => {
    const along = normalise(subtract(loop[(i + 1) % n]!, p));
    const depth: number[] = [];
    for (let s = 0; s < STRIPS; s++) {
      const foot = addScaled(p, along, (lengths[i]! * (s + 0.5)) / STRIPS);
      // Going in from the edge, the nearest other edge takes over where both are equally far.
      let reach = Infinity;
      for (let j = 0; j < n; j++) {
        if (j === i) continue;
        const start = dot(inward[j]!, subtract(foot, loop[j]!));
        const slope = dot(inward[j]!, inward[i]!);
        if (1 - slope > 1e-12) reach = Math.min(reach, Math.max(0, start) / (1 - slope));
      }
      depth.push(Number.isFinite(reach) ? reach : 0);
    }
    return depth;
  });
  const sums = raw.map((depth, i) => (depth.reduce((a, b) => a + b, 0) * lengths[i]!) / STRIPS);
  const total = sums.reduce((a, b) => a + b, 0);
  return raw.map((depth, i) => ({ area: total > 0 ? (area * sums[i]!) / total : 0, excess: excessOf(depth) }));
}

/** Largest moment of a simple beam under strips of load, over total x length / 8, minus one; 0 where it is less. */
function excessOf(depth: readonly number[]): number {
  const total = depth.reduce((a, b) => a + b, 0);
  if (!(total > 0)) return 0;
  const m = depth.length;
  const left = depth.reduce((sum, d, s) => sum + d * (1 - (s + 0.5) / m), 0);
  let [most, shear, moment] = [0, left, 0];
  for (const d of depth) {
    moment += (shear - d / 2) / m;
    shear -= d;
    most = Math.max(most, moment);
  }
  return Math.max(0, most / (total / 8) - 1);
}
