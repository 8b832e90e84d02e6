import type { BucklingClass } from './chi.js';
import { slendernessOf } from './section-class.js';

/** C1 and C2 of internal parts and round tubes without welds, EN 1999-1-1 table 6.3 (from memory). */
const CONSTANTS: Readonly<Record<BucklingClass, readonly [number, number]>> = { A: [32, 220], B: [29, 198] };

/** rho_c = C1 / (beta/eps) - C2 / (beta/eps)²: share of a class 4 tube's wall that stays effective, EN 1999-1-1 6.1.5 (6.12); 1 for stockier ones. */
export function effectiveThickness(
  diameter: number,
  wall: number,
  { fo, modulus, buckling }: { fo: number; modulus: number; buckling: BucklingClass },
): number {
  const slender = slendernessOf(diameter, wall, fo, modulus);
  const [c1, c2] = CONSTANTS[buckling];
  // Below its peak, where the class ends, the formula would fall again.
  return slender <= (2 * c2) / c1 ? 1 : Math.min(1, c1 / slender - c2 / slender ** 2);
}
