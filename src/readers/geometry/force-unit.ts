/** Newtons in one unit of force: NIST SP 811 (2008), B.8; the kip is a thousand pounds-force. */
export const FORCE_IN_N = { N: 1, kN: 1000, lbf: 4.4482216152605, kip: 4448.2216152605 } as const;

/** Newtons in the unit that a column names, whatever the case; 1 where it names none. */
export function newtonsIn(unit: string | null): number {
  for (const [name, newtons] of Object.entries(FORCE_IN_N))
    if (name.toLowerCase() === unit?.toLowerCase()) return newtons;
  return 1;
}
