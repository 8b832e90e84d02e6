import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { unzipSync } from 'fflate';
import { afterAll, beforeEach, expect, it } from 'vitest';
import { run } from '../../src/cli/main.js';
import { inspect, readStl } from '../tools/mesh-check.mjs';

const dir = mkdtempSync(join(tmpdir(), 'gauge-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

let [said, talked] = ['', ''];
beforeEach(() => {
  [said, talked] = ['', ''];
});
const strutwright = (...argv: string[]): Promise<number> =>
  run(argv, {
    result: (text) => {
      said += text;
    },
    talk: (text) => {
      talked += text;
    },
    watched: false,
    colour: false,
    columns: 100,
  });

const FILES = [
  'gauge-bed-01.3mf',
  'gauge-beech-12.stl',
  'gauge.json',
  'gauge.pdf',
  'gauge.stl',
  'kerf-comb.dxf',
  'kerf-comb.svg',
  'manifest.json',
];

it('makes gauges of named sections, their bed, the comb and the sheet without a job, the same bytes again', async () => {
  const call = ['gauge', '--section', 'beech-8', '--section', 'beech-12', '--clearance', '0.3', '-o', at('plain')];
  expect(await strutwright(...call)).toBe(0);
  expect(talked).toBe('');
  expect(said).toContain('gauge.stl: beech-8, clearances 0.10  0.20  0.30  0.40  0.50 mm');
  expect(said).toContain('"clearances": { "beech-8": 0.00 }');
  expect(readdirSync(at('plain')).sort()).toEqual(FILES);
  const stl = readFileSync(at('plain/gauge.stl'));
  expect(inspect(readStl(new Uint8Array(stl)))).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
  const bed = unzipSync(readFileSync(at('plain/gauge-bed-01.3mf')));
  expect(new TextDecoder().decode(bed['3D/3dmodel.model'])).toMatch(/name="gauge-beech-12".*name="gauge"/s);
  expect(readFileSync(at('plain/kerf-comb.dxf'), 'utf8')).toContain('$INSUNITS');
  const before = FILES.map((f) => readFileSync(at(`plain/${f}`)));
  expect(await strutwright(...call)).toBe(0);
  FILES.forEach((f, i) => {
    expect(readFileSync(at(`plain/${f}`)).equals(before[i]!), f).toBe(true);
  });
});

it('takes the sections of the job’s struts, and the job takes the values back until nothing is left to measure', async () => {
  expect(await strutwright('new', at('table'))).toBe(0);
  expect(await strutwright('gauge', at('table'))).toBe(0);
  expect(existsSync(at('table/gauge/gauge.stl'))).toBe(true);
  const checked = async (): Promise<{ code: string; message: string }[]> => {
    said = '';
    await strutwright('check', at('table'), '--json');
    return JSON.parse(said).findings.filter((f: { code: string }) => f.code === 'clearance-not-measured');
  };
  const [finding] = await checked();
  expect(finding!.message).toContain('beech-8');
  expect(finding!.message).toContain('nodes.clearances');
  const job = readFileSync(at('table/job.json'), 'utf8');
  const section = JSON.parse(readFileSync(at('table/gauge/gauge.json'), 'utf8')).gauges[0].section;
  expect(job).toContain('"clearances": {}');
  writeFileSync(at('table/job.json'), job.replace('"clearances": {}', `"clearances": { "${section}": 0.35 }`));
  expect(await checked()).toEqual([]);
  said = '';
  expect(await strutwright('gauge', at('table'), '--json')).toBe(0);
  expect(JSON.parse(said).gauges[0]).toMatchObject({
    section,
    clearances_mm: [0.15, 0.25, 0.35, 0.45, 0.55],
    job: { clearance_mm: 0.35, measured: true },
  });
});

it('refuses what it cannot make, a line each, and writes nothing', async () => {
  expect(await strutwright('gauge')).toBe(2);
  expect(talked).toMatch(/give a job, or a folder with -o/);
  talked = '';
  expect(await strutwright('gauge', '--section', 'oak-9', '-o', at('none'))).toBe(2);
  expect(talked).toMatch(/--section is "oak-9".*catalogue/);
  expect(existsSync(at('none'))).toBe(false);
  for (const wrong of [
    ['--process', 'clay'],
    ['--clearance', '-1'],
    ['--clearance', 'wide'],
  ])
    expect(await strutwright('gauge', ...wrong, '-o', at('none'))).toBe(2);
  writeFileSync(at('mine.txt'), 'not a pack');
  expect(await strutwright('gauge', '-o', at('mine.txt'))).toBe(2);
});

it('begins its help with examples', async () => {
  expect(await strutwright('gauge', '--help')).toBe(0);
  expect(said.indexOf('strutwright gauge my-table')).toBeLessThan(said.indexOf('Usage:'));
});
