import { add, length, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { balanceOfWhole, type Equilibrium, ratio } from '../equilibrium.js';
import type { LoadCase } from '../loads/load-case.js';
import { axialForces, type Response } from './response.js';

/**
 * How well the analysis balances one case: what its member end forces, loads and reactions leave over at each node, and
 * the balance of all loads with all reactions. Bending and line loads are in it, which axial forces alone would miss.
 */
export function equilibriumOfCase(topology: Topology, c: LoadCase, r: Response): Equilibrium {
  const { nodes, members, supports } = topology.truss;
  const triple = (v: Float64Array, i: number): Vec3 => [v[3 * i]! + 0, v[3 * i + 1]! + 0, v[3 * i + 2]! + 0];
  const axial = axialForces(r);
  const largest = axial.reduce((most, t) => Math.max(most, Math.abs(t)), 0);
  const residuals = nodes.map((_, i) => triple(r.imbalance, i));
  const relative = Float64Array.from(nodes, (_, i) => {
    const strongest = topology.barsAt[i]!.reduce((most, b) => Math.max(most, Math.abs(axial[b.memberIndex]!)), 0);
    return ratio(length(residuals[i]!), Math.max(strongest, 1e-9 * largest));
  });
  const outer = nodes.map((_, i) => add(triple(c.nodal, i), triple(r.reactions, i)));
  // Even loads act at mid-length: halves at the ends have the same resultant and moment.
  for (const [e, { even }] of c.lines)
    for (const mark of members[e]!.ends) {
      const i = topology.nodeIndex.get(mark)!;
      const half = topology.axisLength[e]! / 2;
      outer[i] = add(outer[i]!, [even[0] * half, even[1] * half, even[2] * half]);
    }
  return {
    case: c.name,
    maxResidual: residuals.reduce((most, v) => Math.max(most, length(v)), 0),
    maxRelative: relative.reduce((most, v) => Math.max(most, v), 0),
    residuals,
    relative,
    reactions: supports.map(({ node }) => ({ node, force: triple(r.reactions, topology.nodeIndex.get(node)!) })),
    whole: balanceOfWhole(topology, outer, largest),
    findings: [],
  };
}
