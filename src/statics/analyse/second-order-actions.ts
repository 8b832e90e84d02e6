import { dot } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { MemberActions } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import type { FrameMember } from '../frame/member.js';
import { solveSecondOrder } from '../frame/second-order.js';
import { type FrameLoads, type PreparedFrame, prepareFrame } from '../frame/solve-frame.js';
import type { Subdivided } from '../frame/subdivide.js';
import type { Combination } from '../loads/combinations.js';
import type { LoadCase } from '../loads/load-case.js';

export interface SecondOrderActions {
  /** By member index. */
  readonly actions: readonly (readonly MemberActions[])[];
  /** Combinations under which the frame buckles. */
  readonly buckling: readonly string[];
}

/**
 * Actions of second order in every strut, with the lowest buckling shape as initial imperfection in both senses
 * (EN 1993-1-1 5.3.2 (11)): its largest displacement is the job's share of the truss's height, or of the strut's length where one
 * strut bows between its nodes. Stiffness is the design stiffness, `softer` times the mean.
 */
export function secondOrderActions(
  topology: Topology,
  job: Job,
  sub: Subdivided,
  shape: Float64Array,
  cases: readonly LoadCase[],
  combinations: readonly (readonly [combination: Combination, axial: Float64Array, softer: number])[],
): SecondOrderActions {
  const actions: MemberActions[][] = topology.truss.members.map(() => []);
  const buckling: string[] = [];
  const amplitude = job.analysis.imperfection * lengthOfShape(topology, sub, shape);
  const softened = new Map<number, PreparedFrame>();
  for (const [combination, axial, softer] of combinations) {
    const prepared = softened.get(softer) ?? prepareFrame(soften(sub, softer));
    softened.set(softer, prepared);
    if (prepared.state !== 'stiff') continue;
    const loads = elementLoads(sub, cases, combination);
    for (const sign of [1, -1]) {
      const bent = shape.map((v) => sign * amplitude * v);
      const result = solveSecondOrder(prepared, loads, axial, bent);
      if (result.state === 'buckles') {
        buckling.push(combination.name);
        break;
      }
      const name = `${combination.name}, second order`;
      const made = memberActions(topology, sub, loads, result.endForces, name, combination.duration);
      for (const [e, a] of made.entries()) actions[e]!.push(a);
    }
  }
  return { actions, buckling };
}

/** Height of the truss for a shape that moves its nodes, length of the strut for one that bows it between them, mm. */
function lengthOfShape(topology: Topology, sub: Subdivided, shape: Float64Array): number {
  let most = 0;
  for (let i = 0; i < shape.length; i++) if (i % 6 < 3 && Math.abs(shape[i]!) > Math.abs(shape[most]!)) most = i;
  const node = Math.floor(most / 6);
  if (node >= topology.truss.nodes.length) {
    const element = sub.frame.members.findIndex((m) => m.ends[1] === node);
    return topology.axisLength[sub.memberOf[element]!]!;
  }
  const heights = topology.truss.nodes.map((n) => n.at[2]);
  const height = Math.max(...heights) - Math.min(...heights);
  return height > 0 ? height : Math.max(...topology.axisLength);
}

const soften = (sub: Subdivided, by: number) => ({
  ...sub.frame,
  members: sub.frame.members.map(
    (m): FrameMember => ({
      ...m,
      segments: m.segments.map((s) => ({
        length: s.length,
        axial: by * s.axial,
        bendingY: by * s.bendingY,
        bendingZ: by * s.bendingZ,
        torsion: by * s.torsion,
      })),
      springs: m.springs.map((s) => ({ ...s, stiffness: by * s.stiffness })),
    }),
  ),
});

/** A combination's loads on the elements: even loads as they are, free elongations by length. */
function elementLoads(sub: Subdivided, cases: readonly LoadCase[], combination: Combination): FrameLoads {
  const nodal = new Float64Array(sub.frame.fixed.length);
  const members = new Map<number, { line: [number, number, number]; freeElongation: number }>();
  const whole = new Map<number, number>();
  sub.memberOf.forEach((e, k) => {
    whole.set(e, Math.max(whole.get(e) ?? 0, sub.spans[2 * k + 1]!));
  });
  for (const [i, f] of combination.factors) {
    const c = cases[i]!;
    for (let k = 0; k < c.nodal.length; k++) nodal[6 * Math.floor(k / 3) + (k % 3)] += f * c.nodal[k]!;
    sub.memberOf.forEach((e, k) => {
      const even = c.lines.get(e)?.even;
      const free = c.freeElongation?.[e] ?? 0;
      if (!even && free === 0) return;
      const { x, y, z } = sub.frame.members[k]!.axes;
      const old = members.get(k) ?? { line: [0, 0, 0], freeElongation: 0 };
      const share = (sub.spans[2 * k + 1]! - sub.spans[2 * k]!) / whole.get(e)!;
      members.set(k, {
        line: even
          ? [old.line[0] + f * dot(even, x), old.line[1] + f * dot(even, y), old.line[2] + f * dot(even, z)]
          : old.line,
        freeElongation: old.freeElongation + f * free * share,
      });
    });
  }
  return { nodal, members };
}

/** Per member the extremes over its elements' ends; a line load adds its moment on one element as a simple beam. */
function memberActions(
  topology: Topology,
  sub: Subdivided,
  loads: FrameLoads,
  endForces: Float64Array,
  combination: string,
  duration: MemberActions['duration'],
): MemberActions[] {
  const out = topology.truss.members.map((): { -readonly [K in keyof MemberActions]: MemberActions[K] } => ({
    combination,
    axial: 0,
    shearY: 0,
    shearZ: 0,
    momentY: 0,
    momentZ: 0,
    torsion: 0,
    duration,
  }));
  sub.memberOf.forEach((e, k) => {
    const q = endForces.subarray(12 * k, 12 * k + 12);
    const length = sub.spans[2 * k + 1]! - sub.spans[2 * k]!;
    const [, wy, wz] = loads.members?.get(k)?.line ?? [0, 0, 0];
    const a = out[e]!;
    const larger = (i: number, extra = 0): number => Math.max(Math.abs(q[i]!), Math.abs(q[6 + i]!)) + Math.abs(extra);
    for (const n of [-q[0]!, q[6]!]) if (Math.abs(n) > Math.abs(a.axial)) a.axial = n;
    a.shearY = Math.max(a.shearY, larger(1));
    a.shearZ = Math.max(a.shearZ, larger(2));
    a.torsion = Math.max(a.torsion, larger(3));
    a.momentY = Math.max(a.momentY, larger(4, (wz * length ** 2) / 8));
    a.momentZ = Math.max(a.momentZ, larger(5, (wy * length ** 2) / 8));
  });
  return out;
}
