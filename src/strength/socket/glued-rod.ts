/** Fracture term of the glue line: brittle adhesives 0.086, ductile ones 1.213 (Feligioni et al., as quoted in Mater. Struct. 2018, s11527-018-1268-y). */
export const GLUE_FRACTURE = { brittle: 0.086, ductile: 1.213 } as const;

/**
 * Fax,mean = pi la (fv dequ + k (d + e) e), N: a metal rod glued into timber along the grain, Feligioni et al. as quoted in
 * Mater. Struct. 2018, s11527-018-1268-y; fv = 1.2e-3 dequ^-0.2 rho^1.5, dequ = min(dh, 1.25 d), dh = d + 2 e.
 *
 * @param d rod; @param e glue line; @param la glued length; mm; @param density of the timber, kg/m³; @param k of the glue line
 */
export function gluedRodCapacity(d: number, e: number, la: number, density: number, k: number): number {
  const dequ = Math.min(d + 2 * e, 1.25 * d);
  const fv = 1.2e-3 * dequ ** -0.2 * density ** 1.5;
  return Math.PI * la * (fv * dequ + k * (d + e) * e);
}
