import type { WeakestSection } from '../../model/shaped.js';
import { fixed, type Units } from '../kit/units.js';

/** A hub's weakest section in a few words: its area, where it is, and how many times what it must be. */
export function weakestWords(w: WeakestSection, units: Units): string {
  const where = w.where === 'core' ? `across the core at ${w.strut}` : `behind ${w.strut}`;
  return `${units.area(w.area)} ${units.lengthUnit}² ${where} (${fixed(w.area / w.needed, 1)}×)`;
}
