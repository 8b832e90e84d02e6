import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { listen } from './listen.js';

const dir = mkdtempSync(join(tmpdir(), 'nest-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

const heard = listen();
const { strutwright } = heard;

writeFileSync(
  at('panels.json'),
  JSON.stringify({
    A: {
      outline: [
        [0, 0],
        [140, 0],
        [140, 90],
        [0, 90],
      ],
      quantity: 4,
    },
    B: {
      outline: [
        [0, 0],
        [200, 0],
        [0, 100],
      ],
      rotations: [0],
    },
  }),
);

it('lays outlines on sheets and writes them with a plan and a manifest, the same bytes again', async () => {
  expect(await strutwright('nest', at('panels.json'), '--sheet', '600x400', '-o', at('cut'))).toBe(0);
  expect(heard.said).toMatch(/5 panels on 1 sheets; no plan has fewer than 1/);
  expect(heard.said).toMatch(/Kerf 0.2 mm .* is compensated/);
  expect(readdirSync(at('cut')).sort()).toEqual(['manifest.json', 'nesting.json', 'sheets']);
  const plan = JSON.parse(readFileSync(at('cut/nesting.json'), 'utf8'));
  expect(plan.sheets[0].placements.length).toBe(5);
  const before = readFileSync(at('cut/sheets/sheet-01.dxf'), 'utf8');
  expect(await strutwright('nest', at('panels.json'), '--sheet', '600x400', '-o', at('cut'))).toBe(0);
  expect(readFileSync(at('cut/sheets/sheet-01.dxf'), 'utf8')).toBe(before);
});

it('prints the plan alone, flags what fits nowhere, and leaves the kerf to the shop at 0', async () => {
  expect(await strutwright('nest', at('panels.json'), '--sheet', '160x110*2', '--kerf', '0', '--json')).toBe(1);
  const plan = JSON.parse(heard.said);
  expect(plan.kerf.compensated).toBe('shop');
  expect(plan.unplaced).toEqual([
    { mark: 'B', quantity: 1, reason: 'too-large' },
    { mark: 'A', quantity: 2, reason: 'no-sheet-left' },
  ]);
});

it('refuses wrong use and bad files in a line each', async () => {
  expect(await strutwright('nest', at('panels.json'))).toBe(2);
  expect(heard.talked).toMatch(/give a folder with -o/);
  expect(await strutwright('nest', at('panels.txt'), '--json')).toBe(2);
  expect(await strutwright('nest', at('absent.dxf'), '--json')).toBe(2);
  expect(await strutwright('nest', at('panels.json'), '--sheet', '600', '--json')).toBe(2);
  writeFileSync(at('bow.json'), '{ "P": { "outline": [[0,0],[10,10],[10,0],[0,10]] } }');
  expect(await strutwright('nest', at('bow.json'), '--json')).toBe(2);
  expect(heard.talked).toMatch(/bow\.json: panels\[0\] P: its outline crosses or touches itself/);
});
