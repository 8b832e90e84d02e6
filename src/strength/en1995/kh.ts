import type { MaterialFamily } from '../../model/material.js';

/**
 * kh by the depth in bending or the width in tension, mm. Solid timber with rho_k <= 700 kg/m³: min((150/h)^0.2, 1.3), EN 1995-1-1 (3.1);
 * glulam: min((600/h)^0.1, 1.1), (3.2); 1 elsewhere and above those depths. From memory, used in a published worked example.
 */
export function kh(family: MaterialFamily, depth: number, densityK: number): number {
  if (family === 'glulam') return Math.max(1, Math.min((600 / depth) ** 0.1, 1.1));
  if (family !== 'timber' || densityK > 700) return 1;
  return Math.max(1, Math.min((150 / depth) ** 0.2, 1.3));
}
