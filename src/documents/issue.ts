import type { Fonts } from './kit/fonts.js';
import type { Issue } from './kit/paper.js';
import { sayInUnits } from './kit/say-in-units.js';
import type { PackRecords } from './records.js';

/** What every paper of a pack has in common: the job, the faces, what holds it up, and what was not checked though its use asks for it. */
export function issueOf(records: Pick<PackRecords, 'job' | 'hold' | 'findings'>, fonts: Fonts): Issue {
  return {
    job: records.job,
    fonts,
    hold: records.hold.map((words) => sayInUnits(words, records.job.output)),
    notMade: records.findings.filter((f) => f.code === 'check-missing').map((f) => String(f.about?.['check'])),
  };
}
