import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { readText } from '../../src/machine/files.js';
import { writeOne } from '../../src/machine/write-one.js';

const dir = mkdtempSync(join(tmpdir(), 'files-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const path = join(dir, 'a.txt');

it('reads text, and says in one line why it cannot', async () => {
  await writeOne(path, 'Ø 8');
  expect(await readText(path, 10)).toBe('Ø 8');
  await expect(readText(path, 3)).rejects.toThrow(/a\.txt: is larger than 3 bytes: split the file$/);
  await expect(readText(join(dir, 'b.txt'), 10)).rejects.toThrow(/b\.txt: is not there: check the path$/);
  await expect(readText(dir, 10)).rejects.toThrow(/: is a folder: give the path of a file$/);
  await expect(readText('/dev/zero', 10)).rejects.toThrow(/not an ordinary file/);
  writeFileSync(path, new Uint8Array([0xff, 0xfe, 0x00]));
  await expect(readText(path, 10)).rejects.toThrow(/is not UTF-8 text: save/);
});
