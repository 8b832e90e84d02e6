import { expect, it } from 'vitest';
import { pinBearing, pinBending, pinMoment, pinShear, pinUse } from '../../src/strength/en1993/pin.js';

it('a pin of 16 mm, S235: shear 35 kN, bending 123 N m with gammaM0 1.15', () => {
  // Seen: a published calculation sheet after EN 1993-1-8 table 3.10, FvRd 35 kN, MRd 123 N m.
  expect(pinShear(16, 360) / 1000).toBeCloseTo(35, -0.5);
  expect(pinBending(16, 235, 1.15) / 1000).toBeCloseTo(123, 0);
  // Computed independently with numpy.
  expect(pinShear(16, 360)).toBeCloseTo(34743.50147458, 6);
  expect(pinBending(16, 235, 1.15)).toBeCloseTo(123259.70480867, 6);
});

it('between plates of 5, 10, 5 mm with gaps of 1 mm under 20 kN: 60 N m, interaction 0.262, the middle plate bears 56.4 kN', () => {
  // Computed independently with numpy from EN 1993-1-8 table 3.10 and figure 3.11.
  expect(pinMoment(20000, 5, 10, 1)).toBe(60000);
  expect(pinUse(20000, { d: 16, fy: 235, fu: 360 }, { a: 5, b: 10, c: 1 }).combined).toBeCloseTo(0.262012133, 8);
  expect(pinBearing(10, 16, 235)).toBeCloseTo(56400, 6);
});

it('both sheets in inches, psi and pounds-force: EN 1993-1-8 table 3.10 holds in any consistent units', () => {
  const [inch, psi, pound] = [25.4, (0.45359237 * 9.80665) / 25.4 ** 2, 0.45359237 * 9.80665];
  expect((pinShear(16 / inch, 360 / psi) * pound) / 34743.50147458).toBeCloseTo(1, 10);
  expect((pinBending(16 / inch, 235 / psi, 1.15) * pound * inch) / 123259.70480867).toBeCloseTo(1, 10);
  expect((pinBearing(10 / inch, 16 / inch, 235 / psi) * pound) / 56400).toBeCloseTo(1, 10);
  expect((pinMoment(20000 / pound, 5 / inch, 10 / inch, 1 / inch) * pound * inch) / 60000).toBeCloseTo(1, 10);
  const pin = { d: 16 / inch, fy: 235 / psi, fu: 360 / psi };
  const plates = { a: 5 / inch, b: 10 / inch, c: 1 / inch };
  expect(pinUse(20000 / pound, pin, plates).combined).toBeCloseTo(0.262012133, 8);
});
