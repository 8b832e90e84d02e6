import { readdir, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { sha256 } from './hash.js';

/**
 * What tells this build of the program, on this version of Node, from every other: its files by size and time of writing.
 * A version number alone does not change while the program is being worked on.
 */
export async function buildOf(version: string): Promise<string> {
  const root = fileURLToPath(new URL('..', import.meta.url));
  const names = (await readdir(root, { recursive: true })).filter((name) => /\.[jt]s$/.test(name)).sort();
  const facts = await Promise.all(
    names.map(async (name) => {
      const { size, mtimeMs } = await stat(join(root, name));
      return `${name} ${size} ${mtimeMs}`;
    }),
  );
  return sha256([version, process.version, ...facts].join('\n'));
}
