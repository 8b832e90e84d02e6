import type { Job } from '../../model/job/index.js';

/**
 * US customary units for one SI unit. NIST SP 811 (2008), appendix B.8: 1 in = 25.4 mm, 1 ft = 0.3048 m exactly; 1 lb = 0.45359237 kg,
 * 1 lbf = 4.448222 N, 1 psi = 6894.757 Pa.
 */
const CUSTOMARY: ReadonlyMap<string, readonly [unit: string, perUnit: number]> = new Map([
  ['mm', ['in', 1 / 25.4]],
  ['m', ['ft', 1 / 0.3048]],
  ['mm²', ['in²', 1 / 25.4 ** 2]],
  ['m²', ['ft²', 1 / 0.3048 ** 2]],
  ['N', ['lbf', 1 / 4.4482216152605]],
  ['kN', ['kip', 1 / 4.4482216152605]],
  ['kg', ['lb', 1 / 0.45359237]],
  ['MPa', ['psi', 1e6 / 6894.757293168]],
  ['kN/m²', ['lbf/ft²', (1000 / 4.4482216152605) * 0.3048 ** 2]],
]);

/** A number, or two as in 1219 x 610, with its unit. */
const QUANTITY =
  /(?<![\p{L}\d_.])(\d+(?:\.\d+)?)(?:( [x×] )(\d+(?:\.\d+)?))? (kN\/m²|mm²|m²|mm|m|MPa|kN|N|kg)(?![\p{L}\d³/²])/gu;

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
