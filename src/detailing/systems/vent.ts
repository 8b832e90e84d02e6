import type { Job } from '../../model/job/index.js';
import type { Socket } from '../../model/parts.js';
import { boreHalf, smallest } from './sleeve.js';

/** Hole that loose powder leaves a blind bore by, mm; design guides of powder processes ask for 2 at least, from memory. */
const DRAIN = 2;
/** A drain takes at most this share of its bore; common practice, no source. */
const MOST_OF_BORE = 0.5;

/**
 * Diameters wanted of the hole at a socket's floor, mm, the widest first; none: no hole. It lets air and glue out. A bore that is
 * deeper than it is wide holds powder too, and in that process it gets a drain, or where that has no way the vent.
 */
export function floorHoles(socket: Socket, job: Job): readonly number[] {
  const { vent_mm, drain_mm, process } = job.nodes;
  const width = 2 * smallest(boreHalf(socket));
  const drain = drain_mm ?? (process === 'powder' ? DRAIN : 0);
  const drained = process === 'powder' && socket.depth > width ? Math.min(drain, MOST_OF_BORE * width) : 0;
  return [...new Set([Math.max(drained, vent_mm), vent_mm])].filter((d) => d > 0);
}
