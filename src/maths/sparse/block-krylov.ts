import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { seededRandom } from '../random.js';

/** Vectors that go through the operator together; square and round struts buckle in pairs, and a block finds both. */
const BLOCK = 4;
/** A new vector that keeps less than this share of its length adds nothing to the space. */
const DEPENDENT = 1e-10;

export interface Krylov {
  /** Largest eigenvalues, descending; only converged ones. */
  readonly values: readonly number[];
  readonly vectors: readonly Float64Array[];
  readonly steps: number;
}

/**
 * The `wanted` largest eigenvalues of an operator that is self-adjoint in the inner product of a definite matrix B, by block
 * Lanczos with full reorthogonalisation (Grimes, Lewis and Simon, SIAM J. Matrix Anal. Appl. 15 (1994) 228-272).
 * `apply` takes a block of vectors and B times them; `weigh` gives B x. A Ritz value whose residual is below `converged` of it counts as
 * found. Stops at `most` basis vectors at the latest.
 */
export function largestEigenvalues(
  n: number,
  apply: (block: readonly Float64Array[], weighed: readonly Float64Array[]) => readonly Float64Array[],
  weigh: (x: Float64Array) => Float64Array,
  wanted: number,
  most: number,
  converged: number,
): Krylov {
  const random = seededRandom(7);
  const basis: Float64Array[] = [];
  const weighed: Float64Array[] = []; // B times the basis
  const small: number[][] = []; // the operator on the basis: block tridiagonal
  let fresh = extend(
    Array.from({ length: Math.min(BLOCK, n) }, () => Float64Array.from({ length: n }, () => random() - 0.5)),
    basis,
    weighed,
    weigh,
  );
  for (let steps = 1; fresh > 0; steps++) {
    const m = basis.length;
    const from = m - fresh;
    const images = apply(basis.slice(from), weighed.slice(from));
    for (let i = small.length; i < m; i++) small.push(new Array<number>(i + 1).fill(0));
    for (let i = 0; i < fresh; i++)
      for (let j = 0; j <= i; j++)
        small[from + i][from + j] = (dot(weighed[from + i], images[j]) + dot(weighed[from + j], images[i])) / 2;
    // What the images hold beyond the basis is the next block; how much of it a Ritz vector meets is that pair's residual.
    const next = extend(
      images.map((v) => v.slice()),
      basis,
      weighed,
      weigh,
    );
    const coupling = Array.from({ length: next }, (_, i) => images.map((v) => dot(weighed[m + i], v)));
    const pairs = ritz(small, m, coupling, wanted, converged);
    if (pairs.length >= wanted || m >= Math.min(n, most) || next === 0)
      return { values: pairs.map((p) => p.value), vectors: pairs.map((p) => sum(basis, p.weights)), steps };
    for (let i = 0; i < next; i++) {
      small.push(new Array<number>(m + i + 1).fill(0));
      for (let j = 0; j < fresh; j++) small[m + i][from + j] = coupling[i][j];
    }
    fresh = next;
  }
  return { values: [], vectors: [], steps: 0 };
}

/** Makes the vectors orthonormal in B to the basis and to each other and adds them; says how many were left. */
function extend(
  block: readonly Float64Array[],
  basis: Float64Array[],
  weighed: Float64Array[],
  weigh: (x: Float64Array) => Float64Array,
): number {
  let added = 0;
  for (const v of block) {
    const before = Math.sqrt(dot(v, v));
    // Classical Gram-Schmidt twice is as good as once modified and reads each vector once.
    for (let pass = 0; pass < 2; pass++) subtractProjection(v, basis, weighed);
    if (!(Math.sqrt(dot(v, v)) > DEPENDENT * before)) continue;
    const weight = weigh(v);
    const size = Math.sqrt(Math.max(0, dot(v, weight)));
    if (!(size > 0)) continue;
    for (let i = 0; i < v.length; i++) {
      v[i] /= size;
      weight[i] /= size;
    }
    basis.push(v);
    weighed.push(weight);
    added++;
  }
  return added;
}

/** v <- v - basis (weighedᵀ v), four columns a sweep. */
function subtractProjection(v: Float64Array, basis: readonly Float64Array[], weighed: readonly Float64Array[]): void {
  const m = basis.length;
  const c = new Float64Array(m);
  let k = 0;
  for (; k + 3 < m; k += 4) {
    const [w0, w1, w2, w3] = [weighed[k], weighed[k + 1], weighed[k + 2], weighed[k + 3]];
    let [s0, s1, s2, s3] = [0, 0, 0, 0];
    for (let i = 0; i < v.length; i++) {
      const x = v[i];
      s0 += w0[i] * x;
      s1 += w1[i] * x;
      s2 += w2[i] * x;
      s3 += w3[i] * x;
    }
    c[k] = s0;
    c[k + 1] = s1;
    c[k + 2] = s2;
    c[k + 3] = s3;
  }
  for (; k < m; k++) c[k] = dot(weighed[k], v);
  addColumns(
    v,
    basis,
    c.map((x) => -x),
  );
}

/** y <- y + columns c, four columns a sweep. */
function addColumns(y: Float64Array, columns: readonly Float64Array[], c: Float64Array): void {
  let k = 0;
  for (; k + 3 < c.length; k += 4) {
    const [x0, x1, x2, x3] = [columns[k], columns[k + 1], columns[k + 2], columns[k + 3]];
    const [c0, c1, c2, c3] = [c[k], c[k + 1], c[k + 2], c[k + 3]];
    for (let i = 0; i < y.length; i++) y[i] += c0 * x0[i] + c1 * x1[i] + c2 * x2[i] + c3 * x3[i];
  }
  for (; k < c.length; k++) {
    const x = columns[k];
    for (let i = 0; i < y.length; i++) y[i] += c[k] * x[i];
  }
}

function sum(basis: readonly Float64Array[], weights: Float64Array): Float64Array {
  const out = new Float64Array(basis[0].length);
  addColumns(out, basis, weights);
  return out;
}

/** The leading Ritz pairs on the first m basis vectors whose residual |coupling w| is small, down to the first that is not. */
function ritz(
  small: readonly (readonly number[])[],
  m: number,
  coupling: readonly (readonly number[])[],
  wanted: number,
  converged: number,
): { readonly value: number; readonly weights: Float64Array }[] {
  const matrix = Matrix.zeros(m, m);
  for (let i = 0; i < m; i++)
    for (let j = 0; j <= i; j++) {
      matrix.set(i, j, small[i][j]);
      matrix.set(j, i, small[i][j]);
    }
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  const order = realEigenvalues.map((_, k) => k).sort((a, b) => realEigenvalues[b] - realEigenvalues[a]);
  const found: { value: number; weights: Float64Array }[] = [];
  for (const k of order.slice(0, wanted)) {
    const value = realEigenvalues[k];
    const weights = Float64Array.from({ length: m }, (_, i) => eigenvectorMatrix.get(i, k));
    const size = Math.hypot(
      ...coupling.map((row) => row.reduce((total, b, j) => total + b * weights[m - row.length + j], 0)),
    );
    if (!(size <= converged * Math.max(Math.abs(value), Math.abs(realEigenvalues[order[0]])))) break;
    found.push({ value, weights });
  }
  return found;
}

function dot(a: Float64Array, b: Float64Array): number {
  let total = 0;
  for (let i = 0; i < a.length; i++) total += a[i] * b[i];
  return total;
}
