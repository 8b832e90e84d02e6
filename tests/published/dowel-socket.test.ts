import { expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { woodLimit } from '../../src/strength/limits.js';

it('a glued dowel of 12 x 25 mm in wood of fv,k = 4.0 MPa: Rk 3.77 kN, Rd 2.32 kN', () => {
  // Computed independently: pi d l fv,k; kmod 0.8, gammaM 1.3 (EN 1995-1-1 tables 3.1, 2.3, seen in an open handbook).
  const limit = woodLimit(MATERIALS.get('C24')!, 'fv', 'medium', { serviceClass: 1, factor: 3 })!;
  expect(Math.PI * 12 * 25 * limit).toBeCloseTo(2319.945344, 6);
  expect((Math.PI * 12 * 25 * limit * 1.3) / 0.8).toBeCloseTo(3769.911184, 6);
});
