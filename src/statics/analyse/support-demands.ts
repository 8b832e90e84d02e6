import type { SupportDemand } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import { GRAVITY } from '../loads/load-case.js';

/** Uplift below this share of all support forces is round-off. */
const ROUND_OFF = 1e-7;
/** Ballast counts as favourable permanent load: EN 1990 table A1.2(A), 0.9 (from memory). */
const BALLAST_FACTOR = 0.9;

/** Uplift, pressure, shear and ballast of every support held in z under reactions of three a node, N. */
export function supportDemands(topology: Topology, combination: string, reactions: Float64Array): SupportDemand[] {
  const all = reactions.reduce((sum, v) => sum + Math.abs(v), 0);
  return topology.truss.supports.flatMap(({ node, fixed }) => {
    if (!fixed.z) return [];
    const i = 3 * topology.nodeIndex.get(node)!;
    const [x, y, z] = [reactions[i]!, reactions[i + 1]!, reactions[i + 2]!];
    const uplift = -z > ROUND_OFF * all ? -z : 0;
    const pressure = z > ROUND_OFF * all ? z : 0;
    const ballast = uplift / (BALLAST_FACTOR * GRAVITY);
    return [{ node, combination, uplift, pressure, shear: Math.hypot(x, y), ballast }];
  });
}

/** The demand that lifts each support most; supports that nothing lifts are left out. In the order in which supports first come. */
export function mostLifted(demands: readonly SupportDemand[]): SupportDemand[] {
  const worst = new Map<string, SupportDemand>();
  for (const d of demands) if (d.uplift > (worst.get(d.node)?.uplift ?? 0)) worst.set(d.node, d);
  return [...new Set(demands.map((d) => d.node))].flatMap((node) => worst.get(node) ?? []);
}
