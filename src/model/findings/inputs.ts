/** Findings of the inputs stage. */
export const INPUTS_FINDINGS = {} as const;
