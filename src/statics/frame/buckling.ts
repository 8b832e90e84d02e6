import { largestEigenvalues } from '../../maths/sparse/block-krylov.js';
import type { SparseMatrix } from '../../maths/sparse/csc.js';
import { type Factor, factorise } from '../../maths/sparse/factorise.js';
import { multiplySymmetric } from '../../maths/sparse/multiply.js';
import { backSolve } from '../../maths/sparse/solve.js';
import { spread } from '../freedoms.js';
import { assembleFrame } from './assemble.js';
import { geometricStiffness } from './geometric-stiffness.js';
import { toGlobal } from './rotate.js';
import type { PreparedFrame } from './solve-frame.js';

/** The second factorisation stands at this share of the lowest factor: near enough to converge fast, clear of the singular point. */
const SHIFT = 0.97;
/** Sturm counts are taken this share below the lowest and above the highest factor: wider than the factors' own error. */
const STURM = 1e-4;
/** Basis vectors of the first search (rough) and of the second. */
const ROUGH_BASIS = 80;
const FINE_BASIS = 120;
/** Load factors above this are as good as none: the members would have failed long before. */
const NO_FACTOR = 1e8;

/** Lowest load factors of a frame under one set of axial forces. */
export interface Buckling {
  /** Ascending; every factor times the loads makes the frame buckle in its shape. Empty where nothing is compressed enough. */
  readonly factors: readonly number[];
  /** Displacements over all nodes, six a node, by factor; largest displacement 1. */
  readonly shapes: readonly Float64Array[];
  /** Whether negative pivots of K + lambda Kg were 0 below the lowest factor and as many as the factors above the highest (Sylvester). */
  readonly sturm: 'agrees' | 'disagrees' | 'not needed';
}

/**
 * (K + lambda Kg) x = 0 for the smallest positive lambda: block Lanczos on K⁻¹(-Kg) in the inner product of K finds the
 * lowest factor roughly, a second factorisation at 0.97 of it makes the lowest ones sharp, Sturm counts check that none is
 * missed. `axial` is the force of each member of the frame, N, tension positive; members should be subdivided.
 */
export function bucklingFactors(
  prepared: Extract<PreparedFrame, { state: 'stiff' }>,
  axial: ArrayLike<number>,
  wanted = 4,
): Buckling {
  const { frame, freedoms, stiffness, factor, analysis } = prepared;
  const n = freedoms.count;
  const none: Buckling = { factors: [], shapes: [], sturm: 'not needed' };
  if (n === 0) return none;
  const geometric = assembleFrame(frame, freedoms, (e) =>
    toGlobal(frame.members[e], geometricStiffness(frame.members[e], axial[e])),
  );
  const weigh = (x: Float64Array): Float64Array => multiplySymmetric(stiffness, x);
  const minusKg = (x: Float64Array): Float64Array => multiplySymmetric(geometric, x).map((v) => -v);
  const rough = largestEigenvalues(n, (block) => backSolve(factor, block.map(minusKg)), weigh, 1, ROUGH_BASIS);
  let lowest = rough.values.length > 0 && rough.values[0] > 0 ? 1 / rough.values[0] : Infinity;
  if (rough.values.length === 0) lowest = bisect(stiffness, geometric, analysis);
  if (!(lowest < NO_FACTOR)) return none;

  const sigma = SHIFT * lowest;
  const shifted = factorise(analysis, combine(stiffness, geometric, sigma));
  const fine =
    shifted.state === 'factorised'
      ? largestEigenvalues(n, (block) => backSolve(shifted, block.map(weigh)), weigh, Math.min(wanted, n), FINE_BASIS)
      : rough;
  // (K + sigma Kg)⁻¹ K has eigenvalues lambda / (lambda - sigma).
  const pairs = fine.values
    .map((mu, k) => ({ lambda: fine === rough ? 1 / mu : (sigma * mu) / (mu - 1), vector: fine.vectors[k] }))
    .filter((p) => p.lambda > 0 && p.lambda < NO_FACTOR)
    .sort((a, b) => a.lambda - b.lambda);
  if (pairs.length === 0) return none;
  const first = pairs[0].lambda;
  const last = pairs[pairs.length - 1].lambda;
  const negative = (lambda: number): number =>
    negativePivots(factorise(analysis, combine(stiffness, geometric, lambda)));
  const agrees = negative(first * (1 - STURM)) === 0 && negative(last * (1 + STURM)) >= pairs.length;
  return {
    factors: pairs.map((p) => p.lambda),
    shapes: pairs.map((p) => scaled(spread(freedoms, p.vector))),
    sturm: agrees ? 'agrees' : 'disagrees',
  };
}

/** K + lambda Kg: both have one pattern. */
function combine(k: SparseMatrix, kg: SparseMatrix, lambda: number): SparseMatrix {
  return { ...k, values: k.values.map((v, p) => v + lambda * kg.values[p]) };
}

const negativePivots = (f: Factor): number => (f.state === 'factorised' ? f.negative : Number.NaN);

/** The lowest factor by Sturm counts alone, to a tenth: for spectra that the first search could not settle. */
function bisect(k: SparseMatrix, kg: SparseMatrix, analysis: Factor['analysis']): number {
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

/** Largest displacement (not rotation) at 1. */
function scaled(v: Float64Array): Float64Array {
  let most = 0;
  for (let i = 0; i < v.length; i++) if (i % 6 < 3 && Math.abs(v[i]) > Math.abs(most)) most = v[i];
  return most === 0 ? v : v.map((x) => x / most + 0);
}
