import { mkdir, readdir, realpath, rename, rm, writeFile } from 'node:fs/promises';
import { basename, dirname, join, posix, resolve } from 'node:path';
import { FileFault, fileFault } from './file-fault.js';
import { kindOf, readText } from './files.js';
import { sha256 } from './hash.js';
import { takeLock } from './lock.js';
import { makeFolder } from './make-folder.js';

/** What was written of one file of a pack. */
export interface WrittenFile {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

/** A pack that is being built beside its final place. Either `commit` or `abandon` must be called in the end. */
export interface PackFolder {
  /** Writes one file; `path` is relative, with forward slashes. */
  write(path: string, bytes: Uint8Array | string): Promise<WrittenFile>;
  /** Puts the pack in place of the one before, by two renames. */
  commit(): Promise<void>;
  /** Removes what was built; the pack before stays as it was. */
  abandon(): Promise<void>;
}

const MANIFEST = 'manifest.json';
const MANIFEST_FORMAT = 'strutwright-pack/1';
const MANIFEST_BYTES = 512_000_000;

/**
 * Begins a pack at `out`, which must be absent, empty or an earlier pack; throws a FileFault otherwise, and where another
 * run is writing there. Everything is built in `.NAME.building` under the lock `.NAME.lock`; a commit renames the pack
 * before to `.NAME.previous`, then the new one into place, then deletes the one before. A process that is stopped at any
 * moment leaves the old or the new pack whole: at worst as `.NAME.previous`, which the next run puts back.
 */
export async function openPackFolder(out: string): Promise<PackFolder> {
  const place = await realPlace(out);
  const hidden = (kind: string): string => join(dirname(place), `.${basename(place)}.${kind}`);
  const [building, previous, discard] = [hidden('building'), hidden('previous'), hidden('discard')];
  // Before the lock as well as under it, so that a folder of other things sees not even a lock file beside it.
  await mustBeFree(place, out);
  await make(dirname(place));
  const lock = await takeLock(hidden('lock'), out);
  const remove = (path: string): Promise<void> => rm(path, { recursive: true, force: true, maxRetries: 3 });
  /** A rename is whole or not at all, a deletion is not: so a pack is renamed first. */
  const deletePack = async (path: string): Promise<void> => {
    await rename(path, discard);
    await remove(discard);
  };

  try {
    await remove(discard);
    await remove(building);
    if ((await kindOf(previous)) === 'folder') {
      if (!(await isPack(previous)))
        throw new FileFault('not-a-pack', previous, 'stands where the earlier pack is kept, and is not one', 'move it');
      if ((await kindOf(place)) === null) await rename(previous, place);
      else await deletePack(previous);
    }
    await mustBeFree(place, out);
    await mkdir(building);
  } catch (error) {
    await lock.release();
    throw fileFault(error, out);
  }

  const written = new Set<string>();
  const folders = new Set<string>();
  const guarded = async <T>(path: string, act: () => Promise<T>): Promise<T> => {
    try {
      return await act();
    } catch (error) {
      throw fileFault(error, path);
    }
  };
  return {
    write: (path, data) =>
      guarded(posix.join(out, path), async () => {
        checkPath(path);
        // On some systems names that differ in case alone are one file.
        const key = path.toLowerCase();
        if (written.has(key)) throw new Error(`the pack has two files ${path}`);
        written.add(key);
        const bytes = typeof data === 'string' ? new TextEncoder().encode(data) : data;
        const folder = posix.dirname(path);
        if (!folders.has(folder)) await makeFolder(join(building, folder));
        folders.add(folder);
        await writeFile(join(building, path), bytes, { flag: 'wx' });
        return { path, bytes: bytes.byteLength, sha256: sha256(bytes) };
      }),
    commit: () =>
      guarded(out, async () => {
        if (!(await isPack(building))) throw new Error('a pack without its manifest cannot be put in place');
        const before = await kindOf(place);
        if (before !== null) await rename(place, previous);
        await rename(building, place);
        if (before !== null) await deletePack(previous);
        await lock.release();
      }),
    abandon: () =>
      guarded(out, async () => {
        await remove(building);
        if ((await kindOf(place)) === null && (await kindOf(previous)) === 'folder') await rename(previous, place);
        await lock.release();
      }),
  };
}

/** Whether a folder is a pack: its manifest says so. */
export async function isPack(folder: string): Promise<boolean> {
  try {
    const manifest: unknown = JSON.parse(await readText(join(folder, MANIFEST), MANIFEST_BYTES));
    return (manifest as { format?: unknown } | null)?.format === MANIFEST_FORMAT;
  } catch {
    return false;
  }
}

/** The place itself, links followed, so that a link to a pack keeps being a link. */
async function realPlace(out: string): Promise<string> {
  const place = resolve(out);
  try {
    return (await kindOf(place)) === null ? place : await realpath(place);
  } catch (error) {
    throw fileFault(error, out);
  }
}

async function mustBeFree(place: string, out: string): Promise<void> {
  const kind = await kindOf(place);
  if (kind === null) return;
  if (kind !== 'folder')
    throw new FileFault('not-a-folder', out, 'is there and is not a folder', 'choose a new folder');
  if (dirname(place) === place) throw new FileFault('not-a-pack', out, 'is the root of the disk');
  try {
    if ((await readdir(place)).length === 0 || (await isPack(place))) return;
  } catch (error) {
    throw fileFault(error, out);
  }
  throw new FileFault('not-a-pack', out, 'is a folder with other things in it, not a pack');
}

async function make(folder: string): Promise<void> {
  try {
    await makeFolder(folder);
  } catch (error) {
    throw fileFault(error, folder);
  }
}

/** Every part of a path in a pack is a plain name, so that no file is ever written outside. */
function checkPath(path: string): void {
  const plain = path.split('/').every((part) => /^[A-Za-z0-9_][A-Za-z0-9_.-]*$/.test(part));
  if (!plain) throw new FileFault('bad-path', path, 'is no path in a pack');
}
