import { mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { listen } from '../cli/listen.js';
import { runCli } from '../cli/run-cli.js';
import { writeSmallJob } from '../cli/small-job.js';

/** What the design leaves to solids and plans: their findings stand in a pack alone. The truss has no panels, so no sheets. */
const LEFT = ['hub solids', 'engraving', 'bars', 'building order', 'fit-up'];

it('lists what only a pack finds out as not checked by check, and as checked in the pack', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'strutwright-'));
  writeSmallJob(folder, 'Tripod');
  const at = listen();
  await at.strutwright('check', folder, '--json');
  const alone = JSON.parse(at.said);
  expect(alone.notChecked).toEqual(expect.arrayContaining(LEFT));
  expect(alone.checked).not.toEqual(expect.arrayContaining(['building order']));
  await at.strutwright('check', folder);
  expect(at.said).toContain(`Not checked until the pack is made: ${LEFT.join(', ')}.\n`);

  const out = join(folder, 'pack');
  runCli(['make', folder, '-o', out, '--workers', '1']);
  const made = JSON.parse(readFileSync(join(out, 'check.json'), 'utf8'));
  expect(made.checked).toEqual([...alone.checked, ...LEFT]);
  expect(made.notChecked).toEqual(alone.notChecked.filter((c: string) => !LEFT.includes(c)));
}, 120_000);
