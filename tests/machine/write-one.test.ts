import { execFileSync, spawn } from 'node:child_process';
import {
  existsSync,
  lstatSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { writeOne } from '../../src/machine/write-one.js';
import { seededRandom } from '../../src/maths/random.js';

let dir: string;
let path: string;
beforeEach(() => {
  dir = mkdtempSync(join(tmpdir(), 'write-one-'));
  path = join(dir, 'a.txt');
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));
const text = (): string => readFileSync(path, 'utf8');

it('replaces an existing file only where it is told to, and leaves nothing beside it', async () => {
  await writeOne(path, 'one');
  await expect(writeOne(path, 'x')).rejects.toThrow(/a\.txt: is there already: choose/);
  await writeOne(path, 'two', true);
  expect(text()).toBe('two');
  expect(readdirSync(dir)).toEqual(['a.txt']);
  await expect(writeOne(dir, 'x', true)).rejects.toThrow(/: is a folder: /);
});

it('writes through a link, which stays one, and to a device', async () => {
  await writeOne(path, 'one');
  symlinkSync(path, join(dir, 'link'));
  await writeOne(join(dir, 'link'), 'two', true);
  expect(lstatSync(join(dir, 'link')).isSymbolicLink()).toBe(true);
  expect(text()).toBe('two');
  await writeOne('/dev/null', 'x', true);
  expect(lstatSync('/dev/null').isCharacterDevice()).toBe(true);
});

it('of several at once that may not replace, one wins and is whole', async () => {
  const tries = await Promise.allSettled(['a', 'b', 'c'].map((c) => writeOne(path, c.repeat(100_000))));
  expect(tries.filter((t) => t.status === 'fulfilled').length).toBeGreaterThanOrEqual(1);
  expect(text()).toMatch(/^(a{100000}|b{100000}|c{100000})$/);
});

it('a disk that takes no more leaves the file as it was', async () => {
  await writeOne(path, 'one');
  const script = `import { writeOne } from ${JSON.stringify(new URL('../../dist/machine/write-one.js', import.meta.url).href)};
    await writeOne(process.argv[1], 'x'.repeat(100_000), true).catch((e) => console.log(e.message));`;
  // bash(1), ulimit: files of at most 10 blocks of 1024 bytes.
  const said = execFileSync(
    'bash',
    ['-c', 'ulimit -f 10; exec "$0" --input-type=module -e "$1" "$2"', process.execPath, script, path],
    {
      encoding: 'utf8',
    },
  );
  expect(said).toMatch(/a\.txt: the file is larger than the disk allows: make room/);
  expect(text()).toBe('one');
  expect(readdirSync(dir)).toEqual(['a.txt']);
});

it('killed at random moments, the old or the new text is there, whole, and the next writing clears up', {
  timeout: 120_000,
}, async () => {
  const script = `import { writeOne } from ${JSON.stringify(new URL('../../dist/machine/write-one.js', import.meta.url).href)};
    for (let n = Number(process.argv[2]); ; n++) { await writeOne(process.argv[1], (n + '\\n').repeat(200_000), true); process.stdout.write('.'); }`;
  const random = seededRandom(11);
  let last = 0;
  for (let k = 0; k < Number(process.env.KILLS ?? 8); k++) {
    const child = spawn(process.execPath, ['--input-type=module', '-e', script, path, String(last + 1)], {
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    const ended = new Promise((done) => child.once('exit', done));
    await new Promise((done) => child.stdout.once('data', done));
    await new Promise((done) => setTimeout(done, random() * 25));
    child.kill('SIGKILL');
    await ended;
    const first = Number(text().split('\n', 1)[0]);
    expect(first).toBeGreaterThan(last);
    expect(text() === `${first}\n`.repeat(200_000)).toBe(true);
    last = first;
  }
  writeFileSync(join(dir, '.a.txt.4194305.half'), 'of a process that is no more');
  await writeOne(path, 'end', true);
  expect(readdirSync(dir)).toEqual(['a.txt']);
  expect(existsSync(path)).toBe(true);
});
