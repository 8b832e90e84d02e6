import { ROUND_OFF } from '../../model/tolerance.js';

/** Steps in a millimetre: lengths are whole steps of 0.1 mm, the finest that a saw's stop is set to. */
export const STEPS_PER_MM = 10;

/** Fewest steps that hold a piece, a kerf or a trim of `mm`; a binary fraction above a step does not cost one. */
export const stepsUp = (mm: number): number => Math.max(0, Math.ceil((mm - ROUND_OFF.sawStep.value) * STEPS_PER_MM));

/** Most steps that a bar of `mm` gives. */
export const stepsDown = (mm: number): number => Math.floor((mm + ROUND_OFF.sawStep.value) * STEPS_PER_MM);

/** Decimals of a price that are kept exactly. */
const MOST_DECIMALS = 6;

/**
 * Prices as whole numbers of the largest unit of account that states them all exactly (1, 0.1, ... 0.000001).
 * Finer prices are rounded down, so that a bound in them stays a bound.
 */
export function wholePrices(prices: readonly number[]): {
  readonly whole: number[];
  readonly perUnit: number;
  readonly exact: boolean;
} {
  for (let decimals = 0; decimals <= MOST_DECIMALS; decimals++) {
    const perUnit = 10 ** decimals;
    const near = (p: number): boolean =>
      Math.abs(p * perUnit - Math.round(p * perUnit)) <= 1e-9 * Math.max(1, p * perUnit);
    if (prices.every(near)) return { whole: prices.map((p) => Math.round(p * perUnit)), perUnit, exact: true };
  }
  const perUnit = 10 ** MOST_DECIMALS;
  return { whole: prices.map((p) => Math.floor(p * perUnit)), perUnit, exact: false };
}
