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
