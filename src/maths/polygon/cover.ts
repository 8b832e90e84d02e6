import { convexHull, turn } from './convex.js';
import { type Ring, signedArea } from './ring.js';
import { selfCrossing } from './simple.js';

/**
 * A ring of at most `corners` corners, if it can be had, that covers an anticlockwise ring and reaches beyond it by
 * little: inward corners are filled, short sides between outward corners are lost where their neighbours meet, the
 * cheapest first, no step reaching further than `reach`. A ring with few enough corners comes back as it is; one
 * whose hull is larger by less than `hullShare` of its area becomes the hull first.
 */
export function coverRing(ring: Ring, corners: number, reach: number, hullShare: number): Ring {
  if (ring.length / 2 <= corners) return ring;
  const hull = convexHull(ring);
  const start = signedArea(hull) <= signedArea(ring) * (1 + hullShare) ? hull : ring;
  const p: [number, number][] = [];
  for (let i = 0; i < start.length; i += 2) p.push([start[i]!, start[i + 1]!]);
  while (p.length > Math.max(3, corners)) {
    const step = cheapest(p, reach);
    if (!step) break;
    const before = p.slice();
    p.splice(0, p.length, ...step);
    // Filling a bay may run into its far shore: then that is as far as it goes.
    if (selfCrossing(new Float64Array(p.flat()))) return new Float64Array(before.flat());
  }
  return new Float64Array(p.flat());
}

function cheapest(p: readonly [number, number][], reach: number): [number, number][] | null {
  const n = p.length;
  let least = reach;
  let best: (() => [number, number][]) | null = null;
  for (let i = 0; i < n; i++) {
    const [a, b, c, d] = [p[(i + n - 1) % n]!, p[i]!, p[(i + 1) % n]!, p[(i + 2) % n]!];
    const atB = turn(a[0], a[1], b[0], b[1], c[0], c[1]);
    if (atB <= 0) {
      const off = -atB / (Math.hypot(c[0] - a[0], c[1] - a[1]) || 1);
      if (off < least) {
        least = off;
        best = () => p.filter((_, k) => k !== i);
      }
      continue;
    }
    const atC = turn(b[0], b[1], c[0], c[1], d[0], d[1]);
    if (atC <= 0) continue;
    // Lines a b and d c meet beyond the side b c.
    const [ux, uy, vx, vy] = [b[0] - a[0], b[1] - a[1], c[0] - d[0], c[1] - d[1]];
    const det = ux * vy - uy * vx;
    if (det >= 0) continue;
    const t = ((c[0] - b[0]) * vy - (c[1] - b[1]) * vx) / det;
    if (!(t > 0)) continue;
    const tip: [number, number] = [b[0] + t * ux, b[1] + t * uy];
    const off = Math.abs(turn(b[0], b[1], c[0], c[1], tip[0], tip[1])) / (Math.hypot(c[0] - b[0], c[1] - b[1]) || 1);
    if (off < least) {
      least = off;
      best = () => {
        const out = p.slice();
        out[i] = tip;
        out.splice((i + 1) % n, 1);
        return out;
      };
    }
  }
  return best ? best() : null;
}
