import { existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { VERSION } from '../../src/model/version.js';
import { runCli } from './run-cli.js';

const folder = (): string => mkdtempSync(join(tmpdir(), 'strutwright-'));

it('help leads with examples, a near miss is suggested, wrong use is 2', () => {
  const help = runCli(['--help']);
  expect(help.status).toBe(0);
  expect(help.out.startsWith('Examples:')).toBe(true);
  expect(runCli(['make', '--help']).out.startsWith('Examples:')).toBe(true);
  const miss = runCli(['chek', 'x']);
  expect([miss.status, miss.out]).toEqual([2, '']);
  expect(miss.talk).toContain('Did you mean check?');
  expect(runCli([]).status).toBe(2);
});

it('the version is the package file’s', () => {
  const { version } = JSON.parse(readFileSync(join(import.meta.dirname, '..', '..', 'package.json'), 'utf8'));
  expect(VERSION).toBe(version);
});

it('new writes two files that check clear, and refuses a folder with other things in it', () => {
  const at = join(folder(), 'my table');
  expect(runCli(['new', at]).status).toBe(0);
  expect(readdirSync(at).sort()).toEqual(['job.json', 'truss.json']);
  const check = runCli(['check', join(at, 'job.json'), '--json']);
  const report = JSON.parse(check.out);
  expect(report.format).toBe('strutwright-check/1');
  expect(check.status).toBe(report.status === 'clear' ? 0 : 1);
  const again = runCli(['new', at]);
  expect(again.status).toBe(2);
  expect(again.talk).toMatch(/is not empty: choose a new folder\n$/);
  expect(runCli(['new', join(folder(), 'x'), '--template', 'table-modle']).talk).toContain(
    'did you mean "table-model"?',
  );
});

it('every fault of both files is said, a line each with its place, and nothing is written', () => {
  const at = folder();
  writeFileSync(join(at, 'job.json'), '{"format":"strutwright-job/1","title":"x","truss":"t.json"}');
  writeFileSync(
    join(at, 't.json'),
    '{\n "format":"strutwright-truss/1","units":"mm",\n "nodes":[{"id":"A1","at":[0,0,0]},{"id":"A1","at":[1,0,0]}],\n "members":[{"id":"S1","ends":["A1","Z9"],"forse":1}]}',
  );
  const done = runCli(['make', join(at, 'job.json'), '-o', join(at, 'pack')]);
  expect(done.status).toBe(2);
  const lines = done.talk.trim().split('\n');
  expect(lines.length).toBeGreaterThanOrEqual(3);
  for (const line of lines) expect(line).toMatch(/^.*t\.json:\d+:\d+: .+: .+$/);
  expect(done.talk).toContain('"force"');
  expect(existsSync(join(at, 'pack'))).toBe(false);
  expect(readdirSync(at).sort()).toEqual(['job.json', 't.json']);
});

it('a folder that is not a pack is never touched', () => {
  const at = folder();
  runCli(['new', join(at, 'job')]);
  mkdirSync(join(at, 'holiday'));
  writeFileSync(join(at, 'holiday', 'photo.txt'), 'precious');
  const done = runCli(['make', join(at, 'job'), '-o', join(at, 'holiday')]);
  expect(done.status).toBe(2);
  expect(readdirSync(join(at, 'holiday'))).toEqual(['photo.txt']);
  expect(readdirSync(at).sort()).toEqual(['holiday', 'job']);
});

it('a missing file is one line without a trace', () => {
  const done = runCli(['check', join(folder(), 'none.json')]);
  expect(done.status).toBe(2);
  expect(done.talk.trim().split('\n')).toHaveLength(1);
  expect(done.talk).not.toContain('at ');
});
