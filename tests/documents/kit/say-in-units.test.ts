import { expect, it } from 'vitest';
import { sayInUnits } from '../../../src/documents/kit/say-in-units.js';
import { defaultJob } from '../../../src/model/job/index.js';

const { output } = defaultJob();
const us = (text: string): string => sayInUnits(text, { ...output, units: 'US' });

// NIST SP 811 (2008), appendix B.8 and B.9.
it.each([
  ['longer than the 25.4 mm it may be', 'longer than the 1 in it may be'],
  ['1219.2 x 609.6 mm, not to scale', '48 x 24 in, not to scale'],
  ['carries 4.448 N, or 4.448 kN', 'carries 1 lbf, or 1 kip'],
  ['at most 6.895 MPa', 'at most 1000 psi'],
  ['under 1 kN/m² on 1 m²', 'under 20.9 lbf/ft² on 10.8 ft²'],
  ['616 kg/m³', '38.5 lb/ft³'],
  ['0.454 kg and 0.305 m', '1 lb and 1 ft'],
])('%s', (si, customary) => {
  expect(us(si)).toBe(customary);
  expect(sayInUnits(si, output)).toBe(si);
});

it.each(['nodes.clearance_mm', 'S12 mmm', '8.0 mm³/s', 'N12 N', 'M8 x 20', 'kerf_mm 0.2'])('leaves %s', (text) =>
  expect(us(text)).toBe(text),
);
