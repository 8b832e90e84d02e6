type Point = readonly [number, number];

/**
 * The closed polygon with the fewest corners of its own that Douglas and Peucker's halving (Cartographica 10, 1973) leaves: every corner
 * left out lies within `tolerance` of the side that stands for it. Order and sense are kept; a polygon of three corners stays.
 */
export function coarsePolygon(points: readonly Point[], tolerance: number): readonly Point[] {
  const n = points.length;
  if (n <= 3) return points;
  // Halved at the corner farthest from the first, so that the result does not shrink to a line.
  let far = 0;
  for (let i = 1; i < n; i++) if (distance(points[i]!, points[0]!) > distance(points[far]!, points[0]!)) far = i;
  if (far === 0) return points.slice(0, 1);
  const keep = new Array<boolean>(n).fill(false);
  keep[0] = keep[far] = true;
  const stack: [number, number][] = [
    [0, far],
    [far, n],
  ];
  while (stack.length > 0) {
    const [from, to] = stack.pop()!;
    let [worst, at] = [tolerance, -1];
    for (let i = from + 1; i < to; i++) {
      const off = offLine(points[i]!, points[from]!, points[to % n]!);
      if (off > worst) [worst, at] = [off, i];
    }
    if (at < 0) continue;
    keep[at] = true;
    stack.push([from, at], [at, to]);
  }
  return points.filter((_, i) => keep[i]);
}

const distance = (a: Point, b: Point): number => Math.hypot(a[0] - b[0], a[1] - b[1]);

/** Distance of p from the segment a b. */
function offLine(p: Point, a: Point, b: Point): number {
  const [ux, uy] = [b[0] - a[0], b[1] - a[1]];
  const l2 = ux * ux + uy * uy;
  const t = l2 > 0 ? Math.max(0, Math.min(1, ((p[0] - a[0]) * ux + (p[1] - a[1]) * uy) / l2)) : 0;
  return Math.hypot(p[0] - a[0] - t * ux, p[1] - a[1] - t * uy);
}
