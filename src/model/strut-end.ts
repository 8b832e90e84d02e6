import type { Job } from './job/index.js';
import type { EndDetail, Joint } from './parts.js';

/** What the job asks of one strut end; null: as the node has it. */
export interface EndChoice {
  readonly detail: EndDetail;
  readonly joint: Joint | null;
  /** A sleeve round the strut, or a spigot or plate in it. */
  readonly hold: 'socket' | 'spigot' | null;
}

/** Key of a strut end in the job. */
export const endKey = (strut: string, node: string): string => `${strut}@${node}`;

/** What the job asks of a strut's end at a node. */
export function endChoice(job: Pick<Job, 'struts'>, strut: string, node: string): EndChoice {
  const key = endKey(strut, node);
  const own = Object.hasOwn(job.struts.ends, key) ? job.struts.ends[key]! : {};
  const asked = typeof own === 'string' ? { detail: own } : own;
  return { detail: asked.detail ?? 'plain', joint: asked.joint ?? null, hold: asked.hold ?? null };
}

/** The job's ends with another closing detail at one of them; what else was asked of it stays. */
export function withDetail(ends: Job['struts']['ends'], key: string, detail: EndDetail): Job['struts']['ends'] {
  const own = Object.hasOwn(ends, key) ? ends[key]! : {};
  return { ...ends, [key]: typeof own === 'string' ? detail : { ...own, detail } };
}
