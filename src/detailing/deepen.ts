import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import { nodeSystem } from './systems/index.js';

/** The hubs with some sockets deeper, by "strut@node", mm, and their masses anew. Setbacks and cut lengths do not depend on depth. */
export function deepenSockets(
  hubs: readonly HubPart[],
  depths: ReadonlyMap<string, number>,
  job: Job,
): readonly HubPart[] {
  if (depths.size === 0) return hubs;
  return hubs.map((hub) => {
    let deeper = false;
    const sockets = hub.sockets.map((socket) => {
      const depth = depths.get(`${socket.strut}@${hub.mark}`);
      if (depth === undefined || depth <= socket.depth) return socket;
      deeper = true;
      return { ...socket, depth };
    });
    if (!deeper) return hub;
    const placed = { ...hub, sockets };
    return { ...placed, mass: hub.mass === null ? null : (nodeSystem(hub.system)?.mass(placed, job) ?? null) };
  });
}
