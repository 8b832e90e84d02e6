import { lstat, open, readFile, stat } from 'node:fs/promises';
import { FileFault, fileFault } from './file-fault.js';

/** The bytes of a file of at most `most` bytes. Throws a FileFault. */
export async function readBytes(path: string, most: number): Promise<Uint8Array> {
  try {
    const file = await open(path, 'r');
    try {
      const info = await file.stat();
      if (info.isDirectory()) throw new FileFault('not-a-file', path, 'is a folder');
      // A device or pipe has no size and may never end.
      if (!info.isFile()) throw new FileFault('not-a-file', path, 'is not an ordinary file');
      if (info.size > most) throw new FileFault('too-large', path, `is larger than ${most} bytes`);
      return await readFile(file);
    } finally {
      await file.close();
    }
  } catch (error) {
    throw fileFault(error, path);
  }
}

/** The text of a UTF-8 file of at most `most` bytes, any byte-order mark kept. Throws a FileFault, also on bytes that are not UTF-8. */
export async function readText(path: string, most: number): Promise<string> {
  const bytes = await readBytes(path, most);
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    throw new FileFault('not-utf8', path, 'is not UTF-8 text');
  }
}

/** Whether a path is a file that begins as a PDF does. */
export async function isPdf(path: string): Promise<boolean> {
  const file = await open(path, 'r').catch(() => null);
  if (!file) return false;
  try {
    const { buffer } = await file.read(Buffer.alloc(5), 0, 5, 0);
    return buffer.toString('latin1') === '%PDF-';
  } catch {
    return false;
  } finally {
    await file.close();
  }
}

/** What stands at a path: a link is followed. Throws a FileFault where the system does not say. */
export async function kindOf(path: string): Promise<'file' | 'folder' | 'other' | null> {
  try {
    const info = await stat(path);
    return info.isFile() ? 'file' : info.isDirectory() ? 'folder' : 'other';
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return (await isLink(path)) ? 'other' : null;
    throw fileFault(error, path);
  }
}

const isLink = (path: string): Promise<boolean> =>
  lstat(path).then(
    (info) => info.isSymbolicLink(),
    () => false,
  );
