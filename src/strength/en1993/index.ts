import type { MemberActions } from '../../model/solution.js';
import { type Resistance, resistanceOf } from '../resistance.js';
import { governing, lacking, type MemberToJudge, type Standard, type Verdict } from '../standard.js';
import { type BucklingCurve, chi, IMPERFECTION } from './chi.js';
import { sectionClass } from './section-class.js';
import { GAMMA_M1_SHELL, wallBuckling } from './shell-buckling.js';

/** Recommended partial factors, EN 1993-1-1 6.1 (1), note 2B. */
const GAMMA_M0 = 1;
const GAMMA_M1 = 1;
/** Shear above this share of its resistance lowers the yield strength for bending, EN 1993-1-1 6.2.8 (2). */
const SMALL_SHEAR = 0.5;

const curveOf = (buckling: string | undefined): BucklingCurve =>
  buckling !== undefined && buckling in IMPERFECTION ? (buckling as BucklingCurve) : 'c';

/**
 * EN 1993-1-1:2005, round tubes and solid round and rectangular bars: 6.2.3 to 6.2.7, 6.2.8, the linear sum of 6.2.1 (7),
 * buckling 6.3.1 with curves a0 to d, and 6.3.3 with annex B and equivalent moment factors of 1. Lateral buckling of thin flat bars is not covered.
 * Tubes of class 4 (6.2.2.5 (5) sends them to EN 1993-1-6) yield no further than their wall buckles, in pressure, bending and shear.
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
    return null;
  },
  judge(member, actions) {
    const r = resistanceOf(member.shape);
    const steel = steelOf(member);
    const checks = crossSection(member, r, actions, steel);
    if (actions.axial < 0) checks.push(buckling(member, r, actions, steel));
    return governing(checks);
  },
};

/** Stresses that the steel of one member may reach, MPa. */
interface Steel {
  readonly class: 1 | 2 | 3 | 4;
  /** In tension. */
  readonly fy: number;
  /** In pressure and bending; below fy in class 4. */
  readonly pressed: number;
  /** In shear, times sqrt(3). */
  readonly sheared: number;
  /** Exponents of the interaction of pressure and shear in class 4: kx = 1 + chi_x², ktau = 1.5 + 0.5 chi_tau², the lower of those that the editions of EN 1993-1-6 8.5.3 have (from memory). */
  readonly interaction: readonly [number, number] | null;
}

function steelOf({ shape, material }: MemberToJudge): Steel {
  const fy = material.strength['fy']!;
  const kind = sectionClass(shape, fy, material.modulus);
  if (kind !== 4 || shape.kind !== 'tube') return { class: kind, fy, pressed: fy, sheared: fy, interaction: null };
  const { axial, shear } = wallBuckling(shape.diameter, shape.wall, fy, material.modulus);
  return {
    class: 4,
    fy,
    pressed: (axial * fy) / GAMMA_M1_SHELL,
    sheared: (shear * fy) / GAMMA_M1_SHELL,
    interaction: [1 + axial ** 2, 1.5 + 0.5 * shear ** 2],
  };
}

/** Bending ratio: plastic for class 1 and 2; a round section takes the resultant. */
function bent(steel: Steel, r: Resistance, a: MemberActions, stress: number): number {
  const plastic = steel.class <= 2;
  const y = Math.abs(a.momentY) / (plastic ? r.wply : r.wy) / stress;
  const z = Math.abs(a.momentZ) / (plastic ? r.wplz : r.wz) / stress;
  return r.round ? Math.hypot(y, z) : y + z;
}

function crossSection(member: MemberToJudge, r: Resistance, a: MemberActions, steel: Steel): Verdict[] {
  const limit = a.axial >= 0 ? steel.fy : steel.pressed;
  const axial = (Math.abs(a.axial) * GAMMA_M0) / (r.area * limit);
  // Av = 2A/pi for a round tube, A for solid bars: EN 1993-1-1 6.2.6 (3).
  const av = member.shape.kind === 'tube' ? (2 * r.area) / Math.PI : r.area;
  const stress = Math.sqrt(3) * (Math.hypot(a.shearY, a.shearZ) / av + Math.abs(a.torsion) / r.wt);
  const shear = (GAMMA_M0 * stress) / steel.sheared;
  const lowered = shear > SMALL_SHEAR ? steel.pressed * (1 - Math.min(1, (2 * shear - 1) ** 2)) : steel.pressed;
  const moment = a.momentY === 0 && a.momentZ === 0 ? 0 : GAMMA_M0 * (lowered > 0 ? bent(steel, r, a, lowered) : 1);
  const plain = a.axial >= 0 ? 'EN 1993-1-1 6.2.3 (6.5)' : 'EN 1993-1-1 6.2.4 (6.9)';
  const rule = moment === 0 ? plain : axial === 0 ? 'EN 1993-1-1 6.2.5 (6.12)' : 'EN 1993-1-1 6.2.1 (6.2)';
  const { interaction } = steel;
  const wall = 'EN 1993-1-6 8.5.2, D.1';
  const checks = [
    { utilisation: axial + moment, rule: interaction && (a.axial < 0 || moment > 0) ? wall : rule },
    {
      utilisation: shear,
      rule: interaction ? wall : a.torsion === 0 ? 'EN 1993-1-1 6.2.6 (6.17)' : 'EN 1993-1-1 6.2.7 (6.23)',
    },
  ];
  if (interaction && shear > 0)
    checks.push({
      utilisation: (axial + moment) ** interaction[0] + shear ** interaction[1],
      rule: 'EN 1993-1-6 8.5.3 (8.19)',
    });
  return checks;
}

/**
 * 6.3.1 alone, or 6.3.3 (6.61) with kyy of table B.1 and Cm = 1; the moment about both axes is put on the axis that buckles first, which is safe.
 * In class 4 with the stress that the wall bears in place of the yield strength.
 */
function buckling(member: MemberToJudge, r: Resistance, a: MemberActions, steel: Steel): Verdict {
  const { material } = member;
  const fy = steel.pressed;
  const euler = (Math.PI ** 2 * material.modulus * r.area * Math.min(r.iy, r.iz) ** 2) / member.bucklingLength ** 2;
  const lambda = Math.sqrt((r.area * fy) / euler);
  const n = (-a.axial * GAMMA_M1) / (chi(lambda, curveOf(material.buckling)) * r.area * fy);
  const wall = steel.class === 4 ? ' with EN 1993-1-6 D.1' : '';
  if (a.momentY === 0 && a.momentZ === 0) return { utilisation: n, rule: `EN 1993-1-1 6.3.1 (6.46)${wall}` };
  const k = steel.class <= 2 ? 1 + Math.max(0, Math.min(lambda - 0.2, 0.8)) * n : 1 + Math.min(0.6 * lambda, 0.6) * n;
  return { utilisation: n + GAMMA_M1 * k * bent(steel, r, a, fy), rule: `EN 1993-1-1 6.3.3 (6.61)${wall}` };
}
