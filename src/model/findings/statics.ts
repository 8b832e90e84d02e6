/** Findings of the statics stage. */
export const STATICS_FINDINGS = {} as const;
