import type { Vec3 } from '../../maths/vec3.js';
import type { Half, Sleeve } from './sleeve.js';
import { insidePlanes } from './sleeve-inside.js';

/** Added to a section's reach before anything is left out, mm: far above round-off, far below any length that is made. */
const SAFE = 1e-6;

/** Distance of a section's farthest point from its middle, mm. */
export const reachOf = (half: Half): number => (typeof half === 'number' ? half : Math.hypot(half[0], half[1]));

/**
 * Of the planes of a convex hull (n·p <= d inside, four numbers each, n unit) those that part the ball of radius `reach` about
 * `centre`; null where the ball lies wholly outside one of them, or where there are no planes: nothing of it is inside.
 */
export function planesCutting(planes: Float64Array, centre: Vec3, reach: number): Float64Array | null {
  if (planes.length === 0) return null;
  const far = reach + SAFE;
  const cutting: number[] = [];
  for (let i = 0; i < planes.length; i += 4) {
    const beyond = planes[i]! * centre[0] + planes[i + 1]! * centre[1] + planes[i + 2]! * centre[2] - planes[i + 3]!;
    if (beyond > far) return null;
    if (beyond > -far) cutting.push(planes[i]!, planes[i + 1]!, planes[i + 2]!, planes[i + 3]!);
  }
  return Float64Array.from(cutting);
}

/** Whether a point lies inside all planes that are left; with none left it does. */
export const insideAll = (cutting: Float64Array, p: Vec3): boolean => cutting.length === 0 || insidePlanes(cutting, p);

/** Whether the ball of radius `reach` about `centre` (relative to the node) may touch a sleeve or its strut's path. */
export function mayTouch(s: Sleeve, centre: Vec3, reach: number): boolean {
  const d = s.socket.direction;
  const along = centre[0] * d[0] + centre[1] * d[1] + centre[2] * d[2];
  if (along < Math.min(s.root, s.stop) - reach - SAFE) return false;
  const across = Math.hypot(centre[0] - along * d[0], centre[1] - along * d[1], centre[2] - along * d[2]);
  const widest = Math.max(reachOf(s.outer), reachOf(s.cone), reachOf(s.rootHalf), reachOf(s.inner));
  return across < widest + reach + SAFE;
}
