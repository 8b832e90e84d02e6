import type { Meter } from './effort.js';
import type { Requirement } from './mix.js';
import type { Pricer } from './pricer.js';
import type { CuttingProblem } from './problem.js';

/** Total worth of the pieces after rounding to whole numbers: fine enough to lose 1 part in 10 million a piece, exact in doubles. */
const WORTH_DIGITS = 2 ** 40;

/** The pieces' own weights as values: no bar holds more than the largest sum of weights that fits. */
export function materialRequirement(problem: CuttingProblem, pricer: Pricer, meter: Meter): Requirement {
  return wholeRequirement(problem, Float64Array.from(problem.weights), pricer, meter);
}

/**
 * Rounds duals down to whole numbers and settles by an exact knapsack over integers what each bar can carry of them.
 *
 * Whatever the duals were, the result is a true statement about every plan: round-off in the linear programme cannot reach it.
 */
export function requirementFrom(
  problem: CuttingProblem,
  duals: Float64Array,
  pricer: Pricer,
  meter: Meter,
): Requirement {
  let worth = 0;
  for (let i = 0; i < duals.length; i++) worth += duals[i]! * problem.demand[i]!;
  const scale = worth > 0 ? WORTH_DIGITS / worth : 0;
  return wholeRequirement(
    problem,
    duals.map((d) => Math.max(0, Math.floor(d * scale))),
    pricer,
    meter,
  );
}

function wholeRequirement(problem: CuttingProblem, values: Float64Array, pricer: Pricer, meter: Meter): Requirement {
  let worth = 0;
  for (let i = 0; i < values.length; i++) worth += values[i]! * problem.demand[i]!;
  const carry = pricer.values(
    values,
    problem.demand,
    problem.bins.map((b) => b.capacity),
    meter,
  );
  return { worth, carry };
}
