import type { Analysis } from '../maths/sparse/analyse.js';
import { largestEigenvalues } from '../maths/sparse/block-krylov.js';
import type { SparseMatrix } from '../maths/sparse/csc.js';
import { type Factor, factorise } from '../maths/sparse/factorise.js';
import { multiplySymmetric } from '../maths/sparse/multiply.js';
import { backSolve } from '../maths/sparse/solve.js';

/** The second factorisation stands at this share of the lowest factor: near enough to converge fast, clear of the singular point. */
const SHIFT = 0.97;
/** Sturm counts are taken this share below the lowest and above the highest factor: wider than the factors' own error. */
const STURM = 1e-4;
/** Basis vectors of the first search (rough) and of the second. */
const ROUGH_BASIS = 60;
const FINE_BASIS = 120;
/** Residuals, as shares of the eigenvalue, at which the two searches are content. */
const ROUGH = 0.03;
const FINE = 1e-6;
/** Load factors above this are as good as none: the members would have failed long before. */
const NO_FACTOR = 1e8;

/** Smallest positive lambda of (K + lambda Kg) x = 0, with their vectors on the free freedoms. */
export interface LoadFactors {
  /** Ascending. */
  readonly pairs: readonly { readonly lambda: number; readonly vector: Float64Array }[];
  /** Whether negative pivots of K + lambda Kg were 0 below the lowest factor and as many as the factors above the highest (Sylvester). */
  readonly sturm: 'agrees' | 'disagrees' | 'not needed';
}

/**
 * Block Lanczos on K⁻¹(-Kg) in the inner product of K finds the lowest factor roughly, a second factorisation at 0.97 of it
 * makes the lowest ones sharp, Sturm counts check that none is missed. `kg` has the pattern of `k`, whose analysis and factor are given.
 */
export function lowestLoadFactors(
  k: SparseMatrix,
  kg: SparseMatrix,
  analysis: Analysis,
  factor: Factor,
  wanted: number,
): LoadFactors {
  const n = k.columns;
  if (n === 0) return { pairs: [], sturm: 'not needed' };
  const weigh = (x: Float64Array): Float64Array => multiplySymmetric(k, x);
  const minusKg = (x: Float64Array): Float64Array => multiplySymmetric(kg, x).map((v) => -v);
  const rough = largestEigenvalues(n, (block) => backSolve(factor, block.map(minusKg)), weigh, 1, ROUGH_BASIS, ROUGH);
  let lowest = rough.values.length > 0 && rough.values[0] > 0 ? 1 / rough.values[0] : Infinity;
  if (rough.values.length === 0) lowest = bisect(k, kg, analysis);
  if (!(lowest < NO_FACTOR)) return { pairs: [], sturm: 'not needed' };

  let sigma = SHIFT * lowest;
  let shifted = factorise(analysis, combine(k, kg, sigma));
  if (shifted.negative > 0 || shifted.state === 'zero pivot') {
    // A lower factor was missed: the counts find it.
    sigma = SHIFT * bisect(k, kg, analysis);
    shifted = factorise(analysis, combine(k, kg, sigma));
  }
  const fine =
    shifted.state === 'factorised'
      ? largestEigenvalues(n, (_, weighed) => backSolve(shifted, weighed), weigh, Math.min(wanted, n), FINE_BASIS, FINE)
      : rough;
  // (K + sigma Kg)⁻¹ K has eigenvalues lambda / (lambda - sigma).
  const pairs = fine.values
    .map((mu, k) => ({ lambda: fine === rough ? 1 / mu : (sigma * mu) / (mu - 1), vector: fine.vectors[k] }))
    .filter((p) => p.lambda > 0 && p.lambda < NO_FACTOR)
    .sort((a, b) => a.lambda - b.lambda);
  if (pairs.length === 0) return { pairs: [], sturm: 'not needed' };
  const first = pairs[0].lambda;
  const last = pairs[pairs.length - 1].lambda;
  const negative = (lambda: number): number => negativePivots(factorise(analysis, combine(k, kg, lambda)));
  const agrees = negative(first * (1 - STURM)) === 0 && negative(last * (1 + STURM)) >= pairs.length;
  return { pairs, sturm: agrees ? 'agrees' : 'disagrees' };
}

/** Whether any load factor lies between 0 and lambda: K + lambda Kg has then a negative pivot (one factorisation). */
export function hasFactorBelow(k: SparseMatrix, kg: SparseMatrix, analysis: Analysis, lambda: number): boolean {
  return negativePivots(factorise(analysis, combine(k, kg, lambda))) !== 0;
}

/** K + lambda Kg: both have one pattern. */
function combine(k: SparseMatrix, kg: SparseMatrix, lambda: number): SparseMatrix {
  return { ...k, values: k.values.map((v, p) => v + lambda * kg.values[p]) };
}

const negativePivots = (f: Factor): number => (f.state === 'factorised' ? f.negative : Number.NaN);

/** The lowest factor by Sturm counts alone, to a fiftieth, from below: for spectra that the first search could not settle. */
function bisect(k: SparseMatrix, kg: SparseMatrix, analysis: Analysis): number {
  let high = 1e-3;
  while (high < NO_FACTOR && negativePivots(factorise(analysis, combine(k, kg, high))) === 0) high *= 10;
  if (!(high < NO_FACTOR)) return Infinity;
  let low = high / 10;
  while (high / low > 1.02) {
    const middle = Math.sqrt(low * high);
    if (negativePivots(factorise(analysis, combine(k, kg, middle))) === 0) low = middle;
    else high = middle;
  }
  return low;
}
