import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { ifcGuid } from '../../../src/documents/truss/ifc-guid.js';
import { stepReal, stepText } from '../../../src/documents/truss/step-text.js';
import { writeTrussDxf } from '../../../src/documents/truss/truss-dxf.js';
import { writeTrussIfc } from '../../../src/documents/truss/truss-ifc.js';
import { writeTrussObj } from '../../../src/documents/truss/truss-obj.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { assess } from '../../../src/pipeline/assess.js';
import { readDxf } from '../../../src/readers/geometry/dxf.js';
import { readObj } from '../../../src/readers/geometry/obj.js';
import { readTruss } from '../../../src/readers/truss.js';

const dir = mkdtempSync(join(tmpdir(), 'writers-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));

// An invented pyramid; the group and the title try to break out of every format.
const { truss } = readTruss(
  `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [300, 0, 0] }, { "id": "C", "at": [300, 300, 0] }, { "id": "D", "at": [0, 300, 0] }, { "id": "E", "at": [150, 150, 240.5] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"], "group": "ring\\n0\\nEOF <b>'é" }, { "id": "S2", "ends": ["B", "C"] }, { "id": "S3", "ends": ["C", "D"] }, { "id": "S4", "ends": ["D", "A"] },
    { "id": "S5", "ends": ["A", "E"] }, { "id": "S6", "ends": ["B", "E"] }, { "id": "S7", "ends": ["C", "E"] }, { "id": "S8", "ends": ["D", "E"] } ],
  "faces": [ { "id": "P1", "nodes": ["A", "B", "C", "D"], "panel": true }, { "id": "P2", "nodes": ["A", "B", "E"], "panel": true } ] }`,
  't.json',
);

describe('OBJ', () => {
  it('reads back with every strut and face, under their groups', () => {
    const { geometry, faults } = readObj(writeTrussObj(truss!), 't.obj');
    expect(faults).toEqual([]);
    expect(geometry!.lines).toHaveLength(8);
    expect(geometry!.lines[4]!.ends).toEqual([
      [0, 0, 0],
      [150, 150, 240.5],
    ]);
    expect(geometry!.loops.map((l) => l.points.length)).toEqual([4, 3]);
    expect(writeTrussObj(truss!)).toContain('\no S7\ng STRUTS\nl 3 5\n');
  });
});

describe('DXF', () => {
  const text = writeTrussDxf(truss!);
  it('is read without a fault by ezdxf, with its unit, layers and marks', () => {
    const path = join(dir, 't.dxf');
    writeFileSync(path, text);
    const script = `
import ezdxf, json, sys
d = ezdxf.readfile(sys.argv[1])
m = list(d.modelspace())
print(json.dumps({
  'errors': len(d.audit().errors), 'unit': d.header['$INSUNITS'],
  'lines': sorted([list(e.dxf.start) + list(e.dxf.end) for e in m if e.dxftype() == 'LINE']),
  'layers': sorted({e.dxf.layer for e in m}),
  'marks': sorted(e.dxf.text for e in m if e.dxftype() == 'TEXT'),
  'loops': [[e.is_closed, e.is_3d_polyline, len(e)] for e in m if e.dxftype() == 'POLYLINE']}))`;
    const read = JSON.parse(execFileSync('/usr/bin/python3', ['-c', script, path], { encoding: 'utf8' }));
    expect(read).toMatchObject({
      errors: 0,
      unit: 4,
      layers: ['FACES', 'MARKS-FACES', 'MARKS-NODES', 'MARKS-STRUTS', 'STRUTS', 'STRUTS-ring_0_EOF _b___'],
      marks: ['A', 'B', 'C', 'D', 'E', 'P1', 'P2', 'S1', 'S2', 'S3', 'S4', 'S5', 'S6', 'S7', 'S8'],
      loops: [
        [true, true, 4],
        [true, true, 3],
      ],
    });
    expect(read.lines).toHaveLength(8);
    expect(read.lines).toContainEqual([0, 0, 0, 150, 150, 240.5]);
  });
  it('reads back, and is the same every time', () => {
    const { geometry } = readDxf(text, 't.dxf');
    expect(geometry).toMatchObject({ unit: 'mm', up: 'z' });
    expect(geometry!.lines).toHaveLength(8);
    expect(geometry!.loops.map((l) => l.points.length)).toEqual([4, 3]);
    expect(writeTrussDxf(truss!)).toBe(text);
  });
});

describe('IFC4', () => {
  const job = { ...defaultJob("Pyramid 'Ø'\\"), date: '2026-12-01' };
  const text = writeTrussIfc(assess(truss!, job));
  const [head, data] = text.split('\nDATA;\n');
  const lines = data!.split('\n').filter((l) => l.startsWith('#'));
  const of = (entity: string): string[] => lines.filter((l) => l.includes(`=${entity}(`));

  it('is a STEP file of schema IFC4 in which every name stands before its use', () => {
    expect(head).toContain("FILE_SCHEMA(('IFC4'))");
    expect(head).toContain("'Pyramid ''\\X2\\00D8\\X0\\''\\\\','2026-12-01T00:00:00'");
    lines.forEach((line, i) => {
      expect(line).toMatch(/^#\d+=IFC[A-Z0-9]+\(.*\);$/);
      expect(line.startsWith(`#${i + 1}=`)).toBe(true);
      for (const [, ref] of line
        .slice(1)
        .replace(/'(?:[^']|'')*'/g, '')
        .matchAll(/#(\d+)/g))
        expect(Number(ref)).toBeLessThan(i + 1);
    });
    expect(text.endsWith('\nENDSEC;\nEND-ISO-10303-21;\n')).toBe(true);
  });
  it('has a member a strut, a plate a panel, an accessory a node in one assembly, with their marks as tags', () => {
    expect(of('IFCMEMBER').map((l) => /,'(S\d)',\.STRUT\.\);$/.exec(l)?.[1])).toEqual(
      truss!.members.map((m) => m.mark),
    );
    expect(of('IFCPLATE').map((l) => /,'(P\d)',\.SHEET\.\);$/.exec(l)?.[1])).toEqual(['P1', 'P2']);
    expect(of('IFCDISCRETEACCESSORY')).toHaveLength(5);
    expect(of('IFCELEMENTASSEMBLY')[0]).toMatch(/\.SITE\.,\.TRUSS\.\);$/);
    const parts = of('IFCRELAGGREGATES').at(-1)!;
    expect([...parts.matchAll(/#\d+/g)]).toHaveLength(1 + 1 + 8 + 2 + 5);
  });
  it('gives every thing an identifier of its own that does not change', () => {
    const guids = [...data!.matchAll(/^#\d+=IFC\w+\('([0-9A-Za-z_$]{22})'/gm)].map((m) => m[1]!);
    expect(guids.length).toBeGreaterThan(20);
    expect(new Set(guids).size).toBe(guids.length);
    for (const guid of guids) expect(guid[0]).toMatch(/[0-3]/);
    expect(writeTrussIfc(assess(truss!, job))).toBe(text);
    // Ten thousand names, no two alike.
    expect(new Set(Array.from({ length: 10_000 }, (_, i) => ifcGuid(`strut S${i}`))).size).toBe(10_000);
  });
});

// ISO 10303-21, 6.4.3 and 6.3 (from memory): doubled apostrophe and backslash, \\X2\\ for other characters; reals have a point.
it.each([
  ["it's", "'it''s'"],
  ['a\\b', "'a\\\\b'"],
  ['Ø\n', "'\\X2\\00D8000A\\X0\\'"],
])('STEP text of %j', (text, step) => expect(stepText(text)).toBe(step));
it.each([
  [0, '0.'],
  [-0, '0.'],
  [12.5, '12.5'],
  [1e21, '1.E+21'],
  [1e-12, '0.'],
  [-3, '-3.'],
])('STEP real of %d', (value, step) => expect(stepReal(value)).toBe(step));
