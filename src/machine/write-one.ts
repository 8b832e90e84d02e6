import { link, readdir, realpath, rename, rm, unlink, writeFile } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { FileFault, fileFault } from './file-fault.js';
import { kindOf } from './files.js';
import { makeFolder } from './make-folder.js';

/**
 * Writes one file whole or not at all, its folder made where it is missing; an existing file is replaced only where `replace`
 * says so. The text goes beside it first, in `.NAME.PID.half`, which the next writing removes should the process be stopped.
 * Throws a FileFault.
 */
export async function writeOne(path: string, bytes: Uint8Array | string, replace = false): Promise<void> {
  try {
    await makeFolder(dirname(path));
    const kind = await kindOf(path);
    if (kind !== null && !replace) throw isThere(path);
    if (kind === 'folder') throw new FileFault('not-a-file', path, 'is a folder');
    // A device is written to, never renamed over.
    if (kind === 'other') return await writeFile(path, bytes);
    // A link stays a link.
    const place = kind === null ? path : await realpath(path);
    await removeHalves(place);
    const half = join(dirname(place), `.${basename(place)}.${process.pid}.half`);
    try {
      await writeFile(half, bytes);
      await (replace ? rename(half, place) : placeNew(half, place));
    } catch (error) {
      await rm(half, { force: true });
      throw error;
    }
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') throw isThere(path);
    throw fileFault(error, path);
  }
}

const isThere = (path: string): FileFault =>
  new FileFault('failed', path, 'is there already', 'choose another name, or move it away');

/** A rename replaces in silence what came in between; a link refuses. Some disks have no links. */
async function placeNew(half: string, place: string): Promise<void> {
  try {
    await link(half, place);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'EEXIST') throw error;
    await rename(half, place);
    return;
  }
  await unlink(half);
}

/** Halves of processes that are no more. */
async function removeHalves(place: string): Promise<void> {
  for (const name of await readdir(dirname(place)).catch(() => [])) {
    const rest = name.startsWith(`.${basename(place)}.`) ? name.slice(basename(place).length + 2) : '';
    const pid = /^(\d{1,10})\.half$/.exec(rest)?.[1];
    if (pid !== undefined && !runs(Number(pid))) await rm(join(dirname(place), name), { force: true }).catch(() => {});
  }
}

function runs(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
