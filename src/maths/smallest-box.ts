/** The rectangle of least area round a convex polygon: one of its sides lies on a side of the polygon (Freeman and Shapira 1975). */
export interface SmallestBox {
  /** Unit vector along the width; width >= depth. */
  readonly direction: readonly [number, number];
  readonly width: number;
  readonly depth: number;
}

/** Of the corners of a convex polygon, anticlockwise; fewer than two corners: a box of no size along x. */
export function smallestBox(corners: readonly (readonly [number, number])[]): SmallestBox {
  let best: SmallestBox = { direction: [1, 0], width: 0, depth: 0 };
  let least = Number.POSITIVE_INFINITY;
  corners.forEach((a, i) => {
    const b = corners[(i + 1) % corners.length]!;
    const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (!(l > 0)) return;
    const [c, s] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
    let [u0, u1, v0, v1] = [Infinity, -Infinity, Infinity, -Infinity];
    for (const [x, y] of corners) {
      const [u, v] = [c * x + s * y, c * y - s * x];
      u0 = Math.min(u0, u);
      u1 = Math.max(u1, u);
      v0 = Math.min(v0, v);
      v1 = Math.max(v1, v);
    }
    const [along, across] = [u1 - u0, v1 - v0];
    if (along * across >= least * (1 - 1e-9)) return;
    least = along * across;
    best =
      along >= across
        ? { direction: [c, s], width: along, depth: across }
        : { direction: [-s, c], width: across, depth: along };
  });
  return best;
}
