import type { ServiceClass } from './catalogue/timber-factors.js';
import type { Job } from './job/index.js';

/** The job's service class; where it gives none: inside 1, outdoors the weather, 3, until the job says better. */
export const serviceClassOf = (job: Job): ServiceClass => job.strength.serviceClass ?? (job.use === 'outdoor' ? 3 : 1);
