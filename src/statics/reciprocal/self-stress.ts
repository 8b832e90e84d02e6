import { eliminateColumns } from '../../maths/sparse/column-elimination.js';
import { rightNullSpace } from '../../maths/sparse/null-space.js';
import { midpoint, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { equilibriumMatrix } from './equilibrium-matrix.js';

/** Singular values up to this are round-off: those of sound figures lie above 1e-2. */
const ROUND_OFF_CUT = 1e-9;

/**
 * Number of states of self-stress of the pin-jointed figure, as a free body or on its supports: the columns of the equilibrium
 * matrix (unit directions) that depend on others. Singular values up to `cut` count as nought: by elimination where only
 * round-off is to be let pass, else from the singular values themselves.
 */
export function selfStressStates(topology: Topology, supported: boolean, cut: number): number {
  const { matrix, row } = equilibriumMatrix(topology, supported);
  const { members, nodes } = topology.truss;
  const middles = members.map((m) => midpoint(topology.at(m.ends[0]), topology.at(m.ends[1])));
  if (cut > ROUND_OFF_CUT) {
    const nulls = rightNullSpace(matrix, { points: Float64Array.from(middles.flatMap((p) => [...p])) });
    return nulls.vectors.length + nulls.next.filter((n) => n.value <= cut).length;
  }
  // Swept along the longest axis, columns and rows alike, the fill stays low.
  const axis = longestAxis(middles);
  const order = members.map((_, m) => m).sort((a, b) => middles[a][axis] - middles[b][axis] || a - b);
  const rank = new Float64Array(matrix.rows);
  row.forEach((r, f) => {
    if (r >= 0) rank[r] = nodes[Math.floor(f / 3)].at[axis];
  });
  return eliminateColumns(matrix, order, rank).dependent.length;
}

function longestAxis(points: readonly Vec3[]): 0 | 1 | 2 {
  const extent = [0, 1, 2].map((k) => {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const p of points) [low, high] = [Math.min(low, p[k]), Math.max(high, p[k])];
    return high - low;
  });
  return extent[0] >= extent[1] && extent[0] >= extent[2] ? 0 : extent[1] >= extent[2] ? 1 : 2;
}
