import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { unzipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makePack } from '../../dist/pipeline/make.js';
import { readJob } from '../../src/readers/job.js';
import { readTruss } from '../../src/readers/truss.js';

// Names that are markup, formulas, other scripts, turned text, and words of the language itself.
const TITLE = '=HYPERLINK(\\"x\\") <script>alert(\'é\')</script> & ]]> 😀 عربي \\\\ ${x} %n <!--';
const JOB = `{ "format": "strutwright-job/1", "title": "${TITLE}", "truss": "truss.json", "owner": "<b>\\"O'wner\\"</b>", "number": "@1", "drawnBy": "+1",
  "approvedBy": "-1", "forces": { "source": "analysis" }, "printers": [ { "name": "<p>&" } ], "sheets": [ { "name": "=1+1\\"<s>" } ],
  "loads": { "cases": [ { "name": "constructor", "kind": "snow" }, { "name": "=1+1", "kind": "imposed" }, { "name": "<b>😀\\u202e", "kind": "imposed" } ] },
  "stock": { "bars": [ { "section": "beech-8", "length_mm": 1000, "name": "=cmd|' /C calc'!A0" } ] } }`;
const TRUSS = `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "constructor", "at": [0, 0, 0] }, { "id": "toString", "at": [300, 0, 0] }, { "id": "valueOf", "at": [150, 260, 0] }, { "id": "hasOwnProperty", "at": [150, 90, 240] } ],
  "members": [ { "id": "constructor", "ends": ["constructor", "toString"], "group": "=cmd|' /C calc'!A0" }, { "id": "prototype", "ends": ["toString", "valueOf"], "group": "<script>alert(1)</script>" },
    { "id": "toString", "ends": ["valueOf", "constructor"], "group": "constructor" }, { "id": "S4", "ends": ["constructor", "hasOwnProperty"], "group": "__proto__" },
    { "id": "S5", "ends": ["toString", "hasOwnProperty"], "group": "\\u202eabc" }, { "id": "S6", "ends": ["valueOf", "hasOwnProperty"] } ],
  "faces": [ { "id": "valueOf", "nodes": ["constructor", "toString", "hasOwnProperty"], "panel": true, "group": "]]>&\\"'" } ],
  "supports": [ { "node": "constructor", "fixed": "xyz" }, { "node": "toString", "fixed": "xyz" }, { "node": "valueOf", "fixed": "z" } ],
  "loads": [ { "case": "constructor", "node": "hasOwnProperty", "force": [0, 0, -5] }, { "case": "=1+1", "node": "hasOwnProperty", "force": [1, 0, 0] }, { "case": "<b>😀\\u202e", "node": "hasOwnProperty", "force": [0, 0, -5] } ] }`;

const dir = mkdtempSync(join(tmpdir(), 'harmless-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const files = new Map<string, Uint8Array>();
const ending = (end: string): [string, Uint8Array][] => [...files].filter(([path]) => path.endsWith(end));
const text = (bytes: Uint8Array): string => new TextDecoder('utf-8', { fatal: true }).decode(bytes);
const onDisk = (path: string, bytes: Uint8Array): string => {
  const place = join(dir, path.replaceAll('/', '_'));
  writeFileSync(place, bytes);
  return place;
};

beforeAll(async () => {
  const [{ job, faults }, read] = [readJob(JOB, 'job.json'), readTruss(TRUSS, 'truss.json')];
  expect([...faults, ...read.faults]).toEqual([]);
  await makePack(read.truss!, job!, { write: (path, bytes) => void files.set(path, bytes) });
}, 120_000);

describe('names that are markup, formulas and words of the language are harmless', () => {
  it('in the names of files', () => {
    expect(files.size).toBeGreaterThan(20);
    for (const path of files.keys()) expect(path).toMatch(/^[A-Za-z0-9_./-]+$/);
    expect(files.has('nodes/stl/constructor.stl')).toBe(true);
  });
  it('in tables: no cell begins a formula (OWASP, CSV injection)', () => {
    expect(ending('.csv').length).toBeGreaterThan(4);
    for (const [path, bytes] of ending('.csv'))
      for (const row of parse(text(bytes), { bom: true, relax_column_count: true }) as string[][])
        for (const cell of row)
          if (!/^[-+]?\d+(\.\d+)?$/.test(cell)) expect(cell, `${path}: ${cell}`).not.toMatch(/^[=+\-@\t\r]/);
  });
  it('in JSON: every mark has its own row', () => {
    for (const [, bytes] of ending('.json')) JSON.parse(text(bytes));
    const outlines = JSON.parse(text(files.get('panels/outlines.json')!));
    expect(Object.hasOwn(outlines, 'valueOf')).toBe(true);
    const placement = JSON.parse(text(files.get('nodes/placement.json')!));
    expect(Object.keys(placement).sort()).toEqual(['constructor', 'hasOwnProperty', 'toString', 'valueOf']);
    const check = JSON.parse(text(files.get('check.json')!));
    expect(check.members.map((m: { mark: string }) => m.mark)).toEqual([
      'constructor',
      'prototype',
      'toString',
      'S4',
      'S5',
      'S6',
    ]);
    for (const member of check.members)
      for (const name of ['constructor', '=1+1', '<b>😀\u202e']) expect(typeof member.force_N[name]).toBe('number');
  });
  it('in SVG and HTML: escaped, and drawn by another reader', () => {
    for (const [path, bytes] of [...ending('.svg'), ...ending('.html')]) {
      expect(text(bytes), path).not.toMatch(/<script>alert|<b>"O'wner|<!--.*<!--/);
      if (path.endsWith('.svg')) execFileSync('rsvg-convert', ['-o', join(dir, 'drawn.png'), onDisk(path, bytes)]);
    }
    expect(ending('.svg').length).toBeGreaterThan(1);
  });
  it('in 3MF: well-formed XML', () => {
    const script = 'import sys, xml.dom.minidom as m; m.parse(sys.argv[1])';
    expect(ending('.3mf').length).toBeGreaterThan(0);
    for (const [path, bytes] of ending('.3mf'))
      for (const [part, xml] of Object.entries(unzipSync(bytes)))
        if (/\.(model|rels|xml)$/.test(part))
          execFileSync('/usr/bin/python3', ['-c', script, onDisk(`${path}-${part}`, xml)]);
  });
  it('in DXF: read without a fault by ezdxf', () => {
    const script = 'import sys, ezdxf; d = ezdxf.readfile(sys.argv[1]); print(len(d.audit().errors))';
    expect(ending('.dxf').length).toBeGreaterThan(0);
    for (const [path, bytes] of ending('.dxf'))
      expect(execFileSync('/usr/bin/python3', ['-c', script, onDisk(path, bytes)], { encoding: 'utf8' }).trim()).toBe(
        '0',
      );
  });
  it('in PDF: sound by qpdf, with the title as text', () => {
    expect(ending('.pdf').length).toBeGreaterThan(4);
    for (const [path, bytes] of ending('.pdf')) execFileSync('qpdf', ['--check', onDisk(path, bytes)]);
    const report = execFileSync('pdftotext', [onDisk('report.pdf', files.get('report.pdf')!), '-'], {
      encoding: 'utf8',
    });
    expect(report).toContain('<script>');
  });
});
