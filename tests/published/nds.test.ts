import { expect, it } from 'vitest';
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
