type Point = readonly [number, number];

/**
 * Whether a plane loop crosses or touches itself and whether it is convex (no inward corner; straight corners pass).
 * `tolerance` is a length: a corner nearer than this to the line through its neighbours is straight, and a point
 * nearer than this to an edge touches it. A loop that crosses itself is not convex.
 */
export function loopShape(
  loop: readonly Point[],
  tolerance: number,
): { readonly convex: boolean; readonly crossesItself: boolean } {
  const n = loop.length;
  for (let i = 0; i < n; i++) {
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue;
      if (meet(loop[i]!, loop[(i + 1) % n]!, loop[j]!, loop[(j + 1) % n]!, tolerance)) {
        return { convex: false, crossesItself: true };
      }
    }
  }
  let [left, right] = [0, 0];
  for (let i = 0; i < n; i++) {
    const [a, b, c] = [loop[i]!, loop[(i + 1) % n]!, loop[(i + 2) % n]!];
    const off = offLine(a, c, b);
    if (off < -tolerance) left++;
    if (off > tolerance) right++;
    // Doubling back along the same line is a spike, which lies on itself.
    const ahead = (b[0] - a[0]) * (c[0] - b[0]) + (b[1] - a[1]) * (c[1] - b[1]);
    if (Math.abs(off) <= tolerance && ahead < 0) return { convex: false, crossesItself: true };
  }
  return { convex: left === 0 || right === 0, crossesItself: false };
}

/** Signed distance of p from the line a to b, positive on its left; from the point a where a and b coincide. */
function offLine(a: Point, b: Point, p: Point): number {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const l = Math.hypot(dx, dy);
  if (l === 0) return Math.hypot(p[0] - a[0], p[1] - a[1]);
  return (dx * (p[1] - a[1]) - dy * (p[0] - a[0])) / l;
}

/** Whether segments ab and cd cross, or an end of one lies within the tolerance of the other. */
function meet(a: Point, b: Point, c: Point, d: Point, tolerance: number): boolean {
  const crossing = offLine(a, b, c) * offLine(a, b, d) < 0 && offLine(c, d, a) * offLine(c, d, b) < 0;
  if (crossing) return true;
  return near(c, a, b, tolerance) || near(d, a, b, tolerance) || near(a, c, d, tolerance) || near(b, c, d, tolerance);
}

function near(p: Point, a: Point, b: Point, tolerance: number): boolean {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const squared = dx * dx + dy * dy;
  const s = squared > 0 ? Math.min(1, Math.max(0, ((p[0] - a[0]) * dx + (p[1] - a[1]) * dy) / squared)) : 0;
  return Math.hypot(p[0] - a[0] - s * dx, p[1] - a[1] - s * dy) <= tolerance;
}
