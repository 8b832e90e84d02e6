/** Findings of the stock stage. */
export const STOCK_FINDINGS = {} as const;
