import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { afterAll, describe, expect, it } from 'vitest';
import { listen } from './listen.js';

const dir = mkdtempSync(join(tmpdir(), 'export-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);
const heard = listen();
const { strutwright } = heard;
const table = (path: string) => parse(readFileSync(path, 'utf8'), { columns: true }) as Record<string, string>[];

// An upright tripod of three equal legs, 300 mm high over a base circle of 400 mm, 30 N down at its top; invented.
const foot = (k: number): number[] => [400 * Math.cos((2 * Math.PI * k) / 3), 400 * Math.sin((2 * Math.PI * k) / 3), 0];
writeFileSync(
  at('truss.json'),
  JSON.stringify({
    format: 'strutwright-truss/1',
    units: 'mm',
    nodes: [...[0, 1, 2].map((k) => ({ id: `F${k}`, at: foot(k) })), { id: 'TOP', at: [0, 0, 300] }],
    members: [0, 1, 2].map((k) => ({ id: `LEG${k}`, ends: [`F${k}`, 'TOP'] })),
    supports: [0, 1, 2].map((k) => ({ node: `F${k}`, fixed: 'xyz' })),
    loads: [{ case: 'lamp', node: 'TOP', force: [0, 0, -30] }],
  }),
);
writeFileSync(
  at('job.json'),
  JSON.stringify({
    format: 'strutwright-job/1',
    title: 'Tripod',
    truss: 'truss.json',
    forces: { source: 'analysis' },
    analysis: { joints: 'pinned', selfWeight: false },
    loads: { cases: [{ name: 'lamp', kind: 'imposed' }] },
    struts: { section: 'beech-8' },
  }),
);

describe('an export into a folder', () => {
  it('holds the truss in every format and the results as tables', async () => {
    expect(await strutwright('export', at('job.json'), '-o', at('all'))).toBe(0);
    expect(readdirSync(at('all')).sort()).toEqual([
      'displacements.csv',
      'findings.csv',
      'forces.csv',
      'reactions.csv',
      'truss.dxf',
      'truss.ifc',
      'truss.json',
      'truss.obj',
    ]);
  });
  it('has the forces and reactions of statics: each leg 30/3 x 500/300 N in compression', () => {
    for (const row of table(at('all/forces.csv'))) expect(Number(row['case lamp N'])).toBeCloseTo(-50 / 3, 2);
    const reactions = table(at('all/reactions.csv')).filter((r) => r['case'] === 'lamp');
    expect(reactions.map((r) => Number(r['z_N']))).toEqual([10, 10, 10]);
    // Each foot pushes outwards with 10 x 400/300 N, so its support holds it inwards.
    expect(Number(reactions[0]!['x_N'])).toBeCloseTo(-40 / 3, 2);
    const top = table(at('all/displacements.csv')).find((r) => r['case'] === 'lamp' && r['node'] === 'TOP')!;
    expect(Number(top['z_mm'])).toBeLessThan(0);
    expect([Number(top['x_mm']), Number(top['y_mm'])]).toEqual([0, 0]);
  });
  it('has every finding of the check', async () => {
    await strutwright('check', at('job.json'), '--json');
    const { findings } = JSON.parse(heard.said);
    expect(table(at('all/findings.csv')).map((f) => [f['level'], f['code'], f['subject'], f['message']])).toEqual(
      findings.map((f: Record<string, string>) => [f['level'], f['code'], f['subject'], f['message']]),
    );
  });
  it('replaces nothing unasked, and then writes nothing', async () => {
    rmSync(at('all/truss.ifc'));
    expect(await strutwright('export', at('job.json'), '-o', at('all'))).toBe(2);
    expect(heard.talked.trimEnd().split('\n')).toHaveLength(7);
    expect(heard.talked).toMatch(/forces\.csv: is there already: choose another name, or replace it with --force\n/);
    expect(readdirSync(at('all'))).not.toContain('truss.ifc');
    expect(await strutwright('export', at('job.json'), '-o', at('all'), '--force')).toBe(0);
    expect(statSync(at('all/truss.ifc')).size).toBeGreaterThan(1000);
  });
});

describe('an export of one file', () => {
  it('is what the folder has under its name, and the forces where a .csv has no known name', async () => {
    for (const [name, same] of [
      ['reactions.csv', 'reactions.csv'],
      ['mine.csv', 'forces.csv'],
      ['b.DXF', 'truss.dxf'],
    ] as const) {
      expect(await strutwright('export', at('job.json'), '-o', at(name))).toBe(0);
      expect(readFileSync(at(name))).toEqual(readFileSync(at(`all/${same}`)));
    }
  });
  it('of an unknown kind is refused', async () => {
    expect(await strutwright('export', at('job.json'), '-o', at('a.step'))).toBe(2);
    expect(heard.talked).toMatch(
      /a\.step: is of an unknown kind: end it in \.ifc, \.dxf, \.obj, \.json, \.csv, or give a folder/,
    );
  });
});
