import { convexHull2 } from '../../maths/convex-hull2.js';
import type { Job } from '../../model/job/index.js';
import type { Overturning } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import type { Combination } from '../loads/combinations.js';
import type { LoadCase } from '../loads/load-case.js';

/**
 * Overturning of the whole about each edge of the hull of its ground supports: moments of the cases that tip it over those
 * that hold it (EN 1990 EQU), the worst of all combinations; null where fewer than three feet make a hull or nothing tips it.
 * A climber of `climber_N` stands at each node in turn beside the favourable permanent cases; 0: none.
 */
export function overturningOf(
  topology: Topology,
  job: Job,
  cases: readonly LoadCase[],
  combinations: readonly Combination[],
  climber_N: number,
): Overturning | null {
  const { truss } = topology;
  const feet = truss.supports.filter((s) => s.fixed.z).map((s) => ({ mark: s.node, at: topology.at(s.node) }));
  const hull = convexHull2(feet.map((f) => [f.at[0], f.at[1]] as const));
  if (hull.length < 3) return null;
  const foot = (p: readonly [number, number]) => feet.find((f) => f.at[0] === p[0] && f.at[1] === p[1])!;
  const { gammaGfavourable, gammaQ } = job.loads;
  let worst: Overturning | null = null;
  for (const [k, p] of hull.entries()) {
    const [a, b] = [foot(p), foot(hull[(k + 1) % hull.length]!)];
    const about = momentAbout(a.at, b.at);
    const moments = cases.map((c) => momentOfCase(topology, c, about));
    const take = (combination: string, parts: readonly number[]): void => {
      const holding = parts.reduce((sum, m) => sum + Math.max(m, 0), 0);
      const tipping = parts.reduce((sum, m) => sum - Math.min(m, 0), 0);
      // No finite figure where nothing holds it: nothing is worse.
      if (worst?.ratio === null || tipping === 0) return;
      const ratio = holding > 0 ? tipping / holding : null;
      if (ratio === null || ratio > (worst?.ratio ?? 0)) worst = { ratio, edge: [a.mark, b.mark], combination };
    };
    for (const { name, factors } of combinations)
      take(
        name,
        factors.map(([i, f]) => f * moments[i]!),
      );
    if (climber_N === 0) continue;
    const standing = moments.flatMap((m, i) => (cases[i]!.duration === 'permanent' ? [gammaGfavourable * m] : []));
    truss.nodes.forEach((node, i) => {
      if (topology.barsAt[i]!.length === 0) return;
      const name = `${standing.length > 0 ? `${gammaGfavourable} G + ` : ''}${gammaQ} climber at ${node.mark}`;
      take(name, [...standing, gammaQ * about(node.at, [0, 0, -climber_N])]);
    });
  }
  return worst;
}

/** Moment of a force at p about the edge from a to b of an anticlockwise hull, N mm; weight inside the hull is positive. */
type MomentAbout = (p: readonly number[], force: readonly number[]) => number;

function momentAbout(a: readonly number[], b: readonly number[]): MomentAbout {
  const l = Math.hypot(b[0]! - a[0]!, b[1]! - a[1]!);
  const e = [(b[0]! - a[0]!) / l, (b[1]! - a[1]!) / l];
  return (p, f) => {
    const r = [p[0]! - a[0]!, p[1]! - a[1]!, p[2]! - a[2]!];
    // -(r x f) . e: a downward force on the left of a to b holds the edge down.
    const m = [r[1]! * f[2]! - r[2]! * f[1]!, r[2]! * f[0]! - r[0]! * f[2]!];
    return -(m[0]! * e[0]! + m[1]! * e[1]!);
  };
}

function momentOfCase(topology: Topology, c: LoadCase, about: MomentAbout): number {
  let sum = 0;
  topology.truss.nodes.forEach((n, i) => {
    sum += about(n.at, [c.nodal[3 * i]!, c.nodal[3 * i + 1]!, c.nodal[3 * i + 2]!]);
  });
  for (const [e, { even }] of c.lines) {
    const [p, q] = topology.truss.members[e]!.ends.map((m) => topology.at(m));
    const middle = [0, 1, 2].map((k) => (p![k]! + q![k]!) / 2);
    sum += about(
      middle,
      even.map((v) => v * topology.axisLength[e]!),
    );
  }
  return sum;
}
