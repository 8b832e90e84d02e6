import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';

/** What an outdoor job must say before it can stand: wind and snow (unless `indoors`), and what holds its supports down. */
export function missingLoads(job: Job): Finding[] {
  if (job.use !== 'outdoor') return [];
  const found: Finding[] = [];
  for (const kind of ['wind', 'snow'] as const)
    if (job.loads.indoors !== true && !job.loads.cases.some((c) => c.kind === kind))
      found.push(finding('load-missing', 'truss', { about: { kind } }));
  if (!job.loads.anchorage) found.push(finding('anchorage-missing', 'truss'));
  return found;
}

/** Uses that people can climb on. */
export const climbed = (job: Job): boolean =>
  (job.use === 'outdoor' || job.use === 'overhead') && job.analysis.climber_N > 0;
