import { STEEPEST_FALL } from './base-plate.js';
import { SLEEVE_HUB, sizeSocket } from './socket.js';
import type { NodeSystem } from './system.js';

/** A support's node: printed sockets on a level base plate with anchor holes and, where the job asks, a levelling screw. */
export const FOOT_SYSTEM: NodeSystem = {
  ...SLEEVE_HUB,
  name: 'foot',
  title: 'Printed foot with base plate',
  socket: sizeSocket,
  setbacks(sockets, job) {
    const { setbacks, tooClose } = SLEEVE_HUB.setbacks(sockets, job);
    // A strut that falls steeply would go through the plate: it has no setback here.
    const falls = sockets.map((s) => Math.asin(Math.max(-1, Math.min(1, -s.direction[2]))) > STEEPEST_FALL);
    return {
      setbacks: setbacks.map((s, i) => (falls[i] ? null : s)),
      tooClose,
      throughPlate: sockets.filter((_, i) => falls[i]).map((s) => s.strut),
    };
  },
};
