import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { orthonormalise } from '../maths/sparse/orthonormalise.js';
import { barDirections, type PinFigure } from './pin-figure.js';
import { addBarForces, elasticForces } from './pin-truss.js';

/** The least eigenvalue counts as positive above this share of the largest |t / L|: round-off of sums over some thousand bars. */
const POSITIVE = 1e-9;

/** What a self-stress does to the mechanisms. */
export interface PrestressTest {
  /** Eigenvalues of Zᵀ Kg Z, ascending, N/mm, Z orthonormal: all positive, and the mechanisms are held at first order by the self-stress. */
  readonly eigenvalues: readonly number[];
  readonly holds: boolean;
}

/**
 * Zᵀ Kg Z for mechanisms Z (three displacements a node) and bar forces t: Kg of a bar is t/L on the relative displacement of
 * its ends (Calladine and Pellegrino, Int. J. Solids Struct. 27 (1991) 505-515). Mechanisms do not strain bars, so the part along the bar is nought.
 */
export function prestressTest(
  figure: PinFigure,
  axial: ArrayLike<number>,
  mechanisms: readonly Float64Array[],
): PrestressTest {
  const { lengths, units } = barDirections(figure);
  const z = orthonormalise(mechanisms, undefined).vectors;
  const m = Matrix.zeros(z.length, z.length);
  let scale = 0;
  for (let e = 0; e < lengths.length; e++) {
    const q = axial[e] / lengths[e];
    scale = Math.max(scale, Math.abs(q));
    if (q === 0) continue;
    const [a, b] = [3 * figure.ends[2 * e], 3 * figure.ends[2 * e + 1]];
    const relative = z.map((v) => {
      const d = [v[b] - v[a], v[b + 1] - v[a + 1], v[b + 2] - v[a + 2]];
      const along = d[0] * units[3 * e] + d[1] * units[3 * e + 1] + d[2] * units[3 * e + 2];
      return d.map((x, k) => x - along * units[3 * e + k]);
    });
    for (let i = 0; i < z.length; i++)
      for (let j = 0; j <= i; j++) {
        const v =
          q * (relative[i][0] * relative[j][0] + relative[i][1] * relative[j][1] + relative[i][2] * relative[j][2]);
        m.set(i, j, m.get(i, j) + v);
        if (i !== j) m.set(j, i, m.get(i, j));
      }
  }
  const eigenvalues =
    z.length === 0
      ? []
      : new EigenvalueDecomposition(m, { assumeSymmetric: true }).realEigenvalues.sort((p, q) => p - q);
  return { eigenvalues, holds: eigenvalues.length === 0 || eigenvalues[0] > POSITIVE * scale };
}

/** Given bar forces as the part that their loads call for and the part that the bars put on each other. */
export interface ForceSplit {
  /** The elastic answer to the loads that the given forces balance, N. */
  readonly byLoad: Float64Array;
  /** The rest: in equilibrium with no load, N. */
  readonly selfStress: Float64Array;
}

/** Splits t into load part and self-stress, whether or not the figure can move: t balances some load, so that load can be carried. */
export function splitForces(
  figure: PinFigure & { readonly axialStiffness: Float64Array },
  axial: Float64Array,
): ForceSplit {
  const { units } = barDirections(figure);
  const balanced = new Float64Array(figure.nodes.length);
  addBarForces(balanced, figure, units, axial, -1);
  const byLoad = elasticForces(figure, { forces: balanced });
  return { byLoad, selfStress: axial.map((t, e) => t - byLoad[e]) };
}
