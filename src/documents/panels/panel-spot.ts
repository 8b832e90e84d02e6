import { poleOfInaccessibility } from '../../maths/polygon/pole-of-inaccessibility.js';
import type { Ring } from '../../maths/polygon/ring.js';

/** Width of a mark over its height, at least: two characters and the rule under them. */
const FLAT = 1.6;

/** Where a panel's mark stands in a drawing: middle of the widest room for it, and half the width there. */
export function panelSpot(ring: Ring, mark: string): readonly [number, number, number] {
  return poleOfInaccessibility([ring], 1, Math.max(FLAT, 0.6 * mark.length));
}
