import type { Assessment } from '../documents/records.js';
import { settleFindings } from '../model/hold.js';

type Unsettled = Omit<Assessment, 'findings' | 'waived' | 'status' | 'hold'>;

/** Applies the job's waivers to what the stages found and gives the verdict. */
export function settle(found: Unsettled): Assessment {
  return { ...found, ...settleFindings(found.found, found.job, found.notChecked) };
}
