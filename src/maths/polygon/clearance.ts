import type { Ring } from './ring.js';

/** Least distance from (x, y) to the rings' boundary; positive inside (even-odd), negative outside. */
export function clearanceAt(rings: readonly Ring[], x: number, y: number): number {
  let best = Infinity;
  let inside = false;
  for (const r of rings) {
    const n = r.length;
    for (let i = 0; i < n; i += 2) {
      const [ax, ay, bx, by] = [r[i]!, r[i + 1]!, r[(i + 2) % n]!, r[(i + 3) % n]!];
      if (ay > y !== by > y && x < ax + ((y - ay) * (bx - ax)) / (by - ay)) inside = !inside;
      const [dx, dy] = [bx - ax, by - ay];
      const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / (dx * dx + dy * dy || 1)));
      best = Math.min(best, Math.hypot(x - ax - t * dx, y - ay - t * dy));
    }
  }
  return inside ? best : -best;
}
