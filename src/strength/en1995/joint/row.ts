/** nef = min(n, n^0.9 (a1 / 13 d)^0.25): effective number of n bolts in a row along the grain, EN 1995-1-1 (8.34). a1, d mm. */
export const effectiveNumber = (n: number, a1: number, d: number): number =>
  n <= 1 ? n : Math.min(n, n ** 0.9 * (a1 / (13 * d)) ** 0.25);

/**
 * Least distances of bolts and dowels in a strut pulled along its grain, mm, EN 1995-1-1 tables 8.4 and 8.5 at 0°, which agree there: along the row
 * 5 d, loaded end max(7 d, 80), edge 3 d; unloaded end (pressed) 4 d.
 */
export const leastDistances = (
  d: number,
): { readonly along: number; readonly end: number; readonly pressedEnd: number; readonly edge: number } => ({
  along: 5 * d,
  end: Math.max(7 * d, 80),
  pressedEnd: 4 * d,
  edge: 3 * d,
});
