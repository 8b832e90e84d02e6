import { dampedStep } from '../../maths/damped-step.js';
import { extremeEigen } from '../../maths/extreme-eigen.js';
import { dotOf, leastSquares } from '../../maths/least-squares.js';
import { applyTerms, type ForceTerm, residualOf, spreadTerms } from './force-terms.js';
import type { QuadraticForces } from './quadratic-forces.js';

/** A combination of functions over the cells, with the sign that turns its areas into forces. */
export interface DiagramFit {
  readonly x: Float64Array;
  readonly sign: 1 | -1;
  /** Forces by edge, N, sign applied. */
  readonly forces: Float64Array;
  /** Norm of what is left of the terms, in N. */
  readonly misfit: number;
}

const ITERATIONS = 80;
/** A step that betters the misfit by less than this share has converged. */
const CONVERGED = 1e-13;
/** A search that meets its wishes to this share ends the search from other starts. */
const WELL_MET = 1e-9;
/** Wishes met to this share of their size are met. */
const MET = 1e-14;
/** Above this many coefficients steps come from normal equations, below from conjugate gradients, which need no rank. */
const DENSE_FROM = 16;
/** How many eigenvectors of either sign start a search: the misfit is of fourth order in x and may have several valleys. */
const STARTS = 3;

/**
 * x and sign with the least sum of (w (L s t(x) - g))², t quadratic in x: Levenberg-Marquardt (Marquardt, J. SIAM 11 (1963) 431-441)
 * from the directions x in which the forces follow the wishes best, the extreme eigenvectors of the quadratic form g . t(x).
 * null where no direction follows them at all. `sign` limits the search to one sign.
 */
export function fitDiagram(
  q: QuadraticForces,
  terms: readonly ForceTerm[],
  sign: 1 | -1 | undefined,
): DiagramFit | null {
  const targets = Float64Array.from(terms, (term) => term.weight * term.target);
  const h = spreadTerms(terms, targets, q.edges);
  const starts = extremeEigen(q.size, (v) => q.pullBack(q.gradients(v), h), STARTS);
  let best: DiagramFit | null = null;
  for (const { value, vector } of [...starts].sort((a, b) => Math.abs(b.value) - Math.abs(a.value))) {
    const s = sign ?? (value > 0 ? 1 : -1);
    const a = q.gradients(vector);
    const moved = applyTerms(terms, q.polarised(a, a));
    const scale = dotOf(moved, targets) / dotOf(moved, moved);
    if (!(Math.abs(scale) > 0) || !Number.isFinite(scale) || scale * s < 0) continue;
    const found = refineDiagram(
      q,
      terms,
      s,
      vector.map((v) => v * Math.sqrt(Math.abs(scale))),
    );
    if (!best || found.misfit < best.misfit * (1 - 1e-9)) best = found;
    // No other valley can be lower than one that meets the wishes.
    if (best.misfit <= WELL_MET * normOfTargets(terms)) break;
  }
  return best;
}

/** The same from a start x with its sign: the nearest valley, by steps as short as the terms allow. */
export function refineDiagram(
  q: QuadraticForces,
  terms: readonly ForceTerm[],
  sign: 1 | -1,
  start: Float64Array,
): DiagramFit {
  const forcesAt = (a: Float64Array): Float64Array => q.polarised(a, a).map((t) => sign * t);
  let x = start;
  let a = q.gradients(x);
  let forces = forcesAt(a);
  let r = residualOf(terms, forces);
  let misfit = dotOf(r, r);
  let damping = 0;
  let curvature = 0;
  const enough = (MET * normOfTargets(terms)) ** 2;
  for (let step = 0; step < ITERATIONS && misfit > enough; step++) {
    const d = stepOf(q, terms, sign, a, r, damping);
    const tried = x.map((v, m) => v + d[m]);
    const triedA = q.gradients(tried);
    const triedForces = forcesAt(triedA);
    const triedR = residualOf(terms, triedForces);
    const next = dotOf(triedR, triedR);
    if (!(next < misfit)) {
      if (step === 0 || damping === 0) curvature = curvatureOf(q, terms, a);
      damping = damping > 0 ? damping * 8 : 1e-3 * curvature;
      if (damping > 1e12 * curvature || !(curvature > 0)) break;
      continue;
    }
    const gain = (misfit - next) / misfit;
    [x, a, forces, r, misfit] = [tried, triedA, triedForces, triedR, next];
    damping = damping / 16;
    if (gain < CONVERGED) break;
  }
  return { x, sign, forces, misfit: Math.sqrt(misfit) };
}

/** The step of least |w (L s t + J d - g)|² + damping |d|². */
function stepOf(
  q: QuadraticForces,
  terms: readonly ForceTerm[],
  sign: 1 | -1,
  a: Float64Array,
  r: Float64Array,
  damping: number,
): Float64Array {
  const forward = (b: Float64Array): Float64Array =>
    applyTerms(
      terms,
      q.polarised(a, b).map((t) => 2 * sign * t),
    );
  const wanted = r.map((v) => -v);
  if (q.size > DENSE_FROM) {
    const unit = (m: number): Float64Array => Float64Array.from({ length: q.size }, (_, i) => (i === m ? 1 : 0));
    return dampedStep(
      Array.from({ length: q.size }, (_, m) => forward(q.gradients(unit(m)))),
      wanted,
      damping,
    );
  }
  const map = {
    rows: terms.length,
    columns: q.size,
    forward: (d: Float64Array) => forward(q.gradients(d)),
    back: (v: Float64Array) => q.pullBack(a, spreadTerms(terms, v, q.edges)).map((g) => 2 * sign * g),
  };
  return leastSquares(map, wanted, damping).x;
}

/** |J v|² / |v|² along one direction: the scale that damping is measured by. */
function curvatureOf(q: QuadraticForces, terms: readonly ForceTerm[], a: Float64Array): number {
  const v = new Float64Array(q.size).fill(1 / Math.sqrt(q.size));
  const moved = applyTerms(
    terms,
    q.polarised(a, q.gradients(v)).map((t) => 2 * t),
  );
  return dotOf(moved, moved);
}

const normOfTargets = (terms: readonly ForceTerm[]): number =>
  Math.sqrt(terms.reduce((sum, term) => sum + (term.weight * term.target) ** 2, 0));
