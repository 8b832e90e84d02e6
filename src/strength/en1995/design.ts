import { gammaM, kMod } from '../../model/catalogue/timber-factors.js';
import type { MemberActions } from '../../model/solution.js';
import type { MemberToJudge, Rules } from '../standard.js';
import { kh } from './kh.js';

/** Design strengths, MPa: Xd = kmod Xk / gammaM, EN 1995-1-1 (2.14), with kh where the clause allows it. */
export interface DesignStrengths {
  readonly ft0: number;
  readonly fc0: number;
  readonly fc90: number;
  readonly fmy: number;
  readonly fmz: number;
  readonly fv: number;
}

/** Design strengths of a member. kh is for rectangles alone (3.2 (3) speaks of solid rectangular sections): a round bar has 1. */
export function designStrengths(
  member: MemberToJudge,
  duration: MemberActions['duration'],
  rules: Rules,
): DesignStrengths {
  const { material, shape } = member;
  const f = material.strength;
  const factor = kMod(rules.serviceClass, duration) / gammaM(material.family);
  const depth = (d: number): number => kh(material.family, d, material.densityK ?? Number.POSITIVE_INFINITY);
  const [ty, tz, tt] =
    shape.kind === 'rectangle'
      ? [depth(shape.height), depth(shape.width), depth(Math.max(shape.width, shape.height))]
      : [1, 1, 1];
  return {
    ft0: factor * f['ft0k']! * tt,
    fc0: factor * f['fc0k']!,
    fc90: factor * (f['fc90k'] ?? 0),
    fmy: factor * f['fmk']! * ty,
    fmz: factor * f['fmk']! * tz,
    fv: factor * f['fvk']!,
  };
}
