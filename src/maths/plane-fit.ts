import { eigenSymmetric3, type Symmetric3 } from './symmetric3.js';
import { dot, mean, scale, subtract, type Vec3 } from './vec3.js';

export interface PlaneFit {
  /** Mean of the points: the plane passes through it. */
  readonly origin: Vec3;
  /** Unit normal; for a loop by the right-hand rule along it where its area says so. */
  readonly normal: Vec3;
  /** Largest distance of a point from the plane, in the points' unit. */
  readonly flatness: number;
  /** Root-mean-square extents along the normal and along the two directions in the plane, ascending. */
  readonly spread: Vec3;
}

/**
 * The plane through the points' mean with the least sum of squared distances (total least squares): its normal is the
 * eigenvector of the least eigenvalue of the scatter matrix (Pearson 1901, On lines and planes of closest fit).
 * The points are taken as a loop to sign the normal. null for fewer than three points.
 */
export function fitPlane(loop: readonly Vec3[]): PlaneFit | null {
  if (loop.length < 3) return null;
  const origin = mean(loop);
  const scatter = [0, 0, 0, 0, 0, 0];
  for (const p of loop) {
    const [x, y, z] = subtract(p, origin);
    const products = [x * x, x * y, x * z, y * y, y * z, z * z];
    for (let k = 0; k < 6; k++) scatter[k]! += products[k]!;
  }
  const { values, vectors } = eigenSymmetric3(scatter as unknown as Symmetric3);
  const normal = dot(vectors[0], areaVector(loop)) < 0 ? scale(vectors[0], -1) : vectors[0];
  let flatness = 0;
  for (const p of loop) flatness = Math.max(flatness, Math.abs(dot(normal, subtract(p, origin))));
  const spread = values.map((v) => Math.sqrt(Math.max(0, v) / loop.length)) as unknown as Vec3;
  return { origin, normal, flatness, spread };
}

/** Area vector of a loop, 1/2 sum p_k x p_(k+1): its length is the area enclosed, the loop runs anticlockwise about it. */
export function areaVector(loop: readonly Vec3[]): Vec3 {
  const origin = loop[0];
  if (!origin) return [0, 0, 0];
  let [x, y, z] = [0, 0, 0];
  for (let k = 1; k + 1 < loop.length; k++) {
    const [ax, ay, az] = subtract(loop[k]!, origin);
    const [bx, by, bz] = subtract(loop[k + 1]!, origin);
    x += ay * bz - az * by;
    y += az * bx - ax * bz;
    z += ax * by - ay * bx;
  }
  return [x / 2, y / 2, z / 2];
}
