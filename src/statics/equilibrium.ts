import { add, addScaled, cross, length, mean, subtract, type Vec3, ZERO } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import { ROUND_OFF } from '../model/tolerance.js';
import { sizeOf, type Topology } from '../model/topology.js';
import { GIVEN_CASE } from '../model/truss.js';

/** How well member forces balance the loads of one case on the supports. */
export interface Equilibrium {
  readonly case: string;
  /** Largest residual force at a node, N. */
  readonly maxResidual: number;
  /** Largest residual over the largest member force at its node. */
  readonly maxRelative: number;
  /** By node index: what is left of member forces + loads + reactions, N. */
  readonly residuals: readonly Vec3[];
  readonly relative: Float64Array;
  /** Supported nodes, in the file's order: the force that the support gives to the node, N, in its held directions. */
  readonly reactions: readonly { readonly node: string; readonly force: Vec3 }[];
  /** Of all loads and reactions: resultant force in N and moment about the nodes' mean in N mm. */
  readonly whole: { readonly force: Vec3; readonly moment: Vec3; readonly relative: number };
  readonly findings: readonly Finding[];
}

export interface ResidualLimits {
  /** Both relative: residual over the largest member force at the node. */
  readonly residualWarn: number;
  readonly residualStop: number;
}

/**
 * R_i = sum t_e u_e + p_i + r_i at every node: member forces `forces` (N by member index, tension positive, so that a
 * member pulls its node towards its far end), loads p of the case, reactions r that take up what is left in the
 * directions held. Then the balance of the whole, sum (p + r) = 0 and sum x cross (p + r) = 0.
 *
 * The residual is held against the largest member force at the node. A node whose members carry no force beside the
 * rest of the truss (or none at all) is held against its load, or against round-off of the largest force.
 */
export function equilibriumOf(
  topology: Topology,
  forces: Float64Array,
  limits: ResidualLimits,
  caseName: string = GIVEN_CASE,
): Equilibrium {
  const { truss } = topology;
  const loads = loadsOf(topology, caseName);
  const largest = forces.reduce((most, force) => Math.max(most, Math.abs(force)), 0);
  const floor = ROUND_OFF.forceScale.value * largest;

  const held = new Map(truss.supports.map((s) => [s.node, s.fixed]));
  const residuals: Vec3[] = [];
  const outer: Vec3[] = [];
  const reactions: { node: string; force: Vec3 }[] = [];
  const relative = new Float64Array(truss.nodes.length);
  truss.nodes.forEach((node, i) => {
    let pull: Vec3 = loads[i]!;
    let strongest = 0;
    for (const bar of topology.barsAt[i]!) {
      pull = addScaled(pull, bar.direction, forces[bar.memberIndex]!);
      strongest = Math.max(strongest, Math.abs(forces[bar.memberIndex]!));
    }
    const fixed = held.get(node.mark);
    const reaction: Vec3 = fixed ? [fixed.x ? -pull[0] : 0, fixed.y ? -pull[1] : 0, fixed.z ? -pull[2] : 0] : ZERO;
    // 0 and not -0 in the held directions.
    if (fixed) reactions.push({ node: node.mark, force: [reaction[0] + 0, reaction[1] + 0, reaction[2] + 0] });
    residuals.push(add(pull, reaction));
    outer.push(add(loads[i]!, reaction));
    relative[i] = ratio(length(residuals[i]!), strongest > floor ? strongest : Math.max(floor, length(loads[i]!)));
  });

  const whole = balanceOfWhole(topology, outer, largest);
  const findings = [
    ...truss.nodes.flatMap((node, i) =>
      judged(relative[i]!, limits, (level, limit) =>
        finding('node-out-of-balance', node.mark, {
          level,
          value: relative[i]!,
          limit,
          about: { residual_N: length(residuals[i]!) },
        }),
      ),
    ),
    ...judged(whole.relative, limits, (level, limit) =>
      finding('truss-out-of-balance', 'truss', { level, value: whole.relative, limit }),
    ),
  ];
  return {
    case: caseName,
    maxResidual: residuals.reduce((most, r) => Math.max(most, length(r)), 0),
    maxRelative: relative.reduce((most, r) => Math.max(most, r), 0),
    residuals,
    relative,
    reactions,
    whole,
    findings,
  };
}

/** Loads of one case by node index, N; several on one node add up. */
export function loadsOf(topology: Topology, caseName: string): Vec3[] {
  const loads: Vec3[] = topology.truss.nodes.map(() => ZERO);
  for (const load of topology.truss.loads) {
    if (load.case !== caseName) continue;
    const i = topology.nodeIndex.get(load.node)!;
    loads[i] = add(loads[i]!, load.force);
  }
  return loads;
}

/** Held against all loads and reactions together, and never against less than the largest member force: in a truss that
 * only stresses itself the reactions are round-off. */
export function balanceOfWhole(topology: Topology, outer: readonly Vec3[], largestForce: number): Equilibrium['whole'] {
  const { nodes } = topology.truss;
  const centre = mean(nodes.map((n) => n.at));
  let [force, moment]: [Vec3, Vec3] = [ZERO, ZERO];
  let total = 0;
  outer.forEach((p, i) => {
    force = add(force, p);
    moment = add(moment, cross(subtract(nodes[i]!.at, centre), p));
    total += length(p);
  });
  const size = sizeOf(topology.truss);
  const against = Math.max(total, largestForce);
  const relative = Math.max(ratio(length(force), against), ratio(length(moment), against * size));
  return { force, moment, relative };
}

function judged(
  value: number,
  limits: ResidualLimits,
  make: (level: 'warn' | 'stop', limit: number) => Finding,
): Finding[] {
  if (value > limits.residualStop) return [make('stop', limits.residualStop)];
  if (value > limits.residualWarn) return [make('warn', limits.residualWarn)];
  return [];
}

/** a / b; 0 where there is nothing to hold against and nothing left over. */
export const ratio = (a: number, b: number): number => (b > 0 ? a / b : a > 0 ? 1 : 0);
