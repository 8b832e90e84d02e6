import type { CaseResult } from '../../model/solution.js';
import type { Assessment } from '../records.js';

/** The load cases of an analysis, then its combinations. */
export const casesOf = (a: Assessment): readonly CaseResult[] => [
  ...(a.solution?.cases ?? []),
  ...(a.solution?.combinations ?? []),
];
