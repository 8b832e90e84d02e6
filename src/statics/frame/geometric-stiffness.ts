import { type FrameMember, memberLength } from './member.js';
import { slopeProducts } from './slope-products.js';

/**
 * Consistent geometric stiffness of a member under axial force N (tension positive), 12 x 12 by rows in local axes
 * (Przemieniecki, Theory of Matrix Structural Analysis, 1968, section 15.2): bending in both planes; torsion takes none.
 * A member with springs bends with kinks, and its ends do not turn with its nodes: N times the integral of its true slopes' products.
 */
export function geometricStiffness(m: FrameMember, axial: number): Float64Array {
  const l = memberLength(m);
  const k = new Float64Array(144);
  const q = axial / (30 * l);
  // Plane of uy and rz, then of uz and ry, whose rotation runs the other way.
  for (const [u, r, s] of [
    [1, 5, 1],
    [2, 4, -1],
  ] as const) {
    const at = [u, r, 6 + u, 6 + r];
    const rows =
      m.springs.length > 0
        ? slopeProducts(m, u === 1 ? 'bendingZ' : 'bendingY', s).map((row) => row.map((v) => axial * v))
        : [
            [36, 3 * s * l, -36, 3 * s * l],
            [3 * s * l, 4 * l * l, -3 * s * l, -l * l],
            [-36, -3 * s * l, 36, -3 * s * l],
            [3 * s * l, -l * l, -3 * s * l, 4 * l * l],
          ].map((row) => row.map((v) => q * v));
    for (let i = 0; i < 4; i++) for (let j = 0; j < 4; j++) k[12 * at[i] + at[j]] = rows[i][j];
  }
  return k;
}
