import { spawn, spawnSync } from 'node:child_process';
import { chmodSync, chownSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { seededRandom } from '../../src/maths/random.js';
import { runCli } from './run-cli.js';
import { wholePack, writeSmallJob } from './small-job.js';

const BIN = join(import.meta.dirname, '..', '..', 'bin', 'strutwright.js');
const dir = mkdtempSync(join(tmpdir(), 'robust-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const [job, out] = [join(dir, 'job'), join(dir, 'OUT')];
const LONG = { timeout: 600_000 };

let lasts = 0;
beforeAll(() => {
  writeSmallJob(job, 'first');
  const begun = performance.now();
  const done = runCli(['make', job, '-o', out, '--no-cache', '--workers', '1']);
  lasts = performance.now() - begun;
  expect(done.status, done.talk).toBeLessThan(2);
  expect(wholePack(out)).toBe('first');
}, 300_000);

const start = (title: string, ...more: string[]) => {
  writeSmallJob(job, title);
  const child = spawn(process.execPath, [BIN, 'make', job, '-o', out, '--no-cache', '--workers', '1', ...more], {
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  let talked = '';
  child.stderr.on('data', (data) => {
    talked += data;
  });
  const ended = new Promise<{ status: number | null; signal: string | null; talked: string }>((done) =>
    child.once('close', (status, signal) => done({ status, signal, talked })),
  );
  return { child, ended };
};
const until = async (what: () => boolean): Promise<void> => {
  for (let i = 0; i < 6000 && !what(); i++) await new Promise((done) => setTimeout(done, 20));
  expect(what()).toBe(true);
};

it('killed at random moments: the old or the new pack is there, whole, and the next run clears up', LONG, async () => {
  const random = seededRandom(23);
  let last = wholePack(out);
  for (let k = 0; k < Number(process.env.KILLS ?? 3); k++) {
    const title = `killed ${k}`;
    const { child, ended } = start(title);
    await new Promise((done) => setTimeout(done, random() * lasts));
    child.kill('SIGKILL');
    await ended;
    const place = existsSync(out) ? out : join(dir, '.OUT.previous');
    const found = wholePack(place);
    expect([last, title]).toContain(found);
    last = found;
  }
  const { ended } = start('after');
  expect((await ended).status).toBeLessThan(2);
  expect(wholePack(out)).toBe('after');
  expect(readdirSync(dir).sort()).toEqual(['OUT', 'job']);
});

it.each([
  ['SIGINT', 130],
  ['SIGTERM', 143],
] as const)(
  '%s in the middle: exit status %i, the old pack as it was, nothing beside it',
  LONG,
  async (signal, status) => {
    const before = wholePack(out);
    const { child, ended } = start('stopped');
    await until(
      () => existsSync(join(dir, '.OUT.building', 'check.json')) || existsSync(join(dir, '.OUT.building', 'nodes')),
    );
    child.kill(signal);
    const end = await ended;
    expect(end.status).toBe(status);
    expect(end.talked).toBe('Stopped before the pack was whole; nothing of it was kept.\n');
    expect(wholePack(out)).toBe(before);
    expect(readdirSync(dir).sort()).toEqual(['OUT', 'job']);
  },
);

it('a second run into the folder is refused while the first one runs, which is not disturbed', LONG, async () => {
  const first = start('the first of two');
  await until(() => existsSync(join(dir, '.OUT.lock')));
  const second = runCli(['make', job, '-o', out, '--no-cache']);
  expect(second.status).toBe(2);
  expect(second.talk).toMatch(/OUT: another run \(process \d+ on .*\) is writing here: wait until it has ended; .*\n$/);
  expect((await first.ended).status).toBeLessThan(2);
  expect(wholePack(out)).toBe('the first of two');
});

describe('a disk that takes no more', () => {
  it('by the limit on the size of a file: one line with the file, the old pack as it was', LONG, () => {
    const before = wholePack(out);
    writeSmallJob(job, 'too large');
    // bash(1), ulimit: files of at most 20 blocks of 1024 bytes.
    const done = spawnSync(
      'bash',
      ['-c', 'ulimit -f 20; exec "$@"', '-', process.execPath, BIN, 'make', job, '-o', out, '--workers', '1'],
      {
        encoding: 'utf8',
      },
    );
    expect(done.status, done.stderr).toBe(2);
    expect(done.stdout).toBe('');
    expect(done.stderr).toMatch(
      /^.*OUT\/\S+: the file is larger than the disk allows: make room, or choose another disk\n$/,
    );
    expect(wholePack(out)).toBe(before);
    expect(readdirSync(dir).sort()).toEqual(['OUT', 'job']);
    rmSync(join(job, '.strutwright-cache'), { recursive: true, force: true });
  });

  it('by a disk that is full: the same', LONG, (test) => {
    const disk = join(dir, 'disk');
    mkdirSync(disk);
    writeSmallJob(job, 'full');
    // A small disk of its own, in a name space of its own where this user may not mount.
    const script = `mount -t tmpfs -o size=256k tmpfs ${disk} || exit 99
      "$@"; echo "status $?" >&2; find ${disk} >&2; umount ${disk}`;
    const may = spawnSync('unshare', ['-rm', 'true']).status === 0;
    if (!may) test.skip('this system lets nobody mount a disk in a name space of its own');
    const done = spawnSync(
      'unshare',
      [
        '-rm',
        'bash',
        '-c',
        script,
        '-',
        process.execPath,
        BIN,
        'make',
        job,
        '-o',
        join(disk, 'OUT'),
        '--no-cache',
        '--workers',
        '1',
      ],
      {
        encoding: 'utf8',
      },
    );
    rmSync(disk, { recursive: true });
    expect(done.stderr).toMatch(
      /^.*OUT\/\S+: the disk is full: make room, or choose another disk\nstatus 2\n.*disk\n$/,
    );
  });
});

describe('a place that may not be written', () => {
  /** Runs the command as a user without rights: root may write anywhere. */
  const asNobody = (args: readonly string[]) => {
    const root = process.getuid?.() === 0;
    return spawnSync(process.execPath, [BIN, ...args], {
      encoding: 'utf8',
      ...(root ? { uid: 65534, gid: 65534 } : {}),
    });
  };
  const closed = join(dir, 'closed');
  const own = (path: string): void => {
    if (process.getuid?.() === 0) chownSync(path, 65534, 65534);
  };

  it('is named as the user knows it, and stays as it was', LONG, () => {
    writeSmallJob(job, 'closed');
    mkdirSync(closed);
    chmodSync(dir, 0o755);
    chmodSync(closed, 0o555);
    own(closed);
    const done = asNobody(['make', job, '-o', join(closed, 'OUT'), '--workers', '1']);
    expect([done.status, done.stdout]).toEqual([2, '']);
    expect(done.stderr).toBe(`${closed}/OUT: permission is denied: ask for permission, or choose another place\n`);
    expect(readdirSync(closed)).toEqual([]);
    for (const args of [
      ['new', join(closed, 'new')],
      ['export', job, '-o', join(closed, 'a.obj')],
    ])
      expect(asNobody(args).stderr).toMatch(
        /^.*closed\/(new|a\.obj).*: permission is denied: ask for permission, or choose another place\n$/,
      );
    chmodSync(closed, 0o755);
    rmSync(closed, { recursive: true });
  });

  it('is no obstacle as a place for the cache: the pack is made without', LONG, () => {
    const open = join(dir, 'open');
    mkdirSync(open);
    own(open);
    chmodSync(job, 0o555);
    const done = asNobody(['make', job, '-o', join(open, 'OUT'), '--workers', '1']);
    chmodSync(job, 0o755);
    expect(done.status, done.stderr).toBeLessThan(2);
    expect(wholePack(join(open, 'OUT'))).toBe('closed');
    expect(readdirSync(job).sort()).toEqual(['job.json', 'truss.json']);
    rmSync(open, { recursive: true });
  });
});

it('writes nothing outside its folder and the cache, and speaks to no network', LONG, (test) => {
  writeSmallJob(job, 'alone');
  const [home, temp, cwd] = ['home', 'temp', 'cwd'].map((name) => join(dir, name)) as [string, string, string];
  for (const folder of [home, temp, cwd]) mkdirSync(folder);
  // strace(1) would show it too; a name space without a network is on every system that has unshare(1).
  if (spawnSync('unshare', ['-rn', 'true']).status !== 0) test.skip('this system gives nobody a name space of its own');
  const done = spawnSync('unshare', ['-rn', process.execPath, BIN, 'make', job, '-o', out, '--workers', '1'], {
    cwd,
    env: { PATH: process.env.PATH!, HOME: home, TMPDIR: temp },
    encoding: 'utf8',
  });
  expect(done.status, done.stderr).toBeLessThan(2);
  expect(wholePack(out)).toBe('alone');
  for (const folder of [home, temp, cwd]) expect(readdirSync(folder)).toEqual([]);
  expect(readdirSync(dir).sort()).toEqual(['OUT', 'cwd', 'home', 'job', 'temp']);
  expect(readdirSync(job).sort()).toEqual(['.strutwright-cache', 'job.json', 'truss.json']);
});
