import type { Job } from './job/index.js';

/** The job's printers that print by the hubs' process, in the job's order; all of them where none does, which no read job has. */
export function printersOf(job: Pick<Job, 'printers' | 'nodes'>): Job['printers'] {
  const own = job.printers.filter((p) => (p.process ?? job.nodes.process) === job.nodes.process);
  return own.length > 0 ? own : job.printers;
}
