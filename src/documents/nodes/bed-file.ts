import type { PlannedBed } from '../../model/plan.js';
import { type PackedObject, writeThreeMf } from '../formats/three-mf.js';
import type { DeflateBlocks } from '../formats/zip.js';

/** A piece's packed mesh with the depth of its box, mm: what a bed file needs of it. */
export interface BedObject {
  readonly object: PackedObject;
  readonly depth: number;
}

/** The 3MF file of a planned bed. @param objectOf the object of a node's mark and piece */
export function bedFile(
  bed: PlannedBed,
  objectOf: (mark: string, piece: string) => BedObject,
  title: string,
  date: string | null,
  deflate: DeflateBlocks,
  thumbnail: Uint8Array | null = null,
): Uint8Array {
  const items = bed.items.map(({ mark, piece, x, y, turned }) => {
    const { object, depth } = objectOf(mark, piece);
    // A quarter turn carries the box to the left of its corner by its depth.
    return { object, turned, move: [x + (turned ? depth : 0), y] as const };
  });
  return writeThreeMf(items, `${title}: ${bed.mark}`, date, thumbnail, deflate);
}
