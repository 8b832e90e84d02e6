import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import type { SectionShape } from '../../src/model/section.js';
import type { MemberActions } from '../../src/model/solution.js';
import { EN_1995 } from '../../src/strength/en1995/index.js';
import { betaC, kc, relativeSlenderness } from '../../src/strength/en1995/kc.js';
import { kh } from '../../src/strength/en1995/kh.js';

const MPA_PER_PSI = 6894.757293168e-6;
const timber = (name: string) => MATERIALS.get(name)!;
const none: MemberActions = {
  combination: 'given',
  axial: 0,
  shearY: 0,
  shearZ: 0,
  momentY: 0,
  momentZ: 0,
  torsion: 0,
  duration: 'medium',
};
const dry = { serviceClass: 2, factor: 3 } as const;

describe('kc, EN 1995-1-1 6.3.2', () => {
  // Computed independently with numpy from (6.21) to (6.29); betac 0.2 seen in Porteous & Kermani, Structural Timber Design to
  // Eurocode 5; 0.1 for glulam from memory. Strengths: EN 338:2016, EN 14080:2013.
  const table: readonly (readonly [number, number, number, number])[] = [
    [20, 0.99124298776887, 0.9962702505357366, 0.9979671849046327],
    [40, 0.8866984573272058, 0.9051037547341311, 0.9481633642554147],
    [60, 0.676373045478124, 0.7257353995106667, 0.8033048211852493],
    [80, 0.4496122060288108, 0.5014228778492748, 0.5449542999354675],
    [100, 0.3051521830678685, 0.3446257156416082, 0.36542246750372953],
    [120, 0.21813856704467133, 0.24754556911805134, 0.2587493429071294],
    [150, 0.1429987318853916, 0.1627857778570751, 0.16806114491726964],
    [200, 0.08213604769559008, 0.09370165860124519, 0.09568522576146567],
  ];
  for (const [lambda, ...wanted] of table)
    for (const [i, name] of ['C24', 'D40', 'GL24h'].entries())
      it(`${name} at slenderness ${lambda}, in MPa and in psi`, () => {
        const { strength, modulus05, family } = timber(name);
        for (const unit of [1, MPA_PER_PSI]) {
          const rel = relativeSlenderness(lambda, strength['fc0k']! / unit, modulus05! / unit);
          expect(kc(rel, betaC(family))).toBeCloseTo(wanted[i]!, 10);
        }
      });
});

describe('Porteous & Kermani, Structural Timber Design to Eurocode 5, example 5.7.3', () => {
  // Inputs, lambda_z = 129.9 and the verdict "less than unity" seen; the other values computed independently with numpy.
  const shape: SectionShape = { kind: 'rectangle', width: 100, height: 200 };
  // The book's edition of EN 338 has fv,k = 2.5; this example has no shear, so the edition makes no difference.
  const member = { shape, material: timber('C24'), bucklingLength: 3750 };
  const axial = -39750;

  it('6.24 governs at 0.963', () => {
    const verdict = EN_1995.judge(member, { ...none, axial, momentY: 0.99375e6, momentZ: 0.3975e6 }, dry);
    expect(verdict.rule).toBe('EN 1995-1-1 6.3.2 (6.24)');
    expect(verdict.utilisation).toBeCloseTo(0.9634047579416449, 10);
  });

  it('is the same with the section lying on its side', () => {
    const turned = { ...member, shape: { kind: 'rectangle', width: 200, height: 100 } as const };
    const verdict = EN_1995.judge(turned, { ...none, axial, momentZ: 0.99375e6, momentY: 0.3975e6 }, dry);
    expect(verdict.rule).toBe('EN 1995-1-1 6.3.2 (6.23)');
    expect(verdict.utilisation).toBeCloseTo(0.9634047579416449, 10);
  });

  it('stocky, 6.19 governs instead', () => {
    const short = { ...member, bucklingLength: 400 };
    const verdict = EN_1995.judge(short, { ...none, axial, momentY: 0.99375e6, momentZ: 0.3975e6 }, dry);
    expect(verdict.rule).toBe('EN 1995-1-1 6.2.4 (6.19)');
    expect(verdict.utilisation).toBeCloseTo(0.17669763346541986, 10);
  });

  it('kh of a side of 100 mm is 1.0845, and 1 above 150 mm', () => {
    expect(kh('timber', 100, 350)).toBeCloseTo(1.0844717711976986, 12);
    expect(kh('timber', 200, 350)).toBe(1);
    expect(kh('timber', 20, 350)).toBe(1.3);
    expect(kh('timber', 100, 710)).toBe(1);
  });
});

it('a D40 round bar of 12 x 300 mm carries 648 N for a medium time', () => {
  // Computed independently with numpy: lambda 100, lambda_rel 1.5842, kc 0.3446, fc,0,d 16.6154.
  const member = { shape: { kind: 'round', diameter: 12 } as const, material: timber('D40'), bucklingLength: 300 };
  const { utilisation, rule } = EN_1995.judge(member, { ...none, axial: -647.6053878374541 }, dry);
  expect(utilisation).toBeCloseTo(1, 12);
  expect(rule).toBe('EN 1995-1-1 6.3.2 (6.23)');
});
