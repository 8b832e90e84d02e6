/** Imperfection factor alpha by buckling curve, EN 1993-1-1:2005 table 6.1: seen in copies of the standard. */
export const IMPERFECTION = { a0: 0.13, a: 0.21, b: 0.34, c: 0.49, d: 0.76 } as const;
export type BucklingCurve = keyof typeof IMPERFECTION;

/** Slenderness below which buckling is left out, EN 1993-1-1 6.3.1.2 (4). */
const STOCKY = 0.2;

/** chi = 1 / (phi + sqrt(phi² - lambda²)), phi = (1 + alpha (lambda - 0.2) + lambda²) / 2, at most 1. EN 1993-1-1 (6.49). */
export function chi(lambda: number, curve: BucklingCurve): number {
  if (lambda <= STOCKY) return 1;
  const phi = 0.5 * (1 + IMPERFECTION[curve] * (lambda - STOCKY) + lambda ** 2);
  return Math.min(1, 1 / (phi + Math.sqrt(phi ** 2 - lambda ** 2)));
}
