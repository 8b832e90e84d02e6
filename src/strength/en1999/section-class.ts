import type { SectionShape } from '../../model/section.js';
import type { BucklingClass } from './chi.js';

/** beta / epsilon that end class 1, 2, 3 of internal parts without welds, EN 1999-1-1 table 6.2 (from memory). */
const LIMITS: Readonly<Record<BucklingClass, readonly [number, number, number]>> = {
  A: [11, 16, 22],
  B: [13, 16.5, 18],
};

/** Class 1 to 4 of a round tube: beta = 3 sqrt(D/t), EN 1999-1-1 6.1.4.3 (6.10), epsilon = sqrt(250 / fo). Solid sections are class 1. */
export function sectionClass(shape: SectionShape, fo: number, buckling: BucklingClass): 1 | 2 | 3 | 4 {
  if (shape.kind !== 'tube') return 1;
  const beta = 3 * Math.sqrt(shape.diameter / shape.wall);
  const place = LIMITS[buckling].findIndex((limit) => beta <= limit * Math.sqrt(250 / fo));
  return place < 0 ? 4 : ((place + 1) as 1 | 2 | 3);
}
