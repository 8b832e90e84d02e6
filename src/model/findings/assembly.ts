/** Findings of the assembly stage. */
export const ASSEMBLY_FINDINGS = {} as const;
