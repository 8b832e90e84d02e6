import { readdir } from 'node:fs/promises';
import { fileFault } from './file-fault.js';

/** Names in a folder; null where there is no such folder. Throws a FileFault where the path is something else. */
export async function listFolder(path: string): Promise<readonly string[] | null> {
  try {
    return await readdir(path);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw fileFault(error, path);
  }
}
