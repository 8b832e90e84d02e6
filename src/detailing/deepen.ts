import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import { endKey } from '../model/strut-end.js';
import { nodeSystem } from './systems/index.js';

/** The hubs, not yet weighed, with some sockets deeper, by "strut@node", mm; as each node's system makes them so. */
export const deepenSockets = (
  hubs: readonly HubPart[],
  depths: ReadonlyMap<string, number>,
  job: Job,
): readonly HubPart[] =>
  hubs.map((hub) => {
    const wanted = new Map<string, number>();
    for (const { strut, depth } of hub.sockets) {
      const more = depths.get(endKey(strut, hub.mark));
      if (more !== undefined && more > depth) wanted.set(strut, more);
    }
    if (wanted.size === 0) return hub;
    const own = nodeSystem(hub.system)?.deepen;
    if (own) return own(hub, wanted, job);
    return { ...hub, sockets: hub.sockets.map((s) => ({ ...s, depth: wanted.get(s.strut) ?? s.depth })) };
  });
