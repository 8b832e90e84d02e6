/** Imperfection factor and limit slenderness by buckling class, EN 1999-1-1 table 6.6: A seen in published training examples, B from memory. */
const BUCKLING_CLASS = { A: { alpha: 0.2, limit: 0.1 }, B: { alpha: 0.32, limit: 0 } } as const;
export type BucklingClass = keyof typeof BUCKLING_CLASS;

/** chi = 1 / (phi + sqrt(phi² - lambda²)), phi = (1 + alpha (lambda - lambda0) + lambda²) / 2, at most 1. EN 1999-1-1 (6.50). */
export function chi(lambda: number, buckling: BucklingClass): number {
  const { alpha, limit } = BUCKLING_CLASS[buckling];
  if (lambda <= limit) return 1;
  const phi = 0.5 * (1 + alpha * (lambda - limit) + lambda ** 2);
  return Math.min(1, 1 / (phi + Math.sqrt(phi ** 2 - lambda ** 2)));
}
