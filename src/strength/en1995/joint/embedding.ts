/** fh,0,k = 0.082 (1 - 0.01 d) rho_k, MPa: bolts and dowels up to 30 mm in predrilled timber along the grain, EN 1995-1-1 (8.32). d mm, rho_k kg/m³. */
export const embeddingStrength = (d: number, densityK: number): number => 0.082 * (1 - 0.01 * d) * densityK;

/**
 * fh at an angle to the grain, rad: fh,0 / (k90 sin² + cos²), k90 = 1.35 + 0.015 d. EN 1995-1-1 (8.31), (8.33), softwood's k90 for every
 * timber: hardwood's 0.90 + 0.015 d would give more.
 */
export const embeddingAtAngle = (fh0: number, d: number, angle: number): number =>
  fh0 / ((1.35 + 0.015 * d) * Math.sin(angle) ** 2 + Math.cos(angle) ** 2);
