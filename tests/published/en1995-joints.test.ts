import { describe, expect, it } from 'vitest';
import { plateInTheMiddle, yieldMoment } from '../../src/strength/en1995/joint/double-shear.js';
import { embeddingAtAngle, embeddingStrength } from '../../src/strength/en1995/joint/embedding.js';
import { effectiveNumber, leastDistances } from '../../src/strength/en1995/joint/row.js';
import { splittingCapacity } from '../../src/strength/en1995/joint/splitting.js';

describe('a steel dowel of 8 mm, fu 360, in C24, 30 mm of timber each side of a plate', () => {
  // Formulas from memory, names of the modes seen in Porteous & Kermani; numbers computed independently with numpy.
  const fh = embeddingStrength(8, 350);
  const my = yieldMoment(8, 360);
  it('embedding 26.40 MPa, yield moment 24.07 N m', () => {
    expect(fh).toBeCloseTo(26.404, 9);
    expect(my).toBeCloseTo(24068.981974, 5);
  });
  it('modes 6337, 3696, 5186 N; two planes carry 4.55 kN in design', () => {
    const joint = plateInTheMiddle(fh, 8, 30, my);
    expect(joint.f).toBeCloseTo(6336.96, 6);
    expect(joint.g).toBeCloseTo(3695.5212925, 5);
    expect(joint.h).toBeCloseTo(5186.0482421, 5);
    expect((2 * joint.perPlane * 0.8) / 1.3).toBeCloseTo(4548.3338984, 5);
  });
  it('the modes in inches, psi and pounds-force: of fh and My given, (8.11) holds in any consistent units', () => {
    // Embedding and yield moment themselves are fitted to mm and MPa: whole jobs drawn in inches stand in any-units.test.ts.
    const [inch, pound] = [25.4, 0.45359237 * 9.80665];
    const psi = pound / inch ** 2;
    const joint = plateInTheMiddle(fh / psi, 8 / inch, 30 / inch, my / (pound * inch));
    expect((joint.f * pound) / 6336.96).toBeCloseTo(1, 9);
    expect((joint.g * pound) / 3695.5212925).toBeCloseTo(1, 9);
    expect((joint.h * pound) / 5186.0482421).toBeCloseTo(1, 9);
  });
});

it('a bolt M12 of grade 4.6 has a tensile capacity of 33.7 kN and a yield moment of 76.7 N m', () => {
  // Tensile capacity seen in Porteous & Kermani (3.37e4 N, stress area 84.3 mm²); yield moment computed independently.
  expect(400 * 84.3).toBeCloseTo(3.37e4, -2);
  expect(yieldMoment(12, 400)).toBeCloseTo(76745.423287, 5);
});

it('embedding across the grain of softwood with a bolt of 12 mm is lower by 1.35 + 0.015 d', () => {
  // EN 1995-1-1 (8.33), from memory.
  const fh = embeddingStrength(12, 350);
  expect(fh / embeddingAtAngle(fh, 12, Math.PI / 2)).toBeCloseTo(1.53, 12);
  expect(embeddingAtAngle(fh, 12, 0)).toBe(fh);
});

it('embedding at 30°, 45° and 60° to the grain falls by 1.1325, 1.265 and 1.3975 with a bolt of 12 mm', () => {
  // EN 1995-1-1 (8.31), from memory, by hand: k90 sin² + cos² with k90 = 1.53; 1.59 with a bolt of 16 mm.
  const at = (d: number, degrees: number) => 20 / embeddingAtAngle(20, d, (degrees * Math.PI) / 180);
  expect([30, 45, 60].map((a) => at(12, a).toFixed(4))).toEqual(['1.1325', '1.2650', '1.3975']);
  expect(at(16, 45).toFixed(4)).toBe('1.2950');
  expect(at(12, 150)).toBeCloseTo(at(12, 30), 12);
});

it('rows: three bolts at 5 d count as 2.12; one counts as one', () => {
  // 3^0.9 (5/13)^0.25 = 2.6879 x 0.7875 = 2.1167, by hand from (8.34), from memory.
  expect(effectiveNumber(3, 60, 12)).toBeCloseTo(2.1167, 3);
  expect(effectiveNumber(1, 0, 12)).toBe(1);
  expect(effectiveNumber(2, 1000, 12)).toBe(2);
});

it('least distances of an M8 and an M16 bolt: the loaded end 80 and 112 mm', () => {
  // EN 1995-1-1 table 8.4 (from memory).
  expect(leastDistances(8)).toEqual({ along: 40, end: 80, pressedEnd: 32, edge: 24 });
  expect(leastDistances(16)).toEqual({ along: 80, end: 112, pressedEnd: 64, edge: 48 });
});

it('splitting of a member of 50 x 200 mm loaded at half its depth: 9.9 kN', () => {
  // 14 x 50 x sqrt(100 / 0.5) = 9899 N, by hand from (8.4), from memory.
  expect(splittingCapacity(50, 200, 100)).toBeCloseTo(9899.5, 0);
});
