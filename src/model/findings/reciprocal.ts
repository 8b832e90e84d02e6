/** Findings of the reciprocal stage. */
export const RECIPROCAL_FINDINGS = {} as const;
