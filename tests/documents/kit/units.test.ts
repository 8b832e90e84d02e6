import { describe, expect, it } from 'vitest';
import { drawingScale } from '../../../src/documents/kit/drawing-scale.js';
import { fixed, inchFraction, unitsOf } from '../../../src/documents/kit/units.js';
import { readable } from '../../../src/documents/kit/view/marks/strut-mark.js';
import { defaultJob } from '../../../src/model/job/index.js';

describe('units of output', () => {
  it('writes inches as fractions in lowest terms', () => {
    expect(inchFraction(12.5)).toBe('12 1/2');
    expect(inchFraction(0.09375)).toBe('3/32');
    expect(inchFraction(3.999)).toBe('4');
    expect(inchFraction(-1.25)).toBe('−1 1/4');
    expect(inchFraction(0)).toBe('0');
  });
  it('rounds lengths to saw down, never up, in every unit', () => {
    const job = defaultJob();
    const at = (output: object) => unitsOf({ ...job, output: { ...job.output, ...output } }, 0).cut;
    const [si, inches, fractions] = [
      at({}),
      at({ units: 'US', fractions: false }),
      at({ units: 'US', fractions: true }),
    ];
    expect([si(212.29), si(212.3), si(70.1 * 3)]).toEqual(['212.2', '212.3', '210.3']);
    expect([inches(254), inches(254.0253), inches(253.9999)]).toEqual(['10.000', '10.000', '9.999']);
    // 12 3/32 in is 307.18125 mm.
    expect([fractions(307.18125), fractions(307.9), fractions(307.18), fractions(null)]).toEqual([
      '12 3/32',
      '12 3/32',
      '12 1/16',
      '',
    ]);
    for (let k = 0; k < 3200; k++) expect(fractions((k * 25.4) / 32)).toBe(inchFraction(k / 32));
  });
  it('keeps decimals where a fraction would say nothing', () => {
    const job = defaultJob();
    const { length } = unitsOf({ ...job, output: { ...job.output, units: 'US', fractions: true } }, 0);
    expect([length(25.4), length(0.1, 2), length(0.0254, 3)]).toEqual(['1', '0.0039', '0.00100']);
  });
  it('leaves unknown numbers blank and never writes minus nought', () => {
    expect(fixed(null, 1)).toBe('');
    expect(fixed(Number.NaN, 1)).toBe('');
    expect(fixed(-0.01, 1)).toBe('0.0');
  });
  it('converts by the exact inch and the standard pound-force', () => {
    // NIST SP 811 (2008) appendix B.8: 1 lbf = 4.448 222 N; 1 in = 25.4 mm exactly.
    const job = defaultJob();
    const us = unitsOf({ ...job, output: { ...job.output, units: 'US' } }, 4448.222);
    expect(us.force(444.8222)).toBe('+100');
    expect(us.length(254, 1)).toBe('10.000');
    expect(unitsOf(job, 100).force(-12.345)).toBe('−12.3');
    expect(unitsOf(job, 120_000).force(-12_345)).toBe('−12.3');
    expect(unitsOf(job, 120_000).forceUnit).toBe('kN');
  });
});

describe('scales of ISO 5455', () => {
  it.each([
    [100, 100, '1:1'],
    [199, 100, '1:2'],
    [201, 100, '1:5'],
    [501, 100, '1:10'],
    [30_000, 150, '1:200'],
    [21, 100, '2:1'],
    [19, 100, '5:1'],
    [2, 100, '50:1'],
  ])('%d mm in %d mm is drawn at %s', (size, room, name) => {
    expect(drawingScale([size, size / 2], [room, room]).name).toBe(name);
  });
});

describe('writing along a line', () => {
  it('is never upside down, and reads from the right where the line is upright', () => {
    for (let k = 0; k < 360; k += 5) {
      const angle = readable(Math.cos((k * Math.PI) / 180), Math.sin((k * Math.PI) / 180));
      expect(Math.abs(angle)).toBeLessThanOrEqual(Math.PI / 2 + 1e-5);
      expect(Math.abs(Math.sin(angle - (k * Math.PI) / 180))).toBeLessThan(1e-9);
    }
    expect(readable(0, 1)).toBeCloseTo(-Math.PI / 2, 9);
    expect(readable(0, -1)).toBeCloseTo(-Math.PI / 2, 9);
  });
});
