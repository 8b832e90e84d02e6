import { parse } from 'csv-parse/sync';
import { describe, expect, it } from 'vitest';
import { forceSheets } from '../../src/documents/forces/force-sheets.js';
import { forcesCsv } from '../../src/documents/forces/forces-csv.js';
import type { Written } from '../../src/documents/kit/paper.js';
import { barAnglesCsv } from '../../src/documents/nodes/bar-angles.js';
import { barDirectionsCsv } from '../../src/documents/nodes/bar-directions.js';
import { nodeSheets } from '../../src/documents/nodes/node-sheets.js';
import { outlinesJson } from '../../src/documents/panels/outlines.js';
import { panelListCsv } from '../../src/documents/panels/panel-list.js';
import { report } from '../../src/documents/report/report.js';
import { cutListCsv } from '../../src/documents/struts/cut-list-csv.js';
import { cutListPdf } from '../../src/documents/struts/cut-list-pdf.js';
import { loadFonts } from '../../src/machine/fonts.js';
import { add, cross, scale, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { inventedTruss } from './invented.js';
import { exampleRecords, packRecords, planeTruss } from './pack-records.js';
import { checkPdf, outside, overlaps, textOf } from './pdf.js';

const fonts = await loadFonts();
const records = packRecords();
const rowsOf = (bytes: Uint8Array, delimiter = ','): Record<string, string>[] =>
  parse(Buffer.from(bytes), { columns: true, delimiter, bom: true });

const holds = (written: Written): string => {
  checkPdf(written.bytes);
  expect(overlaps(written.placed)).toEqual([]);
  expect(outside(written.bytes)).toEqual([]);
  return textOf(written.bytes);
};
const says = (text: string, marks: readonly string[]): void => {
  const words = new Set(text.split(/[\s,:;]+/));
  expect(marks.filter((mark) => !words.has(mark))).toEqual([]);
};
const struts = records.topology.truss.members.map((m) => m.mark);
const nodes = records.topology.truss.nodes.map((n) => n.mark);

describe('papers of a pack', () => {
  it('force sheets name every node and strut', async () => {
    says(holds(await forceSheets(records, fonts)), [...struts, ...nodes]);
  });
  it('the cut list names every strut and both its ends', async () => {
    says(holds(await cutListPdf(records, fonts)), [...struts, ...nodes]);
  });
  it('node sheets name every node and strut', async () => {
    says(holds(await nodeSheets(records, fonts)), [...struts, ...nodes]);
  });
  it.each([
    ['drilled-ball', { kind: 'round', diameter_mm: 8 }, 'Jig'],
    ['socket', { kind: 'rectangle', width_mm: 8, height_mm: 14 }, 'Setback'],
    ['spigot', { kind: 'tube', diameter_mm: 10, wall_mm: 1 }, 'Setback'],
  ] as const)('node sheets of the system %s', async (system, shape, word) => {
    const base = defaultJob();
    const other = packRecords({
      nodes: { ...base.nodes, system },
      struts: { ...base.struts, section: 'own' },
      sections: { own: { shape, material: 'beech-dowel' } },
    });
    const text = holds(await nodeSheets(other, fonts));
    says(text, nodes);
    expect(text).toContain(word);
  });
  it('every paper keeps its rules with marks as long as they may be', async () => {
    const long = (mark: string): string => `Mark-of_${mark}_`.padEnd(24, 'W');
    const plain = inventedTruss();
    const truss = {
      ...plain,
      faces: [],
      nodes: plain.nodes.map((n) => ({ ...n, mark: long(n.mark) })),
      members: plain.members.map((m) => ({ ...m, mark: long(m.mark), ends: m.ends.map(long) as [string, string] })),
    };
    const records = packRecords({}, truss);
    for (const write of [forceSheets, cutListPdf, nodeSheets, report]) holds(await write(records, fonts));
  });
  it.each([
    ['no forces', (t: Truss): Truss => ({ ...t, members: t.members.map((m) => ({ ...m, force: null })) })],
    ['forces of nought', (t: Truss): Truss => ({ ...t, members: t.members.map((m) => ({ ...m, force: 0 })) })],
    [
      'one strut',
      (t: Truss): Truss => ({ ...t, faces: [], nodes: t.nodes.slice(0, 9), members: t.members.slice(0, 1) }),
    ],
    [
      'sections that nobody knows',
      (t: Truss): Truss => ({ ...t, members: t.members.map((m) => ({ ...m, section: 'unknown' })) }),
    ],
  ])('every paper stands with %s', async (_, change) => {
    const bare = packRecords({}, change(inventedTruss()));
    for (const write of [forceSheets, cutListPdf, nodeSheets, report]) {
      const text = holds(await write(bare, fonts));
      expect(text).not.toMatch(/NaN|undefined|null|Infinity/);
    }
    for (const table of [forcesCsv, cutListCsv])
      expect(rowsOf(table(bare)).length).toBe(bare.topology.truss.members.length);
  });
  it('the report says every finding', async () => {
    const text = holds(await report(records, fonts));
    says(
      text,
      records.findings.map((f) => f.subject).filter((s) => s !== 'truss'),
    );
    expect(text).toContain('On hold');
    expect(text).toContain('half the clear-wood means of European beech');
  });
  it('the report draws deflection, buckling and mechanisms where there are any', async () => {
    const standing = holds(await report(exampleRecords('canopy'), fonts));
    expect(standing).toContain('Deflected shape');
    expect(standing).toContain('Lowest buckling shape');
    expect(standing).not.toContain('Mechanism 1');
    const short = holds(
      await report(
        // A corner held by three struts swings once one of them is gone.
        exampleRecords('canopy', (truss) => ({ ...truss, members: truss.members.filter((m) => m.mark !== 'S02') })),
        fonts,
      ),
    );
    expect(short).toContain('Mechanism 1 of');
  });
  it('force sheets of a loaded truss show its loads', async () => {
    const text = holds(await forceSheets(exampleRecords('canopy'), fonts));
    expect(text).toContain('24.00 N');
  });
  it('truss and force diagram stand on one sheet with the same marks, and each node has its polyhedron', async () => {
    const lantern = exampleRecords('lantern');
    const text = holds(await forceSheets(lantern, fonts));
    const diagram = text.slice(text.indexOf('Form and forces'));
    for (const { mark } of lantern.topology.truss.members)
      expect(diagram.split(new RegExp(`\\b${mark}\\b`)).length).toBeGreaterThan(2);
    for (const { cell } of lantern.reciprocal!.diagram!.vertices) expect(diagram).toContain(cell);
    expect(holds(await nodeSheets(lantern, fonts))).toContain('closed to');
  });
  it('a plane truss is drawn square to its plane beside its diagram', async () => {
    const base = defaultJob();
    const plane = packRecords(
      { forces: { ...base.forces, source: 'reciprocal', fix: [{ strut: 'S1', force_N: -10 }] } },
      planeTruss(),
    );
    expect(plane.reciprocal!.diagram!.kind).toBe('plane');
    for (const write of [forceSheets, nodeSheets, report]) holds(await write(plane, fonts));
  });
  it.each(['A3', 'Letter'] as const)('all hold on %s in inches and pounds', async (paper) => {
    const us = packRecords({
      output: { ...defaultJob().output, paper, units: 'US', fractions: true, projection: 'third-angle' },
    });
    for (const write of [forceSheets, cutListPdf, nodeSheets, report]) holds(await write(us, fonts));
  });
});

describe('tables of a pack', () => {
  it('cut-list.csv: one row a strut, and axis = setbacks + floats + cut to the last digit', () => {
    const rows = rowsOf(cutListCsv(records));
    expect(rows.map((r) => r['mark'])).toEqual(struts);
    expect(Object.keys(rows[0]!)).toEqual(
      'mark,from,to,section,axis_length_mm,setback_from_mm,setback_to_mm,cut_length_mm,float_from_mm,float_to_mm,force_N,utilisation,bar'.split(
        ',',
      ),
    );
    const um = (text: string | undefined): number => Math.round(Number(text) * 1000);
    for (const r of rows)
      expect(
        um(r['setback_from_mm']) +
          um(r['setback_to_mm']) +
          um(r['float_from_mm']) +
          um(r['float_to_mm']) +
          um(r['cut_length_mm']),
      ).toBe(um(r['axis_length_mm']));
  });
  it('forces.csv has one row a strut', () => {
    expect(rowsOf(forcesCsv(records)).map((r) => r['mark'])).toEqual(struts);
  });
  it('bar-directions.csv has unit vectors that lead to the far node', () => {
    const rows = rowsOf(barDirectionsCsv(records));
    expect(rows.length).toBe(2 * struts.length);
    for (const r of rows) {
      const d: Vec3 = [Number(r['x']), Number(r['y']), Number(r['z'])];
      expect(Math.abs(Math.hypot(...d) - 1)).toBeLessThan(1e-8);
      const member = records.topology.truss.members[records.topology.memberIndex.get(r['strut']!)!]!;
      const far = member.ends.find((m) => m !== r['node'])!;
      const length = records.topology.axisLength[records.topology.memberIndex.get(r['strut']!)!]!;
      const reached = add(records.topology.at(r['node']!), scale(d, length));
      expect(Math.hypot(...reached.map((c, i) => c - records.topology.at(far)[i]!))).toBeLessThan(1e-5);
    }
  });
  it('bar-angles.csv has every pair at a node, by the law of cosines', () => {
    const rows = rowsOf(barAnglesCsv(records));
    expect(rows.length).toBe(
      nodes.reduce((n, _, i) => {
        const k = records.topology.barsAt[i]!.length;
        return n + (k * (k - 1)) / 2;
      }, 0),
    );
    for (const r of rows.slice(0, 40)) {
      const far = (strut: string): Vec3 =>
        records.topology.at(
          records.topology.truss.members[records.topology.memberIndex.get(strut)!]!.ends.find((m) => m !== r['node'])!,
        );
      const [n, a, b] = [records.topology.at(r['node']!), far(r['strut_a']!), far(r['strut_b']!)];
      const gap = (p: Vec3, q: Vec3): number => Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
      const [x, y, z] = [gap(n, a), gap(n, b), gap(a, b)];
      expect(Number(r['angle_deg'])).toBeCloseTo((Math.acos((x * x + y * y - z * z) / (2 * x * y)) * 180) / Math.PI, 5);
    }
  });
  it('panel-list.csv and outlines.json agree, and frames are right-handed', () => {
    const list = rowsOf(panelListCsv(records));
    expect(Object.keys(list[0]!)).toEqual(['mark', 'corners', 'area_mm2', 'thickness_mm', 'flatness_mm', 'sheet']);
    const outlines = JSON.parse(Buffer.from(outlinesJson(records)).toString());
    expect(Object.keys(outlines)).toEqual(list.map((r) => r['mark']));
    for (const [mark, { outline, frame }] of Object.entries<{ outline: number[][]; frame: Record<string, Vec3> }>(
      outlines,
    )) {
      expect(Math.hypot(...cross(frame['x']!, frame['y']!).map((c, i) => c - frame['z']![i]!))).toBeLessThan(1e-12);
      expect(outline.length).toBe(Number(list.find((r) => r['mark'] === mark)!['corners']));
    }
  });
  it('a semicolon table has decimal commas and the same numbers', () => {
    const semicolon = packRecords({ output: { ...defaultJob().output, csv: 'semicolon' } });
    const bytes = cutListCsv(semicolon);
    expect([...bytes.slice(0, 3)]).toEqual([0xef, 0xbb, 0xbf]);
    const rows = rowsOf(bytes, ';');
    const plain = rowsOf(cutListCsv(records));
    expect(rows.map((r) => r['cut_length_mm']!.replace(',', '.'))).toEqual(plain.map((r) => r['cut_length_mm']));
  });
  it('a text that a spreadsheet would run is made harmless, a negative number is not touched', () => {
    const { topology } = records;
    const evil = {
      ...records,
      utilisations: [
        { mark: 'S1', kind: 'strut' as const, at: null, combination: '=1+1', force: 1, utilisation: 9, rule: '@x' },
      ],
    };
    const first = rowsOf(forcesCsv(evil))[0]!;
    expect(first['combination']).toBe("'=1+1");
    expect(first['rule']).toBe("'@x");
    expect(Number(first['force_N'])).toBeCloseTo(topology.truss.members[0]!.force!, 3);
  });
});
