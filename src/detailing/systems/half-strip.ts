/**
 * Two round bars whose axes meet at a node are each symmetric about the plane of the axes, so their least distance lies in that
 * plane (the midpoint of a closest pair and its mirror image is no farther apart). There a bar is a half-strip: half-width r, from
 * the setback outwards.
 */

/**
 * Least setback s1 of bar 1 that keeps it at least `gap` from bar 2, which starts at s2; -Infinity where any will do.
 *
 * Bar 2 grown by the gap is a half-strip with rounded corners. Bar 1 must start beyond the farthest point, measured along bar 1, at
 * which the grown bar 2 reaches into bar 1's strip. That distance is a concave function of the height v across bar 1, so its
 * largest value on |v| <= r1 is at the peak or at the nearer end.
 *
 * @param angle between the bars, rad, 0 < angle <= pi
 * @param r1 half-width of bar 1, mm; @param r2 half-width of bar 2, mm
 */
export function leastSetback(angle: number, r1: number, r2: number, s2: number, gap: number): number {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  // Corners of bar 2's end in bar 1's axes (u along bar 1, v towards bar 2): inner is the one that faces bar 1.
  const inner = { u: s2 * c + r2 * s, v: s2 * s - r2 * c };
  const outer = { u: s2 * c - r2 * s, v: s2 * s + r2 * c };
  const bottom = Math.min(inner.v, outer.v) - gap;
  if (bottom >= r1) return Number.NEGATIVE_INFINITY;
  const high = r1;
  if (c > 0) {
    // The grown bar 2 runs away upwards and outwards: its reach grows with v, so v = r1 decides.
    return reach(high, inner, outer, c, s, gap);
  }
  // Obtuse: the reach peaks at the inner corner's arc, straight along bar 1.
  const peak = inner.v;
  return reach(Math.min(high, Math.max(peak, -r1)), inner, outer, c, s, gap);
}

interface Corner {
  readonly u: number;
  readonly v: number;
}

/** Largest u on the line at height v inside the half-strip with end corners `inner`, `outer`, direction (c, s), grown by `gap`. */
function reach(v: number, inner: Corner, outer: Corner, c: number, s: number, gap: number): number {
  let best = Number.NEGATIVE_INFINITY;
  for (const corner of [inner, outer]) {
    const h = v - corner.v;
    if (Math.abs(h) <= gap) best = Math.max(best, corner.u + Math.sqrt(gap * gap - h * h));
  }
  // Side that faces bar 1: from the inner corner along (c, s), moved out by gap (s, -c).
  if (s > 0) {
    const start = { u: inner.u + gap * s, v: inner.v - gap * c };
    const along = (v - start.v) / s;
    if (along >= 0) best = Math.max(best, start.u + along * c);
  }
  // End face, moved out by gap towards the node: it bounds u from above only where bar 2 points away from bar 1.
  const [a, b] = [
    { u: inner.u - gap * c, v: inner.v - gap * s },
    { u: outer.u - gap * c, v: outer.v - gap * s },
  ];
  const [low, up] = a.v <= b.v ? [a, b] : [b, a];
  if (v >= low.v && v <= up.v) {
    const level = up.v === low.v;
    best = Math.max(best, level ? Math.max(low.u, up.u) : low.u + ((v - low.v) / (up.v - low.v)) * (up.u - low.u));
  }
  return best;
}

/**
 * Setback common to both bars of a pair that keeps them at least `gap` apart, mm. Never short; the least where it is reached at
 * corner against corner or corner against side.
 * With t the angle: t <= 90 degrees: (rmin + g + rmax cos t) / sin t; beyond: (rmin sin t + g) / (1 - cos t); where both corners
 * face each other across the bisector, ((r1 + r2) cos(t/2) + sqrt(g² - (r1 - r2)² sin²(t/2))) / (2 sin(t/2)).
 */
export function commonSetback(angle: number, r1: number, r2: number, gap: number): number {
  const [low, high] = r1 < r2 ? [r1, r2] : [r2, r1];
  const half = angle / 2;
  const across = (high - low) * Math.sin(half);
  if (gap > 0 && across <= gap) {
    const tilt = Math.asin(across / gap);
    if (tilt <= half && half + tilt <= Math.PI / 2)
      return ((r1 + r2) * Math.cos(half) + Math.sqrt(gap * gap - across * across)) / (2 * Math.sin(half));
  }
  return angle <= Math.PI / 2
    ? (low + gap + high * Math.cos(angle)) / Math.sin(angle)
    : (low * Math.sin(angle) + gap) / (1 - Math.cos(angle));
}
