import { length, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';
import type { ForceTerm } from './force-terms.js';

/**
 * Balance of the loaded and supported nodes of an open complex in the directions that no support holds:
 * sum of t_e u_e = -p, one term a direction. The other nodes are in balance
 * whatever the diagram; a load inside asks what no diagram of these cells can give.
 */
export function equilibriumTerms(
  topology: Topology,
  complex: CellComplex,
  loads: readonly Vec3[],
  weight: number,
): ForceTerm[] {
  const { truss } = topology;
  const edgeOf = new Int32Array(truss.members.length).fill(-1);
  complex.member.forEach((m, e) => {
    if (m >= 0) edgeOf[m] = e;
  });
  const fixed = new Map(truss.supports.map((s) => [s.node, s.fixed]));
  const open = new Set(complex.openEdges.flatMap((e) => [complex.from[e], complex.to[e]]));
  return truss.nodes.flatMap((node, i) => {
    if (!open.has(i) && length(loads[i]) === 0) return [];
    const held = fixed.get(node.mark);
    const bars = topology.barsAt[i].filter((bar) => edgeOf[bar.memberIndex] >= 0);
    return ([0, 1, 2] as const).flatMap((axis): ForceTerm[] => {
      if (held && [held.x, held.y, held.z][axis]) return [];
      return [
        {
          edges: bars.map((bar) => edgeOf[bar.memberIndex]),
          coefficients: bars.map((bar) => bar.direction[axis]),
          target: -loads[i][axis],
          weight,
        },
      ];
    });
  });
}
