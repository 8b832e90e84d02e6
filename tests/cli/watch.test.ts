import { spawn } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { wholePack, writeSmallJob } from './small-job.js';

const BIN = join(import.meta.dirname, '..', '..', 'bin', 'strutwright.js');
const WAITING = 'Waiting for a change of the job or the truss; Ctrl+C ends.\n';
let [dir, job, out]: string[] = [];
let watching: ReturnType<typeof follow>;
beforeEach(() => {
  dir = mkdtempSync(join(tmpdir(), 'watch-'));
  [job, out] = [join(dir, 'job'), join(dir, 'OUT')];
});
afterEach(() => {
  watching.child.kill('SIGKILL');
  rmSync(dir!, { recursive: true, force: true });
});

/** The command, and what it has talked since the last time that was asked for, once it waits again. */
function follow() {
  const child = spawn(process.execPath, [BIN, 'make', job!, '-o', out!, '--watch', '--workers', '1'], {
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  let talked = '';
  child.stderr.on('data', (data) => {
    talked += data;
  });
  const ended = new Promise<number | null>((done) => child.once('exit', done));
  return {
    child,
    ended,
    async said(): Promise<string> {
      for (let i = 0; i < 12_000 && !talked.endsWith(WAITING); i++) await new Promise((done) => setTimeout(done, 20));
      const since = talked;
      talked = '';
      return since;
    },
  };
}

it('follows the job and the truss, past a fault in either, until a signal ends it', { timeout: 600_000 }, async () => {
  writeSmallJob(job!, 'one');
  watching = follow();
  expect(await watching.said()).toBe(WAITING);
  expect(wholePack(out!)).toBe('one');

  writeSmallJob(job!, 'two');
  expect(await watching.said()).toBe(WAITING);
  expect(wholePack(out!)).toBe('two');

  // A fault in the truss is told in its line; the pack stays, and so does the watch.
  const truss = join(job!, 'truss.json');
  const sound = readFileSync(truss, 'utf8');
  writeFileSync(truss, sound.replace('"D"]', '"Q"]'));
  expect(await watching.said()).toMatch(
    /^.*truss\.json:1:\d+: .* names node "Q", which the file does not have: .*\nWaiting/,
  );
  expect(wholePack(out!)).toBe('two');
  // So is one in the job, on top of it.
  writeFileSync(join(job!, 'job.json'), '{');
  expect(await watching.said()).toMatch(/^.*job\.json:1:2: /);
  writeSmallJob(job!, 'three');
  // Saved as editors do: another file renamed over it.
  writeFileSync(join(job!, 'truss.tmp'), sound.replace('240', '250'));
  renameSync(join(job!, 'truss.tmp'), truss);
  let said = await watching.said();
  // Two saves close together may be two runs; the last is of what stands there now.
  if (!readFileSync(join(out!, 'truss', 'truss.json'), 'utf8').includes('250')) said = await watching.said();
  expect(said).toBe(WAITING);
  expect(wholePack(out!)).toBe('three');
  expect(readFileSync(join(out!, 'truss', 'truss.json'), 'utf8')).toContain('250');

  watching.child.kill('SIGINT');
  expect(await watching.ended).toBe(130);
  expect(readdirSync(dir!).sort()).toEqual(['OUT', 'job']);
});

it('begins with a fault, and makes the pack once it is mended', { timeout: 600_000 }, async () => {
  writeSmallJob(job!, 'one');
  rmSync(join(job!, 'truss.json'));
  watching = follow();
  expect(await watching.said()).toMatch(/^.*truss\.json: is not there: check the path\nWaiting/);
  writeSmallJob(job!, 'mended');
  expect(await watching.said()).toBe(WAITING);
  expect(wholePack(out!)).toBe('mended');
  watching.child.kill('SIGTERM');
  expect(await watching.ended).toBe(143);
});
