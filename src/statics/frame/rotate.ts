import type { FrameMember } from './member.js';

/** Rᵀ K R for a 12 x 12 matrix by rows, R the member's axes at each of its four triples. */
export function toGlobal(m: FrameMember, local: Float64Array): Float64Array {
  const r = [m.axes.x, m.axes.y, m.axes.z];
  const half = new Float64Array(144);
  const out = new Float64Array(144);
  // half = K R
  for (let i = 0; i < 12; i++)
    for (let b = 0; b < 12; b += 3)
      for (let c = 0; c < 3; c++) {
        const at = 12 * i + b;
        half[at + c] = local[at] * r[0][c] + local[at + 1] * r[1][c] + local[at + 2] * r[2][c];
      }
  for (let a = 0; a < 12; a += 3)
    for (let c = 0; c < 3; c++)
      for (let j = 0; j < 12; j++) {
        out[12 * (a + c) + j] =
          r[0][c] * half[12 * a + j] + r[1][c] * half[12 * (a + 1) + j] + r[2][c] * half[12 * (a + 2) + j];
      }
  return out;
}

/** Global triples of a 12-vector from local ones: Rᵀ v. */
export function vectorToGlobal(m: FrameMember, v: ArrayLike<number>): Float64Array {
  const { x, y, z } = m.axes;
  return Float64Array.from({ length: 12 }, (_, i) => {
    const [b, c] = [i - (i % 3), i % 3];
    return x[c] * v[b] + y[c] * v[b + 1] + z[c] * v[b + 2];
  });
}

/** Local triples of a 12-vector: R v. */
export function vectorToLocal(m: FrameMember, v: ArrayLike<number>): Float64Array {
  const axes = [m.axes.x, m.axes.y, m.axes.z];
  return Float64Array.from({ length: 12 }, (_, i) => {
    const b = i - (i % 3);
    const a = axes[i % 3];
    return a[0] * v[b] + a[1] * v[b + 1] + a[2] * v[b + 2];
  });
}
