import type { Random } from '../random.js';

/** A vector that keeps less than this share of its length lay in the span of the ones before it. */
const DEPENDENT = 1e-14;

/**
 * Q and R of V = Q R by modified Gram-Schmidt, twice over ("twice is enough": Giraud, Langou and Rozloznik, Comput. Math.
 * Appl. 50 (2005) 1069-1075). A vector that depends on earlier ones becomes zero, or, with `random`, a fresh direction.
 */
export function orthonormalise(
  vectors: readonly Float64Array[],
  random: Random | undefined,
): { readonly vectors: Float64Array[]; readonly triangle: number[][] } {
  const q = vectors.map((v) => v.slice());
  const triangle = q.map(() => new Array<number>(q.length).fill(0));
  for (let k = 0; k < q.length; k++) {
    const before = norm(q[k]);
    sweep(q, k, triangle);
    let size = norm(q[k]);
    if (!(size > DEPENDENT * before)) {
      triangle[k][k] = 0;
      if (!random) {
        q[k].fill(0);
        continue;
      }
      for (let i = 0; i < q[k].length; i++) q[k][i] = random() - 0.5;
      sweep(q, k, undefined);
      size = norm(q[k]);
      if (!(size > DEPENDENT)) {
        q[k].fill(0);
        continue;
      }
    } else triangle[k][k] = size;
    for (let i = 0; i < q[k].length; i++) q[k][i] /= size;
  }
  return { vectors: q, triangle };
}

function sweep(q: readonly Float64Array[], k: number, triangle: number[][] | undefined): void {
  const v = q[k];
  for (let pass = 0; pass < 2; pass++)
    for (let j = 0; j < k; j++) {
      const u = q[j];
      let s = 0;
      for (let i = 0; i < v.length; i++) s += u[i] * v[i];
      if (s === 0) continue;
      for (let i = 0; i < v.length; i++) v[i] -= s * u[i];
      if (triangle) triangle[j][k] += s;
    }
}

/** |v| */
export function norm(v: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < v.length; i++) sum += v[i] * v[i];
  return Math.sqrt(sum);
}
