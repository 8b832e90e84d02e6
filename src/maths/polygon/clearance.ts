import type { Ring } from './ring.js';

/** Least distance from (x, y) to the rings' boundary; positive inside (even-odd), negative outside. */
export function clearanceAt(rings: readonly Ring[], x: number, y: number): number {
  let best = Infinity; // squared: one root at the end
  let inside = false;
  for (const r of rings) {
    const n = r.length;
    let ax = r[n - 2]!;
    let ay = r[n - 1]!;
    for (let i = 0; i < n; i += 2) {
      const bx = r[i]!;
      const by = r[i + 1]!;
      if (ay > y !== by > y && x < ax + ((y - ay) * (bx - ax)) / (by - ay)) inside = !inside;
      const dx = bx - ax;
      const dy = by - ay;
      const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / (dx * dx + dy * dy || 1)));
      const ox = x - ax - t * dx;
      const oy = y - ay - t * dy;
      const square = ox * ox + oy * oy;
      if (square < best) best = square;
      ax = bx;
      ay = by;
    }
  }
  return inside ? Math.sqrt(best) : -Math.sqrt(best);
}
