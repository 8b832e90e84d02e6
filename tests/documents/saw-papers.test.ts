import { writeFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { expect, it } from 'vitest';
import type { Written } from '../../src/documents/kit/paper.js';
import { unitsOf } from '../../src/documents/kit/units.js';
import type { PackRecords } from '../../src/documents/records.js';
import { barBatches } from '../../src/documents/struts/bar-batches.js';
import { buyingListCsv } from '../../src/documents/struts/buying-list.js';
import { LABEL_SHEETS } from '../../src/documents/struts/label-sheets.js';
import { labelsPdf } from '../../src/documents/struts/labels.js';
import { offcutsJson, rackAfter } from '../../src/documents/struts/offcuts.js';
import { sawPlanPdf } from '../../src/documents/struts/saw-plan.js';
import { loadFonts } from '../../src/machine/fonts.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import { planBars } from '../../src/pipeline/stages/stock.js';
import { readJob } from '../../src/readers/job.js';
import { packRecords } from './pack-records.js';
import { checkPdf, outside, overlaps, textOf } from './pdf.js';

const fonts = await loadFonts();

const { parts, job: usual } = packRecords();
const usualPlan = (await planBars(parts.struts, usual)).plan;

/** A pack whose bars are those of the usual job, whatever is changed in the papers. */
const withUsual = (change: Partial<Job> = {}): PackRecords => ({ ...packRecords(change), stock: usualPlan });

const show = (name: string, written: Written): void => {
  const folder = process.env['SHOW_PAPERS'];
  if (folder) writeFileSync(`${folder}/${name}.pdf`, written.bytes);
};

const rack: Job['stock'] = {
  ...defaultJob().stock,
  bars: [
    { section: 'beech-8', length_mm: 1000, price: 2.35 },
    { section: 'beech-8', length_mm: 2000, price: 4.2, available: 3 },
  ],
  rack: [
    { section: 'beech-8', length_mm: 640, mark: 'B004R' },
    { section: 'beech-8', length_mm: 310 },
    { section: 'beech-8', length_mm: 40, mark: 'stub' },
  ],
  currency: 'EUR',
};
const fromRack = await (async (): Promise<PackRecords> => {
  const records = packRecords({ stock: rack });
  return { ...records, stock: (await planBars(records.parts.struts, records.job)).plan };
})();

it('the saw plan names every bar and every strut on it once, and no text touches another', async () => {
  const records = fromRack;
  const written = await sawPlanPdf(records, fonts);
  show('saw-plan', written);
  checkPdf(written.bytes);
  expect(overlaps(written.placed)).toEqual([]);
  expect(outside(written.bytes)).toEqual([]);
  const texts = written.placed.map((t) => t.text);
  for (const bar of records.stock!.bars) {
    expect(texts.filter((t) => t === bar.mark)).toHaveLength(1);
    const marks = bar.cuts.map((cut) => cut.mark).join('  ');
    expect(texts.some((t) => t === marks)).toBe(true);
  }
});

it.each([
  ['A4', 'SI', false],
  ['Letter', 'US', true],
] as const)('holds on %s in %s units', async (paper, units, fractions) => {
  const written = await sawPlanPdf(
    withUsual({
      output: { ...defaultJob().output, paper, units, fractions },
      saw: { ...defaultJob().saw, trimEnds: 2 },
    }),
    fonts,
  );
  show(`saw-plan-${paper}`, written);
  checkPdf(written.bytes);
  expect(overlaps(written.placed)).toEqual([]);
  expect(outside(written.bytes)).toEqual([]);
});

it('puts equal bars in one batch and says each setting once', () => {
  const bar = (mark: string, lengths: readonly number[], stock = 'dowel') => ({
    mark,
    section: 's',
    stock,
    length: 1000,
    price: 1,
    fromRack: false,
    cuts: lengths.map((length, i) => ({ mark: `${mark}.${i}`, length })),
    offcut: 0,
    kept: false,
  });
  const batches = barBatches(
    [bar('B1', [400, 200, 200]), bar('B2', [400, 200, 200]), bar('B3', [400, 200]), bar('B4', [400, 200], 'other')],
    String,
  );
  expect(batches.map((b) => b.bars.map((x) => x.mark))).toEqual([['B1', 'B2'], ['B3'], ['B4']]);
  expect(batches[0]!.settings).toEqual([
    { length: 400, times: 1 },
    { length: 200, times: 2 },
  ]);
  // In inches to 1/32 lengths half a millimetre apart may be one setting of the saw.
  const { cut } = unitsOf({ ...defaultJob(), output: { ...defaultJob().output, units: 'US', fractions: true } }, 0);
  const inches = barBatches([bar('B1', [307.5, 307.2]), bar('B2', [307.9, 307.2]), bar('B3', [308, 307.2])], cut);
  expect(inches.map((b) => [b.bars.length, b.settings.map((s) => s.times)])).toEqual([
    [2, [2]],
    [1, [1, 1]],
  ]);
});

it.each(Object.keys(LABEL_SHEETS) as Job['output']['labels'][])(
  '%s: two labels a strut, each inside its own',
  async (labels) => {
    const records = withUsual({ output: { ...defaultJob().output, labels } });
    const written = await labelsPdf(records, fonts);
    show(`labels-${labels}`, written);
    checkPdf(written.bytes);
    expect(overlaps(written.placed)).toEqual([]);
    const sheet = LABEL_SHEETS[labels];
    expect(written.sheets).toBe(Math.ceil((2 * records.parts.struts.length) / (sheet.across * sheet.down)));
    for (const t of written.placed) {
      const column = Math.floor((t.x - sheet.left) / sheet.pitch[0]);
      const row = Math.floor((t.y - sheet.top) / sheet.pitch[1]);
      const [x, y] = [sheet.left + column * sheet.pitch[0], sheet.top + row * sheet.pitch[1]];
      expect(t.x - t.width / 2).toBeGreaterThan(x + 4.9);
      expect(t.x + t.width / 2).toBeLessThan(x + sheet.label.width - 4.9);
      expect(t.y - t.height / 2).toBeGreaterThan(y);
      expect(t.y + t.height / 2).toBeLessThan(y + sheet.label.height);
    }
    const words = textOf(written.bytes).split(/[\s,:;]+/);
    for (const strut of records.parts.struts) expect(words.filter((w) => w === strut.mark)).toHaveLength(2);
  },
);

it('the buying list adds up to the plan’s cost, rack offcuts apart', async () => {
  const records = fromRack;
  const rows: Record<string, string>[] = parse(Buffer.from(buyingListCsv(records)), { columns: true });
  const bars = records.stock!.bars;
  expect(rows.reduce((sum, r) => sum + Number(r['quantity']), 0)).toBe(bars.length);
  expect(rows.reduce((sum, r) => sum + Number(r['price']), 0)).toBeCloseTo(records.stock!.cost, 9);
  for (const r of rows.filter((x) => x['from'] === 'rack')) expect(Number(r['price'])).toBe(0);
});

it('the next job reads the rack as this one leaves it', async () => {
  const records = fromRack;
  const text = new TextDecoder().decode(offcutsJson(records));
  const { job, faults } = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 'Next', truss: 'truss.json', ...JSON.parse(text) }),
    'job.json',
  );
  expect(faults).toEqual([]);
  const next = job!.stock.rack;
  expect(next).toEqual(rackAfter(records.stock!, records.job));
  // The stub is too short for any strut and stays; every kept offcut is there, rounded down, under a mark of its own.
  expect(next.some((r) => r.mark === 'stub' && r.length_mm === 40)).toBe(true);
  const kept = records.stock!.bars.filter((b) => b.kept);
  for (const b of kept) {
    expect(next.some((r) => r.mark?.startsWith(`${b.mark}R`) && r.length_mm === Math.floor(b.offcut))).toBe(true);
  }
  const marks = next.flatMap((r) => (r.mark === undefined ? [] : [r.mark]));
  expect(new Set(marks).size).toBe(marks.length);
});
