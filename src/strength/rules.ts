import type { Job } from '../model/job/index.js';
import type { Rules } from './standard.js';

/** The job's rules. Service class where it gives none: inside 1; outdoors the weather, 3, until the job says better. */
export const rulesOf = (job: Job): Rules => ({
  serviceClass: job.strength.serviceClass ?? (job.use === 'outdoor' ? 3 : 1),
  factor: job.strength.allowableFactor,
});
