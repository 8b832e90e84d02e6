/** Findings of the strength stage. */
export const STRENGTH_FINDINGS = {} as const;
