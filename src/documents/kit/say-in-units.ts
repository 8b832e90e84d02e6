import type { Job } from '../../model/job/index.js';
import { FORCE_IN_N, KG_IN_LB, LENGTH_IN_MM } from '../../model/units.js';

/**
 * US customary units for one SI unit; 1 psi = 6894.757 Pa (NIST SP 811 (2008), appendix B.8).
 */
const CUSTOMARY: ReadonlyMap<string, readonly [unit: string, perUnit: number]> = new Map([
  ['mm', ['in', 1 / LENGTH_IN_MM.in]],
  ['m', ['ft', 1000 / LENGTH_IN_MM.ft]],
  ['mm²', ['in²', 1 / LENGTH_IN_MM.in ** 2]],
  ['m²', ['ft²', (1000 / LENGTH_IN_MM.ft) ** 2]],
  ['N', ['lbf', 1 / FORCE_IN_N.lbf]],
  ['kN', ['kip', 1000 / FORCE_IN_N.kip]],
  ['kg', ['lb', 1 / KG_IN_LB]],
  ['MPa', ['psi', 1e6 / 6894.757293168]],
  ['kg/m³', ['lb/ft³', (LENGTH_IN_MM.ft / 1000) ** 3 / KG_IN_LB]],
  ['kN/m²', ['lbf/ft²', (1000 / FORCE_IN_N.lbf) * (LENGTH_IN_MM.ft / 1000) ** 2]],
]);

/** A number, or two as in 1219 x 610, with its unit. */
const QUANTITY =
  /(?<![\p{L}\d_.])(\d+(?:\.\d+)?)(?:( [x×] )(\d+(?:\.\d+)?))? (kN\/m²|kg\/m³|mm²|m²|mm|m|MPa|kN|N|kg)(?![\p{L}\d³/²])/gu;

/**
 * A sentence in the units of a job's papers: as it is in SI, each quantity converted in US customary units, to as many figures as
 * it has and to three at least.
 */
export function sayInUnits(text: string, output: Job['output']): string {
  if (output.units === 'SI') return text;
  return text.replace(QUANTITY, (_, first: string, by: string | undefined, second: string | undefined, si: string) => {
    const [unit, per] = CUSTOMARY.get(si)!;
    return `${converted(first, per)}${second === undefined ? '' : `${by}${converted(second, per)}`} ${unit}`;
  });
}

const LEAST_FIGURES = 3;

function converted(text: string, per: number): string {
  const figures = Math.max(LEAST_FIGURES, text.replace('.', '').replace(/^0+/, '').length);
  return String(Number((Number(text) * per).toPrecision(figures)));
}
