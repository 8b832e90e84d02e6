import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import type { Material } from '../../src/model/material.js';
import type { SectionShape } from '../../src/model/section.js';
import type { MemberActions } from '../../src/model/solution.js';
import { axialOnly } from '../../src/strength/actions.js';
import { ALLOWABLE } from '../../src/strength/allowable.js';
import { EN_1993 } from '../../src/strength/en1993/index.js';
import { EN_1995 } from '../../src/strength/en1995/index.js';
import { EN_1999 } from '../../src/strength/en1999/index.js';
import type { Standard } from '../../src/strength/standard.js';
import type { Rotation } from './motions.js';
import { holdEverywhere, type PublishedCheck, type UnitSystem } from './unit-systems.js';

/**
 * A utilisation by a standard whose formulas hold in any consistent units, with the section lying either way: a turn that takes the first
 * axis elsewhere exchanges width and height, y and z; a round section takes its moment about any axis.
 */
function used(
  standard: Standard,
  shape: SectionShape,
  material: string,
  bucklingLength: number,
  actions: Partial<MemberActions>,
): PublishedCheck['value'] {
  return (s, r) => {
    const stress = s.newton / s.mm ** 2;
    const turned = Math.abs(r[0]) < 0.5;
    const given = { ...axialOnly('given', 0, 'medium'), ...actions };
    const [my, mz] = turnedMoments(shape, given, r, turned);
    const [vy, vz] = turned ? [given.shearZ, given.shearY] : [given.shearY, given.shearZ];
    const m = MATERIALS.get(material)!;
    const inSystem: Material = {
      ...m,
      // Above 700 kg/m³ timber has no kh, whose 150 mm would not be 150 in.
      ...(m.densityK === undefined ? {} : { densityK: 710 }),
      modulus: m.modulus * stress,
      ...(m.modulus05 === undefined ? {} : { modulus05: m.modulus05 * stress }),
      ...(m.thickest === undefined ? {} : { thickest: m.thickest * s.mm }),
      strength: Object.fromEntries(Object.entries(m.strength).map(([k, v]) => [k, v * stress])),
    };
    const member = { shape: inUnits(shape, s, turned), material: inSystem, bucklingLength: bucklingLength * s.mm };
    const scaled: MemberActions = {
      ...given,
      axial: given.axial * s.newton,
      shearY: vy * s.newton,
      shearZ: vz * s.newton,
      momentY: my * s.newton * s.mm,
      momentZ: mz * s.newton * s.mm,
    };
    return standard.judge(member, scaled, { serviceClass: 2, factor: 3 }).utilisation;
  };
}

function turnedMoments(shape: SectionShape, a: MemberActions, r: Rotation, turned: boolean): readonly [number, number] {
  if (shape.kind === 'rectangle') return turned ? [a.momentZ, a.momentY] : [a.momentY, a.momentZ];
  const angle = Math.atan2(r[1], r[0] + 0.3);
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return [c * a.momentY - s * a.momentZ, s * a.momentY + c * a.momentZ];
}

function inUnits(shape: SectionShape, { mm }: UnitSystem, turned: boolean): SectionShape {
  if (shape.kind === 'rectangle') {
    const [width, height] = turned ? [shape.height, shape.width] : [shape.width, shape.height];
    return { kind: 'rectangle', width: width * mm, height: height * mm };
  }
  if (shape.kind === 'tube') return { kind: 'tube', diameter: shape.diameter * mm, wall: shape.wall * mm };
  return { kind: 'round', diameter: shape.diameter * mm };
}

const row = (name: string, wanted: number, value: PublishedCheck['value'], within = 1e-9): PublishedCheck => ({
  name,
  wanted,
  dimension: 'number',
  within,
  turns: 'any',
  value,
});
const tube = (diameter: number, wall: number): SectionShape => ({ kind: 'tube', diameter, wall });
const round = (diameter: number): SectionShape => ({ kind: 'round', diameter });
const bar = (width: number, height: number): SectionShape => ({ kind: 'rectangle', width, height });

// EN 1993-1-1 6.3.1: A 325.09 mm², i 14.101 mm, N by numpy from (6.46) to (6.50), alpha seen in copies of the standard.
holdEverywhere('EN 1993-1-1, a tube of 42.4 x 2.6 mm, 2 m, just carries', [
  row(
    '28.13 kN of S235 by curve a',
    1,
    used(EN_1993, tube(42.4, 2.6), 'S235H-hot', 2000, { axial: -28125.8158106052 }),
  ),
  row(
    '29.50 kN of S355 by curve a',
    1,
    used(EN_1993, tube(42.4, 2.6), 'S355H-hot', 2000, { axial: -29496.09664021527 }),
  ),
  row('25.71 kN of S355 by curve c', 1, used(EN_1993, tube(42.4, 2.6), 'S355H-cold', 2000, { axial: -25710 }), 1e-3),
]);

/*
 * Beam-column by hand, EN 1993-1-1 6.3.3 (6.61) with kyy of table B.1 (class 1): tube 42.4 x 2.6, S235, 2 m, curve a, N = 10 kN, M = 0.2 kNm.
 * chi A fy = 28,125.8 N, n = 10,000 / 28,125.8 = 0.355545; lambda 1.510 so kyy = 1 + 0.8 n = 1.284436;
 * Wpl = (42.4³ - 37.2³)/6 = (76,225.024 - 51,478.848)/6 = 4,124.363 mm³, Mpl = 969,225 N mm; 0.2e6 / 969,225 = 0.206350.
 * Sum 0.355545 + 1.284436 x 0.206350 = 0.620589 (the same sums in Python).
 */
holdEverywhere('EN 1993-1-1 6.3.3, the same tube bent and pressed', [
  row(
    '10 kN with 0.2 kNm use 0.6206, about any axis',
    0.620589147276778,
    used(EN_1993, tube(42.4, 2.6), 'S235H-hot', 2000, { axial: -10000, momentY: 2e5 }),
    1e-9,
  ),
  row(
    'bending alone uses M / Wpl fy',
    2e5 / (((42.4 ** 3 - 37.2 ** 3) / 6) * 235),
    used(EN_1993, tube(42.4, 2.6), 'S235H-hot', 2000, { momentZ: 2e5 }),
  ),
  row(
    'shear alone uses V √3 / ((2A/π) fy), Av of 6.2.6 (3)',
    (20000 * Math.sqrt(3)) / (((2 * (Math.PI / 4) * (42.4 ** 2 - 37.2 ** 2)) / Math.PI) * 235),
    used(EN_1993, tube(42.4, 2.6), 'S235H-hot', 2000, { shearY: 20000 }),
  ),
]);

// EN 1999-1-1 6.3.1: numpy, gammaM1 1.1 (seen in TALAT 9.2), alpha and lambda0 of class A seen in TALAT 2301.
holdEverywhere('EN 1999-1-1, a tube of 25 x 2 mm, 1 m, just carries', [
  row('5.25 kN of 6060-T6', 1, used(EN_1999, tube(25, 2), '6060-T6', 1000, { axial: -5252.380836349753 })),
  row('5.50 kN of 6082-T6', 1, used(EN_1999, tube(25, 2), '6082-T6', 1000, { axial: -5500 }), 1e-3),
]);

/*
 * EN 1995-1-1 without kh, which asks for mm: timber above 700 kg/m³ has none. (6.21) to (6.29), (6.23), (6.24) worked in Python apart from the program.
 * C24's strengths, 160 x 200, 3.5 m, N = 80 kN, My = 4 kNm about the strong, Mz = 1 kNm about the weak axis; medium, class 2: kmod 0.8, gammaM 1.3:
 * fc 12.9231, fm 14.7692. sigma_c = 80,000 / 32,000 = 2.5. iz = 46.188: lambda 75.777, rel 1.284939, kc 0.490711; iy = 57.735: rel 1.027951, kc 0.668504.
 * sigma_my = 4e6 / (160 x 200²/6) = 3.75, sigma_mz = 1e6 / (200 x 160²/6) = 1.171875.
 * (6.24): 2.5/(0.490711 x 12.9231) + 0.7 x 3.75/14.7692 + 1.171875/14.7692 = 0.651309; (6.23): 0.598829.
 */
holdEverywhere('EN 1995-1-1 6.3.2 by hand, without kh', [
  row(
    'C24 of 160 x 200 mm, 3.5 m, 80 kN with 4 and 1 kNm: (6.24) at 0.6513',
    0.6513087363536464,
    used(EN_1995, bar(160, 200), 'C24', 3500, { axial: -80000, momentY: 4e6, momentZ: 1e6 }),
    1e-9,
  ),
  row(
    'a D40 round bar of 12 x 300 mm carries 648 N',
    1,
    used(EN_1995, round(12), 'D40', 300, { axial: -647.6053878374541 }),
  ),
  row(
    // fc as above, pi/4 144 = 113.097; sigma 300/113.097 = 2.652592, /(0.344626 x 16.615385) = 0.463255; W = pi 12³/32 = 169.646, fm = 24.615385:
    // 1500/169.646/24.615385 = 0.359204. Sum 0.822449.
    'the same under 300 N with 1.5 Nm about any axis: 0.8224',
    0.8224489296432032,
    used(EN_1995, round(12), 'D40', 300, { axial: -300, momentY: 1500 }),
    1e-9,
  ),
  row(
    // 6.2.3 (6.17): ft 24 x 0.8/1.3 = 14.769231; 800/113.097/14.769231 = 0.478938; + 1000/169.646/24.615385 = 0.239470.
    'pulled by 800 N with 1 Nm: (6.17) at 0.7184',
    0.7184077292342499,
    used(EN_1995, round(12), 'D40', 300, { axial: 800, momentZ: 1000 }),
    1e-9,
  ),
  row(
    // 6.1.7 (6.13) with kcr 0.67 of A1:2008: 1.5 x 10,000 / (0.67 x 32,000) / (4.0 x 0.8 / 1.3) = 0.284223.
    'C24 of 160 x 200 mm under a shear of 10 kN: (6.13) at 0.2842',
    0.28422341417910446,
    used(EN_1995, bar(160, 200), 'C24', 3500, { shearZ: 10000 }),
    1e-9,
  ),
]);

/*
 * Rankine's sum (any old textbook of strength) for a beech dowel of 8 x 300 mm: values of the catalogue, so that the formula alone is held.
 */
const BEECH = MATERIALS.get('beech-dowel')!;
const EULER_8 = (Math.PI ** 2 * BEECH.modulus * ((Math.PI / 64) * 8 ** 4)) / 300 ** 2;
const CRUSH_8 = (Math.PI / 4) * 64 * BEECH.strength['fc']!;
holdEverywhere('allowable stress with a factor of 3, a beech dowel of 8 x 300 mm', [
  row(
    'pressed by 40 N: 3 N (1/A fc + 1/NE)',
    3 * 40 * (1 / CRUSH_8 + 1 / EULER_8),
    used(ALLOWABLE, round(8), 'beech-dowel', 300, { axial: -40 }),
  ),
  row(
    'with 200 N mm: bending grows by 1/(1 - 3 N/NE)',
    3 * 40 * (1 / CRUSH_8 + 1 / EULER_8) +
      ((3 * 200) / ((Math.PI / 32) * 512 * BEECH.strength['fm']!)) * (1 / (1 - 120 / EULER_8)),
    used(ALLOWABLE, round(8), 'beech-dowel', 300, { axial: -40, momentY: 200 }),
  ),
  row(
    'pulled by 300 N: 3 N / A ft',
    (3 * 300) / ((Math.PI / 4) * 64 * BEECH.strength['ft']!),
    used(ALLOWABLE, round(8), 'beech-dowel', 300, { axial: 300 }),
  ),
  row(
    'sheared by 200 N: 3 x 4/3 V / A fv',
    (3 * (4 / 3) * 200) / ((Math.PI / 4) * 64 * BEECH.strength['fv']!),
    used(ALLOWABLE, round(8), 'beech-dowel', 300, { shearY: 160, shearZ: 120 }),
  ),
  row(
    'a thin ring of it by 2 V / A, to 1 %',
    (3 * 2 * 50) / (Math.PI * 39 * 1 * BEECH.strength['fv']!),
    used(ALLOWABLE, tube(40, 1), 'beech-dowel', 300, { shearZ: 50 }),
    0.01,
  ),
]);
