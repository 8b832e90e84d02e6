import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { axialOnly } from '../../src/strength/actions.js';
import { chi } from '../../src/strength/en1999/chi.js';
import { effectiveThickness } from '../../src/strength/en1999/effective-thickness.js';
import { EN_1999 } from '../../src/strength/en1999/index.js';
import { sectionClass } from '../../src/strength/en1999/section-class.js';

const rules = { serviceClass: 1, factor: 3 } as const;

// Computed independently with numpy; alpha and lambda0 of class A seen in TALAT 2301, of class B from memory.
const TABLE: readonly (readonly [number, number, number])[] = [
  [0.2, 0.9796, 0.9377],
  [0.6, 0.8727, 0.7886],
  [1.0, 0.6563, 0.5721],
  [1.4, 0.4158, 0.3738],
  [1.8, 0.2699, 0.2495],
  [2.2, 0.1867, 0.1756],
  [2.6, 0.1363, 0.1296],
  [3.0, 0.1037, 0.0993],
];

it('chi of buckling classes A and B, EN 1999-1-1 6.3.1.2', () => {
  for (const [lambda, a, b] of TABLE) {
    expect(chi(lambda, 'A')).toBeCloseTo(a, 4);
    expect(chi(lambda, 'B')).toBeCloseTo(b, 4);
  }
});

it('a tube of 25 x 2 mm, 1 m long: 5.25 kN of 6060-T6, 5.50 kN of 6082-T6', () => {
  // Computed independently with numpy, gammaM1 1.1 (seen in TALAT 9.2).
  const shape = { kind: 'tube', diameter: 25, wall: 2 } as const;
  for (const [name, wanted, places] of [
    ['6060-T6', 5252.380836349753, 9],
    ['6082-T6', 5500, 2],
  ] as const) {
    const member = { shape, material: MATERIALS.get(name)!, bucklingLength: 1000 };
    const { utilisation, rule } = EN_1999.judge(member, axialOnly('given', -wanted, 'short'), rules);
    expect(utilisation).toBeCloseTo(1, places);
    expect(rule).toBe('EN 1999-1-1 6.3.1 (6.49)');
  }
});

it('a wall thicker than its strength holds for is out of scope', () => {
  const shape = { kind: 'tube', diameter: 50, wall: 6 } as const;
  expect(EN_1999.outOfScope({ shape, material: MATERIALS.get('6082-T6')!, bucklingLength: 1000 })).toContain('6 mm');
});

it('a class 4 tube of 6060-T6, 150 x 1 mm, counts with 0.873 of its wall', () => {
  // EN 1999-1-1 6.1.5 (6.12), class A (from memory), by hand: beta = 3 sqrt(150) = 36.742, epsilon = sqrt(250/140) = 1.336306, ratio 27.4955;
  // rho = 32/27.4955 - 220/27.4955² = 1.163827 - 0.291005 = 0.872822.
  expect(effectiveThickness(150, 1, { fo: 140, modulus: 70000, buckling: 'A' })).toBeCloseTo(0.872822, 5);
  // The formula is 1 where class 3 ends: 32/22 - 220/484, 29/18 - 198/324.
  const wallAt = (ratio: number): number => (ratio * Math.sqrt(250 / 140)) ** 2 / 9;
  expect(effectiveThickness(wallAt(22.000001), 1, { fo: 140, modulus: 70000, buckling: 'A' })).toBeCloseTo(1, 6);
  expect(effectiveThickness(wallAt(18.000001), 1, { fo: 140, modulus: 70000, buckling: 'B' })).toBeCloseTo(1, 6);
  const member = {
    shape: { kind: 'tube', diameter: 150, wall: 1 } as const,
    material: MATERIALS.get('6060-T6')!,
    bucklingLength: 100,
  };
  const squash = ((Math.PI / 4) * (150 ** 2 - 148 ** 2) * 140) / 1.1;
  expect(EN_1999.judge(member, axialOnly('given', -0.5 * squash, 'short'), rules).utilisation).toBeCloseTo(
    0.5 / 0.872822,
    4,
  );
  expect(EN_1999.judge(member, axialOnly('given', 0.5 * squash, 'short'), rules).utilisation).toBeCloseTo(0.5, 6);
});

describe('EN 1999-1-1 6.2.9 and 6.3.3.1 by hand, 6082-T6', () => {
  const fo = 250 / 1.1;
  const member = (width: number, height: number, bucklingLength: number) => ({
    shape: { kind: 'rectangle', width, height } as const,
    material: MATERIALS.get('6082-T6')!,
    bucklingLength,
  });
  const none = axialOnly('given', 0, 'short');
  const wy = (4 * 5 ** 2) / 6;
  const wz = (5 * 4 ** 2) / 6;
  it('a bar of 4 x 5 mm pulled and bent: (N/NRd)^1.3 + ((My/MRd)^1.7 + (Mz/MRd)^1.7)^0.6 (6.43)', () => {
    const a = { ...none, axial: 0.5 * 20 * fo, momentY: 0.3 * wy * fo, momentZ: 0.2 * wz * fo };
    const { utilisation, rule } = EN_1999.judge(member(4, 5, 50), a, rules);
    expect(utilisation).toBeCloseTo(0.5 ** 1.3 + (0.3 ** 1.7 + 0.2 ** 1.7) ** 0.6, 10);
    expect(rule).toBe('EN 1999-1-1 6.2.9 (6.43)');
  });
  it('pressed and bent: (N/Nb)^0.8 + ((My/MRd)^1.7)^0.6 (6.62)', () => {
    const strut = member(4, 5, 100);
    const i = (5 * 4 ** 3) / 12;
    const lambda = Math.sqrt((20 * 250) / ((Math.PI ** 2 * 70000 * i) / 100 ** 2));
    const phi = 0.5 * (1 + 0.2 * (lambda - 0.1) + lambda ** 2);
    const nb = (20 * fo) / (phi + Math.sqrt(phi ** 2 - lambda ** 2));
    const a = { ...none, axial: -0.4 * nb, momentY: 0.3 * wy * fo };
    const { utilisation, rule } = EN_1999.judge(strut, a, rules);
    expect(utilisation).toBeCloseTo(0.4 ** 0.8 + 0.3 ** (1.7 * 0.6), 10);
    expect(rule).toBe('EN 1999-1-1 6.3.3.1 (6.62)');
  });
  it('shear by the peak of 1.5 V / A, fo / sqrt3', () => {
    const { utilisation } = EN_1999.judge(member(4, 5, 50), { ...none, shearZ: 900 }, rules);
    expect(utilisation).toBeCloseTo((1.5 * 900 * Math.sqrt(3)) / 20 / fo, 10);
  });
  it('classes of a 6060-T6 tube (class A, fo 140) end at D/t 24, 50.8 and 96', () => {
    // beta/epsilon of 11, 16, 22 (table 6.2, from memory): D/t = (ratio/3)² 250/140.
    const alloy = { fo: 140, modulus: 70000, buckling: 'A' } as const;
    const tube = (diameter: number) => sectionClass({ kind: 'tube', diameter, wall: 1 }, alloy);
    expect([23.9, 24.1, 50.7, 50.9, 95.9, 96.1].map(tube)).toEqual([1, 2, 2, 3, 3, 4]);
    expect(sectionClass({ kind: 'tube', diameter: 65, wall: 1 }, { ...alloy, buckling: 'B' })).toBe(4);
  });
});
