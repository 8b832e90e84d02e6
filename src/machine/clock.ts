/** ms since 1970, the same in every thread: for the time limits of searches, never for what is written. */
export const now = (): number => Date.now();
