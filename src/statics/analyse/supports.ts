import { convexHull2 } from '../../maths/convex-hull2.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import type { Combination } from '../loads/combinations.js';
import { GRAVITY, type LoadCase } from '../loads/load-case.js';
import type { Response } from './response.js';

/** Uplift below this share of all support forces is round-off. */
const ROUND_OFF = 1e-7;
/** Ballast counts as favourable permanent load: EN 1990 table A1.2(A), 0.9 (from memory). */
const BALLAST_FACTOR = 0.9;

/** A model on a table may be fixed to it in any way; what stands outdoors or hangs over people must say how. */
const peopleNear = (job: Job): boolean => job.use === 'outdoor' || job.use === 'overhead';

/** Worst uplift of each support that stands on the ground (held in z), with its shear and what it needs. */
export function upliftFindings(
  topology: Topology,
  job: Job,
  combinations: readonly Combination[],
  responses: readonly Response[],
): Finding[] {
  const found: Finding[] = [];
  const { anchorage } = job.loads;
  for (const { node, fixed } of topology.truss.supports) {
    if (!fixed.z) continue;
    const i = topology.nodeIndex.get(node)!;
    let worst: { uplift: number; shear: number; combination: string } | null = null;
    responses.forEach((r, c) => {
      const [x, y, z] = [r.reactions[3 * i]!, r.reactions[3 * i + 1]!, r.reactions[3 * i + 2]!];
      const all = r.reactions.reduce((sum, v) => sum + Math.abs(v), 0);
      if (-z > ROUND_OFF * all && -z > (worst?.uplift ?? 0))
        worst = { uplift: -z, shear: Math.hypot(x, y), combination: combinations[c]!.name };
    });
    if (!worst) continue;
    const { uplift, shear, combination } = worst as { uplift: number; shear: number; combination: string };
    const about = { combination, shear_N: shear, ballast_kg: uplift / (BALLAST_FACTOR * GRAVITY) };
    const holds = anchorage?.kind === 'ground-contact' ? 0 : anchorage?.capacity_N;
    if (holds !== undefined && uplift > holds)
      found.push(finding('support-uplift', node, { value: uplift, limit: holds, about }));
    else
      found.push(
        finding('support-anchor', node, {
          level: anchorage || !peopleNear(job) ? 'note' : 'warn',
          value: uplift,
          about,
        }),
      );
  }
  return found;
}

/**
 * Overturning of the whole about each edge of the hull of its ground supports: moments of the cases that tip it over those
 * that hold it down (EQU, EN 1990 6.4.1). Only where nothing but its own weight holds it: anchors are judged by their uplift.
 */
export function overturningFindings(
  topology: Topology,
  job: Job,
  cases: readonly LoadCase[],
  combinations: readonly Combination[],
): Finding[] {
  if (job.loads.anchorage && job.loads.anchorage.kind !== 'ground-contact') return [];
  const { truss } = topology;
  const feet = truss.supports.filter((s) => s.fixed.z).map((s) => ({ mark: s.node, at: topology.at(s.node) }));
  const hull = convexHull2(feet.map((f) => [f.at[0], f.at[1]] as const));
  if (hull.length < 3) return [];
  const foot = (p: readonly [number, number]) => feet.find((f) => f.at[0] === p[0] && f.at[1] === p[1])!;
  let worst: { ratio: number; edge: string; combination: string } | null = null;
  hull.forEach((p, k) => {
    const [a, b] = [foot(p), foot(hull[(k + 1) % hull.length]!)];
    const moments = cases.map((c) => momentAbout(topology, c, a.at, b.at));
    for (const { name, factors } of combinations) {
      let [holding, tipping] = [0, 0];
      for (const [i, f] of factors) {
        const m = f * moments[i]!;
        if (m > 0) holding += m;
        else tipping -= m;
      }
      const ratio = holding > 0 ? tipping / holding : tipping > 0 ? Infinity : 0;
      if (ratio > 1 && ratio > (worst?.ratio ?? 0)) worst = { ratio, edge: `${a.mark}-${b.mark}`, combination: name };
    }
  });
  if (!worst) return [];
  const { ratio, edge, combination } = worst as { ratio: number; edge: string; combination: string };
  return [
    finding('truss-overturns', 'truss', {
      level: peopleNear(job) ? 'stop' : 'note',
      value: ratio,
      limit: 1,
      about: { edge, combination },
    }),
  ];
}

/** Moment of a case about the edge from a to b of an anticlockwise hull, N mm; weight inside the hull is positive. */
function momentAbout(topology: Topology, c: LoadCase, a: readonly number[], b: readonly number[]): number {
  const l = Math.hypot(b[0]! - a[0]!, b[1]! - a[1]!);
  const e = [(b[0]! - a[0]!) / l, (b[1]! - a[1]!) / l];
  const of = (p: readonly number[], f: readonly number[]): number => {
    const r = [p[0]! - a[0]!, p[1]! - a[1]!, p[2]! - a[2]!];
    // -(r x f) . e: a downward force on the left of a to b holds the edge down.
    const m = [r[1]! * f[2]! - r[2]! * f[1]!, r[2]! * f[0]! - r[0]! * f[2]!];
    return -(m[0]! * e[0]! + m[1]! * e[1]!);
  };
  let sum = 0;
  topology.truss.nodes.forEach((n, i) => {
    sum += of(n.at, [c.nodal[3 * i]!, c.nodal[3 * i + 1]!, c.nodal[3 * i + 2]!]);
  });
  for (const [e2, { even }] of c.lines) {
    const [p, q] = topology.truss.members[e2]!.ends.map((m) => topology.at(m));
    const middle = [0, 1, 2].map((k) => (p![k]! + q![k]!) / 2);
    sum += of(
      middle,
      even.map((v) => v * topology.axisLength[e2]!),
    );
  }
  return sum;
}
