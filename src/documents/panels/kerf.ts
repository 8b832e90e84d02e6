import { offsetRings } from '../../maths/polygon/boolean.js';
import { type Ring, signedArea } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import type { Job } from '../../model/job/index.js';

/** Half the kerf, mm, where it is taken up here; 0 where the shop does it: exactly one of the two. */
export const kerfOffset = (cutter: Job['cutter']): number => (cutter.compensate === 'here' ? cutter.kerf_mm / 2 : 0);

/** What every sheet says about the kerf. */
export function sayKerf(cutter: Job['cutter']): string {
  const measured = cutter.kerfMeasured ? 'measured' : 'not measured: cut the kerf comb first';
  return cutter.compensate === 'here'
    ? `Kerf ${cutter.kerf_mm} mm (${measured}) is compensated in this file: do not offset again`
    : 'Kerf is NOT compensated in this file: offset by half the kerf at the machine';
}

/** Corners nearer than this are one: ten steps of the polygon library's grid. mm */
const SAME_CORNER = 1e-4;

/**
 * The path of the cutter's middle: outlines out by `offset`, holes in, corners kept sharp. null where a hole is
 * smaller than the kerf and nothing of its path is left.
 */
export function cutterPath(ring: Ring, offset: number, side: 'outside' | 'inside'): Ring | null {
  if (offset === 0) return ring;
  const moved = offsetRings([ring], side === 'outside' ? offset : -offset, 'mitre');
  if (moved.length === 0) return null;
  return tidyRing(
    moved.reduce((a, b) => (signedArea(b) > signedArea(a) ? b : a)),
    SAME_CORNER,
  );
}
