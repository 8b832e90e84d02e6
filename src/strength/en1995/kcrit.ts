/** sigma_m,crit of a solid rectangle, MPa: 0.78 b² E0.05 / (h lef), EN 1995-1-1 (6.32). mm and MPa. */
export const criticalBending = (b: number, h: number, lef: number, e005: number): number =>
  (0.78 * b * b * e005) / (h * lef);

/** kcrit by lambda_rel,m: 1 up to 0.75, 1.56 - 0.75 lambda up to 1.4, 1 / lambda² beyond. EN 1995-1-1 (6.34), from memory. */
export function kcrit(lambdaRelM: number): number {
  if (lambdaRelM <= 0.75) return 1;
  return lambdaRelM <= 1.4 ? 1.56 - 0.75 * lambdaRelM : 1 / lambdaRelM ** 2;
}
