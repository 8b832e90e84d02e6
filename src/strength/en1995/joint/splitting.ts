/**
 * F90,Rk = 14 b w sqrt(he / (1 - he/h)), N: softwood split by a force across the grain, EN 1995-1-1 8.1.4 (8.4); w = 1 for bolts and dowels.
 *
 * @param b thickness of the member; @param h its depth; @param he from the loaded edge to the farthest fastener; mm
 */
export const splittingCapacity = (b: number, h: number, he: number): number => 14 * b * Math.sqrt(he / (1 - he / h));
