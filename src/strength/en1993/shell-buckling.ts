/**
 * Fabrication quality class C, normal: EN 1993-1-6:2007 tables D.2 and D.6 (from memory): a tube off the rack, whose roundness nobody has measured.
 * Limit slenderness, plastic range factor and exponent of D.1.2.2 and D.1.4.2, the same class (from memory).
 */
const QUALITY = 16;
const MERIDIONAL = { limit: 0.2, beta: 0.6 } as const;
const SHEAR = { limit: 0.4, beta: 0.6, alpha: 0.5 } as const;
/** Cx of a long cylinder is never below this, D.1.2.1 (6); shorter ones have more, so it is safe for every length. */
const LEAST_CX = 0.6;
/** gammaM1 of shells shall not be smaller, EN 1993-1-6 8.5.2 (2). */
export const GAMMA_M1_SHELL = 1.1;

/** What the buckling of a tube's wall leaves of its yield strength, at most 1. */
export interface WallBuckling {
  /** chi_x, under pressure along the axis. */
  readonly axial: number;
  /** chi_tau, in shear. */
  readonly shear: number;
}

/**
 * chi = 1 up to lambda0, 1 - beta (lambda - lambda0) / (lambda_p - lambda0), alpha / lambda² from lambda_p = sqrt(alpha / (1 - beta)) on:
 * EN 1993-1-6:2007 8.5.2 (4), (8.13) to (8.16), exponent eta = 1.
 */
function reduction(lambda: number, alpha: number, { limit, beta }: { limit: number; beta: number }): number {
  if (lambda <= limit) return 1;
  const plastic = Math.sqrt(alpha / (1 - beta));
  return lambda < plastic ? 1 - (beta * (lambda - limit)) / (plastic - limit) : alpha / lambda ** 2;
}

/**
 * Buckling of the wall of a round tube, EN 1993-1-6:2007 annex D (from memory): along the axis sigma_cr = 0.605 E Cx t/r (D.2) with Cx = 0.6,
 * alpha_x = 0.62 / (1 + 1.91 (dw/t)^1.44), dw/t = sqrt(r/t) / Q; in shear tau_cr = 0.25 E (t/r)^1.5, a long cylinder's, (D.21) and (D.24).
 *
 * @param diameter outer, any length; @param wall the same; @param fy, modulus any stress
 */
export function wallBuckling(diameter: number, wall: number, fy: number, modulus: number): WallBuckling {
  const slender = (diameter - wall) / 2 / wall;
  const alpha = 0.62 / (1 + 1.91 * (Math.sqrt(slender) / QUALITY) ** 1.44);
  const along = Math.sqrt((fy * slender) / (0.605 * LEAST_CX * modulus));
  const across = Math.sqrt((fy / Math.sqrt(3)) * (slender ** 1.5 / (0.25 * modulus)));
  return { axial: reduction(along, alpha, MERIDIONAL), shear: reduction(across, SHEAR.alpha, SHEAR) };
}
