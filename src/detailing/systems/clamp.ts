import { clampStrength } from './clamp-strength.js';
import { SLEEVE_HUB, sizeSocket } from './socket.js';
import type { NodeSystem } from './system.js';

/** A hub in two halves, screwed together along the plane that most of its struts lie in: those can be laid in last. */
export const CLAMP_SYSTEM: NodeSystem = {
  ...SLEEVE_HUB,
  name: 'clamp',
  title: 'Printed hub in two halves, screwed',
  socket: sizeSocket,
  strength: clampStrength,
};
