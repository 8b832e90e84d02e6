import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { axialOnly } from '../../src/strength/actions.js';
import { columnStability, NDS } from '../../src/strength/nds.js';

const LBF = 4.4482216152605;
const INCH = 25.4;

it('a 4 x 4 of Douglas fir-larch No. 1, 8 ft: Cp 0.3539, 7479 lb', () => {
  // Constants from memory (Fc 1500, CF 1.15, Emin 620000 psi, c 0.8, CD 1); result computed independently with numpy.
  expect(columnStability(677.4186197916666, 1725, 0.8)).toBeCloseTo(0.35392880164072227, 10);
  const member = {
    shape: { kind: 'rectangle', width: 3.5 * INCH, height: 3.5 * INCH } as const,
    material: MATERIALS.get('DFL-No1')!,
    bucklingLength: 96 * INCH,
  };
  const verdict = NDS.judge(member, axialOnly('given', -7478.957989670511 * LBF, 'long'), {
    serviceClass: 1,
    factor: 3,
  });
  expect(verdict.utilisation).toBeCloseTo(1, 8);
  expect(verdict.rule).toBe('NDS 3.7.1');
});

it('more slender than 50 is out of scope (NDS 3.7.1.4, from memory)', () => {
  const shape = { kind: 'rectangle', width: 38, height: 89 } as const;
  const material = MATERIALS.get('SPF-No2')!;
  expect(NDS.outOfScope({ shape, material, bucklingLength: 1901 })).toContain('50');
  expect(NDS.outOfScope({ shape, material, bucklingLength: 1899 })).toBeNull();
});

describe('NDS 2018 in brief, by hand', () => {
  const material = MATERIALS.get('DFL-No1')!;
  const { Fb, Ft, Fv, Fc, Emin } = material.strength as Record<string, number>;
  const member = {
    shape: { kind: 'rectangle', width: 3.5 * INCH, height: 5.5 * INCH } as const,
    material,
    bucklingLength: 96 * INCH,
  };
  const dry = { serviceClass: 1, factor: 3 } as const;
  const area = 3.5 * 5.5 * INCH ** 2;
  const sx = ((3.5 * 5.5 ** 2) / 6) * INCH ** 3;
  const at = (
    axial: number,
    more: object,
    duration: 'long' | 'medium' | 'short' = 'long',
    rules: typeof dry | { serviceClass: 3; factor: 3 } = dry,
  ) => NDS.judge(member, { ...axialOnly('given', axial, duration), ...more }, rules);

  it('constants of Douglas fir-larch No. 1 (NDS Supplement table 4A, from memory): Fb 1000, Ft 675, Fv 180, Fc 1500, Emin 620,000 psi', () => {
    const psi = 6894.757293168e-6;
    expect([Fb, Ft, Fv, Fc, Emin].map((v) => Math.round(v / psi))).toEqual([1000, 675, 180, 1500, 620000]);
  });
  it("tension with bending: ft/Ft' + fb/Fb' (3.9-1), CF of a nominal 6 in depth 1.3", () => {
    const n = 0.4 * Ft * 1.3 * area;
    const { utilisation, rule } = at(n, { momentY: 0.5 * Fb * 1.3 * sx });
    expect(utilisation).toBeCloseTo(0.9, 10);
    expect(rule).toBe('NDS 3.9.1 (3.9-1)');
  });
  it("compression with bending: (fc/Fc')² + fb / (Fb' (1 - fc/FcE1)) (3.9-3)", () => {
    const star = Fc * 1.1;
    const fce = (d: number) => (0.822 * Emin) / (96 / d) ** 2;
    const a = fce(3.5) / star;
    const half = (1 + a) / 1.6;
    const cp = half - Math.sqrt(half ** 2 - a / 0.8);
    const fc = 0.5 * cp * star;
    const fb = 0.3 * Fb * 1.3;
    const { utilisation, rule } = at(-fc * area, { momentY: fb * sx });
    expect(utilisation).toBeCloseTo(0.25 + 0.3 / (1 - fc / fce(5.5)), 10);
    expect(rule).toBe('NDS 3.9.2 (3.9-3)');
  });
  it('CD 1.25 for seven days, 1.6 for wind (2.3.2); wet lumber loses 15 % in bending, 3 % in shear (CM)', () => {
    const m = { momentY: 0.5 * Fb * 1.3 * sx };
    expect(at(0, m, 'medium').utilisation).toBeCloseTo(0.5 / 1.25, 10);
    expect(at(0, m, 'short').utilisation).toBeCloseTo(0.5 / 1.6, 10);
    expect(at(0, m, 'long', { serviceClass: 3, factor: 3 }).utilisation).toBeCloseTo(0.5 / 0.85, 10);
    const v = { shearZ: (0.5 * Fv * area) / 1.5 };
    expect(at(0, v).utilisation).toBeCloseTo(0.5, 10);
    expect(at(0, v, 'long', { serviceClass: 3, factor: 3 }).utilisation).toBeCloseTo(0.5 / 0.97, 10);
  });
  it('wet lumber presses on 0.8 Fc with 0.9 Emin', () => {
    const star = Fc * 1.1 * 0.8;
    const a = (0.822 * 0.9 * Emin) / (96 / 3.5) ** 2 / star;
    const half = (1 + a) / 1.6;
    const cp = half - Math.sqrt(half ** 2 - a / 0.8);
    expect(at(-cp * star * area, {}, 'long', { serviceClass: 3, factor: 3 }).utilisation).toBeCloseTo(1, 10);
  });
  it.each([
    [3.5, 1.5],
    [4.5, 1.4],
    [5.5, 1.3],
    [7.25, 1.2],
    [9.25, 1.1],
    [11.25, 1],
    [13.25, 0.9],
  ])('CF of a depth of %f in is %f in tension (NDS Supplement table 4A, from memory)', (inches, cf) => {
    const shape = { kind: 'rectangle', width: 1.5 * INCH, height: inches * INCH } as const;
    const n = Ft * 1.5 * inches * INCH ** 2;
    expect(NDS.judge({ ...member, shape }, axialOnly('given', n, 'long'), dry).utilisation).toBeCloseTo(1 / cf, 10);
  });
  it('a round pole buckles as the square of equal area and inertia would (3.7.3): depth sqrt(12) d/4', () => {
    const shape = { kind: 'round', diameter: 100 } as const;
    const slender = (50 * Math.sqrt(12) * 100) / 4;
    expect(NDS.outOfScope({ shape, material, bucklingLength: slender + 1 })).toContain('3.7.1.4');
    expect(NDS.outOfScope({ shape, material, bucklingLength: slender - 1 })).toBeNull();
  });
});
