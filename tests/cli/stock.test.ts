import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { listen } from './listen.js';

const dir = mkdtempSync(join(tmpdir(), 'stock-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

const heard = listen();
const { strutwright } = heard;

writeFileSync(at('pieces.csv'), 'mark,length_mm,quantity\nS1,450,4\nS2,320.5,3\nS3,120,2\n');

it('plans bars and rack, and says every setting', async () => {
  expect(await strutwright('stock', at('pieces.csv'), '--bar', '1000:2.5', '--rack', '650', '--kerf', '3')).toBe(0);
  expect(heard.talked).toBe('');
  // 4 x 450 + 3 x 320.5 + 2 x 120 = 3001.5 mm: the rack's 650 and at least 2.36 bars of 995.
  expect(heard.said).toMatch(/^bar: 4 bars, 7\.50\. Proven: no plan for these pieces costs less\.\n/);
  expect(heard.said).toContain('3 of 1000.0 mm\n');
  expect(heard.said).toContain('1 of 650.0 mm, from the rack\n');
});

it('prints the plan as JSON and writes the saw plan', async () => {
  expect(await strutwright('stock', at('pieces.csv'), '--bar', '2000', '--json', '-o', at('saw.pdf'))).toBe(0);
  const plan = JSON.parse(heard.said);
  expect(plan.format).toBe('strutwright-stock-plan/1');
  const cuts = plan.bars.flatMap((b: { cuts: { mark: string }[] }) => b.cuts.map((c) => c.mark)).sort();
  expect(cuts).toEqual(['S1', 'S1', 'S1', 'S1', 'S2', 'S2', 'S2', 'S3', 'S3']);
  expect(plan.lowerBound).toBe(plan.cost);
  expect(readFileSync(at('saw.pdf')).subarray(0, 5).toString()).toBe('%PDF-');
});

it('keeps sections apart and takes bars of a job', async () => {
  writeFileSync(
    at('job.json'),
    JSON.stringify({
      format: 'strutwright-job/1',
      title: 'Bars',
      truss: 'truss.json',
      stock: {
        bars: [
          { section: 'beech-8', length_mm: 1000, price: 3 },
          { section: 'beech-12', length_mm: 2000, price: 7 },
        ],
      },
    }),
  );
  writeFileSync(at('two.csv'), 'mark;cut_length_mm;section\nA;400,5;beech-8\nB;400,5;beech-8\nC;1500;beech-12\n');
  expect(await strutwright('stock', at('two.csv'), '--job', at('job.json'))).toBe(0);
  expect(heard.said).toContain('beech-8: 1 bar, 3.00.');
  expect(heard.said).toContain('beech-12: 1 bar, 7.00.');
  // A section of the catalogue comes in its usual bars.
  writeFileSync(at('known.csv'), 'mark;cut_length_mm;section\nA;400,5;beech-6\n');
  expect(await strutwright('stock', at('known.csv'), '--job', at('job.json'))).toBe(0);
  expect(heard.said).toContain('beech-6: 1 bar, 1.00.');
  writeFileSync(at('three.csv'), 'mark;cut_length_mm;section\nA;400,5;oak-9\n');
  expect(await strutwright('stock', at('three.csv'), '--job', at('job.json'))).toBe(2);
  expect(heard.talked).toMatch(/no bar of oak-9 to cut from: give --bar/);
});

it('flags what no bar gives, by mark', async () => {
  expect(await strutwright('stock', at('pieces.csv'), '--bar', '400')).toBe(1);
  expect(heard.talked).toMatch(/^S1: 450 mm long, longer than the 395 mm/);
  expect(heard.said).toContain('320.5');
});

it('says every fault of a table, with its line', async () => {
  writeFileSync(at('bad.csv'), 'mark,length_mm,quantity\nS1,none,1\nS2,-4,1\n3,10,1.5\n');
  expect(await strutwright('stock', at('bad.csv'), '--bar', '400')).toBe(2);
  expect(heard.talked.split('\n').filter((l) => l !== '')).toHaveLength(4);
  expect(heard.talked).toMatch(/bad\.csv:2:1: the length "none"/);
  expect(heard.talked).toMatch(/bad\.csv:3:1: the length "-4"/);
  expect(heard.talked).toMatch(/bad\.csv:4:1: the quantity "1\.5"/);
});

it.each([
  [['--bar', 'long'], '--bar is "long"'],
  [['--bar', '100:1:2:3'], '--bar is "100:1:2:3"'],
  [['--bar', '100:1:1.5'], '--bar is "100:1:1.5"'],
  [['--bar', '100', '--kerf', '-1'], '--kerf is "-1"'],
  [['--bar', '100', '-o', 'plan.txt'], '--out is "plan.txt"'],
  [[], 'no bar of bar to cut from'],
])('refuses %j', async (flags, message) => {
  expect(await strutwright('stock', at('pieces.csv'), ...flags)).toBe(2);
  expect(heard.talked).toContain(message);
});
