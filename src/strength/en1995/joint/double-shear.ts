/** My,Rk = 0.3 fu,k d^2.6, N mm: yield moment of a bolt or dowel, EN 1995-1-1 (8.30). fu MPa, d mm. */
export const yieldMoment = (d: number, fu: number): number => 0.3 * fu * d ** 2.6;

/** Failure of a fastener in double shear with a plate in the middle: timber crushed (f), one hinge a member (g), hinges in plate and timber (h). */
export interface DoubleShear {
  readonly f: number;
  readonly g: number;
  readonly h: number;
  /** The least: Fv,Rk for each of the two shear planes, N. */
  readonly perPlane: number;
}

/**
 * Fv,Rk a shear plane with a steel plate of any thickness as the middle member, EN 1995-1-1 (8.11):
 * f fh t1 d; g fh t1 d (sqrt(2 + 4 My / (fh d t1²)) - 1); h 2.3 sqrt(My fh d). The rope effect is left out, as it must be for dowels.
 *
 * @param t1 thickness of the timber beside the plate, mm; @param fh MPa; @param my N mm
 */
export function plateInTheMiddle(fh: number, d: number, t1: number, my: number): DoubleShear {
  const f = fh * t1 * d;
  const g = f * (Math.sqrt(2 + (4 * my) / (fh * d * t1 * t1)) - 1);
  const h = 2.3 * Math.sqrt(my * fh * d);
  return { f, g, h, perPlane: Math.min(f, g, h) };
}
