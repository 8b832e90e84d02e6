import { type FSWatcher, watch } from 'node:fs';
import { basename, dirname, resolve } from 'node:path';

/** Calls waiting for a change of some files. */
export interface Watch {
  /** Resolves after the next change of one of the files, once they have been still for a moment. */
  next(): Promise<void>;
  close(): void;
}

/** Editors write a file in several steps: a change is told when nothing has happened for this long, ms. */
const STILL = 120;

/**
 * Watches files by their folders, since an editor that saves by renaming leaves a watch on the file itself behind.
 * Files that are not there yet are watched for as well, where their folder is.
 */
export function watchFiles(paths: readonly string[]): Watch {
  const byFolder = new Map<string, Set<string>>();
  for (const path of paths.map((p) => resolve(p))) {
    const names = byFolder.get(dirname(path)) ?? new Set<string>();
    byFolder.set(dirname(path), names.add(basename(path)));
  }
  let changed = false;
  let waiting: (() => void) | null = null;
  let timer: NodeJS.Timeout | undefined;
  const tell = (): void => {
    clearTimeout(timer);
    timer = setTimeout(() => {
      if (!waiting) {
        changed = true;
        return;
      }
      const done = waiting;
      waiting = null;
      done();
    }, STILL);
  };
  const watchers: FSWatcher[] = [];
  for (const [folder, names] of byFolder) {
    try {
      const watcher = watch(folder, (_, name) => {
        if (name === null || names.has(name)) tell();
      });
      watcher.on('error', () => {});
      watchers.push(watcher);
    } catch {
      // A folder that is not there is reported by the run itself.
    }
  }
  return {
    next: () =>
      new Promise((done) => {
        if (changed) {
          changed = false;
          done();
        } else waiting = done;
      }),
    close() {
      clearTimeout(timer);
      for (const watcher of watchers) watcher.close();
    },
  };
}
