import { randomUUID } from 'node:crypto';
import { open, readFile, unlink } from 'node:fs/promises';
import { setTimeout as wait } from 'node:timers/promises';
import { FileFault, fileFault } from './file-fault.js';
import { type Holder, mayRun, thisProcess } from './process-life.js';

/** A lock file that this process holds. */
export interface Lock {
  release(): Promise<void>;
}

type Held = Holder & { readonly token: string };

/** How long a lock file may stand empty between its making and its writing, ms: a healthy disk takes under one. */
const EMPTY_FOR = 1000;

/**
 * Takes the lock file at `path`, or throws a FileFault `locked` where a process that may still run holds it. Every fault names
 * `about`, the place that the lock is for: the user knows of no lock.
 * The lock of a process that has ended is removed under a lock of its own, named after the dead one, so that of several
 * runs that find it only one removes it, and none removes a fresh one.
 */
export async function takeLock(path: string, about: string): Promise<Lock> {
  const token = randomUUID();
  for (;;) {
    if (await create(path, { ...thisProcess(), token }, about)) return { release: () => remove(path, token, about) };
    const held = await read(path, about);
    if (held === 'gone') continue;
    if (held && mayRun(held))
      throw new FileFault(
        'locked',
        about,
        `another run (process ${held.pid} on ${held.host}) is writing here`,
        `wait until it has ended; if none runs, delete ${path}`,
      );
    const clearing = await takeLock(`${path}.${held ? held.token.slice(0, 8) : 'empty'}`, about);
    try {
      const now = await read(path, about);
      if (now !== 'gone' && now?.token === held?.token) await unlink(path);
    } catch (error) {
      throw fileFault(error, about);
    } finally {
      await clearing.release();
    }
  }
}

async function create(path: string, held: Held, about: string): Promise<boolean> {
  try {
    const file = await open(path, 'wx');
    try {
      await file.writeFile(JSON.stringify(held));
    } finally {
      await file.close();
    }
    return true;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'EEXIST') return false;
    throw fileFault(error, about);
  }
}

/** What a lock file says; null where it stays empty or says nothing of use: its writer was stopped halfway. */
async function read(path: string, about: string): Promise<Held | null | 'gone'> {
  for (let waited = 0; waited < EMPTY_FOR; waited += 50) {
    try {
      const held = JSON.parse(await readFile(path, 'utf8')) as Partial<Held>;
      if (typeof held.pid === 'number' && typeof held.host === 'string' && typeof held.token === 'string')
        return { pid: held.pid, host: held.host, token: held.token, began: String(held.began ?? '') };
      return null;
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException;
      if (code === 'ENOENT') return 'gone';
      if (code) throw fileFault(error, about);
    }
    await wait(50);
  }
  return null;
}

async function remove(path: string, token: string, about: string): Promise<void> {
  const held = await read(path, about);
  if (held !== 'gone' && held?.token === token) await unlink(path).catch(() => {});
}
