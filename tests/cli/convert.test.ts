import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { listen } from './listen.js';

const dir = mkdtempSync(join(tmpdir(), 'convert-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

const heard = listen();
const { strutwright } = heard;

writeFileSync(at('a.obj'), 'v 0 0 0\nv 1 0 0\nv 0 0 1\ng legs\nl 1 2\nl 2 3\nl 3 1\n');

it('asks for the unit and the up axis, both at once, and writes nothing', async () => {
  expect(await strutwright('convert', at('a.obj'), '-o', at('truss.json'))).toBe(2);
  expect(heard.talked).toMatch(
    /a\.obj: does not say its unit: give --unit mm, cm, m, in or ft\n.*a\.obj: does not say which way is up/,
  );
  expect(readdirSync(dir)).toEqual(['a.obj']);
});

it('writes a truss file and the memory of its marks, and tells what it did', async () => {
  const call = ['convert', at('a.obj'), '-o', at('truss.json'), '--unit', 'm', '--up', 'y', '--find-faces'];
  expect(await strutwright(...call)).toBe(0);
  expect(heard.said).toContain('3 nodes, 3 struts, 1 face.\n');
  expect(JSON.parse(readFileSync(at('truss.json'), 'utf8')).members).toHaveLength(3);
  const first = readFileSync(at('truss.json'), 'utf8');
  // Supports and loads that were written into it by hand would be lost: it is not replaced unasked.
  expect(await strutwright(...call)).toBe(2);
  expect(heard.talked).toMatch(/truss\.json: is there already: choose another name, or replace it with --force\n$/);
  expect(readFileSync(at('truss.json'), 'utf8')).toBe(first);
  // Once more over its own file: the same bytes, every mark kept.
  expect(await strutwright(...call, '--force', '--json')).toBe(0);
  expect(JSON.parse(heard.said).marks).toEqual({ kept: 7, new: 0, withdrawn: [], prefixed: false });
  expect(readFileSync(at('truss.json'), 'utf8')).toBe(first);
});

it.each([
  [['convert', at('none.obj'), '-o', at('t.json')], /none\.obj: is not there: check the path/],
  [
    ['convert', at('a.obj'), '-o', at('a.obj'), '--unit', 'm', '--up', 'z', '--force'],
    /a\.obj: is there and is not a truss file/,
  ],
  [['convert', at('a.obj'), '-o', at('t.json'), '--unit', 'yd'], /--unit is "yd": give one of/],
  [['convert', at('a.obj'), '-o', at('t.json'), '--merge', '-1'], /--merge is "-1": give a length/],
  [['convert', at('a.step'), '-o', at('t.json')], /is of an unknown kind: give a file that ends in/],
  [['convert', at('a.obj')], /required option/],
])('refuses %j', async (argv, words) => {
  expect(await strutwright(...argv)).toBe(2);
  expect(heard.talked).toMatch(words);
});
