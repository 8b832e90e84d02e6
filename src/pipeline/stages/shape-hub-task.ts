import { writeStl } from '../../documents/formats/stl.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import type { ShapedHub } from '../../model/shaped.js';
import { shapeHub } from '../../shaping/shape-hub.js';

export interface ShapeHubInput {
  readonly hub: HubPart;
  readonly job: Job;
  /** Largest tension of each socket's strut, N, in the sockets' order. */
  readonly tension: readonly number[];
}

export interface ShapeHubOutput {
  readonly shaped: ShapedHub;
  /** Bytes of each piece's STL. */
  readonly stl: readonly Uint8Array[];
}

/** Shapes one hub and writes its STL, in whatever thread. */
export async function shapeHubTask({ hub, job, tension }: ShapeHubInput): Promise<ShapeHubOutput> {
  const shaped = await shapeHub(hub, job, tension);
  return { shaped, stl: shaped.pieces.map((p) => writeStl(p.positions, p.triangles, hub.mark)) };
}
