import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

const BIN = join(import.meta.dirname, '..', '..', 'bin', 'strutwright.js');

/** Runs the real command in a process of its own, its output a pipe. */
export function runCli(args: readonly string[], cwd?: string, env: Record<string, string> = {}) {
  const done = spawnSync(process.execPath, [BIN, ...args], {
    encoding: 'utf8',
    timeout: 240_000,
    maxBuffer: 1 << 28,
    cwd,
    env: { ...process.env, NO_COLOR: '', ...env },
  });
  return { status: done.status, out: done.stdout, talk: done.stderr };
}
