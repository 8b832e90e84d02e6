import { expect, it } from 'vitest';
import { gaugeSheet } from '../../../src/documents/nodes/gauge-sheet.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import { defaultJob, type Job, jobSchema } from '../../../src/model/job/index.js';
import type { Section } from '../../../src/model/section.js';
import { shapeGauge } from '../../../src/shaping/gauge.js';
import { checkPdf, outside, overlaps, textOf } from '../pdf.js';

const fonts = await loadFonts();
const rod: Section = {
  name: 'beech-8',
  shape: { kind: 'round', diameter: 8 },
  material: 'beech-dowel',
  measured: null,
};

async function sheetOf(job: Job, section = rod) {
  const piece = (await shapeGauge(section, job))!;
  return gaugeSheet(
    { issue: { job }, gauges: [{ section, piece, file: 'nodes/gauge.stl' }], comb: 'panels/kerf-comb.svg or .dxf' },
    fonts,
  );
}

it('names every clearance, what to do and the keys that take the values, nothing over anything else', async () => {
  const sheet = await sheetOf(defaultJob('Table'));
  checkPdf(sheet.bytes);
  expect(overlaps(sheet.placed)).toEqual([]);
  expect(outside(sheet.bytes)).toEqual([]);
  const text = textOf(sheet.bytes).replaceAll(/\s+/g, ' ');
  for (const c of ['0.20', '0.30', '0.40', '0.50', '0.60', '8.20', '8.60']) expect(text).toContain(c);
  expect(text).toContain('"nodes": { "clearances": { "beech-8": 0.00 } }');
  expect(text).toContain('kerf = (100 mm − width) / 10');
  expect(text).not.toContain('Outdoors');
});

it('says what swelling adds outdoors: 0.4 % of beech for each per cent of moisture, 8 % unless the job says otherwise', async () => {
  const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', use: 'outdoor' });
  // 0.4 %/% x 8 % x 8 mm = 0.256 mm.
  expect(textOf((await sheetOf(job)).bytes)).toContain('Outdoors 0.26 mm come on top');
  const drier = { ...job, fit: { ...job.fit, moistureChange: 4 } };
  expect(textOf((await sheetOf(drier)).bytes)).toContain('Outdoors 0.13 mm come on top');
});

it('tells bores in inches where the papers are in them, and what goes into the job in its mm', async () => {
  const plain = defaultJob('Table');
  const sheet = await sheetOf({ ...plain, output: { ...plain.output, paper: 'Letter', units: 'US', fractions: true } });
  expect(overlaps(sheet.placed)).toEqual([]);
  expect(outside(sheet.bytes)).toEqual([]);
  const text = textOf(sheet.bytes).replaceAll(/\s+/g, ' ');
  // 8.20 mm / 25.4 = 0.32283 in; 0.20 mm = 0.00787 in (NIST SP 811 (2008), appendix B.8).
  expect(text).toMatch(/0\.20 0\.0079 0\.3228/);
  expect(text).toMatch(/0\.60 0\.0236 0\.3386/);
  expect(text).not.toContain('8.20');
  expect(text).toContain('Enter it in mm, as the first column and the gauge itself have it:');
  // A comb of 98.0 mm has a kerf of 0.20 mm: (3.937 - 98 / 25.4) x 2.54 = 0.200.
  expect((3.937 - 98 / 25.4) * 2.54).toBeCloseTo((100 - 98) / 10, 3);
  expect(text).toContain('kerf = (3.937 in − width) × 2.54: both in mm');
});
