import { type Ring, reversed, signedArea } from './ring.js';

/**
 * The ring anticlockwise, without corners nearer than `tolerance` to the one before them or to the straight line
 * between their neighbours. Fewer than three corners left: an empty ring.
 */
export function tidyRing(ring: Ring, tolerance: number): Ring {
  let points: [number, number][] = [];
  for (let i = 0; i < ring.length; i += 2) points.push([ring[i]!, ring[i + 1]!]);
  for (let changed = true; changed && points.length >= 3; ) {
    changed = false;
    const kept: [number, number][] = [];
    const n = points.length;
    for (let i = 0; i < n; i++) {
      const a = kept.length > 0 ? kept[kept.length - 1]! : points[n - 1]!;
      const b = points[i]!;
      const c = points[(i + 1) % n]!;
      const [ux, uy] = [c[0] - a[0], c[1] - a[1]];
      const [vx, vy] = [b[0] - a[0], b[1] - a[1]];
      const span = Math.hypot(ux, uy);
      const near = Math.hypot(vx, vy) <= tolerance;
      const straight = span > tolerance && Math.abs(ux * vy - uy * vx) <= tolerance * span && ux * vx + uy * vy >= 0;
      if (near || straight) changed = true;
      else kept.push(b);
    }
    points = kept;
  }
  if (points.length < 3) return new Float64Array(0);
  const out = new Float64Array(points.flat());
  return signedArea(out) < 0 ? reversed(out) : out;
}
