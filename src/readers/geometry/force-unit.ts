import { FORCE_IN_N } from '../../model/units.js';

/** Newtons in the unit that a column names, whatever the case; 1 where it names none. */
export function newtonsIn(unit: string | null): number {
  for (const [name, newtons] of Object.entries(FORCE_IN_N))
    if (name.toLowerCase() === unit?.toLowerCase()) return newtons;
  return 1;
}
