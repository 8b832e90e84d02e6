import { existsSync, readFileSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { expect, it } from 'vitest';
import { TEMPLATES } from '../../src/cli/commands/new.js';
import { templateNames } from '../../src/machine/templates.js';

const SRC = join(import.meta.dirname, '..', '..', 'src');

/** Modules that are loaded with a file before anything runs: what it imports statically, and so on; types are not loaded. */
function loadedWith(entry: string): string[] {
  const seen = new Set([entry]);
  for (const path of seen) {
    if (!existsSync(path)) continue;
    const text = readFileSync(path, 'utf8');
    for (const [, names, target] of text.matchAll(/^(?:import|export)\s+(?!type\b)([^'";]*?)\s*from\s*'([^']+)'/gm)) {
      const types = /^\{(?:\s*type\s[^,}]*,?)*\s*\}$/.test(names!);
      if (!types) seen.add(target!.startsWith('.') ? join(dirname(path), target!.replace(/\.js$/, '.ts')) : target!);
    }
  }
  return [...seen].map((path) => (existsSync(path) ? relative(SRC, path) : path));
}

it('loads commands and nothing behind them before it knows what is asked', () => {
  const loaded = loadedWith(join(SRC, 'cli', 'main.ts'));
  expect(loaded).toContain(join('cli', 'commands', 'check.ts'));
  const heavy = loaded.filter((path) => !path.startsWith('cli') && path !== 'commander');
  expect(heavy.sort()).toEqual([join('model', 'units.ts'), join('model', 'version.ts')]);
});

it('would notice what a command loads', () => {
  expect(loadedWith(join(SRC, 'cli', 'make-job.ts'))).toContain(join('pipeline', 'make.ts'));
});

it('names every template in the help', async () => {
  expect([...(await templateNames())].sort()).toEqual(TEMPLATES);
});
