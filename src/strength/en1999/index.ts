import type { MemberActions } from '../../model/solution.js';
import { wallBuckling } from '../en1993/shell-buckling.js';
import { type Resistance, resistanceOf } from '../resistance.js';
import { governing, lacking, type MemberToJudge, type Standard, type Verdict } from '../standard.js';
import { type BucklingClass, chi } from './chi.js';
import { effectiveThickness } from './effective-thickness.js';
import { sectionClass } from './section-class.js';

/** EN 1999-1-1 table 6.1: seen in published training examples. */
const GAMMA_M1 = 1.1;
/** Exponents of 6.2.9.2 for hollow sections and of 6.3.3.1 (3), (6.62). */
const HOLLOW = { section: 1.3, axial: 0.8, biaxial: 1.7 } as const;

const classOf = (buckling: string | undefined): BucklingClass => (buckling === 'A' ? 'A' : 'B');

/**
 * EN 1999-1-1:2007, tubes and bars without welds: 6.2.3, 6.2.4, 6.2.6, 6.2.9, 6.3.1, 6.3.3.1. A tube of class 4 counts with its effective
 * thickness (6.1.5) all round, though in bending only its pressed side buckles; in shear its wall bears no more than a steel one's share.
 */
export const EN_1999: Standard = {
  name: 'EN 1999-1-1',
  missing: (material) => lacking(material, ['fo', 'fu']),
  outOfScope({ shape, material }) {
    if (material.family !== 'aluminium') return 'it covers aluminium alone';
    const thick =
      shape.kind === 'tube'
        ? shape.wall
        : shape.kind === 'round'
          ? shape.diameter
          : Math.min(shape.width, shape.height);
    if (material.thickest !== undefined && thick > material.thickest)
      return `${thick} mm is thicker than the ${material.thickest} mm that its proof strength holds for`;
    return null;
  },
  judge(member, actions) {
    const r = resistanceOf(member.shape);
    const fo = member.material.strength['fo']! / GAMMA_M1;
    const left = effective(member);
    const checks = crossSection(r, actions, fo, left);
    if (actions.axial < 0) checks.push(buckling(member, r, actions, fo, left.pressed));
    return governing(checks);
  },
};

/** What local buckling leaves of a section in pressure and bending, and of its shear. */
interface Effective {
  readonly pressed: number;
  readonly sheared: number;
}

function effective({ shape, material }: MemberToJudge): Effective {
  const alloy = { fo: material.strength['fo']!, modulus: material.modulus, buckling: classOf(material.buckling) };
  if (shape.kind !== 'tube' || sectionClass(shape, alloy) < 4) return { pressed: 1, sheared: 1 };
  return {
    pressed: effectiveThickness(shape.diameter, shape.wall, alloy),
    sheared: wallBuckling(shape.diameter, shape.wall, alloy.fo, alloy.modulus).shear,
  };
}

/** ((My/MyRd)^1.7 + (Mz/MzRd)^1.7)^0.6; a round section takes the resultant. Elastic moduli (shape factor 1): safe for every class up to 3. */
function bent(r: Resistance, a: MemberActions, fo: number): number {
  const [y, z] = [Math.abs(a.momentY) / (r.wy * fo), Math.abs(a.momentZ) / (r.wz * fo)];
  return r.round ? Math.hypot(y, z) : (y ** HOLLOW.biaxial + z ** HOLLOW.biaxial) ** 0.6;
}

function crossSection(r: Resistance, a: MemberActions, fo: number, left: Effective): Verdict[] {
  const axial = Math.abs(a.axial) / (r.area * fo * (a.axial < 0 ? left.pressed : 1));
  const moment = bent(r, a, fo * left.pressed);
  const shear =
    (Math.sqrt(3) * ((r.shearPeak * Math.hypot(a.shearY, a.shearZ)) / r.area + Math.abs(a.torsion) / r.wt)) /
    (fo * left.sheared);
  const plain = a.axial >= 0 ? 'EN 1999-1-1 6.2.3 (6.18)' : 'EN 1999-1-1 6.2.4 (6.22)';
  return [
    moment === 0
      ? { utilisation: axial, rule: plain }
      : {
          utilisation: axial === 0 ? moment : axial ** HOLLOW.section + moment,
          rule: axial === 0 ? 'EN 1999-1-1 6.2.5 (6.24)' : 'EN 1999-1-1 6.2.9 (6.43)',
        },
    { utilisation: shear, rule: a.torsion === 0 ? 'EN 1999-1-1 6.2.6 (6.28)' : 'EN 1999-1-1 6.2.7 (6.34)' },
  ];
}

function buckling(member: MemberToJudge, r: Resistance, a: MemberActions, full: number, left: number): Verdict {
  const { material } = member;
  const euler = (Math.PI ** 2 * material.modulus * r.area * Math.min(r.iy, r.iz) ** 2) / member.bucklingLength ** 2;
  // kappa and the heat-affected zone are 1; the effective area goes into resistance and slenderness, 6.3.1.2 (6.51).
  const fo = full * left;
  const lambda = Math.sqrt((r.area * left * material.strength['fo']!) / euler);
  const n = -a.axial / (chi(lambda, classOf(material.buckling)) * r.area * fo);
  const moment = bent(r, a, fo);
  return moment === 0
    ? { utilisation: n, rule: 'EN 1999-1-1 6.3.1 (6.49)' }
    : { utilisation: n ** HOLLOW.axial + moment, rule: 'EN 1999-1-1 6.3.3.1 (6.62)' };
}
