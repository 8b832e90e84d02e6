/** What a search may still spend, counted in looks at a pair of panels, so that the machine's speed changes nothing. */
export interface Budget {
  spent: number;
  readonly limit: number;
  /** Set once the caller's time has run out; only a plan with a time limit ever asks the clock. */
  stopped: boolean;
  readonly outOfTime: (() => boolean) | null;
}

export const budgetOf = (limit: number, outOfTime: (() => boolean) | null): Budget => ({
  spent: 0,
  limit,
  stopped: false,
  outOfTime,
});

/** Whether the search must end. */
export function isSpent(budget: Budget, limit: number = budget.limit): boolean {
  if (!budget.stopped && budget.outOfTime?.()) budget.stopped = true;
  return budget.stopped || budget.spent >= limit;
}
