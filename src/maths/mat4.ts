import { cross, type Vec3 } from './vec3.js';

/** A rigid motion p -> R p + t as 16 numbers, 4 x 4, row-major; the last row is 0 0 0 1. */
export type Mat4 = readonly number[];

export const IDENTITY4: Mat4 = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1];

/** The motion that takes the local axes x, y, z = x cross y at the origin to `x`, `y`, x cross y at `origin`. */
export function frameToWorld(origin: Vec3, x: Vec3, y: Vec3): Mat4 {
  const z = cross(x, y);
  return [x[0], y[0], z[0], origin[0], x[1], y[1], z[1], origin[1], x[2], y[2], z[2], origin[2], 0, 0, 0, 1];
}

export function translation(t: Vec3): Mat4 {
  return [1, 0, 0, t[0], 0, 1, 0, t[1], 0, 0, 1, t[2], 0, 0, 0, 1];
}

/** M p */
export const transformPoint = (m: Mat4, p: Vec3): Vec3 => [
  m[0]! * p[0] + m[1]! * p[1] + m[2]! * p[2] + m[3]!,
  m[4]! * p[0] + m[5]! * p[1] + m[6]! * p[2] + m[7]!,
  m[8]! * p[0] + m[9]! * p[1] + m[10]! * p[2] + m[11]!,
];

/** R d: rotates a direction, leaves out the move. */
export const transformDirection = (m: Mat4, d: Vec3): Vec3 => [
  m[0]! * d[0] + m[1]! * d[1] + m[2]! * d[2],
  m[4]! * d[0] + m[5]! * d[1] + m[6]! * d[2],
  m[8]! * d[0] + m[9]! * d[1] + m[10]! * d[2],
];

/** A B: first b, then a. */
export function multiply4(a: Mat4, b: Mat4): Mat4 {
  const out = new Array<number>(16).fill(0);
  for (let i = 0; i < 4; i++)
    for (let j = 0; j < 4; j++) {
      let sum = 0;
      for (let k = 0; k < 4; k++) sum += a[4 * i + k]! * b[4 * k + j]!;
      out[4 * i + j] = sum;
    }
  return out;
}

/** Inverse of a rigid motion: (R, t) -> (Rt, -Rt t). */
export function invertRigid(m: Mat4): Mat4 {
  const t: Vec3 = [m[3]!, m[7]!, m[11]!];
  const r: Mat4 = [m[0]!, m[4]!, m[8]!, 0, m[1]!, m[5]!, m[9]!, 0, m[2]!, m[6]!, m[10]!, 0, 0, 0, 0, 1];
  const moved = transformDirection(r, t);
  return [r[0]!, r[1]!, r[2]!, -moved[0], r[4]!, r[5]!, r[6]!, -moved[1], r[8]!, r[9]!, r[10]!, -moved[2], 0, 0, 0, 1];
}
