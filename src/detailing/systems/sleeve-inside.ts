import type { Vec3 } from '../../maths/vec3.js';
import type { Half, Sleeve } from './sleeve.js';

/** Half-sizes of a sleeve's outside at a distance from the node, between root and mouth. */
export function outerAt(s: Sleeve, along: number): Half {
  if (along < s.coneFoot)
    return along < s.root ? s.rootHalf : between(s.rootHalf, s.cone, part(s.root, s.coneFoot, along));
  if (along >= s.coneTop) return s.outer;
  return between(s.cone, s.outer, part(s.coneFoot, s.coneTop, along));
}

const part = (from: number, to: number, at: number): number => (to > from ? (at - from) / (to - from) : 1);

export function between(a: Half, b: Half, t: number): Half {
  if (typeof a === 'number' || typeof b === 'number') return (a as number) + t * ((b as number) - (a as number));
  return [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1])];
}

/** Whether a point (relative to the node) lies in the sleeve's outside shape, its bore filled, grown by `margin`. */
export function insideSleeve(s: Sleeve, p: Vec3, margin = 0): boolean {
  const along = alongOf(s, p);
  if (along < s.root - margin || along > s.mouth + margin) return false;
  return acrossWithin(s, p, outerAt(s, along), margin);
}

/** Whether a point lies in the strut's path, from the stop outwards without end, grown by `margin`. */
export const insidePath = (s: Sleeve, p: Vec3, margin = 0): boolean =>
  alongOf(s, p) > s.stop - margin && acrossWithin(s, p, s.inner, margin);

/** Whether a point lies inside every plane (n·p <= d, four numbers each), grown by `margin`; no planes: nothing. */
export function insidePlanes(planes: Float64Array, p: Vec3, margin = 0): boolean {
  for (let i = 0; i < planes.length; i += 4)
    if (planes[i]! * p[0] + planes[i + 1]! * p[1] + planes[i + 2]! * p[2] > planes[i + 3]! + margin) return false;
  return planes.length > 0;
}

const alongOf = (s: Sleeve, p: Vec3): number => {
  const d = s.socket.direction;
  return p[0] * d[0] + p[1] * d[1] + p[2] * d[2];
};

function acrossWithin(s: Sleeve, p: Vec3, half: Half, margin: number): boolean {
  const { y, z } = s.socket;
  const a = p[0] * y[0] + p[1] * y[1] + p[2] * y[2];
  const b = p[0] * z[0] + p[1] * z[1] + p[2] * z[2];
  return typeof half === 'number'
    ? a * a + b * b < (half + margin) ** 2
    : Math.abs(a) < half[0] + margin && Math.abs(b) < half[1] + margin;
}
