import type { MemberActions } from '../../model/solution.js';
import { type Resistance, resistanceOf } from '../resistance.js';
import { governing, lacking, type MemberToJudge, type Standard, type Verdict } from '../standard.js';
import { type BucklingCurve, chi, IMPERFECTION } from './chi.js';
import { sectionClass } from './section-class.js';

/** Recommended partial factors, EN 1993-1-1 6.1 (1), note 2B. */
const GAMMA_M0 = 1;
const GAMMA_M1 = 1;
/** Shear above this share of its resistance lowers the yield strength for bending, EN 1993-1-1 6.2.8 (2). */
const SMALL_SHEAR = 0.5;

const curveOf = (buckling: string | undefined): BucklingCurve =>
  buckling !== undefined && buckling in IMPERFECTION ? (buckling as BucklingCurve) : 'c';

/**
 * EN 1993-1-1:2005, round tubes of class 1 to 3 and solid round and rectangular bars: 6.2.3 to 6.2.7, 6.2.8, the linear sum of 6.2.1 (7),
 * buckling 6.3.1 with curves a0 to d, and 6.3.3 with annex B and equivalent moment factors of 1. Lateral buckling of thin flat bars is not covered.
 */
export const EN_1993: Standard = {
  name: 'EN 1993-1-1',
  missing: (material) => lacking(material, ['fy', 'fu']),
  outOfScope({ shape, material }) {
    if (material.family !== 'steel') return 'it covers steel alone';
    const thick =
      shape.kind === 'tube'
        ? shape.wall
        : shape.kind === 'round'
          ? shape.diameter
          : Math.min(shape.width, shape.height);
    if (material.thickest !== undefined && thick > material.thickest)
      return `${thick} mm is thicker than the ${material.thickest} mm that its yield strength holds for`;
    return sectionClass(shape, material.strength['fy']!) === 4
      ? 'the tube is of class 4 (d/t above 90 epsilon²)'
      : null;
  },
  judge(member, actions) {
    const r = resistanceOf(member.shape);
    const fy = member.material.strength['fy']!;
    const checks = crossSection(member, r, actions, fy);
    if (actions.axial < 0) checks.push(buckling(member, r, actions, fy));
    return governing(checks);
  },
};

/** Bending ratio: plastic for class 1 and 2; a round section takes the resultant. */
function bent(member: MemberToJudge, r: Resistance, a: MemberActions, fy: number): number {
  const plastic = sectionClass(member.shape, member.material.strength['fy']!) <= 2;
  const y = Math.abs(a.momentY) / (plastic ? r.wply : r.wy) / fy;
  const z = Math.abs(a.momentZ) / (plastic ? r.wplz : r.wz) / fy;
  return r.round ? Math.hypot(y, z) : y + z;
}

function crossSection(member: MemberToJudge, r: Resistance, a: MemberActions, fy: number): Verdict[] {
  const axial = (Math.abs(a.axial) * GAMMA_M0) / (r.area * fy);
  // Av = 2A/pi for a round tube, A for solid bars: EN 1993-1-1 6.2.6 (3).
  const av = member.shape.kind === 'tube' ? (2 * r.area) / Math.PI : r.area;
  const shear = (GAMMA_M0 * Math.sqrt(3) * (Math.hypot(a.shearY, a.shearZ) / av + Math.abs(a.torsion) / r.wt)) / fy;
  const lowered = shear > SMALL_SHEAR ? fy * (1 - Math.min(1, (2 * shear - 1) ** 2)) : fy;
  const moment = a.momentY === 0 && a.momentZ === 0 ? 0 : GAMMA_M0 * (lowered > 0 ? bent(member, r, a, lowered) : 1);
  const plain = a.axial >= 0 ? 'EN 1993-1-1 6.2.3 (6.5)' : 'EN 1993-1-1 6.2.4 (6.9)';
  const rule = moment === 0 ? plain : axial === 0 ? 'EN 1993-1-1 6.2.5 (6.12)' : 'EN 1993-1-1 6.2.1 (6.2)';
  return [
    { utilisation: axial + moment, rule },
    { utilisation: shear, rule: a.torsion === 0 ? 'EN 1993-1-1 6.2.6 (6.17)' : 'EN 1993-1-1 6.2.7 (6.23)' },
  ];
}

/** 6.3.1 alone, or 6.3.3 (6.61) with kyy of table B.1 and Cm = 1; the moment about both axes is put on the axis that buckles first, which is safe. */
function buckling(member: MemberToJudge, r: Resistance, a: MemberActions, fy: number): Verdict {
  const { material, shape } = member;
  const euler = (Math.PI ** 2 * material.modulus * r.area * Math.min(r.iy, r.iz) ** 2) / member.bucklingLength ** 2;
  const lambda = Math.sqrt((r.area * fy) / euler);
  const n = (-a.axial * GAMMA_M1) / (chi(lambda, curveOf(material.buckling)) * r.area * fy);
  if (a.momentY === 0 && a.momentZ === 0) return { utilisation: n, rule: 'EN 1993-1-1 6.3.1 (6.46)' };
  const plastic = sectionClass(shape, fy) <= 2;
  const k = plastic ? 1 + Math.max(0, Math.min(lambda - 0.2, 0.8)) * n : 1 + Math.min(0.6 * lambda, 0.6) * n;
  return { utilisation: n + GAMMA_M1 * k * bent(member, r, a, fy), rule: 'EN 1993-1-1 6.3.3 (6.61)' };
}
