import { expect, it } from 'vitest';
import { bedSheets } from '../../../src/documents/nodes/bed-sheets.js';
import { sayDuration } from '../../../src/documents/nodes/duration.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import { seededRandom } from '../../../src/maths/random.js';
import { printersSchema } from '../../../src/model/job/nodes.js';
import { planBeds } from '../../../src/planning/beds/plan-beds.js';
import { packRecords } from '../pack-records.js';
import { checkPdf, outside, overlaps, textOf } from '../pdf.js';

const fonts = await loadFonts();

it('says of each bed its printer, pieces, mass and time with everything that the time is reckoned from', async () => {
  const random = seededRandom(5);
  const pieces = Array.from({ length: 40 }, (_, i) => ({
    mark: `N${String(i + 1).padStart(3, '0')}`,
    piece: i % 9 === 0 ? 'cap-S17' : '',
    box: [i % 9 === 0 ? 8 : 20 + 40 * random(), 12 + 30 * random(), 20 + 20 * random()] as const,
    volume: 4000,
    mass: 0.005,
  }));
  const printers = printersSchema.parse([
    { name: 'left machine', width_mm: 150, depth_mm: 130, flow_mm3_per_s: 10, layerChange_s: 3, layer_mm: 0.25 },
    { name: 'round machine', bed: 'circle', width_mm: 260 },
  ]);
  const tall = { ...pieces[0]!, mark: 'N900', piece: '', box: [170, 60, 40] as const };
  const beds = planBeds([...pieces, tall], printers);
  const sheet = (await bedSheets({ ...packRecords(), beds }, fonts))!;
  checkPdf(sheet.bytes);
  expect(sheet.sheets).toBeGreaterThan(beds.beds.length);
  expect(overlaps(sheet.placed)).toEqual([]);
  expect(outside(sheet.bytes)).toEqual([]);
  const text = textOf(sheet.bytes).replaceAll(/\s+/g, ' ');
  expect(text).toContain('left machine');
  expect(text).toContain('round machine');
  expect(text).toContain('within about 30 %');
  const left = beds.beds.find((b) => b.printer === 'left machine')!;
  // volume / flow + layers x change, by hand.
  const layers = Math.ceil(Math.max(...left.items.map((i) => i.box[2])) / 0.25);
  const seconds = (4000 * left.items.length) / 10 + layers * 3;
  expect(left.time).toBeCloseTo(seconds, 6);
  expect(text).toContain(
    `About ${sayDuration(seconds)} = ${4000 * left.items.length} mm³ / 10.0 mm³/s + ${layers} layers × 3.0 s`,
  );
  for (const item of left.items) expect(text).toContain(item.mark);
});

it('is not written where nothing is printed', async () => {
  expect(await bedSheets(packRecords(), fonts)).toBeNull();
});

it('says times as a workshop does', () => {
  expect(sayDuration(20)).toBe('1 min');
  expect(sayDuration(59 * 60)).toBe('59 min');
  expect(sayDuration(7500)).toBe('2 h 05 min');
});

it('tells sizes, volumes and masses in US customary units where the papers are in them, the printer’s figures in its mm', async () => {
  const box = [50.8, 25.4, 38.1] as const;
  const piece = { mark: 'N001', piece: '', box, volume: 16387.064, mass: 0.45359237 };
  const printers = printersSchema.parse([
    { name: 'inch machine', width_mm: 254, depth_mm: 203.2, flow_mm3_per_s: 10, layerChange_s: 3, layer_mm: 0.25 },
  ]);
  const records = packRecords();
  const output = { ...records.job.output, paper: 'Letter' as const, units: 'US' as const, fractions: true };
  const beds = planBeds([piece], printers);
  const sheet = (await bedSheets({ ...records, job: { ...records.job, output }, beds }, fonts))!;
  expect(overlaps(sheet.placed)).toEqual([]);
  expect(outside(sheet.bytes)).toEqual([]);
  const text = textOf(sheet.bytes).replaceAll(/\s+/g, ' ');
  // 1 in³ = 16 387.064 mm³, 1 lb = 0.453 592 37 kg (NIST SP 811 (2008), appendix B.8).
  expect(text).toContain('Bed 10 × 8 in, not drawn to scale. 1.00 in³, 1.000 lb.');
  expect(text).toMatch(/(2 × 1|1 × 2) × 1 1\/2 1\.000 1\.000/);
  expect(text).toContain('1 pieces on 1 beds: 1.0 in³, 1.000 lb');
  expect(text).toContain('in the job, in mm as there');
  expect(text).toContain('= 16387 mm³ / 10.0 mm³/s');
  expect(text).not.toContain('cm³');
});
