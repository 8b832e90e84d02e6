import { leastScaledEigenvalue } from '../../maths/sparse/least-eigenvalue.js';
import { solveOne } from '../../maths/sparse/solve-one.js';
import type { SeriesModel } from './series-model.js';

/**
 * x with K x = p, K the stiffness of the members that stand on the active freedoms; the others keep a pivot of 1 and stay 0.
 * null where K is singular, by the same measures as for a whole structure.
 */
export function factoriseStanding(
  model: SeriesModel,
  stands: Uint8Array,
  active: Uint8Array,
  right: Float64Array,
): Float64Array | null {
  const stiffness = model.sum(stands);
  const { starts, indices, values } = stiffness;
  for (let j = 0; j < stiffness.columns; j++)
    for (let p = starts[j]!; p < starts[j + 1]!; p++)
      if (!active[j] || !active[indices[p]!]) values[p] = indices[p] === j ? 1 : 0;
  const factor = model.factorise(stiffness);
  if (factor.state === 'zero pivot' || factor.pivotRatio < model.singularPivot) return null;
  if (
    factor.pivotRatio < model.doubtfulPivot &&
    leastScaledEigenvalue(stiffness, {}, model.analysis).value < model.singularEigenvalue
  )
    return null;
  return solveOne(factor, right);
}
