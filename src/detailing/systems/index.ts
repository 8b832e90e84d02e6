import { CLAMP_SYSTEM } from './clamp.js';
import { DRILLED_BALL_SYSTEM } from './drilled-ball.js';
import { DRILLED_CUBE_SYSTEM } from './drilled-cube.js';
import { FOOT_SYSTEM } from './foot.js';
import { SOCKET_SYSTEM } from './socket.js';
import { SPIGOT_SYSTEM } from './spigot.js';
import type { NodeSystem } from './system.js';

/** Node systems by name. A new one is a file and a line here. */
const SYSTEMS: readonly NodeSystem[] = [
  SOCKET_SYSTEM,
  SPIGOT_SYSTEM,
  FOOT_SYSTEM,
  DRILLED_BALL_SYSTEM,
  DRILLED_CUBE_SYSTEM,
  CLAMP_SYSTEM,
];

const BY_NAME: ReadonlyMap<string, NodeSystem> = new Map(SYSTEMS.map((s) => [s.name, s]));

/** The node system of a name; null where there is none. */
export const nodeSystem = (name: string): NodeSystem | null => BY_NAME.get(name) ?? null;
