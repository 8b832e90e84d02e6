import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { openCache } from '../../src/machine/cache.js';
import { sha256 } from '../../src/machine/hash.js';

let dir: string;
beforeEach(() => {
  dir = mkdtempSync(join(tmpdir(), 'cache-'));
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));

const [a, b] = [sha256('a'), sha256('b')];
const bytes = new Uint8Array([1, 2, 3]);

it('remembers by digest from run to run', async () => {
  const first = await openCache(dir, '1');
  await first.put(a, bytes);
  expect(await first.get(b)).toBeNull();
  expect(await (await openCache(dir, '1')).get(a)).toEqual(bytes);
});

it('is not trusted under another version, and forgets the old one', async () => {
  await (await openCache(dir, '1')).put(a, bytes);
  expect(await (await openCache(dir, '2')).get(a)).toBeNull();
  expect(await (await openCache(dir, '1')).get(a)).toBeNull();
});

it('never gives back what was damaged', async () => {
  const cache = await openCache(dir, '1');
  await cache.put(a, bytes);
  const [home] = readdirSync(dir);
  const path = join(dir, home!, a.slice(0, 2), a.slice(2));
  const file = readFileSync(path);
  for (const damaged of [file.subarray(0, 65), Buffer.concat([file, Buffer.from([0])]), Buffer.alloc(0)]) {
    writeFileSync(path, damaged);
    expect(await cache.get(a)).toBeNull();
  }
});

it('prunes what the run did not use, and works without a folder that can be written', async () => {
  const first = await openCache(dir, '1');
  await first.put(a, bytes);
  await first.put(b, bytes);
  const second = await openCache(dir, '1');
  await second.get(b);
  await second.prune();
  const third = await openCache(dir, '1');
  expect([await third.get(a), await third.get(b)]).toEqual([null, bytes]);
  const nowhere = await openCache('/proc/nowhere', '1');
  await nowhere.put(a, bytes);
  expect(await nowhere.get(a)).toBeNull();
  expect(await third.get('../../etc/passwd')).toBeNull();
});
