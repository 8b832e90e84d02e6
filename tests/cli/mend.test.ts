import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { NESTED_CUBES } from '../published/rankine-cases.js';
import { listen } from './listen.js';

const dir = mkdtempSync(join(tmpdir(), 'mend-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

const heard = listen();
const { strutwright } = heard;

/** A cube in a cube in centimetres, turned a little and rounded to 0.001 cm, with a comment that must survive. */
const c = NESTED_CUBES;
const [cos, sin] = [Math.cos(0.3), Math.sin(0.3)];
const turned = (p: readonly number[]): number[] => [
  p[0]! * cos - p[1]! * sin,
  (p[0]! * sin + p[1]! * cos) * cos - p[2]! * sin,
  (p[0]! * sin + p[1]! * cos) * sin + p[2]! * cos,
];
const rounded = (x: number): number => Math.round(x * 10_000) / 1000;
const file = `{
  // Drawn by nobody.
  "format": "strutwright-truss/1", "units": "cm",
  "nodes": [
${c.nodes.map((p, i) => `    { "id": "N${i}", "at": ${JSON.stringify(turned(p).map(rounded))} }`).join(',\n')}
  ],
  "members": [
${c.edges.map(([a, b], i) => `    { "id": "S${i}", "ends": ["N${a}", "N${b}"], "force": ${c.forces[i]!.toFixed(3)} }`).join(',\n')}
  ],
  "faces": ${JSON.stringify(c.faces.map((f, i) => ({ id: `F${i}`, nodes: f.map((n) => `N${n}`) })))}
}
`;
writeFileSync(at('truss.json'), file);
writeFileSync(
  at('job.json'),
  '{ "format": "strutwright-job/1", "title": "Cubes", "truss": "truss.json", "scale": 10, "forceScale": 2 }',
);
const report = () => JSON.parse(heard.said);

it('mends a truss file: flat and in balance, everything else as it was', async () => {
  expect(await strutwright('mend', at('truss.json'), '-o', at('mended.json'), '--json')).toBe(0);
  expect(report()).toMatchObject({ format: 'strutwright-mend/1', done: true, findings: [] });
  // Rounded to 0.01 mm: no coordinate is off by more than half of that.
  expect(report().largestMove_mm).toBeLessThan(0.005 * Math.sqrt(3));
  expect(report().after.flatness_mm).toBeLessThan(1e-9);
  const mended = readFileSync(at('mended.json'), 'utf8');
  expect(mended).toContain('// Drawn by nobody.');
  expect(mended).toContain('"units": "cm"');
  expect(await strutwright('mend', at('mended.json'), '--json')).toBe(0);
  expect(report()).toMatchObject({ movements: [], before: { flatness_mm: expect.closeTo(0, 9) } });
});

it("measures movements as built, at the job's scale", async () => {
  expect(await strutwright('mend', at('truss.json'), '--json')).toBe(0);
  const alone = report().largestMove_mm;
  expect(await strutwright('mend', at('job.json'), '--json')).toBe(0);
  expect(report().largestMove_mm).toBeCloseTo(10 * alone, 6);
});

it('refuses beyond the bound with exit status 1, names the node and writes nothing', async () => {
  expect(await strutwright('mend', at('truss.json'), '--bound', '0.0001', '-o', at('never.json'))).toBe(1);
  expect(heard.said).toMatch(
    /STOP The truss: mending would move N\d+ by 0\.00\d+ mm, more than the 0\.0001? mm allowed/,
  );
  expect(heard.talked).toContain('Nothing was written.');
  expect(() => readFileSync(at('never.json'))).toThrow();
});

it.each([
  [['mend', at('none.json')], /none\.json/],
  [['mend', at('truss.json'), '--bound', 'much'], /--bound is "much": give a length/],
  [['mend', at('truss.json'), '--flatness', '--equilibrium'], /give one, or neither/],
  [['mend', at('truss.json'), '--keep', 'N1,Q9'], /--keep names Q9/],
])('refuses %j', async (argv, words) => {
  expect(await strutwright(...argv)).toBe(2);
  expect(heard.talked).toMatch(words);
});
