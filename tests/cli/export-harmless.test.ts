import { execFileSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readObj } from '../../src/readers/geometry/obj.js';
import { readTruss } from '../../src/readers/truss.js';
import { listen } from './listen.js';

// Groups, cases and titles that are markup, formulas, commands of a format, turned text and other scripts.
const NASTY = [
  `=HYPERLINK("x")`,
  `<script>alert('é')</script>`,
  `');DROP`,
  `]]> & "quoted"`,
  `\u202eabc عربي`,
  '😀 − Ø',
  'v 0 0 0\nl 1 2',
  '0\r\nENDSEC\r\n0\r\nEOF',
  '../../etc/passwd',
];
const dir = mkdtempSync(join(tmpdir(), 'export-harmless-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);
const exported = (name: string): string => readFileSync(at(`out/${name}`), 'utf8');

beforeAll(async () => {
  const nodes = NASTY.map((_, i) => ({ id: `N${i}`, at: [100 * i, 100 * (i % 2), 50 * (i % 3)] }));
  writeFileSync(
    at('truss.json'),
    JSON.stringify({
      format: 'strutwright-truss/1',
      units: 'mm',
      nodes: [...nodes, { id: 'TOP', at: [300, 300, 900] }],
      members: NASTY.map((group, i) => ({ id: `S${i}`, ends: [`N${i}`, 'TOP'], group })),
      faces: [{ id: 'P1', nodes: ['N0', 'N1', 'TOP'], panel: true, group: NASTY[3] }],
      supports: nodes.map((n) => ({ node: n.id, fixed: 'xyz' })),
      loads: [{ case: NASTY[0], node: 'TOP', force: [0, 0, -5] }],
    }),
  );
  writeFileSync(
    at('job.json'),
    JSON.stringify({
      format: 'strutwright-job/1',
      title: NASTY.slice(0, 6).join(' '),
      owner: NASTY[1],
      truss: 'truss.json',
      forces: { source: 'analysis' },
      loads: { cases: [{ name: NASTY[0], kind: 'imposed' }] },
      struts: { section: 'beech-8' },
    }),
  );
  const heard = listen();
  const status = await heard.strutwright('export', at('job.json'), '-o', at('out'));
  expect([status, heard.talked.replace(/^Wrote .*\n$/, '')]).toEqual([0, '']);
});

describe('names that are markup, formulas and commands are harmless in an export', () => {
  it('in the names of its files', () => expect(readdirSync(dir).sort()).toEqual(['job.json', 'out', 'truss.json']));

  it('in CSV: no cell begins a formula (OWASP, CSV injection), every row has its cells', () => {
    for (const name of ['forces.csv', 'displacements.csv', 'reactions.csv', 'findings.csv']) {
      const rows = parse(exported(name), { bom: true }) as string[][];
      expect(rows.length).toBeGreaterThan(1);
      for (const cell of rows.flat()) if (!/^-?\d+(\.\d+)?$/.test(cell)) expect(cell, name).not.toMatch(/^[=+\-@\t\r]/);
    }
  });

  it('in OBJ: as many vertices and lines as there are', () => {
    const text = exported('truss.obj');
    expect(text.match(/^v /gm)).toHaveLength(NASTY.length + 1);
    expect(text.match(/^l /gm)).toHaveLength(NASTY.length);
    expect(readObj(text, 'f').faults).toEqual([]);
  });

  it('in DXF: read without a fault by ezdxf, every line there', () => {
    const script = `
import ezdxf, sys
d = ezdxf.readfile(sys.argv[1])
m = d.modelspace()
print(len(d.audit().errors), len(m.query('LINE')), len(m.query('POLYLINE')))`;
    const said = execFileSync('/usr/bin/python3', ['-c', script, at('out/truss.dxf')], { encoding: 'utf8' });
    expect(said.trim()).toBe(`0 ${NASTY.length} 1`);
  });

  it('in IFC: every line is one instance of ISO 10303-21, its strings closed and its references there', () => {
    // A reader of its own, from the grammar of ISO 10303-21:2016, 5.5 and 6.4: Debian has a viewer of IFC and no tool that checks it.
    const text = exported('truss.ifc');
    expect(text).toMatch(/^[\x20-\x7e\r\n]+$/);
    const data = /\nDATA;\n([\s\S]*)\nENDSEC;\nEND-ISO-10303-21;\n$/.exec(text.replaceAll('\r\n', '\n'))![1]!;
    const defined = new Set<string>();
    const named = new Set<string>();
    const types = new Map<string, number>();
    for (const line of data.split('\n')) {
      const bare = line.replace(/'(?:[^']|'')*'/g, "''");
      const instance = /^(#\d+)\s*=\s*([A-Z0-9]+)\(([^;']*(?:''[^;']*)*)\);$/.exec(bare);
      expect(instance, line).not.toBeNull();
      defined.add(instance![1]!);
      types.set(instance![2]!, (types.get(instance![2]!) ?? 0) + 1);
      for (const [reference] of instance![3]!.matchAll(/#\d+/g)) named.add(reference);
      let depth = 0;
      for (const c of instance![3]!) {
        depth += c === '(' ? 1 : c === ')' ? -1 : 0;
        expect(depth).toBeGreaterThanOrEqual(0);
      }
      expect(depth).toBe(0);
    }
    expect([...named].filter((reference) => !defined.has(reference))).toEqual([]);
    expect(types.get('IFCMEMBER')).toBe(NASTY.length);
    expect(types.get('IFCPLATE')).toBe(1);
    expect(types.get('IFCELEMENTASSEMBLY')).toBe(1);
    // Marks as tags.
    for (const mark of ['S0', 'S8', 'P1', 'TOP']) expect(data).toContain(`'${mark}'`);
  });

  it('in JSON: read back the same', () => {
    const { truss, faults } = readTruss(exported('truss.json'), 'f');
    expect(faults).toEqual([]);
    expect(truss!.members.map((m) => m.group)).toEqual(
      readTruss(readFileSync(at('truss.json'), 'utf8'), 'f').truss!.members.map((m) => m.group),
    );
  });
});
