import { readdir, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { sha256 } from './hash.js';
import { makeFolder } from './make-folder.js';

/**
 * A memory beside the job, by digest of what went in. Safe to delete at any moment; never trusted under another version
 * of the program, nor where an entry's own checksum does not fit. A cache that cannot be written remembers nothing and
 * says nothing: it is never needed.
 */
export interface Cache {
  /** The bytes kept under a digest (64 hexadecimal digits), or null. */
  get(digest: string): Promise<Uint8Array | null>;
  /** Whether there is an entry, sound or not. */
  has(digest: string): Promise<boolean>;
  put(digest: string, bytes: Uint8Array): Promise<void>;
  /** Removes every entry that this run neither read nor wrote. */
  prune(): Promise<void>;
}

const DIGEST = /^[0-9a-f]{64}$/;
const CHECKSUM_BYTES = 64;

/** Opens the cache in `folder` for one version of the program; what other versions left there is removed. */
export async function openCache(folder: string, version: string): Promise<Cache> {
  const own = sha256(version).slice(0, 16);
  const home = join(folder, own);
  const used = new Set<string>();
  for (const other of await list(folder))
    if (/^[0-9a-f]{16}$/.test(other) && other !== own) await remove(join(folder, other));
  // Two levels, since some file systems are slow with many names in one folder.
  const place = (digest: string): string => join(home, digest.slice(0, 2), digest.slice(2));
  return {
    async get(digest) {
      if (!DIGEST.test(digest)) return null;
      const file = await readFile(place(digest)).catch(() => null);
      if (!file) return null;
      const bytes = file.subarray(CHECKSUM_BYTES);
      if (file.subarray(0, CHECKSUM_BYTES).toString('latin1') !== sha256(bytes)) {
        await remove(place(digest));
        return null;
      }
      used.add(digest);
      return new Uint8Array(bytes);
    },
    has: (digest) =>
      stat(place(digest)).then(
        () => true,
        () => false,
      ),
    async put(digest, bytes) {
      if (!DIGEST.test(digest)) return;
      used.add(digest);
      const target = place(digest);
      const half = `${target}.${process.pid}.half`;
      try {
        await makeFolder(join(home, digest.slice(0, 2)));
        await writeFile(half, Buffer.concat([Buffer.from(sha256(bytes), 'latin1'), bytes]));
        await rename(half, target);
      } catch {
        await remove(half);
      }
    },
    async prune() {
      for (const start of await list(home))
        for (const rest of await list(join(home, start)))
          if (!used.has(start + rest)) await remove(join(home, start, rest));
    },
  };
}

const list = (folder: string): Promise<string[]> => readdir(folder).catch(() => []);
const remove = (path: string): Promise<void> => rm(path, { recursive: true, force: true }).catch(() => {});
