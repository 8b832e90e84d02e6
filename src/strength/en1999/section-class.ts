import type { SectionShape } from '../../model/section.js';
import type { BucklingClass } from './chi.js';

/** beta / epsilon that end class 1, 2, 3 of internal parts without welds, EN 1999-1-1 table 6.2 (from memory). */
const LIMITS: Readonly<Record<BucklingClass, readonly [number, number, number]>> = {
  A: [11, 16, 22],
  B: [13, 16.5, 18],
};

/** epsilon² = 250 MPa / fo of aluminium with E = 70,000 MPa, as a strain, so that any unit of stress will do. */
const REFERENCE_STRAIN = 250 / 70000;

/** beta / epsilon of a round tube: beta = 3 sqrt(D/t), EN 1999-1-1 6.1.4.3 (6.10), epsilon² = (250 / fo)(E / 70,000). */
export const slendernessOf = (diameter: number, wall: number, fo: number, modulus: number): number =>
  3 * Math.sqrt((diameter / wall) * (fo / (REFERENCE_STRAIN * modulus)));

/** Class 1 to 4 of a round tube. Solid sections are class 1. */
export function sectionClass(
  shape: SectionShape,
  { fo, modulus, buckling }: { fo: number; modulus: number; buckling: BucklingClass },
): 1 | 2 | 3 | 4 {
  if (shape.kind !== 'tube') return 1;
  const slender = slendernessOf(shape.diameter, shape.wall, fo, modulus);
  const place = LIMITS[buckling].findIndex((limit) => slender <= limit);
  return place < 0 ? 4 : ((place + 1) as 1 | 2 | 3);
}
