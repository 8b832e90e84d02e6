import type { Ring } from './ring.js';

const lowest = (r: Ring): number => {
  let best = 0;
  for (let i = 2; i < r.length; i += 2)
    if (r[i + 1]! < r[best + 1]! || (r[i + 1] === r[best + 1] && r[i]! < r[best]!)) best = i;
  return best;
};

const highest = (r: Ring): number => {
  let best = 0;
  for (let i = 2; i < r.length; i += 2)
    if (r[i + 1]! > r[best + 1]! || (r[i + 1] === r[best + 1] && r[i]! > r[best]!)) best = i;
  return best;
};

/**
 * A + (-B) for convex anticlockwise A and B: the positions of B's origin, relative to A's, at which they touch or
 * overlap. The edges of both merged by angle (de Berg et al., Computational Geometry, 3rd ed., 13.3).
 */
export function convexNoFit(a: Ring, b: Ring): Ring {
  const na = a.length;
  const nb = b.length;
  const out = new Float64Array(na + nb);
  const i0 = lowest(a);
  // -B has B's corners negated, in the same sense; its lowest corner is B's highest.
  const j0 = highest(b);
  let i = 0;
  let j = 0;
  let count = 0;
  let ia = i0;
  let jb = j0;
  while (i < na || j < nb) {
    out[count] = a[ia]! - b[jb]!;
    out[count + 1] = a[ia + 1]! - b[jb + 1]!;
    count += 2;
    const ia2 = ia + 2 === na ? 0 : ia + 2;
    const jb2 = jb + 2 === nb ? 0 : jb + 2;
    const side =
      i >= na
        ? -1
        : j >= nb
          ? 1
          : (a[ia2]! - a[ia]!) * (b[jb + 1]! - b[jb2 + 1]!) - (a[ia2 + 1]! - a[ia + 1]!) * (b[jb]! - b[jb2]!);
    if (side >= 0) {
      i += 2;
      ia = ia2;
    }
    if (side <= 0) {
      j += 2;
      jb = jb2;
    }
  }
  return count === na + nb ? out : out.subarray(0, count);
}
