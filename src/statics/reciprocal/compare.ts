import { leastSquares } from '../../maths/least-squares.js';
import { multiply, multiplyTransposed } from '../../maths/sparse/multiply.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Topology } from '../../model/topology.js';
import { trussMatrix } from './equilibrium-matrix.js';

export type ForceSource = 'given' | 'reciprocal' | 'analysis';

/** Two sources of member forces held against each other, N by member index. */
export interface ForceComparison {
  readonly first: ForceSource;
  readonly second: ForceSource;
  /** first - second = self-stress part + remainder. */
  readonly difference: Float64Array;
  /** The part that loads nothing: in balance at every node without any load. */
  readonly selfStress: Float64Array;
  /** The rest: the shortest list of forces that leaves the same residuals at the nodes as the difference does. */
  readonly remainder: Float64Array;
  /** Largest difference, and over the largest force of the second source. */
  readonly largest: number;
  readonly relative: number;
}

/**
 * d = t1 - t2 split into its projection on the null space of the equilibrium matrix A (on the supports) and the remainder,
 * which is the shortest solution of A y = A d. Two sources that both balance the same loads differ by self-stress alone.
 */
export function compareForces(
  topology: Topology,
  first: { readonly source: ForceSource; readonly forces: Float64Array },
  second: { readonly source: ForceSource; readonly forces: Float64Array },
): ForceComparison {
  const difference = first.forces.map((t, m) => t - second.forces[m]);
  const { matrix } = trussMatrix(topology, true);
  const map = {
    rows: matrix.rows,
    columns: matrix.columns,
    forward: (t: Float64Array) => multiply(matrix, t),
    back: (r: Float64Array) => multiplyTransposed(matrix, r),
  };
  const remainder = leastSquares(map, map.forward(difference)).x;
  const largest = largestOf(difference);
  const against = largestOf(second.forces);
  return {
    first: first.source,
    second: second.source,
    difference,
    selfStress: difference.map((d, m) => d - remainder[m]),
    remainder,
    largest,
    relative: against > 0 ? largest / against : largest > 0 ? 1 : 0,
  };
}

/**
 * One finding for two sources that differ by more than the residual limit of the largest force; it names the worst strut. An
 * analysis has its own note for that: it knows no self-stress, and its joints may bend.
 */
export function comparisonFindings(topology: Topology, comparison: ForceComparison, limit: number): Finding[] {
  if (comparison.relative <= limit || comparison.second === 'analysis') return [];
  const worst = comparison.difference.reduce((w, d, m, all) => (Math.abs(d) > Math.abs(all[w]) ? m : w), 0);
  const size = largestOf(comparison.difference);
  return [
    finding('forces-differ', 'truss', {
      value: comparison.relative,
      limit,
      about: {
        first: comparison.first,
        second: comparison.second,
        strut: topology.truss.members[worst].mark,
        difference_N: size,
        remainder_N: largestOf(comparison.remainder),
      },
    }),
  ];
}

const largestOf = (values: Float64Array): number => values.reduce((most, v) => Math.max(most, Math.abs(v)), 0);
