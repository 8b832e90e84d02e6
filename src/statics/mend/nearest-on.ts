import { type Analysis, analyse } from '../../maths/sparse/analyse.js';
import { fromTriplets } from '../../maths/sparse/csc.js';
import { factorise } from '../../maths/sparse/factorise.js';
import { multiply, multiplyTransposed } from '../../maths/sparse/multiply.js';
import { addToDiagonal, gramLower } from '../../maths/sparse/null-space.js';
import { solve } from '../../maths/sparse/solve.js';
import type { RowList } from './row-list.js';

/** Least damping of J J', as a share of its largest diagonal: equations may depend on each other. */
const LEAST_DAMPING = 1e-13;

/**
 * The point x + d nearest to nought on the linearised equations J d = -c: x + d = J'(J J' + damping)⁻¹(J x - c),
 * x counted from where everything came from, in scaled unknowns. The damping follows the size of c, which keeps dependent equations from
 * blowing up and lets the steps converge quadratically (Fan and Yuan, Computing 74 (2005) 23-39).
 * `before`: the analysis of a step with the same pattern, made once.
 */
export function nearestOn(
  equations: RowList,
  x: Float64Array,
  before: Analysis | null,
): { readonly x: Float64Array; readonly analysis: Analysis | null } {
  const count = equations.values.length;
  const jacobian = fromTriplets(count, x.length, equations.rows, equations.columns, equations.entries);
  const right = multiply(jacobian, x);
  let size = 0;
  equations.values.forEach((c, i) => {
    right[i] -= c;
    size = Math.max(size, Math.abs(c));
  });
  const gram = gramLower(jacobian);
  let diagonal = 0;
  for (let j = 0; j < gram.columns; j++) {
    for (let p = gram.starts[j]; p < gram.starts[j + 1]; p++) {
      if (gram.indices[p] === j) diagonal = Math.max(diagonal, gram.values[p]);
    }
  }
  // Nothing that may change appears in the equations.
  if (diagonal === 0) return { x, analysis: before };
  const shifted = addToDiagonal(gram, Math.max(LEAST_DAMPING, size * size) * diagonal);
  const analysis = before && before.entry.length === shifted.values.length ? before : analyse(shifted);
  const factor = factorise(analysis, shifted);
  return { x: multiplyTransposed(jacobian, solve(factor, shifted, [right]).x[0]), analysis };
}
