/** Exit status of every command, a contract with scripts. */
export const EXIT = {
  clear: 0,
  flagged: 1,
  /** Wrong use or bad input; nothing was written. */
  refused: 2,
  /** A fault of the program. */
  fault: 70,
} as const;
