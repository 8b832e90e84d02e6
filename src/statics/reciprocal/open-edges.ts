import { length } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { loadsOf } from '../equilibrium.js';
import type { EdgeTable } from './edges.js';

/**
 * Edges along which cells of the file may be open to the outside: two open cells meet there, and a load or a support acts at both ends, so that the
 * lines of action and the edge span the face that is not there. Any other opening is a fault.
 */
export function openEdgesOf(
  topology: Topology,
  table: EdgeTable,
  cells: readonly { readonly faces: readonly number[] }[],
): Set<number> {
  const acted = loadsOf(topology, GIVEN_CASE).map((p) => length(p) > 0);
  if (!acted.includes(true)) return new Set();
  for (const { node } of topology.truss.supports) acted[topology.nodeIndex.get(node)!] = true;
  const rims = new Map<number, number>();
  for (const cell of cells) {
    const count = new Map<number, number>();
    for (const f of new Set(cell.faces)) for (const e of table.faceEdges[f]) count.set(e, (count.get(e) ?? 0) + 1);
    for (const [e, n] of count) if (n === 1) rims.set(e, (rims.get(e) ?? 0) + 1);
  }
  return new Set([...rims].flatMap(([e, n]) => (n === 2 && acted[table.from[e]] && acted[table.to[e]] ? [e] : [])));
}
