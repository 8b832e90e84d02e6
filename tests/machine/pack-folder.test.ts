import { spawn } from 'node:child_process';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { openPackFolder } from '../../src/machine/pack-folder.js';
import { seededRandom } from '../../src/maths/random.js';

let dir: string;
let out: string;
beforeEach(() => {
  dir = mkdtempSync(join(tmpdir(), 'pack-'));
  out = join(dir, 'OUT');
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));

const MANIFEST = JSON.stringify({ format: 'strutwright-pack/1' });
async function pack(text: string): Promise<void> {
  const folder = await openPackFolder(out);
  await folder.write('struts/cut-list.csv', text);
  await folder.write('manifest.json', MANIFEST);
  await folder.commit();
}
const cutList = (): string => readFileSync(join(out, 'struts/cut-list.csv'), 'utf8');

describe('a pack folder', () => {
  it('is put in place whole, replaces an earlier pack, and leaves nothing beside it', async () => {
    await pack('one');
    await pack('two');
    expect(cutList()).toBe('two');
    expect(readdirSync(dir)).toEqual(['OUT']);
  });

  it('tells the bytes and the SHA-256 of each file', async () => {
    const folder = await openPackFolder(out);
    // FIPS 180-4, the one-block message "abc".
    expect(await folder.write('a/abc.txt', 'abc')).toEqual({
      path: 'a/abc.txt',
      bytes: 3,
      sha256: 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad',
    });
    await folder.abandon();
  });

  it('leaves the pack before untouched when it is abandoned', async () => {
    await pack('one');
    const folder = await openPackFolder(out);
    await folder.write('struts/cut-list.csv', 'half');
    await folder.abandon();
    expect(cutList()).toBe('one');
    expect(readdirSync(dir)).toEqual(['OUT']);
  });

  it('never touches a folder that is not a pack', async () => {
    mkdirSync(out);
    writeFileSync(join(out, 'notes.txt'), 'mine');
    await expect(openPackFolder(out)).rejects.toThrow(/OUT: is a folder with other things in it, not a pack: choose/);
    expect(readdirSync(dir)).toEqual(['OUT']);
    expect(readdirSync(out)).toEqual(['notes.txt']);
    writeFileSync(join(out, 'manifest.json'), '{"format":"something-else/1"}');
    await expect(openPackFolder(out)).rejects.toThrow(/not a pack/);
  });

  it('takes an empty folder, follows a link, refuses a file and a place under a file', async () => {
    mkdirSync(out);
    await pack('one');
    const link = join(dir, 'link');
    symlinkSync(out, link);
    const folder = await openPackFolder(link);
    await folder.write('manifest.json', MANIFEST);
    await folder.commit();
    expect(readdirSync(dir).sort()).toEqual(['OUT', 'link']);
    expect(readdirSync(out)).toEqual(['manifest.json']);
    writeFileSync(join(dir, 'file'), '');
    await expect(openPackFolder(join(dir, 'file'))).rejects.toThrow(/is not a folder/);
    await expect(openPackFolder(join(dir, 'file', 'x'))).rejects.toThrow(/is not a folder/);
    await expect(openPackFolder('/proc/nowhere/OUT')).rejects.toThrow(/nowhere/);
    await expect(openPackFolder('/')).rejects.toThrow(/root|not a pack/);
  });

  it('writes nowhere but inside', async () => {
    const folder = await openPackFolder(out);
    for (const path of ['../x', '/etc/x', 'a/../../x', 'a\\..\\x', 'a//b', '', '.hidden', 'a/./b', 'a\0b'])
      await expect(folder.write(path, 'x')).rejects.toThrow(/no path in a pack/);
    await folder.write('a.txt', '');
    await expect(folder.write('A.txt', '')).rejects.toThrow(/two files/);
    await folder.abandon();
    expect(readdirSync(dir)).toEqual([]);
  });
});

describe('a second run into one folder', () => {
  it('is refused while the first one runs', async () => {
    const first = await openPackFolder(out);
    await expect(openPackFolder(out)).rejects.toThrow(/another run \(process \d+ on .*\) is writing here: wait/);
    await first.abandon();
    await pack('one');
    expect(cutList()).toBe('one');
  });

  it('of several that find a dead lock, one at a time gets it', async () => {
    const dead = { pid: 2 ** 22 + 1, host: hostname(), began: '', token: 'deadbeef-0000' };
    writeFileSync(join(dir, '.OUT.lock'), JSON.stringify(dead));
    const tries = await Promise.allSettled(Array.from({ length: 8 }, () => openPackFolder(out)));
    const won = tries.filter((t) => t.status === 'fulfilled');
    expect(won).toHaveLength(1);
    await won[0]!.value.abandon();
    expect(readdirSync(dir)).toEqual([]);
  });

  it('clears a lock that was never written, and keeps one of another machine', async () => {
    writeFileSync(join(dir, '.OUT.lock'), '');
    await pack('one');
    expect(readdirSync(dir)).toEqual(['OUT']);
    writeFileSync(
      join(dir, '.OUT.lock'),
      JSON.stringify({ pid: 1, host: 'a-machine-elsewhere', began: '', token: 'x' }),
    );
    await expect(openPackFolder(out)).rejects.toThrow(/if none runs, delete .*\.OUT\.lock$/);
  });
});

describe('after a stop between the two renames', () => {
  it('the next run puts the earlier pack back, then replaces it', async () => {
    await pack('one');
    const { renameSync } = await import('node:fs');
    renameSync(out, join(dir, '.OUT.previous'));
    mkdirSync(join(dir, '.OUT.building'));
    const folder = await openPackFolder(out);
    expect(cutList()).toBe('one');
    await folder.abandon();
    expect(cutList()).toBe('one');
    expect(readdirSync(dir)).toEqual(['OUT']);
  });

  it('a folder of other things under that name is left alone', async () => {
    mkdirSync(join(dir, '.OUT.previous'));
    writeFileSync(join(dir, '.OUT.previous', 'mine.txt'), '');
    await expect(openPackFolder(out)).rejects.toThrow(/stands where the earlier pack is kept/);
    expect(existsSync(join(dir, '.OUT.previous', 'mine.txt'))).toBe(true);
    expect(existsSync(join(dir, '.OUT.lock'))).toBe(false);
  });
});

it('killed at random moments, the old or the new pack is there, whole', { timeout: 120_000 }, async () => {
  const script = new URL('./fixtures/write-pack.mjs', import.meta.url).pathname;
  const random = seededRandom(7);
  await pack('0\n'.repeat(2000));
  await (await openPackFolder(out)).abandon();
  let last = 0;
  const kills = Number(process.env.KILLS ?? 12);
  for (let k = 0; k < kills; k++) {
    const child = spawn(process.execPath, [script, out, String(last + 1)], { stdio: ['ignore', 'pipe', 'inherit'] });
    const ended = new Promise((done) => child.once('exit', done));
    // After the first pack, at any moment of one of those that follow.
    await new Promise((done) => child.stdout.once('data', done));
    await new Promise((done) => setTimeout(done, random() * 40));
    child.kill('SIGKILL');
    await ended;

    const whole = existsSync(out) ? out : join(dir, '.OUT.previous');
    const { title } = JSON.parse(readFileSync(join(whole, 'manifest.json'), 'utf8')) as { title: string };
    expect(Number(title)).toBeGreaterThan(last);
    last = Number(title);
    for (let i = 0; i < 12; i++)
      expect(readFileSync(join(whole, `part-${i % 3}/file-${i}.txt`), 'utf8')).toBe(`${title}\n`.repeat(2000));
    // The next run finds its way from whatever was left.
    await (await openPackFolder(out)).abandon();
    expect(readdirSync(dir)).toEqual(['OUT']);
  }
});

it.skipIf(!existsSync('/dev/full') || process.getuid?.() !== 0)(
  'a full disk is one line, and the old pack stays',
  async () => {
    const { execFileSync } = await import('node:child_process');
    const disk = join(dir, 'disk');
    mkdirSync(disk);
    try {
      execFileSync('mount', ['-t', 'tmpfs', '-o', 'size=64k', 'tmpfs', disk], { stdio: 'ignore' });
    } catch {
      // Without the right to mount there is no small disk to fill.
      return;
    }
    try {
      out = join(disk, 'OUT');
      await pack('one');
      const folder = await openPackFolder(out);
      await expect(folder.write('big.bin', new Uint8Array(200_000))).rejects.toThrow(
        /big\.bin: the disk is full: make room/,
      );
      await folder.abandon();
      expect(cutList()).toBe('one');
    } finally {
      execFileSync('umount', [disk]);
    }
  },
);
