/** What a search may still spend, counted in looks at a pair of panels, so that the machine's speed changes nothing. */
export interface Budget {
  spent: number;
  readonly limit: number;
  /** Set once the caller's time has run out; only a plan with a time limit ever asks the clock. */
  stopped: boolean;
  /** Set once time has decided anything: the plan then depends on the machine. */
  hurried: boolean;
  /** Share of the caller's time that has gone, from 0; null: no time limit. */
  readonly timeShare: (() => number) | null;
}

export const budgetOf = (limit: number, timeShare: (() => number) | null): Budget => ({
  spent: 0,
  limit,
  stopped: false,
  hurried: false,
  timeShare,
});

/** Share of the time before which it decides nothing: beginning is slower than it counts. */
const TIME_COUNTS = 0.1;

/** How far the search is, in evaluations; where time runs faster than they do, time decides, so that every phase gets its share. */
export function goneOf(budget: Budget): number {
  if (!budget.timeShare) return budget.spent;
  const share = budget.timeShare();
  if (share >= 1) budget.stopped = true;
  if (share < TIME_COUNTS || share * budget.limit <= budget.spent) return budget.spent;
  budget.hurried = true;
  return share * budget.limit;
}

/** Whether the search must end. */
export function isSpent(budget: Budget, limit: number = budget.limit): boolean {
  const gone = goneOf(budget);
  return budget.stopped || gone >= limit;
}
