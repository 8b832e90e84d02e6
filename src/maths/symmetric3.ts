import type { Vec3 } from './vec3.js';

/** A symmetric 3 x 3 matrix by its upper triangle: xx, xy, xz, yy, yz, zz. */
export type Symmetric3 = readonly [number, number, number, number, number, number];

export interface Eigen3 {
  /** Ascending. */
  readonly values: Vec3;
  /** Unit vectors in the order of the values. */
  readonly vectors: readonly [Vec3, Vec3, Vec3];
}

/** Off-diagonals below this share of the largest entry are nought: cyclic Jacobi squares the error each sweep. */
const OFF_DIAGONAL = 1e-17;
const SWEEPS = 30;

/**
 * A = V diag(values) V', by cyclic Jacobi rotations (Golub and Van Loan, Matrix Computations, 8.5.2).
 * Small eigenvalues come out with an error of about 1e-16 of the largest; the zero matrix gives the axes.
 */
export function eigenSymmetric3(m: Symmetric3): Eigen3 {
  const a = [
    [m[0], m[1], m[2]],
    [m[1], m[3], m[4]],
    [m[2], m[4], m[5]],
  ];
  const v = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const largest = Math.max(...m.map(Math.abs));
  for (let sweep = 0; sweep < SWEEPS; sweep++) {
    let worst = 0;
    for (const [p, q] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      const off = a[p]![q]!;
      worst = Math.max(worst, Math.abs(off));
      if (Math.abs(off) <= OFF_DIAGONAL * largest) continue;
      const tau = (a[q]![q]! - a[p]![p]!) / (2 * off);
      const t = (tau >= 0 ? 1 : -1) / (Math.abs(tau) + Math.hypot(1, tau));
      const c = 1 / Math.hypot(1, t);
      const s = t * c;
      for (let k = 0; k < 3; k++) {
        const [kp, kq] = [a[k]![p]!, a[k]![q]!];
        a[k]![p] = c * kp - s * kq;
        a[k]![q] = s * kp + c * kq;
      }
      for (let k = 0; k < 3; k++) {
        const [pk, qk] = [a[p]![k]!, a[q]![k]!];
        a[p]![k] = c * pk - s * qk;
        a[q]![k] = s * pk + c * qk;
        const [vp, vq] = [v[k]![p]!, v[k]![q]!];
        v[k]![p] = c * vp - s * vq;
        v[k]![q] = s * vp + c * vq;
      }
    }
    if (worst <= OFF_DIAGONAL * largest) break;
  }
  const order = [0, 1, 2].sort((i, j) => a[i]![i]! - a[j]![j]! || i - j);
  const column = (j: number): Vec3 => [v[0]![j]!, v[1]![j]!, v[2]![j]!];
  return {
    values: order.map((j) => a[j]![j]!) as unknown as Vec3,
    vectors: order.map(column) as unknown as [Vec3, Vec3, Vec3],
  };
}
