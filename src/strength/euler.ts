import type { StrutPart } from '../model/parts.js';
import { sectionProperties } from '../model/section.js';

/** pi² E I / L² (Euler 1744) in N, with the mean modulus, the least second moment and the effective length in mm; null where section or material are unknown. */
export function eulerLoad(strut: StrutPart, effectiveLength: number): number | null {
  if (!strut.section || !strut.material || effectiveLength <= 0) return null;
  const { iy, iz } = sectionProperties(strut.section.shape);
  return (Math.PI ** 2 * strut.material.modulus * Math.min(iy, iz)) / effectiveLength ** 2;
}
