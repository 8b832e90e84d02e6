import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { seededRandom } from '../random.js';
import { type AnalyseOptions, type Analysis, analyse } from './analyse.js';
import type { SparseMatrix } from './csc.js';
import { diagonalOf, factorise } from './factorise.js';
import { multiplySymmetric } from './multiply.js';
import { addToDiagonal } from './null-space.js';
import { orthonormalise } from './orthonormalise.js';
import { backSolve } from './solve.js';

/** Shift of the scaled matrix, whose diagonal is 1: rigid modes lie at 1e-16, the first flexible one above 6e-10. */
const SHIFT = 1e-11;
const BLOCK = 4;
const ITERATIONS = 3;

/**
 * The least eigenvalue of D^-1/2 A D^-1/2, D the diagonal of a positive semidefinite A, with its vector in A's unknowns:
 * how near A is to singular, whatever the units of its unknowns. Block inverse iteration with Ritz values.
 * `known`: an analysis of A's pattern, where there is one.
 */
export function leastScaledEigenvalue(
  lower: SparseMatrix,
  options: AnalyseOptions = {},
  known?: Analysis,
): { readonly value: number; readonly vector: Float64Array } {
  const n = lower.columns;
  const root = diagonalOf(lower).map((d) => (d > 0 ? 1 / Math.sqrt(d) : 1));
  const values = lower.values.slice();
  for (let j = 0; j < n; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) values[p] *= root[j] * root[lower.indices[p]];
  const scaled = { ...lower, values };
  const shifted = addToDiagonal(scaled, SHIFT);
  const factor = factorise(known ?? analyse(shifted, options), shifted);
  const random = seededRandom(1);
  let z: Float64Array[] = Array.from({ length: Math.min(BLOCK, n) }, () =>
    Float64Array.from({ length: n }, () => random() - 0.5),
  );
  for (let step = 0; step < ITERATIONS; step++) z = orthonormalise(backSolve(factor, z), random).vectors;
  const az = z.map((v) => multiplySymmetric(scaled, v));
  const small = new Matrix(z.map((v) => az.map((w) => v.reduce((sum, x, i) => sum + x * w[i], 0))));
  const eigen = new EigenvalueDecomposition(small, { assumeSymmetric: true });
  let least = 0;
  eigen.realEigenvalues.forEach((v, k) => {
    if (v < eigen.realEigenvalues[least]) least = k;
  });
  const vector = new Float64Array(n);
  z.forEach((v, c) => {
    const w = eigen.eigenvectorMatrix.get(c, least);
    for (let i = 0; i < n; i++) vector[i] += w * v[i] * root[i];
  });
  return { value: eigen.realEigenvalues[least], vector };
}
