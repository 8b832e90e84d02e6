/** Why a file or folder could not be read or written, as data. */
export type FileTrouble =
  | 'missing'
  | 'not-a-file'
  | 'not-a-folder'
  | 'not-a-pack'
  | 'not-allowed'
  | 'read-only'
  | 'disk-full'
  | 'too-large'
  | 'not-utf8'
  | 'locked'
  | 'bad-path'
  | 'failed';

const MEND: Record<FileTrouble, string> = {
  missing: 'check the path',
  'not-a-file': 'give the path of a file',
  'not-a-folder': 'give the path of a folder',
  'not-a-pack': 'choose a new folder, or an earlier pack to replace',
  'not-allowed': 'ask for permission, or choose another place',
  'read-only': 'choose a place that can be written',
  'disk-full': 'make room, or choose another disk',
  'too-large': 'split the file',
  'not-utf8': 'save the file as UTF-8',
  locked: 'wait until the other run has ended',
  'bad-path': 'use a relative path without ..',
  failed: 'check the disk',
};

/** Thrown by everything in this folder that touches the disk; `path: what: mend` is its message. */
export class FileFault extends Error {
  constructor(
    readonly trouble: FileTrouble,
    readonly path: string,
    readonly what: string,
    readonly mend: string = MEND[trouble],
  ) {
    super(`${printable(path)}: ${what}: ${mend}`);
    this.name = 'FileFault';
  }
}

const printable = (path: string): string => path.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, '?');

/** The fault that a system error about `path` amounts to; anything else than a system error is thrown as it is. */
export function fileFault(error: unknown, path: string): FileFault {
  if (error instanceof FileFault) return error;
  const code = (error as NodeJS.ErrnoException | null)?.code;
  if (!code) throw error;
  const words: Record<string, [FileTrouble, string]> = {
    ENOENT: ['missing', 'is not there'],
    ENOTDIR: ['not-a-folder', 'a part of the path is not a folder'],
    EISDIR: ['not-a-file', 'is a folder'],
    EACCES: ['not-allowed', 'permission is denied'],
    EPERM: ['not-allowed', 'permission is denied'],
    EROFS: ['read-only', 'the disk is read-only'],
    ENOSPC: ['disk-full', 'the disk is full'],
    EDQUOT: ['disk-full', 'your share of the disk is full'],
    EFBIG: ['disk-full', 'the file is larger than the disk allows'],
    ENAMETOOLONG: ['bad-path', 'the path is too long'],
    ELOOP: ['bad-path', 'the links of the path run in a circle'],
  };
  const [trouble, what] = words[code] ?? ['failed', `the system says ${code}`];
  return new FileFault(trouble, path, what);
}
