import { writeStl } from '../../documents/formats/stl.js';
import { type PackedObject, packObject } from '../../documents/formats/three-mf.js';
import { pieceIcon } from '../../documents/nodes/piece-pictures.js';
import { deflateBlocks } from '../../machine/deflate.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import type { ShapedHub } from '../../model/shaped.js';
import { shapeHub } from '../../shaping/shape-hub.js';
import { type PieceView, viewOf } from './piece-view.js';

export interface ShapeHubInput {
  readonly hub: HubPart;
  readonly job: Job;
  /** Largest tension of each socket's strut, N, in the sockets' order. */
  readonly tension: readonly number[];
  /** Number of its first piece as an object of a bed; a hub has fewer pieces than `PIECES`. */
  readonly object: number;
}

/** Object numbers kept free for each hub. */
export const PIECES = 16;

export interface ShapeHubOutput {
  readonly shaped: ShapedHub;
  /** Bytes of each piece's STL. */
  readonly stl: readonly Uint8Array[];
  /** Each piece as an object of a bed file. */
  readonly objects: readonly PackedObject[];
  /** What is seen of each on its bed. */
  readonly views: readonly PieceView[];
}

/** Shapes one hub and writes its STL and its part of a bed file, in whatever thread. */
export async function shapeHubTask({ hub, job, tension, object }: ShapeHubInput): Promise<ShapeHubOutput> {
  const shaped = await shapeHub(hub, job, tension);
  return {
    shaped,
    stl: shaped.pieces.map((p) => writeStl(p.positions, p.triangles, hub.mark)),
    objects: shaped.pieces.map((p, i) => {
      const name = p.piece ? `${hub.mark}.${p.piece}` : hub.mark;
      const icon = pieceIcon(p.positions, p.triangles, deflateBlocks);
      return packObject(p.positions, p.triangles, object + i, name, `${name}/${hub.revision}`, deflateBlocks, icon);
    }),
    views: shaped.pieces.map(viewOf),
  };
}
