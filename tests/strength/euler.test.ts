import { expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import type { StrutPart } from '../../src/model/parts.js';
import { eulerLoad } from '../../src/strength/euler.js';

it('a tube 42.4 x 2.6 of 2 m carries pi² E I / L² = 33.5 kN by hand: I = pi/64 (42.4⁴ - 37.2⁴) = 64,644 mm⁴, E = 210,000 MPa', () => {
  const strut = {
    section: { name: 't', material: 'S235', measured: null, shape: { kind: 'tube', diameter: 42.4, wall: 2.6 } },
    material: MATERIALS.get('S235') ?? { modulus: 210000 },
  } as StrutPart;
  expect(eulerLoad(strut, 2000)! / 1000).toBeCloseTo((Math.PI ** 2 * 210000 * 64644) / 2000 ** 2 / 1000, 1);
  expect(eulerLoad({ ...strut, section: null }, 2000)).toBeNull();
});
