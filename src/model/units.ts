/** Millimetres in one unit of length, exact: the international inch is 25.4 mm (ISO 80000-3, NIST SP 811 B.8). */
export const LENGTH_IN_MM = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8 } as const;

export type LengthUnit = keyof typeof LENGTH_IN_MM;

export const LENGTH_UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const satisfies readonly LengthUnit[];

/** Newtons in one unit of force: NIST SP 811 (2008), B.8; the kip is a thousand pounds-force. */
export const FORCE_IN_N = { N: 1, kN: 1000, lbf: 4.4482216152605, kip: 4448.2216152605 } as const;
/** Kilograms in one avoirdupois pound, exact: NIST SP 811 (2008), B.8. */
export const KG_IN_LB = 0.45359237;
