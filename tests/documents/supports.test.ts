import { expect, it } from 'vitest';
import { supportsCsv } from '../../src/documents/forces/supports-csv.js';
import { report } from '../../src/documents/report/report.js';
import { loadFonts } from '../../src/machine/fonts.js';
import { exampleRecords, packRecords } from './pack-records.js';
import { textOf } from './pdf.js';

it('supports.csv: one row a support and combination, its pressures summing to the combination’s weight', () => {
  const records = exampleRecords('canopy');
  const rows = new TextDecoder().decode(supportsCsv(records)!).trim().split('\n');
  expect(rows[0]).toBe('node,combination,pressure_N,uplift_N,shear_N,ballast_kg');
  const { combinations } = records.solution!;
  const feet = records.topology.truss.supports.filter((s) => s.fixed.z).length;
  expect(rows.length - 1).toBe(feet * combinations.length);
  for (const { name, reactions } of combinations) {
    const own = rows.filter((r) => r.split(',')[1] === name).map((r) => r.split(',').map(Number));
    const sum = own.reduce((total, r) => total + r[2]! - r[3]!, 0);
    expect(sum).toBeCloseTo(
      reactions.reduce((total, r) => total + r.force[2], 0),
      2,
    );
  }
});

it('without supports there is no such table', () => {
  expect(supportsCsv(packRecords())).toBeNull();
});

it('the report says what each support must hold, and how the whole buckles beside Euler', async () => {
  const records = exampleRecords('canopy');
  const text = textOf((await report(records, await loadFonts())).bytes);
  expect(text).toContain('Supports');
  for (const { node } of records.topology.truss.supports) expect(text).toMatch(new RegExp(`^\\s*${node} `, 'm'));
  expect(text).toMatch(/nearest to its Euler\s+load/);
  expect(text).toContain('with design stiffness');
});

it.each([
  [1, true, /loads are\s+compatible\s+with\s+the\s+mechanisms:\s+they\s+do\s+no\s+work\s+on\s+them/],
  [1, false, /loads are\s+not\s+compatible\s+with\s+the\s+mechanisms:\s+they\s+drive\s+them/],
  [1, null, null],
  [0, true, null],
] as const)(
  'of %i mechanisms and a load that is compatible: %s, the report says so, or nothing',
  async (mechanisms, loadCompatible, words) => {
    const records = exampleRecords('canopy');
    const solution = records.solution!;
    const counts = { ...solution.counts!, mechanisms, loadCompatible };
    const { bytes } = await report({ ...records, solution: { ...solution, counts } }, await loadFonts());
    const text = textOf(bytes);
    if (words) expect(text).toMatch(words);
    else expect(text).not.toMatch(/compatible\s+with/);
    expect(text).toMatch(mechanisms === 1 ? /1\s+mechanism\s/ : /no\s+mechanisms?\s/);
  },
);
