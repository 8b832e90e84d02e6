import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Overturning, SupportDemand } from '../../model/solution.js';
import { mostLifted } from './support-demands.js';

/** A model on a table may be fixed to it in any way; what stands outdoors or hangs over people must say how. */
const peopleNear = (job: Job): boolean => job.use === 'outdoor' || job.use === 'overhead';

/** Worst uplift of each support that stands on the ground (held in z), with its shear and what it needs. Ground contact holds no tension. */
export function upliftFindings(demands: readonly SupportDemand[], job: Job): Finding[] {
  const { anchorage } = job.loads;
  const holds = anchorage?.kind === 'ground-contact' ? 0 : anchorage?.capacity_N;
  return mostLifted(demands).map(({ node, combination, uplift, shear, ballast }) => {
    const about = { combination, shear_N: shear, ballast_kg: ballast };
    return holds !== undefined && uplift > holds
      ? finding('support-uplift', node, { value: uplift, limit: holds, about })
      : finding('support-anchor', node, {
          level: anchorage || !peopleNear(job) ? 'note' : 'warn',
          value: uplift,
          about,
        });
  });
}

/** A truss that only stands on the ground and tips over. What anchors or ballast hold is judged by their uplift. */
export function overturningFindings(worst: Overturning | null, job: Job): Finding[] {
  if (job.loads.anchorage && job.loads.anchorage.kind !== 'ground-contact') return [];
  if (!worst || (worst.ratio !== null && worst.ratio <= 1)) return [];
  return [
    finding('truss-overturns', 'truss', {
      level: peopleNear(job) ? 'stop' : 'note',
      value: worst.ratio,
      limit: 1,
      about: { edge: worst.edge.join('-'), combination: worst.combination },
    }),
  ];
}
