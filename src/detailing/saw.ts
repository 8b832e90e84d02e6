import { ROUND_OFF } from '../model/tolerance.js';

/** The largest whole number of saw steps in `length`, in mm; a binary fraction short of a step counts as that step. */
export function roundDownToStep(length: number, step: number): number {
  const steps = Math.floor((length + ROUND_OFF.sawStep.value) / step);
  // Multiplying by a step such as 0.1 would bring the binary fraction back; dividing by its inverse does not.
  const perUnit = Math.round(1 / step);
  return Math.abs(perUnit * step - 1) < 1e-12 ? steps / perUnit : steps * step;
}
