import { type CheckReport, checkReport } from '../documents/check-json.js';
import type { Job } from '../model/job/index.js';
import type { Truss } from '../model/truss.js';
import { assess } from './assess.js';

/** The object of check.json for a truss as read and a job: all but solids and plans, whose findings stand in a pack alone. */
export async function check(truss: Truss, job: Job): Promise<CheckReport> {
  return checkReport(assess(truss, job));
}
