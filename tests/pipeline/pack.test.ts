import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdtempSync, readdirSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { beforeAll, describe, expect, it } from 'vitest';
import { runCli } from '../cli/run-cli.js';

const EXAMPLES = join(import.meta.dirname, '..', '..', 'examples');

type Row = Record<string, string>;

describe.each(['lantern', 'canopy'])('the pack of the example %s', (name) => {
  let pack: string;
  let manifest: {
    files: { path: string; bytes: number; sha256: string }[];
    parts: { mark: string; kind: string; digest: string; files: string[] }[];
    status: string;
  };
  const bytes = (path: string): Buffer => readFileSync(join(pack, path));
  const csv = (path: string): Row[] => parse(bytes(path), { columns: true });
  const truss = JSON.parse(readFileSync(join(EXAMPLES, name, 'truss.json'), 'utf8'));
  const marks = (items: { id: string }[]): string[] => items.map((i) => i.id).sort();
  const column = (rows: Row[], key: string): string[] => rows.map((r) => r[key]!).sort();

  beforeAll(() => {
    pack = join(mkdtempSync(join(tmpdir(), 'strutwright-')), 'pack');
    const done = runCli(['make', join(EXAMPLES, name), '-o', pack, '--workers', '2']);
    expect(done.talk).toBe('');
    expect([0, 1]).toContain(done.status);
    manifest = JSON.parse(bytes('manifest.json').toString());
  }, 300_000);

  it('has every file that its manifest lists, and no other', () => {
    const found = readdirSync(pack, { recursive: true, withFileTypes: true })
      .filter((e) => e.isFile())
      .map((e) => join(e.parentPath, e.name).slice(pack.length + 1))
      .filter((p) => p !== 'manifest.json')
      .sort();
    expect(manifest.files.map((f) => f.path).sort()).toEqual(found);
    for (const file of manifest.files) {
      expect(bytes(file.path).length).toBe(file.bytes);
      expect(createHash('sha256').update(bytes(file.path)).digest('hex')).toBe(file.sha256);
    }
    for (const path of CONTRACT) expect(found).toContain(path);
  });

  it('names the same struts, nodes and panels in every list', () => {
    const struts = marks(truss.members);
    const nodes = marks(truss.nodes);
    const panels = marks(truss.faces.filter((f: { panel?: boolean }) => f.panel));
    const partsOf = (kind: string) =>
      manifest.parts
        .filter((p) => p.kind === kind)
        .map((p) => p.mark)
        .sort();
    expect(partsOf('strut')).toEqual(struts);
    expect(partsOf('node')).toEqual(nodes);
    expect(partsOf('panel')).toEqual(panels);
    expect(column(csv('struts/cut-list.csv'), 'mark')).toEqual(struts);
    expect(csv('nodes/bar-directions.csv')).toHaveLength(2 * struts.length);
    expect([...new Set(column(csv('nodes/bar-directions.csv'), 'node'))]).toEqual(nodes);
    // Where each node's mesh stands; the caps of drop-in sockets have a mesh of their own beside their node's.
    const placed = Object.keys(JSON.parse(bytes('nodes/placement.json').toString()));
    expect(placed.filter((mark) => nodes.includes(mark)).sort()).toEqual(nodes);
    for (const other of placed.filter((mark) => !nodes.includes(mark))) {
      const [node, cap] = other.split('.cap-');
      expect(nodes).toContain(node);
      expect(struts).toContain(cap);
    }
    expect(column(csv('panels/panel-list.csv'), 'mark')).toEqual(panels);
    expect(Object.keys(JSON.parse(bytes('panels/outlines.json').toString())).sort()).toEqual(panels);
    const check = JSON.parse(bytes('check.json').toString());
    expect(marks(check.members.map((m: { mark: string }) => ({ id: m.mark })))).toEqual(struts);
    expect(check.faces).toHaveLength(truss.faces.length);
    const stock = JSON.parse(bytes('struts/stock-plan.json').toString());
    expect(stock.bars.flatMap((b: { cuts: { mark: string }[] }) => b.cuts.map((c) => c.mark)).sort()).toEqual(struts);
  });

  it('cuts so that cut + setbacks + floats is the axis to the last printed digit', () => {
    const at = new Map<string, number[]>(truss.nodes.map((n: { id: string; at: number[] }) => [n.id, n.at]));
    for (const row of csv('struts/cut-list.csv')) {
      const micro = (key: string): number => Math.round(Number(row[key]) * 1000);
      expect(
        micro('cut_length_mm') +
          micro('setback_from_mm') +
          micro('setback_to_mm') +
          micro('float_from_mm') +
          micro('float_to_mm'),
      ).toBe(micro('axis_length_mm'));
      const [a, b] = [at.get(row['from']!)!, at.get(row['to']!)!];
      expect(Number(row['axis_length_mm'])).toBeCloseTo(Math.hypot(...a.map((v, i) => v - b[i]!)), 2);
      expect(Number(row['float_from_mm'])).toBeGreaterThanOrEqual(0.75 - 1e-9);
    }
  });

  it('directions are unit vectors from node to node', () => {
    const at = new Map<string, number[]>(truss.nodes.map((n: { id: string; at: number[] }) => [n.id, n.at]));
    const ends = new Map<string, string[]>(truss.members.map((m: { id: string; ends: string[] }) => [m.id, m.ends]));
    for (const row of csv('nodes/bar-directions.csv')) {
      const far = ends.get(row['strut']!)!.find((n) => n !== row['node'])!;
      const d = at.get(far)!.map((v, i) => v - at.get(row['node']!)![i]!);
      const length = Math.hypot(...d);
      ['x', 'y', 'z'].forEach((axis, i) => {
        expect(Math.abs(Number(row[axis]) - d[i]! / length)).toBeLessThan(1e-7);
      });
    }
  });

  it('every STL is closed by admesh, an independent checker', () => {
    const stls = manifest.files.filter((f) => f.path.endsWith('.stl')).map((f) => join(pack, f.path));
    expect(stls.length).toBeGreaterThanOrEqual(truss.nodes.length);
    for (const stl of stls.slice(0, 12)) {
      const { stdout } = spawnSync('timeout', ['60', 'admesh', stl], { encoding: 'utf8' });
      expect(stdout).toMatch(/Total disconnected facets\s*:\s*0/);
      expect(stdout).toMatch(/Number of parts\s*:\s*1\s/);
      expect(stdout).toMatch(/Degenerate facets\s*:\s*0/);
    }
  });

  it('every PDF is sound by qpdf, an independent reader', () => {
    const pdfs = manifest.files.filter((f) => f.path.endsWith('.pdf'));
    expect(pdfs.length).toBeGreaterThanOrEqual(4);
    for (const { path } of pdfs) expect(spawnSync('qpdf', ['--check', join(pack, path)]).status).toBe(0);
  });

  it('has the same bytes again, with another number of workers', () => {
    const again = `${pack}-again`;
    runCli(['make', join(EXAMPLES, name), '-o', again, '--workers', '1'], undefined, { TZ: 'Pacific/Auckland' });
    expect(existsSync(again)).toBe(true);
    expect(readFileSync(join(again, 'manifest.json'), 'utf8')).toBe(bytes('manifest.json').toString());
  }, 300_000);
});

/** Paths that are a contract. */
const CONTRACT = [
  'check.json',
  'report.pdf',
  'forces/force-sheets.pdf',
  'forces/forces.csv',
  'struts/cut-list.csv',
  'struts/cut-list.pdf',
  'struts/stock-plan.json',
  'nodes/bar-directions.csv',
  'nodes/bar-angles.csv',
  'nodes/placement.json',
  'nodes/node-sheets.pdf',
  'panels/panel-list.csv',
  'panels/outlines.json',
];
