import { dot } from '../../maths/vec3.js';
import type { MemberActions } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import type { FrameMember } from '../frame/member.js';
import type { FrameLoads, FrameResult } from '../frame/solve-frame.js';
import type { LoadCase } from '../loads/load-case.js';
import type { PinLoads, PinResult } from '../pin-truss.js';

/**
 * What one case does to the structure, in a form that adds up linearly: a combination is the same sum of responses.
 * Per member 12 numbers: axial force at the first and second end; at the first end shear y, z, torsion, moment y, z; the even
 * load along local x, y, z; extra mid-span moments about y, z of uneven loads.
 */
export interface Response {
  readonly member: Float64Array;
  /** mm, three a node. */
  readonly displacements: Float64Array;
  /** N, three a node. */
  readonly reactions: Float64Array;
  /** Force that is left over at each node, N, three a node. */
  readonly imbalance: Float64Array;
}
export const PER_MEMBER = 12;

/** Loads of a case on the frame: even loads in local axes, nodal forces with no moments. */
export function frameLoads(c: LoadCase, members: readonly FrameMember[]): FrameLoads {
  const nodal = new Float64Array(2 * c.nodal.length);
  for (let i = 0; i < c.nodal.length; i += 3) nodal.set(c.nodal.subarray(i, i + 3), 2 * i);
  const loads = new Map<number, { line: [number, number, number]; freeElongation: number }>();
  members.forEach((m, e) => {
    const even = c.lines.get(e)?.even;
    const freeElongation = c.freeElongation?.[e] ?? 0;
    if (!even && freeElongation === 0) return;
    const { x, y, z } = m.axes;
    loads.set(e, { line: even ? [dot(even, x), dot(even, y), dot(even, z)] : [0, 0, 0], freeElongation });
  });
  return { nodal, members: loads };
}

/** Loads of a case on the pinned truss: what lies along a member goes to its nodes in halves. */
export function pinLoads(c: LoadCase, topology: Topology, ends: Int32Array): PinLoads {
  const forces = c.nodal.slice();
  for (const [e, { even }] of c.lines)
    for (let s = 0; s < 2; s++)
      for (let k = 0; k < 3; k++) forces[3 * ends[2 * e + s]! + k] += (even[k]! * topology.axisLength[e]!) / 2;
  return { forces, ...(c.freeElongation ? { freeElongation: c.freeElongation } : {}) };
}

export function frameResponse(c: LoadCase, result: FrameResult, members: readonly FrameMember[]): Response {
  const member = new Float64Array(PER_MEMBER * members.length);
  members.forEach((m, e) => {
    const q = result.endForces.subarray(12 * e, 12 * e + 12);
    member.set([-q[0]!, q[6]!, q[1]!, q[2]!, q[3]!, q[4]!, q[5]!], PER_MEMBER * e);
    setLoads(member, e, c, m.axes);
  });
  const displacements = new Float64Array(result.displacements.length / 2);
  const reactions = new Float64Array(result.reactions.length / 2);
  const imbalance = new Float64Array(result.imbalance.length / 2);
  for (let i = 0; i < displacements.length; i += 3) {
    displacements.set(result.displacements.subarray(2 * i, 2 * i + 3), i);
    reactions.set(result.reactions.subarray(2 * i, 2 * i + 3), i);
    imbalance.set(result.imbalance.subarray(2 * i, 2 * i + 3), i);
  }
  return { member, displacements, reactions, imbalance };
}

/** Members of a pinned truss are simple beams under their own load. */
export function pinResponse(
  c: LoadCase,
  result: PinResult,
  topology: Topology,
  axes: readonly FrameMember['axes'][],
): Response {
  const member = new Float64Array(PER_MEMBER * axes.length);
  axes.forEach((a, e) => {
    const at = PER_MEMBER * e;
    setLoads(member, e, c, a);
    const l = topology.axisLength[e]!;
    const t = result.axial[e]!;
    // The nodes carry half of the load along the axis each: the force falls evenly along the member.
    member[at] = t + (member[at + 7]! * l) / 2;
    member[at + 1] = t - (member[at + 7]! * l) / 2;
    member[at + 2] = (-member[at + 8]! * l) / 2;
    member[at + 3] = (-member[at + 9]! * l) / 2;
  });
  const { displacements, reactions, imbalance } = result;
  return { member, displacements, reactions, imbalance };
}

function setLoads(member: Float64Array, e: number, c: LoadCase, axes: FrameMember['axes']): void {
  const line = c.lines.get(e);
  if (!line) return;
  const { even, extraMoment } = line;
  const at = PER_MEMBER * e;
  member.set(
    [dot(even, axes.x), dot(even, axes.y), dot(even, axes.z), dot(extraMoment, axes.z), dot(extraMoment, axes.y)],
    at + 7,
  );
}

/** Sum of responses with factors. */
export function combine(responses: readonly Response[], factors: readonly (readonly [number, number])[]): Response {
  const first = responses[0]!;
  const sum = (pick: (r: Response) => Float64Array): Float64Array => {
    const out = new Float64Array(pick(first).length);
    for (const [i, f] of factors) {
      const v = pick(responses[i]!);
      for (let k = 0; k < out.length; k++) out[k] += f * v[k]!;
    }
    return out;
  };
  return {
    member: sum((r) => r.member),
    displacements: sum((r) => r.displacements),
    reactions: sum((r) => r.reactions),
    imbalance: sum((r) => r.imbalance),
  };
}

/** Axial force of each member at mid-length, N. */
export const axialForces = (r: Response): Float64Array =>
  Float64Array.from(
    { length: r.member.length / PER_MEMBER },
    (_, e) => (r.member[PER_MEMBER * e]! + r.member[PER_MEMBER * e + 1]!) / 2,
  );

/**
 * Actions of member e between `from` and `to` mm along its axis: the axial force of larger size, the largest shears and moments
 * (at the ends, or where the shear vanishes between them), torsion.
 */
export function actionsOf(
  r: Response,
  e: number,
  from: number,
  to: number,
  combination: string,
  duration: MemberActions['duration'],
): MemberActions {
  const [n1, n2, vy, vz, t, my, mz, , wy, wz, extraY, extraZ] = r.member.subarray(
    PER_MEMBER * e,
    PER_MEMBER * e + PER_MEMBER,
  );
  // Forces on the first end: M(x) = -m1 + sign (v x + w x²/2), extreme where v + w x = 0.
  const at = (x: number, m1: number, v: number, w: number, sign: 1 | -1): number =>
    Math.abs(-m1 + sign * (v * x + (w * x * x) / 2));
  const bend = (m1: number, v: number, w: number, sign: 1 | -1): number => {
    const peak = w !== 0 ? -v / w : from;
    const between = peak > from && peak < to ? at(peak, m1, v, w, sign) : 0;
    return Math.max(at(from, m1, v, w, sign), at(to, m1, v, w, sign), between);
  };
  const endMoments = (x: number): readonly [number, number] => [at(x, my, vz, wz, -1), at(x, mz, vy, wy, 1)];
  const shear = (v: number, w: number): number => Math.max(Math.abs(v + w * from), Math.abs(v + w * to));
  return {
    combination,
    axial: Math.abs(n1) >= Math.abs(n2) ? n1 : n2,
    shearY: shear(vy, wy),
    shearZ: shear(vz, wz),
    momentY: bend(my, vz, wz, -1) + Math.abs(extraY),
    momentZ: bend(mz, vy, wy, 1) + Math.abs(extraZ),
    torsion: Math.abs(t),
    duration,
    endMoments: [endMoments(from), endMoments(to)],
  };
}
