import { type FileHandle, mkdtemp, open, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Spool } from './memory-spool.js';

/** A spool in a file of its own among the system's temporary files; nobody else sees it, and closing it takes it away. */
export async function openSpool(): Promise<Spool & { close(): Promise<void> }> {
  const folder = await mkdtemp(join(tmpdir(), 'strutwright-spool-'));
  const path = join(folder, 'spool');
  let file: FileHandle;
  try {
    file = await open(path, 'wx+');
  } catch (error) {
    await rm(folder, { recursive: true, force: true });
    throw error;
  }
  // Where the system allows it the name goes at once, so that nothing is left of a run that is killed.
  await rm(folder, { recursive: true, force: true }).catch(() => {});
  let end = 0;
  return {
    async put(bytes) {
      const at = end;
      end += bytes.length;
      const { length } = bytes;
      try {
        for (let done = 0; done < length; ) {
          const { bytesWritten } = await file.write(bytes, done, length - done, at + done);
          done += bytesWritten;
        }
      } catch {
        // A full disk: what does not go there stays in memory.
        return async () => bytes;
      }
      return async () => {
        const back = new Uint8Array(length);
        for (let done = 0; done < length; ) {
          const { bytesRead } = await file.read(back, done, length - done, at + done);
          if (bytesRead === 0) throw new Error('the spool is shorter than what was put into it');
          done += bytesRead;
        }
        return back;
      };
    },
    async close() {
      await file.close();
      await rm(folder, { recursive: true, force: true }).catch(() => {});
    },
  };
}
