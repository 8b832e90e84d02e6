import type { Job } from '../model/job/index.js';
import { serviceClassOf } from '../model/service-class.js';
import type { Rules } from './standard.js';

/** The job's rules. */
export const rulesOf = (job: Job): Rules => ({
  serviceClass: serviceClassOf(job),
  factor: job.strength.allowableFactor,
});
