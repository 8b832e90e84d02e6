import type { Assessment } from '../documents/records.js';
import type { Job } from '../model/job/index.js';
import { blockedStruts } from '../planning/assembly/blocked.js';

/** Rounds of giving details and looking again: a detail changes lengths a little, and with them what can be spread. */
const ROUNDS = 4;

/**
 * The assessment with a closing detail at one end of every strut that could not get in otherwise, where the job asks for that
 * (`assembly.closing: "give"`): the end slides into a deeper socket and back, at the hub with fewer sockets. The job's own details stay.
 */
export function giveClosingDetails(first: Assessment, assessAgain: (job: Job) => Assessment): Assessment {
  let found = first;
  if (first.job.assembly.closing !== 'give') return found;
  for (let round = 0; round < ROUNDS; round++) {
    const blocked = blockedStruts(found.topology, found.parts, found.job);
    if (blocked.length === 0) break;
    const sockets = new Map(found.parts.hubs.map((h) => [h.mark, h.sockets.length]));
    const ends = { ...found.job.struts.ends };
    for (const strut of blocked) {
      const member = found.topology.truss.members[found.topology.memberIndex.get(strut)!]!;
      const [a, b] = member.ends;
      const node = (sockets.get(b) ?? 0) < (sockets.get(a) ?? 0) ? b : a;
      ends[`${strut}@${node}`] = 'slide';
    }
    found = assessAgain({ ...found.job, struts: { ...found.job.struts, ends } });
  }
  return found;
}
