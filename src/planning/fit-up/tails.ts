import type { Job } from '../../model/job/index.js';
import type { Tail } from './sure-chance.js';

/**
 * P(|x| > t) for a sum x of independent errors with deviation 1. Normal errors: exact. Even ones: at most 2 exp(-t²/2), since
 * an even error is sub-Gaussian with its own variance (Arbel, Marchal and Nguyen, ESAIM: P&S 24 (2020) 39-55, from memory), and
 * at most 1/t² (Chebyshev).
 */
export const tailOf = (distribution: Job['fit']['distribution']): Tail =>
  distribution === 'normal' ? outside : (t) => Math.min(1, 2 * Math.exp((-t * t) / 2), 1 / (t * t));

/** P(|x| > t) for a single error with deviation 1. */
export const singleTailOf = (distribution: Job['fit']['distribution']): Tail =>
  distribution === 'normal' ? outside : (t) => Math.max(0, 1 - t / Math.sqrt(3));

/** P(|normal| > x), by the complementary error function of Numerical Recipes 6.2 (from memory): relative error below 1.2e-7. */
function outside(x: number): number {
  if (x === Infinity) return 0;
  const z = x / Math.SQRT2;
  const t = 1 / (1 + z / 2);
  const c = [
    -1.26551223, 1.00002368, 0.37409196, 0.09678418, -0.18628806, 0.27886807, -1.13520398, 1.48851587, -0.82215223,
    0.17087277,
  ];
  let power = 0;
  for (let i = c.length - 1; i >= 0; i--) power = c[i]! + t * power;
  return t * Math.exp(-z * z + power);
}
