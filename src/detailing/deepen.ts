import type { HubPart } from '../model/parts.js';

/** The hubs, not yet weighed, with some sockets deeper, by "strut@node", mm. Setbacks and cut lengths do not depend on depth. */
export const deepenSockets = (hubs: readonly HubPart[], depths: ReadonlyMap<string, number>): readonly HubPart[] =>
  hubs.map((hub) => {
    let deeper = false;
    const sockets = hub.sockets.map((socket) => {
      const depth = depths.get(`${socket.strut}@${hub.mark}`);
      if (depth === undefined || depth <= socket.depth) return socket;
      deeper = true;
      return { ...socket, depth };
    });
    return deeper ? { ...hub, sockets } : hub;
  });
