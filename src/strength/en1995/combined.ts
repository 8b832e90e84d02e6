import type { Resistance } from '../resistance.js';
import type { MemberToJudge, Verdict } from '../standard.js';
import type { DesignStrengths } from './design.js';
import { betaC, kc, relativeSlenderness, STOCKY } from './kc.js';
import { criticalBending, kcrit } from './kcrit.js';

/** km of EN 1995-1-1 6.1.6 (2): rectangles of solid timber and glulam 0.7, other shapes 1. */
const KM = { rectangle: 0.7, other: 1 } as const;

/** Stresses, MPa: axial with tension positive, bending absolute. */
export interface Stresses {
  readonly axial: number;
  readonly my: number;
  readonly mz: number;
}

/** Bending ratios: a round bar takes the resultant of its two moments. */
function bending(r: Resistance, s: Stresses, f: DesignStrengths): readonly [string, number][] {
  const [y, z] = [s.my / f.fmy, s.mz / f.fmz];
  if (r.round) return [['', Math.hypot(y, z)]];
  return [
    ['first', y + KM.rectangle * z],
    ['second', KM.rectangle * y + z],
  ];
}

/** Tension with bending: EN 1995-1-1 6.2.3 (6.17), (6.18); alone 6.1.2 (6.1); bending alone 6.1.6 (6.11), (6.12). */
export function tensionChecks(r: Resistance, s: Stresses, f: DesignStrengths): Verdict[] {
  const axial = s.axial / f.ft0;
  if (s.my === 0 && s.mz === 0) return [{ utilisation: axial, rule: 'EN 1995-1-1 6.1.2 (6.1)' }];
  return bending(r, s, f).map(([which, m]) => ({
    utilisation: axial + m,
    rule:
      s.axial === 0
        ? `EN 1995-1-1 6.1.6 (${which === 'second' ? '6.12' : '6.11'})`
        : `EN 1995-1-1 6.2.3 (${which === 'second' ? '6.18' : '6.17'})`,
  }));
}

/** Compression, with bending or without: EN 1995-1-1 6.3.2 (6.23), (6.24); stocky 6.1.4 (6.2), 6.2.4 (6.19), (6.20). */
export function compressionChecks(member: MemberToJudge, r: Resistance, s: Stresses, f: DesignStrengths): Verdict[] {
  const { material } = member;
  const fc0k = material.strength['fc0k']!;
  const ratio = -s.axial / f.fc0;
  const lambda = [r.iy, r.iz].map((i) => relativeSlenderness(member.bucklingLength / i, fc0k, material.modulus05!));
  const bent = bending(r, s, f);
  if (lambda.every((l) => l <= STOCKY)) {
    if (s.my === 0 && s.mz === 0) return [{ utilisation: ratio, rule: 'EN 1995-1-1 6.1.4 (6.2)' }];
    return bent.map(([which, m]) => ({
      utilisation: ratio ** 2 + m,
      rule: `EN 1995-1-1 6.2.4 (${which === 'second' ? '6.20' : '6.19'})`,
    }));
  }
  const beta = betaC(material.family);
  const [ky, kz] = [kc(lambda[0]!, beta), kc(lambda[1]!, beta)];
  if (r.round) return [{ utilisation: ratio / ky + bent[0]![1], rule: 'EN 1995-1-1 6.3.2 (6.23)' }];
  return [
    { utilisation: ratio / ky + bent[0]![1], rule: 'EN 1995-1-1 6.3.2 (6.23)' },
    { utilisation: ratio / kz + bent[1]![1], rule: 'EN 1995-1-1 6.3.2 (6.24)' },
  ];
}

/** Lateral buckling of a rectangle bent about its strong axis, with compression or without: EN 1995-1-1 6.3.3 (6.33), (6.35). The unbraced length is the buckling length. */
export function lateralChecks(member: MemberToJudge, r: Resistance, s: Stresses, f: DesignStrengths): Verdict[] {
  const { shape, material } = member;
  // A square has no strong axis to buckle from.
  if (shape.kind !== 'rectangle' || shape.width === shape.height) return [];
  const strongIsY = shape.height > shape.width;
  const [b, h] = strongIsY ? [shape.width, shape.height] : [shape.height, shape.width];
  const [stress, strength] = strongIsY ? [s.my, f.fmy] : [s.mz, f.fmz];
  if (stress === 0) return [];
  const fmk = material.strength['fmk']!;
  const lambdaM = Math.sqrt(fmk / criticalBending(b, h, member.bucklingLength, material.modulus05!));
  const bent = stress / (kcrit(lambdaM) * strength);
  if (s.axial >= 0) return [{ utilisation: bent, rule: 'EN 1995-1-1 6.3.3 (6.33)' }];
  const weak = strongIsY ? r.iz : r.iy;
  const lambda = relativeSlenderness(member.bucklingLength / weak, material.strength['fc0k']!, material.modulus05!);
  const axial = -s.axial / (kc(lambda, betaC(material.family)) * f.fc0);
  return [{ utilisation: bent ** 2 + axial, rule: 'EN 1995-1-1 6.3.3 (6.35)' }];
}
