import { addScaled, distance, dot, subtract, type Vec3 } from './vec3.js';

/** Nearest points of two segments: their distance and where along each (0 at its start, 1 at its end). */
export interface SegmentDistance {
  readonly distance: number;
  readonly s: number;
  readonly t: number;
}

/** Below this share of |u|²|v|² the segments count as parallel, where the pair of nearest points is not unique. */
const PARALLEL = 1e-14;

const clamp = (x: number): number => Math.min(1, Math.max(0, x));

/** min |p(s) - q(t)| over 0 <= s, t <= 1 (Ericson, Real-Time Collision Detection, 2005, 5.1.9); points allowed. */
export function segmentDistance(p0: Vec3, p1: Vec3, q0: Vec3, q1: Vec3): SegmentDistance {
  const u = subtract(p1, p0);
  const v = subtract(q1, q0);
  const r = subtract(p0, q0);
  const [uu, vv, uv, ur, vr] = [dot(u, u), dot(v, v), dot(u, v), dot(u, r), dot(v, r)];
  let s = 0;
  let t = 0;
  if (uu === 0 && vv === 0) return { distance: distance(p0, q0), s, t };
  if (uu === 0) t = clamp(vr / vv);
  else if (vv === 0) s = clamp(-ur / uu);
  else {
    const determinant = uu * vv - uv * uv;
    s = determinant > PARALLEL * uu * vv ? clamp((uv * vr - ur * vv) / determinant) : 0;
    t = (uv * s + vr) / vv;
    if (t < 0 || t > 1) {
      t = clamp(t);
      s = clamp((uv * t - ur) / uu);
    }
  }
  return { distance: distance(addScaled(p0, u, s), addScaled(q0, v, t)), s, t };
}
