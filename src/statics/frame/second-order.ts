import { factorise } from '../../maths/sparse/factorise.js';
import { multiplySymmetric } from '../../maths/sparse/multiply.js';
import { solve } from '../../maths/sparse/solve.js';
import { gather, spread } from '../freedoms.js';
import { fixedEndForces } from './chain-stiffness.js';
import { frameGeometric } from './frame-buckling.js';
import { geometricStiffness } from './geometric-stiffness.js';
import { vectorToGlobal, vectorToLocal } from './rotate.js';
import type { FrameLoads, PreparedFrame } from './solve-frame.js';

/** Rounds in which the axial forces are taken from the deformed frame; the second changes them by parts of a thousand. */
const ROUNDS = 3;

export type SecondOrder =
  | {
      readonly state: 'stands';
      /** mm and rad beyond the imperfection, six a node. */
      readonly displacements: Float64Array;
      /** As in a first-order result, on the deformed frame: 12 a member, local axes. */
      readonly endForces: Float64Array;
      readonly residual: number;
    }
  /** K + Kg is not positive definite: the loads exceed the buckling load. */
  | { readonly state: 'buckles' };

/**
 * Second-order analysis of a subdivided frame with an initial imperfection d0 (six a node): (K + Kg) d = f - Kg d0, the
 * axial forces of Kg taken from the solution in turn (EN 1993-1-1 5.2.2, 5.3.2 (11); McGuire, Gallagher and Ziemian 2000, ch. 9).
 * `axial`: first-order force of each member, N.
 */
export function solveSecondOrder(
  prepared: Extract<PreparedFrame, { state: 'stiff' }>,
  loads: FrameLoads,
  axial: ArrayLike<number>,
  imperfection: Float64Array,
): SecondOrder {
  const { frame, freedoms, local, stiffness, analysis } = prepared;
  const held = new Map<number, Float64Array>();
  const p = loads.nodal.slice();
  for (const [e, load] of loads.members ?? []) {
    const q = fixedEndForces(frame.members[e], load);
    held.set(e, q);
    const global = vectorToGlobal(frame.members[e], q);
    for (let i = 0; i < 12; i++) p[6 * frame.members[e].ends[i < 6 ? 0 : 1] + (i % 6)] -= global[i];
  }
  const f = gather(freedoms, p);
  const d0 = gather(freedoms, imperfection);
  let forces = Float64Array.from(axial);
  for (let round = 1; ; round++) {
    const kg = frameGeometric(prepared, forces);
    const tangent = { ...stiffness, values: stiffness.values.map((v, k) => v + kg.values[k]) };
    const factor = factorise(analysis, tangent);
    if (factor.state !== 'factorised' || factor.negative > 0) return { state: 'buckles' };
    const push = multiplySymmetric(kg, d0);
    const { x, residual } = solve(factor, tangent, [f.map((v, i) => v - push[i])]);
    const displacements = spread(freedoms, x[0]);
    const endForces = new Float64Array(12 * frame.members.length);
    const next = new Float64Array(frame.members.length);
    frame.members.forEach((m, e) => {
      const ends = (v: Float64Array): Float64Array => {
        const out = new Float64Array(12);
        out.set(v.subarray(6 * m.ends[0], 6 * m.ends[0] + 6));
        out.set(v.subarray(6 * m.ends[1], 6 * m.ends[1] + 6), 6);
        return vectorToLocal(m, out);
      };
      const d = ends(displacements);
      const bent = ends(imperfection).map((v, i) => v + d[i]);
      const g = geometricStiffness(m, forces[e]);
      const q = endForces.subarray(12 * e, 12 * e + 12);
      q.set(held.get(e) ?? new Float64Array(12));
      for (let r = 0; r < 12; r++)
        for (let c = 0; c < 12; c++) q[r] += local[e][12 * r + c] * d[c] + g[12 * r + c] * bent[c];
      next[e] = (q[6] - q[0]) / 2;
    });
    if (round === ROUNDS) return { state: 'stands', displacements, endForces, residual: residual[0] };
    forces = next;
  }
}
