import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { dotOf } from './least-squares.js';
import { seededRandom } from './random.js';

export interface EigenPair {
  readonly value: number;
  /** Unit length. */
  readonly vector: Float64Array;
}

/** Steps at most: extreme eigenvalues settle first, and starting vectors need no more digits. */
const STEPS = 60;
/** A remainder below this share of the largest entry so far has left the space that can be reached. */
const EXHAUSTED = 1e-12;

/**
 * The `count` lowest and `count` highest eigenpairs of a symmetric map of the given size, ascending, each once: Lanczos with
 * full reorthogonalisation (Golub and Van Loan, Matrix Computations, 4th ed. 2013, 10.3.4). Exact for sizes up to 60; of a
 * repeated eigenvalue one vector is found.
 */
export function extremeEigen(
  size: number,
  apply: (x: Float64Array) => Float64Array,
  count: number,
): readonly EigenPair[] {
  const random = seededRandom(7);
  const q: Float64Array[] = [unit(Float64Array.from({ length: size }, () => random() - 0.5))];
  const steps = Math.min(size, STEPS);
  const rows: number[][] = [];
  let largest = 0;
  for (let j = 0; j < steps; j++) {
    const w = apply(q[j]);
    rows.push(q.map((v) => dotOf(v, w)));
    largest = Math.max(largest, ...rows[j].map(Math.abs));
    for (let twice = 0; twice < 2; twice++) {
      for (const v of q) {
        const c = dotOf(v, w);
        for (let i = 0; i < size; i++) w[i] -= c * v[i];
      }
    }
    const left = Math.sqrt(dotOf(w, w));
    if (j + 1 === steps || !(left > EXHAUSTED * Math.max(largest, left))) break;
    q.push(unit(w));
  }
  const n = rows.length;
  const small = Matrix.zeros(n, n);
  rows.forEach((row, j) => {
    row.forEach((v, i) => {
      small.set(i, j, v);
      small.set(j, i, v);
    });
  });
  const evd = new EigenvalueDecomposition(small, { assumeSymmetric: true });
  const order = evd.realEigenvalues.map((_, i) => i).sort((a, b) => evd.realEigenvalues[a] - evd.realEigenvalues[b]);
  const chosen = order.filter((_, i) => i < count || i >= n - count);
  return chosen.map((k) => {
    const vector = new Float64Array(size);
    for (let j = 0; j < n; j++) {
      const c = evd.eigenvectorMatrix.get(j, k);
      for (let i = 0; i < size; i++) vector[i] += c * q[j][i];
    }
    return { value: evd.realEigenvalues[k], vector: unit(vector) };
  });
}

function unit(v: Float64Array): Float64Array {
  const l = Math.sqrt(dotOf(v, v));
  return l > 0 ? v.map((x) => x / l) : v;
}
