import { type Analysis, analyse } from '../../maths/sparse/analyse.js';
import type { SparseMatrix } from '../../maths/sparse/csc.js';
import { type Factor, factorise } from '../../maths/sparse/factorise.js';
import { leastScaledEigenvalue } from '../../maths/sparse/least-eigenvalue.js';
import { solve } from '../../maths/sparse/solve.js';
import { blockPoints, type Freedoms, gather, numberFreedoms, spread } from '../freedoms.js';
import { assembleFrame } from './assemble.js';
import { chainStiffness, fixedEndForces, type MemberLoad } from './chain-stiffness.js';
import type { Frame, FrameMember } from './member.js';
import { toGlobal, vectorToGlobal, vectorToLocal } from './rotate.js';

/** Pivots below this share of their own diagonal entry call for a closer look. */
export const DOUBTFUL_PIVOT = 1e-6;
/** Least eigenvalue of the scaled stiffness below which the frame can move: rigid modes stay under 1e-16, flexible ones above 6e-10. */
export const SINGULAR = 1e-13;

/** Loads of one case on a frame. */
export interface FrameLoads {
  /** N and N mm, six a node. */
  readonly nodal: Float64Array;
  /** Loads along members, by the member's index; absent: none. */
  readonly members?: ReadonlyMap<number, MemberLoad>;
}

export interface FrameResult {
  /** mm and rad, six a node. */
  readonly displacements: Float64Array;
  /** Forces of the nodes on each member, 12 a member in its local axes: N, N mm. Axial force is the 7th, tension positive. */
  readonly endForces: Float64Array;
  /** What the supports give, six a node: N, N mm. */
  readonly reactions: Float64Array;
  /** What is left of member end forces and loads at the free freedoms, six a node: N, N mm. */
  readonly imbalance: Float64Array;
  readonly residual: number;
}

/** A frame's stiffness, factorised once; or the node that it can move at. */
export type PreparedFrame =
  | {
      readonly state: 'stiff';
      readonly frame: Frame;
      readonly freedoms: Freedoms;
      readonly local: readonly Float64Array[];
      readonly stiffness: SparseMatrix;
      readonly analysis: Analysis;
      readonly factor: Factor;
    }
  | { readonly state: 'mechanism'; readonly node: number };

/** Assembles and factorises the stiffness of a space frame (McGuire, Gallagher and Ziemian 2000, ch. 4 and 5). */
export function prepareFrame(frame: Frame): PreparedFrame {
  const freedoms = numberFreedoms(frame.fixed, 6);
  const made = new Map<FrameMember['segments'], Float64Array>();
  const local = frame.members.map((m) => {
    const known = m.springs.length === 0 ? made.get(m.segments) : undefined;
    const k = known ?? chainStiffness(m);
    if (m.springs.length === 0) made.set(m.segments, k);
    return k;
  });
  const stiffness = assembleFrame(frame, freedoms, (e) => toGlobal(frame.members[e], local[e]));
  const options = { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, frame.nodes) };
  const analysis = analyse(stiffness, options);
  const factor = factorise(analysis, stiffness);
  const nodeOf = (freedom: number): number => Math.floor(freedoms.of.indexOf(freedom) / 6);
  if (factor.state === 'zero pivot') return { state: 'mechanism', node: nodeOf(factor.stoppedAt) };
  if (factor.pivotRatio < DOUBTFUL_PIVOT) {
    const least = leastScaledEigenvalue(stiffness, options);
    if (least.value < SINGULAR) return { state: 'mechanism', node: nodeOf(indexOfLargest(least.vector)) };
  }
  return { state: 'stiff', frame, freedoms, local, stiffness, analysis, factor };
}

/** Displacements, end forces and reactions of a prepared frame under each case. */
export function solveFrame(
  prepared: Extract<PreparedFrame, { state: 'stiff' }>,
  cases: readonly FrameLoads[],
): FrameResult[] {
  const { frame, freedoms, local, stiffness, factor } = prepared;
  const held = cases.map((c) => {
    const forces = new Map<number, Float64Array>();
    for (const [e, load] of c.members ?? []) forces.set(e, fixedEndForces(frame.members[e], load));
    return forces;
  });
  const right = cases.map((c, i) => {
    const p = c.nodal.slice();
    for (const [e, q] of held[i]) addEnds(p, frame, e, vectorToGlobal(frame.members[e], q), -1);
    return gather(freedoms, p);
  });
  const { x, residual } = solve(factor, stiffness, right);
  return cases.map((c, i) => {
    const displacements = spread(freedoms, x[i]);
    const endForces = new Float64Array(12 * frame.members.length);
    const balance = c.nodal.map((v) => -v);
    frame.members.forEach((m, e) => {
      const d = vectorToLocal(m, endsOf(displacements, m.ends));
      const q = held[i].get(e)?.slice() ?? new Float64Array(12);
      for (let r = 0; r < 12; r++) for (let k = 0; k < 12; k++) q[r] += local[e][12 * r + k] * d[k];
      endForces.set(q, 12 * e);
      addEnds(balance, frame, e, vectorToGlobal(m, q), 1);
    });
    return {
      displacements,
      endForces,
      reactions: balance.map((v, k) => (frame.fixed[k] ? v + 0 : 0)),
      imbalance: balance.map((v, k) => (frame.fixed[k] ? 0 : 0 - v)),
      residual: residual[i],
    };
  });
}

function endsOf(d: Float64Array, ends: readonly [number, number]): Float64Array {
  const out = new Float64Array(12);
  out.set(d.subarray(6 * ends[0], 6 * ends[0] + 6));
  out.set(d.subarray(6 * ends[1], 6 * ends[1] + 6), 6);
  return out;
}

function addEnds(p: Float64Array, frame: Frame, e: number, q: Float64Array, sign: 1 | -1): void {
  const { ends } = frame.members[e];
  for (let i = 0; i < 12; i++) p[6 * ends[i < 6 ? 0 : 1] + (i % 6)] += sign * q[i];
}

function indexOfLargest(v: Float64Array): number {
  let at = 0;
  v.forEach((x, i) => {
    if (Math.abs(x) > Math.abs(v[at])) at = i;
  });
  return at;
}
