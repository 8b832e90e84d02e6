/** Millimetres in one unit of length, exact: the international inch is 25.4 mm (ISO 80000-3, NIST SP 811 B.8). */
export const LENGTH_IN_MM = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8 } as const;

export type LengthUnit = keyof typeof LENGTH_IN_MM;

export const LENGTH_UNITS = ['mm', 'cm', 'm', 'in', 'ft'] as const satisfies readonly LengthUnit[];
