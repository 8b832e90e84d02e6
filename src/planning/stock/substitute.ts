import type { CuttingProblem } from './problem.js';

/**
 * Where pieces could run out of bars: the longest bar once more, without limit, at a price above any saving that one such
 * bar can bring, so that a plan leaves as little uncut as it can. Bars of it are what is missing.
 */
export function withSubstitute(problem: CuttingProblem): CuttingProblem {
  const endless = problem.bins.reduce((most, b) => (b.available === Infinity ? Math.max(most, b.capacity) : most), 0);
  if (problem.weights[0]! <= endless) return problem;
  const longest = problem.bins.reduce((a, b) => (b.capacity > a.capacity ? b : a));
  const dearest = Math.max(1, ...problem.bins.map((b) => b.cost));
  const pieces = Math.floor(longest.capacity / problem.weights[problem.weights.length - 1]!);
  return {
    ...problem,
    bins: [...problem.bins, { capacity: longest.capacity, cost: dearest * (pieces + 1), available: Infinity }],
  };
}
