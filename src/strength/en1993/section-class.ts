import type { SectionShape } from '../../model/section.js';

/** epsilon² = 235 MPa / fy of steel with E = 210,000 MPa, as a strain, so that any unit of stress will do. */
const REFERENCE_STRAIN = 235 / 210000;

/**
 * Class 1 to 3 of a round tube by d/t against 50, 70, 90 epsilon², epsilon² = (235 / fy)(E / 210,000); 4 beyond. EN 1993-1-1 table 5.2, sheet 3.
 * Solid sections are class 1.
 */
export function sectionClass(shape: SectionShape, fy: number, modulus: number): 1 | 2 | 3 | 4 {
  if (shape.kind !== 'tube') return 1;
  const slender = (shape.diameter / shape.wall) * (fy / (REFERENCE_STRAIN * modulus));
  if (slender <= 50) return 1;
  if (slender <= 70) return 2;
  return slender <= 90 ? 3 : 4;
}
