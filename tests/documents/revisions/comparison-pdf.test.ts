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
import { overlaps } from '../pdf.js';

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
