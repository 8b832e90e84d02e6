/** Vectors of three numbers, as plain readonly triples; every function is pure. */
export type Vec3 = readonly [number, number, number];

export const ZERO: Vec3 = [0, 0, 0];
export const X_AXIS: Vec3 = [1, 0, 0];
export const Y_AXIS: Vec3 = [0, 1, 0];
export const Z_AXIS: Vec3 = [0, 0, 1];

export const add = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
export const subtract = (a: Vec3, b: Vec3): Vec3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const scale = (a: Vec3, s: number): Vec3 => [a[0] * s, a[1] * s, a[2] * s];
/** a + s b */
export const addScaled = (a: Vec3, b: Vec3, s: number): Vec3 => [a[0] + b[0] * s, a[1] + b[1] * s, a[2] + b[2] * s];
export const negate = (a: Vec3): Vec3 => [-a[0], -a[1], -a[2]];
export const dot = (a: Vec3, b: Vec3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const cross = (a: Vec3, b: Vec3): Vec3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
export const length = (a: Vec3): number => Math.hypot(a[0], a[1], a[2]);
export const distance = (a: Vec3, b: Vec3): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
export const midpoint = (a: Vec3, b: Vec3): Vec3 => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2];

/** a / |a|; the zero vector stays zero. */
export function normalise(a: Vec3): Vec3 {
  const l = length(a);
  return l > 0 ? [a[0] / l, a[1] / l, a[2] / l] : ZERO;
}

/** Angle between a and b in rad, 0 to pi, by atan2(|a x b|, a.b): accurate near 0 and near pi, unlike acos. */
export const angleBetween = (a: Vec3, b: Vec3): number => Math.atan2(length(cross(a, b)), dot(a, b));

/** A unit vector square to d, chosen from d alone so that the same d always gives the same answer. */
export function perpendicular(d: Vec3): Vec3 {
  const [x, y, z] = [Math.abs(d[0]), Math.abs(d[1]), Math.abs(d[2])];
  const least: Vec3 = x <= y && x <= z ? X_AXIS : y <= z ? Y_AXIS : Z_AXIS;
  return normalise(cross(d, least));
}

export const isFinite3 = (a: Vec3): boolean => Number.isFinite(a[0]) && Number.isFinite(a[1]) && Number.isFinite(a[2]);

/** Arithmetic mean of at least one point; the mean of none is the origin. */
export function mean(points: readonly Vec3[]): Vec3 {
  let sum: Vec3 = ZERO;
  for (const p of points) sum = add(sum, p);
  return points.length > 0 ? scale(sum, 1 / points.length) : ZERO;
}
