/** Partial factors of EN 1993-1-8 2.2: gammaM2 for shear, gammaM0 for bending and bearing of pins. */
export const PIN_FACTORS = { m0: 1, m2: 1.25 } as const;

/** Fv,Rd = 0.6 A fup / gammaM2, N: one shear plane of a pin, EN 1993-1-8 table 3.10. d mm, fu MPa. */
export const pinShear = (d: number, fu: number): number => (0.6 * (Math.PI / 4) * d * d * fu) / PIN_FACTORS.m2;

/** MRd = 1.5 Wel fyp / gammaM0, N mm, EN 1993-1-8 table 3.10. */
export const pinBending = (d: number, fy: number, gammaM0: number = PIN_FACTORS.m0): number =>
  (1.5 * (Math.PI / 32) * d ** 3 * fy) / gammaM0;

/** MEd = F/8 (b + 4 c + 2 a), N mm: middle plate b, gaps c, outer plates a, EN 1993-1-8 figure 3.11. */
export const pinMoment = (force: number, a: number, b: number, c: number): number => (force / 8) * (b + 4 * c + 2 * a);

/** Fb,Rd = 1.5 t d fy / gammaM0, N: bearing of plate and pin, EN 1993-1-8 table 3.10. */
export const pinBearing = (t: number, d: number, fy: number): number => (1.5 * t * d * fy) / PIN_FACTORS.m0;

/** Utilisation of a pin in double shear: shear alone, and (MEd/MRd)² + (FvEd/FvRd)² (EN 1993-1-8 table 3.10). */
export function pinUse(
  force: number,
  pin: { readonly d: number; readonly fy: number; readonly fu: number },
  plates: { readonly a: number; readonly b: number; readonly c: number },
): { readonly shear: number; readonly combined: number } {
  const shear = force / 2 / pinShear(pin.d, pin.fu);
  const bent = pinMoment(force, plates.a, plates.b, plates.c) / pinBending(pin.d, pin.fy);
  return { shear, combined: bent ** 2 + shear ** 2 };
}
