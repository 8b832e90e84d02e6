import { fromTriplets, type SparseMatrix } from '../../maths/sparse/csc.js';
import type { Topology } from '../../model/topology.js';

/** Rows of the equilibrium matrix: a free freedom each. */
export interface EquilibriumMatrix {
  /** A, with A t + p = 0: entry u of a strut at a node in an axis, a column a strut. */
  readonly matrix: SparseMatrix;
  /** Row of freedom 3 node + axis; -1 where it is held. */
  readonly row: Int32Array;
}

/** Of unit directions; on its supports, or as a free body. */
export function equilibriumMatrix(topology: Topology, supported: boolean): EquilibriumMatrix {
  const { truss } = topology;
  const row = new Int32Array(3 * truss.nodes.length);
  if (supported) {
    for (const { node, fixed } of truss.supports) {
      const i = 3 * topology.nodeIndex.get(node)!;
      for (const [axis, held] of [fixed.x, fixed.y, fixed.z].entries()) if (held) row[i + axis] = -1;
    }
  }
  let count = 0;
  for (let i = 0; i < row.length; i++) if (row[i] === 0) row[i] = count++;
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  topology.barsAt.forEach((bars, node) => {
    for (const bar of bars) {
      for (const axis of [0, 1, 2] as const) {
        if (row[3 * node + axis] < 0) continue;
        rows.push(row[3 * node + axis]);
        columns.push(bar.memberIndex);
        values.push(bar.direction[axis]);
      }
    }
  });
  return { matrix: fromTriplets(count, truss.members.length, rows, columns, values), row };
}
