import type { Job } from '../model/job/index.js';
import type { Truss } from '../model/truss.js';
import { assess } from './assess.js';
import { type Sizing, sizeSections } from './size.js';

/** Sizes the struts of a job with the assessment that `check` makes. `file` is the truss as read; the job's scale is applied inside. */
export function sizeJob(file: Truss, job: Job, tell?: (round: number, heavier: number) => void): Promise<Sizing> {
  // Load factors of the whole change no utilisation; they are found when the sized truss is checked.
  const quick = { ...job, analysis: { ...job.analysis, buckling: false } };
  return sizeSections(
    file,
    job,
    async (truss) => {
      const { parts, utilisations, forces, solution } = await assess(truss, quick);
      // Forces that the analysis found stand in the solution already.
      const claimed = forces && forces.source !== 'analysis' ? forces.values : null;
      return { parts, utilisations, loading: { forces: claimed, solution } };
    },
    tell,
  );
}
