import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { comparisonPdf } from '../../../src/documents/revisions/comparison-pdf.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import type { Comparison } from '../../../src/model/comparison.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { readTruss } from '../../../src/readers/truss.js';
import { overlaps, textOf } from '../pdf.js';

const dir = mkdtempSync(join(tmpdir(), 'comparison-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));

const { truss } = readTruss(
  `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [300, 0, 0] }, { "id": "C", "at": [150, 260, 0] }, { "id": "D", "at": [150, 90, 240] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"] }, { "id": "S2", "ends": ["B", "C"] }, { "id": "S3", "ends": ["C", "A"] }, { "id": "S4", "ends": ["A", "D"] } ],
  "faces": [ { "id": "P1", "nodes": ["A", "B", "C"], "panel": true } ] }`,
  't.json',
);
const none = { strut: 0, node: 0, panel: 0, cap: 0, guide: 0, gauge: 0 };
const comparison: Comparison = {
  format: 'strutwright-compare/1',
  from: { title: 'Tripod', revision: 'A', date: null },
  to: { title: 'Tripod', revision: 'B', date: '2026-12-01' },
  unchanged: [{ kind: 'strut', mark: 'S1' }],
  relabelled: [{ kind: 'strut', mark: 'S3', was: 'S9' }],
  changed: [
    { kind: 'strut', mark: 'S4', what: [{ name: 'cut_length_mm', from: 276.5, to: 284.5 }] },
    { kind: 'panel', mark: 'P1', what: [] },
  ],
  new: [{ kind: 'node', mark: 'D' }],
  withdrawn: [{ kind: 'strut', mark: 'S7' }],
  totals: {
    unchanged: { ...none, strut: 1 },
    relabelled: { ...none, strut: 1 },
    changed: { ...none, strut: 1, panel: 1 },
    new: { ...none, node: 1 },
    withdrawn: { ...none, strut: 1 },
  },
};

it('counts, lists and pictures what must be made again, and no text touches another', async () => {
  const job = { ...defaultJob('Tripod'), revision: 'B', date: '2026-12-01' };
  const { bytes, sheets, placed } = await comparisonPdf(
    { comparison, job, before: truss, after: truss },
    await loadFonts(),
  );
  expect(sheets).toBe(4);
  const path = join(dir, 'c.pdf');
  writeFileSync(path, bytes);
  execFileSync('qpdf', ['--check', path]);
  const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' });
  expect(text).toMatch(/S4\s+strut\s+cut length 276\.5 to 284\.5/);
  expect(text).toMatch(/S3\s+strut\s+was S9/);
  expect(text).toContain('Withdrawn: strut S7.');
  expect(overlaps(placed)).toEqual([]);
});

it('tells lengths and areas in inches where the papers are in them, and more figures where two would read the same', async () => {
  const what = [
    { name: 'cut_length_mm', from: 276.5, to: 284.5 },
    { name: 'section', from: 'beech-8', to: 'beech-10' },
  ];
  const inInches: Comparison = {
    ...comparison,
    changed: [
      { kind: 'strut', mark: 'S4', what },
      { kind: 'strut', mark: 'S2', what: [{ name: 'cut_length_mm', from: 254, to: 254.1 }] },
      { kind: 'panel', mark: 'P1', what: [{ name: 'area_mm2', from: 6451.6, to: 12903.2 }] },
      { kind: 'node', mark: 'A', what: [{ name: 'angle_deg S1 S3', from: 60, to: 61.5 }] },
      { kind: 'node', mark: 'B', what: [{ name: 'setback_mm S1', from: null, to: 25.4 }] },
    ],
  };
  const told = async (fractions: boolean) => {
    const plain = defaultJob('Tripod');
    const job = { ...plain, revision: 'B', output: { ...plain.output, units: 'US' as const, fractions } };
    const written = await comparisonPdf({ comparison: inInches, job, before: truss, after: truss }, await loadFonts());
    expect(overlaps(written.placed)).toEqual([]);
    return textOf(written.bytes).replaceAll(/\s+/g, ' ');
  };
  // By hand from 1 in = 25.4 mm (NIST SP 811 (2008), appendix B.8): 276.5 mm = 10.8858 in, down to 10 28/32; 284.5 = 11.2008, 11 6/32.
  const ruled = await told(true);
  expect(ruled).toContain('cut length 10 7/8 to 11 3/16; section beech-8 to beech-10');
  // 254.1 mm = 10.00394 in: both are 10 on a rule.
  expect(ruled).toContain('cut length 10.00000 to 10.00394');
  expect(ruled).toContain('area 10.00 to 20.00');
  expect(ruled).toContain('angle S1 S3: 60 to 61.5');
  expect(ruled).toContain('setback S1: none to 1.0000');
  expect(ruled).toContain('in, in², °');
  const decimal = await told(false);
  expect(decimal).toContain('cut length 10.885 to 11.200');
  expect(decimal).toContain('cut length 10.000 to 10.003');
});
