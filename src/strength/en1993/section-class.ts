import type { SectionShape } from '../../model/section.js';

/** Class 1 to 3 of a round tube by d/t against 50, 70, 90 epsilon², epsilon² = 235 / fy; 4 beyond. EN 1993-1-1 table 5.2, sheet 3. Solid sections are class 1. */
export function sectionClass(shape: SectionShape, fy: number): 1 | 2 | 3 | 4 {
  if (shape.kind !== 'tube') return 1;
  const slender = (shape.diameter / shape.wall) * (fy / 235);
  if (slender <= 50) return 1;
  if (slender <= 70) return 2;
  return slender <= 90 ? 3 : 4;
}
