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
const CONVERGED = 1e-15;
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
  for (let step = 0; step < ITERATIONS && misfit > 0; step++) {
    const here = a;
    const jacobian = {
      rows: terms.length,
      columns: q.size,
      forward: (d: Float64Array) =>
        applyTerms(
          terms,
          q.polarised(here, q.gradients(d)).map((t) => 2 * sign * t),
        ),
      back: (v: Float64Array) => q.pullBack(here, spreadTerms(terms, v, q.edges)).map((g) => 2 * sign * g),
    };
    const d = leastSquares(
      jacobian,
      r.map((v) => -v),
      damping,
    ).x;
    const tried = x.map((v, m) => v + d[m]);
    const triedA = q.gradients(tried);
    const triedForces = forcesAt(triedA);
    const triedR = residualOf(terms, triedForces);
    const next = dotOf(triedR, triedR);
    if (!(next < misfit)) {
      const column = jacobian.back(jacobian.forward(d));
      const curvature = dotOf(column, d) / Math.max(dotOf(d, d), Number.MIN_VALUE);
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
