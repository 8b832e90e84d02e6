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
