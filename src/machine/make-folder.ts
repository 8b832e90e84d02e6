import { mkdir } from 'node:fs/promises';
import { dirname } from 'node:path';

/**
 * Makes a folder and those above it. Not by Node's own recursive option, which never returns where the system answers
 * ENOENT below a folder that exists, as in /proc.
 */
export async function makeFolder(path: string): Promise<void> {
  try {
    await mkdir(path);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'EEXIST') return;
    const above = dirname(path);
    if (code !== 'ENOENT' || above === path) throw error;
    await makeFolder(above);
    await mkdir(path).catch((again: NodeJS.ErrnoException) => {
      if (again.code !== 'EEXIST') throw again;
    });
  }
}
