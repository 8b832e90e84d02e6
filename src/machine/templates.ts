import { readdir } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';

const ROOT = new URL('../../templates/', import.meta.url);

/** The templates that the program ships, by name. */
export async function templateNames(): Promise<readonly string[]> {
  const entries = await readdir(ROOT, { withFileTypes: true });
  return entries
    .filter((e) => e.isDirectory())
    .map((e) => e.name)
    .sort();
}

/** The folder of one of them. */
export const templateFolder = (name: string): string => fileURLToPath(new URL(`${name}/`, ROOT));
