import { turn } from './convex.js';
import type { Ring } from './ring.js';

/**
 * The first pair of edges (by their first corners) that cross or touch where a simple polygon's may not, or null.
 * Every pair is looked at: outlines have tens of corners.
 */
export function selfCrossing(ring: Ring): [number, number] | null {
  const n = ring.length / 2;
  const p = (i: number): [number, number] => [ring[2 * (i % n)]!, ring[2 * (i % n) + 1]!];
  for (let i = 0; i < n; i++) {
    const a = p(i);
    const b = p(i + 1);
    for (let j = i + 1; j < n; j++) {
      const c = p(j);
      const d = p(j + 1);
      if (j === i + 1 || (i === 0 && j === n - 1)) {
        // Neighbours share a corner; they may not fold back on each other.
        const [u, v, w] = j === i + 1 ? [a, b, d] : [c, a, b];
        const back = (v[0] - u[0]) * (w[0] - v[0]) + (v[1] - u[1]) * (w[1] - v[1]) < 0;
        if (n > 2 && back && turn(u[0], u[1], v[0], v[1], w[0], w[1]) === 0) return [i, j];
      } else if (segmentsMeet(a, b, c, d)) return [i, j];
    }
  }
  return null;
}

type P = readonly [number, number];

function segmentsMeet(a: P, b: P, c: P, d: P): boolean {
  const d1 = turn(c[0], c[1], d[0], d[1], a[0], a[1]);
  const d2 = turn(c[0], c[1], d[0], d[1], b[0], b[1]);
  const d3 = turn(a[0], a[1], b[0], b[1], c[0], c[1]);
  const d4 = turn(a[0], a[1], b[0], b[1], d[0], d[1]);
  if (d1 * d2 < 0 && d3 * d4 < 0) return true;
  const on = (q: P, u: P, v: P): boolean =>
    Math.min(u[0], v[0]) <= q[0] &&
    q[0] <= Math.max(u[0], v[0]) &&
    Math.min(u[1], v[1]) <= q[1] &&
    q[1] <= Math.max(u[1], v[1]);
  return (
    (d1 === 0 && on(a, c, d)) || (d2 === 0 && on(b, c, d)) || (d3 === 0 && on(c, a, b)) || (d4 === 0 && on(d, a, b))
  );
}
