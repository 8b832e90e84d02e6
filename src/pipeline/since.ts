import type { PartKind } from '../model/part-kind.js';
import type { PackPart } from './pack-writer.js';

/** An earlier pack that this one follows: what is unchanged is not made again. */
export interface Since {
  readonly title: string;
  readonly revision: string;
  readonly parts: readonly PackPart[];
}

/** How parts of this issue stand to those of the one before. */
export interface Lineage {
  /** Whether the part of that mark was made before exactly as it is now. */
  unchanged(kind: PartKind, mark: string, digest: string | null): boolean;
  /** Revision letter of the part's own last change. */
  revision(kind: PartKind, mark: string, digest: string | null): string;
  /** Caps and guides that the earlier pack has of a node, without their files. */
  accessories(node: string): readonly PackPart[];
}

/** `revision`: the letter of this issue. Without an earlier pack everything is new. */
export function lineageOf(since: Since | null, revision: string): Lineage {
  const before = new Map((since?.parts ?? []).map((p) => [`${p.kind} ${p.mark}`, p]));
  const same = (kind: PartKind, mark: string, digest: string | null): PackPart | null => {
    const part = before.get(`${kind} ${mark}`);
    return part && digest !== null && part.digest === digest ? part : null;
  };
  return {
    unchanged: (kind, mark, digest) => same(kind, mark, digest) !== null,
    revision: (kind, mark, digest) => same(kind, mark, digest)?.revision ?? revision,
    accessories: (node) =>
      (since?.parts ?? [])
        .filter((p) => (p.kind === 'cap' || p.kind === 'guide') && p.mark.startsWith(`${node}.`))
        .map((p) => ({ ...p, files: [] })),
  };
}
