import type { Ring } from './ring.js';

/** (b - a) x (c - a): positive when a, b, c turn left. */
export const turn = (ax: number, ay: number, bx: number, by: number, cx: number, cy: number): number =>
  (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);

/** Whether an anticlockwise ring turns left or goes straight at every corner; `slack` is the cross product taken for straight. */
export function isConvex(ring: Ring, slack: number): boolean {
  const n = ring.length;
  for (let i = 0; i < n; i += 2) {
    const j = (i + 2) % n;
    const k = (i + 4) % n;
    if (turn(ring[i]!, ring[i + 1]!, ring[j]!, ring[j + 1]!, ring[k]!, ring[k + 1]!) < -slack) return false;
  }
  return true;
}

/** Convex hull, anticlockwise, of the corners of a ring (Andrew, Information Processing Letters 9, 1979). */
export function convexHull(ring: Ring): Ring {
  const points: [number, number][] = [];
  for (let i = 0; i < ring.length; i += 2) points.push([ring[i]!, ring[i + 1]!]);
  points.sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const half = (list: [number, number][]): [number, number][] => {
    const chain: [number, number][] = [];
    for (const p of list) {
      while (chain.length >= 2) {
        const a = chain[chain.length - 2]!;
        const b = chain[chain.length - 1]!;
        if (turn(a[0], a[1], b[0], b[1], p[0], p[1]) > 0) break;
        chain.pop();
      }
      chain.push(p);
    }
    chain.pop();
    return chain;
  };
  const lower = half(points);
  const upper = half(points.reverse());
  return new Float64Array([...lower, ...upper].flat());
}
