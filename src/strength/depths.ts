import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import type { Truss } from '../model/truss.js';
import { allActions, type Loading } from './actions.js';
import { rulesOf } from './rules.js';
import { requiredDepth } from './socket/depth.js';
import { socketsWithCases } from './sockets.js';

/**
 * Depths that sockets need beyond their own, mm, by "strut@node": what the worst of their combinations asks for. A socket that no depth
 * mends, or whose depth the job fixes, is not among them.
 */
export function requiredDepths(truss: Truss, parts: Parts, loading: Loading, job: Job): ReadonlyMap<string, number> {
  const needed = new Map<string, number>();
  if (job.nodes.depth_mm !== undefined) return needed;
  for (const { hub, socket, cases } of socketsWithCases(parts, allActions(truss, loading, job), job, rulesOf(job))) {
    const depths = cases.map(requiredDepth);
    if (depths.some((d) => d === null)) continue;
    const most = Math.max(...depths.map((d) => d!));
    if (most > socket.depth) needed.set(`${socket.strut}@${hub.mark}`, most);
  }
  return needed;
}

/** A note that names the deepest; none where no socket was deepened. */
export function depthFindings(depths: ReadonlyMap<string, number>, job: Job): readonly Finding[] {
  let deepest: readonly [string, number] | null = null;
  for (const one of depths) if (deepest === null || one[1] > deepest[1]) deepest = one;
  if (deepest === null) return [];
  const about = { factor: job.nodes.depthFactor, end: deepest[0], depth_mm: deepest[1] };
  return [finding('sockets-deepened', 'truss', { value: depths.size, about })];
}
