import type { Ring } from './ring.js';

const lowest = (r: Ring): number => {
  let best = 0;
  for (let i = 2; i < r.length; i += 2)
    if (r[i + 1]! < r[best + 1]! || (r[i + 1] === r[best + 1] && r[i]! < r[best]!)) best = i;
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
  // -B has B's corners negated, in the same sense; its lowest corner is B's highest.
  const minus = new Float64Array(nb);
  for (let i = 0; i < nb; i++) minus[i] = -b[i]!;
  const i0 = lowest(a);
  const j0 = lowest(minus);
  let i = 0;
  let j = 0;
  let count = 0;
  while (i < na || j < nb) {
    const ia = (i0 + i) % na;
    const jb = (j0 + j) % nb;
    out[count++] = a[ia]! + minus[jb]!;
    out[count++] = a[ia + 1]! + minus[jb + 1]!;
    const ia2 = (ia + 2) % na;
    const jb2 = (jb + 2) % nb;
    const side =
      i >= na
        ? -1
        : j >= nb
          ? 1
          : (a[ia2]! - a[ia]!) * (minus[jb2 + 1]! - minus[jb + 1]!) -
            (a[ia2 + 1]! - a[ia + 1]!) * (minus[jb2]! - minus[jb]!);
    if (side >= 0) i += 2;
    if (side <= 0) j += 2;
  }
  return out.slice(0, count);
}
