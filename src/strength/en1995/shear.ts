import type { MemberActions } from '../../model/solution.js';
import type { Resistance } from '../resistance.js';
import type { MemberToJudge, Verdict } from '../standard.js';
import type { DesignStrengths } from './design.js';

/** kcr of EN 1995-1-1 6.1.7 (2) as amended in 2008: cracks leave two thirds of the width. */
const KCR = 0.67;

/** Shear 6.1.7 (6.13) on the resultant of both directions, torsion 6.1.8 (6.14); kshape as amended in 2014 (from memory). */
export function shearChecks(member: MemberToJudge, r: Resistance, a: MemberActions, f: DesignStrengths): Verdict[] {
  const checks: Verdict[] = [];
  const shear = Math.hypot(a.shearY, a.shearZ);
  if (shear > 0)
    checks.push({
      utilisation: (r.shearPeak * shear) / (KCR * r.area * f.fv),
      rule: 'EN 1995-1-1 6.1.7 (6.13)',
    });
  if (a.torsion !== 0) {
    const { shape } = member;
    const kShape =
      shape.kind === 'rectangle'
        ? Math.min(1 + (0.05 * Math.max(shape.width, shape.height)) / Math.min(shape.width, shape.height), 1.3)
        : 1.2;
    checks.push({ utilisation: Math.abs(a.torsion) / (r.wt * kShape * f.fv), rule: 'EN 1995-1-1 6.1.8 (6.14)' });
  }
  return checks;
}
