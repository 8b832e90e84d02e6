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
 * `apply` takes a block of vectors; `weigh` gives B x. A Ritz value whose residual is below `converged` of it counts as found.
 * Stops at `most` basis vectors at the latest.
 */
export function largestEigenvalues(
  n: number,
  apply: (block: readonly Float64Array[]) => readonly Float64Array[],
  weigh: (x: Float64Array) => Float64Array,
  wanted: number,
  most: number,
  converged: number,
): Krylov {
  const random = seededRandom(7);
  const basis: Float64Array[] = [];
  const weighed: Float64Array[] = []; // B times the basis
  const images: Float64Array[] = []; // operator times the basis
  const small: number[][] = [];
  let block: Float64Array[] = Array.from({ length: Math.min(BLOCK, n) }, () =>
    Float64Array.from({ length: n }, () => random() - 0.5),
  );
  let found: Krylov = { values: [], vectors: [], steps: 0 };
  for (let steps = 1; ; steps++) {
    const fresh: Float64Array[] = [];
    for (const v of block) {
      const w = join(v, basis, weighed, weigh);
      if (!w) continue;
      fresh.push(w.unit);
      basis.push(w.unit);
      weighed.push(w.weight);
    }
    if (fresh.length === 0) return found;
    images.push(...apply(fresh));
    found = ritz(small, basis, weighed, images, weigh, wanted, steps, converged);
    if (found.values.length >= wanted || basis.length >= Math.min(n, most)) return found;
    block = images.slice(-fresh.length).map((v) => v.slice());
  }
}

/** v made orthonormal to the basis in B; null where nothing is left of it. */
function join(
  v: Float64Array,
  basis: readonly Float64Array[],
  weighed: readonly Float64Array[],
  weigh: (x: Float64Array) => Float64Array,
): { unit: Float64Array; weight: Float64Array } | null {
  const before = Math.sqrt(Math.max(0, dot(v, weigh(v))));
  for (let pass = 0; pass < 2; pass++) for (let k = 0; k < basis.length; k++) axpy(v, basis[k], -dot(weighed[k], v));
  let weight = weigh(v);
  const size = Math.sqrt(Math.max(0, dot(v, weight)));
  if (!(size > DEPENDENT * before)) return null;
  const unit = v.map((x) => x / size);
  weight = weight.map((x) => x / size);
  return { unit, weight };
}

/** Ritz pairs; `small` is the operator on the basis and grows with it. */
function ritz(
  small: number[][],
  basis: readonly Float64Array[],
  weighed: readonly Float64Array[],
  images: readonly Float64Array[],
  weigh: (x: Float64Array) => Float64Array,
  wanted: number,
  steps: number,
  converged: number,
): Krylov {
  const m = basis.length;
  for (let i = small.length; i < m; i++) {
    small.push([]);
    for (let j = 0; j <= i; j++) {
      const v = (dot(weighed[i], images[j]) + dot(weighed[j], images[i])) / 2;
      small[i][j] = v;
      small[j][i] = v;
    }
  }
  const eigen = new EigenvalueDecomposition(new Matrix(small), { assumeSymmetric: true });
  const order = eigen.realEigenvalues
    .map((_, k) => k)
    .sort((a, b) => eigen.realEigenvalues[b] - eigen.realEigenvalues[a]);
  const values: number[] = [];
  const vectors: Float64Array[] = [];
  const n = basis[0].length;
  for (const k of order.slice(0, wanted)) {
    const value = eigen.realEigenvalues[k];
    const vector = new Float64Array(n);
    const residual = new Float64Array(n);
    for (let i = 0; i < m; i++) {
      const w = eigen.eigenvectorMatrix.get(i, k);
      axpy(vector, basis[i], w);
      axpy(residual, images[i], w);
    }
    axpy(residual, vector, -value);
    const size = Math.sqrt(Math.max(0, dot(residual, weigh(residual))));
    if (!(size <= converged * Math.max(Math.abs(value), Math.abs(eigen.realEigenvalues[order[0]])))) break;
    values.push(value);
    vectors.push(vector);
  }
  return { values, vectors, steps };
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

function axpy(y: Float64Array, x: Float64Array, s: number): void {
  if (s !== 0) for (let i = 0; i < y.length; i++) y[i] += s * x[i];
}
