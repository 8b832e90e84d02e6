import { expect, it } from 'vitest';
import { GLUE_FRACTURE, gluedRodCapacity } from '../../src/strength/socket/glued-rod.js';

it('a rod of 12 mm in a glue line of 1 mm, 120 mm deep in timber of 420 kg/m³: 32.6 kN brittle, 38.1 kN ductile', () => {
  // Formula seen in Mater. Struct. 2018 (s11527-018-1268-y), which quotes Feligioni et al.; numbers computed independently with numpy.
  expect(gluedRodCapacity(12, 1, 120, 420, GLUE_FRACTURE.brittle)).toBeCloseTo(32579.453712445, 6);
  expect(gluedRodCapacity(12, 1, 120, 420, GLUE_FRACTURE.ductile)).toBeCloseTo(38102.750588604, 6);
});

it('lies within a quarter below the mean of Steiger, Gehri and Widmann 2007', () => {
  // fv = 7.8 (lambda/10)^-1/3 (rho/480)^0.6 MPa on the hole (exponents seen, 7.8 from memory): 40.0 kN mean, computed independently.
  const ratio = gluedRodCapacity(12, 1, 120, 420, GLUE_FRACTURE.ductile) / 40001.307;
  expect(ratio).toBeGreaterThan(0.75);
  expect(ratio).toBeLessThan(1);
});
