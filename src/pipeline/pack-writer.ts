import { sha256 } from '../machine/hash.js';
import type { PartKind } from '../model/part-kind.js';

export interface PackFile {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

export interface PackPart {
  readonly mark: string;
  readonly kind: PartKind;
  /** Over what is made, not over where it stands; null where its machine file is withheld. */
  readonly digest: string | null;
  /** The same without labels: parts of one form differ in their letters at most. */
  readonly form: string | null;
  /** Revision letter of the part's own last change. */
  readonly revision: string;
  readonly files: readonly string[];
  /** Of a printed node: its weakest section square to a strut and what it must be at least, measured on the mesh. */
  readonly weakest_section?: {
    readonly strut: string;
    readonly where: 'root' | 'core';
    readonly area_mm2: number;
    readonly needed_mm2: number;
  };
}

export type WriteFile = (path: string, bytes: Uint8Array) => void | Promise<void>;

/** Writes a pack's files one by one and keeps nothing but their paths, sizes and digests. */
export interface PackWriter {
  put(path: string, bytes: Uint8Array | string): Promise<void>;
  /** In the order of their paths. */
  files(): readonly PackFile[];
}

export function packWriter(write: WriteFile): PackWriter {
  const files = new Map<string, PackFile>();
  return {
    async put(path, content) {
      if (files.has(path)) throw new Error(`the pack already has ${path}`);
      const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
      files.set(path, { path, bytes: bytes.length, sha256: sha256(bytes) });
      await write(path, bytes);
    },
    files: () => [...files.values()].sort((a, b) => (a.path < b.path ? -1 : a.path > b.path ? 1 : 0)),
  };
}
