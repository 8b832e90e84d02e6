import { type PlanImage, planImage } from '../../documents/nodes/piece-pictures.js';
import { deflateBlocks, inflateBlocks } from '../../machine/deflate.js';
import { convexHull2 } from '../../maths/convex-hull2.js';
import type { Point2 } from '../../model/parts.js';
import type { ShapedPiece } from '../../model/shaped.js';

/** What is seen of a piece on its bed from above, small enough to be kept for thousands of pieces. */
export interface PieceView {
  /** Convex hull of the piece in plan, anticlockwise, mm from its box's corner. */
  readonly footprint: readonly Point2[];
  /** Its picture, compressed. */
  readonly plan: Omit<PlanImage, 'shade'> & { readonly blocks: Uint8Array };
}

export function viewOf({ positions, triangles }: Pick<ShapedPiece, 'positions' | 'triangles'>): PieceView {
  const { width, depth, shade } = planImage(positions, triangles);
  return { footprint: convexHull2(outermost(positions)), plan: { width, depth, blocks: deflateBlocks(shade) } };
}

/** Vertices that are farthest out in some direction of many: their hull is the piece's but for slivers. */
function outermost(positions: Float32Array): [number, number][] {
  const points: [number, number][] = [];
  for (let k = 0; k < DIRECTIONS; k++) {
    const c = Math.cos((2 * Math.PI * k) / DIRECTIONS);
    const s = Math.sin((2 * Math.PI * k) / DIRECTIONS);
    let best = 0;
    let most = Number.NEGATIVE_INFINITY;
    for (let i = 0; i < positions.length; i += 3) {
      const out = c * positions[i]! + s * positions[i + 1]!;
      if (out > most) {
        most = out;
        best = i;
      }
    }
    points.push([positions[best]!, positions[best + 1]!]);
  }
  return points;
}

const DIRECTIONS = 48;

export const planOf = ({ width, depth, blocks }: PieceView['plan']): PlanImage => ({
  width,
  depth,
  shade: inflateBlocks(blocks),
});
