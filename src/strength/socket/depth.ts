import type { SocketCase } from './case.js';
import { judgeSocket } from './index.js';

/** Depths are rounded up to whole steps of this, mm. */
const STEP = 0.5;
/** Deeper than this many diameters a socket is no socket: the stress in a bond peaks at its ends and more length adds little. */
export const DEEPEST = 5;

/**
 * The least depth, in steps of 0.5 mm and at least the socket's own, at which the socket passes; null where no depth up to five
 * diameters does, because something else than the engaged length is too weak. Every check falls or stays with depth, so halving finds it.
 */
export function requiredDepth(c: SocketCase): number | null {
  const passes = (depth: number): boolean => {
    const verdict = judgeSocket({ ...c, socket: { ...c.socket, depth } });
    return verdict !== null && verdict.utilisation <= 1;
  };
  const { shape } = c.socket.section;
  const size = shape.kind === 'rectangle' ? Math.max(shape.width, shape.height) : shape.diameter;
  let low = Math.floor(c.socket.depth / STEP);
  let high = Math.ceil((DEEPEST * size) / STEP);
  if (passes(c.socket.depth)) return c.socket.depth;
  if (high <= low || !passes(high * STEP)) return null;
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (passes(middle * STEP)) high = middle;
    else low = middle;
  }
  return high * STEP;
}
