import type { Job } from '../model/job/index.js';
import { endChoice, endKey, withDetail } from '../model/strut-end.js';
import type { Topology } from '../model/topology.js';
import { blockedStruts } from '../planning/assembly/blocked.js';
import type { Fixings } from './detail.js';

/** Rounds of giving details and looking again: a detail changes lengths a little, and with them what can be spread. */
const ROUNDS = 4;

/**
 * The job's fixings with a closing detail at one end of every strut that could not get in otherwise, where it asks for that
 * (`assembly.closing: "give"`): the end slides into a deeper socket and back, at the hub with fewer sockets; a strut that cannot
 * be tilted for that is laid in at both ends. The job's own details stay.
 *
 * @param again hubs and struts as a job with more closing details makes them
 */
export function giveClosingDetails<T extends { readonly job: Job; readonly fixings: Fixings }>(
  topology: Topology,
  first: T,
  again: (job: Job) => T,
): T {
  let found = first;
  if (first.job.assembly.closing !== 'give') return found;
  for (let round = 0; round < ROUNDS; round++) {
    const { job, fixings } = found;
    const blocked = blockedStruts(topology, { ...fixings, panels: [] }, job);
    if (blocked.length === 0) break;
    const sockets = new Map(fixings.hubs.map((h) => [h.mark, h.sockets.length]));
    let ends = job.struts.ends;
    for (const strut of blocked) {
      const [a, b] = topology.truss.members[topology.memberIndex.get(strut)!]!.ends;
      const [at, other] = (sockets.get(b) ?? 0) < (sockets.get(a) ?? 0) ? [b, a] : [a, b];
      // A strut too stocky to be tilted past a sleeve is laid in at both ends.
      const slid = endChoice(job, strut, at).detail === 'slide';
      ends = withDetail(ends, endKey(strut, at), slid ? 'drop-in' : 'slide');
      if (slid) ends = withDetail(ends, endKey(strut, other), 'drop-in');
    }
    found = again({ ...job, struts: { ...job.struts, ends } });
  }
  return found;
}
