// The commands as a whole, each in a process of its own: start-up, check, and the pack of the example of 40 nodes.
import { spawnSync } from 'node:child_process';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const title = 'Commands: wall seconds, median of three';

const BIN = fileURLToPath(new URL('../../bin/strutwright.js', import.meta.url));
const EXAMPLES = fileURLToPath(new URL('../../examples/', import.meta.url));

const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

function timed(args) {
  const runs = [1, 2, 3].map(() => {
    const wall = performance.now();
    spawnSync(process.execPath, [BIN, ...args], { stdio: 'ignore' });
    return (performance.now() - wall) / 1000;
  });
  return median(runs).toFixed(2).padStart(7);
}

export async function run(print) {
  const out = join(mkdtempSync(join(tmpdir(), 'strutwright-')), 'pack');
  print(`start-up (--version)       ${timed(['--version'])} s wall   target 0.50`);
  print(`check, 40 nodes            ${timed(['check', join(EXAMPLES, 'lantern')])} s wall   target 0.70`);
  print(`make, 40 nodes, 1 worker   ${timed(['make', join(EXAMPLES, 'lantern'), '-o', out, '--workers', '1'])} s wall`);
  print(`make, 40 nodes, 2 workers  ${timed(['make', join(EXAMPLES, 'lantern'), '-o', out, '--workers', '2'])} s wall`);
}
