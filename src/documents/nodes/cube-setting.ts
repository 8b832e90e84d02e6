import type { CubeFace } from '../../detailing/systems/cube-faces.js';
import { cubeEntry } from '../../detailing/systems/cube-rim.js';
import { cubeHalf } from '../../detailing/systems/drilled-cube.js';
import type { HubPart, Socket } from '../../model/parts.js';

/** How a cube is set out and held for one bore. */
export interface CubeSetting {
  readonly face: CubeFace;
  /** The cube's edge, mm. */
  readonly edge: number;
  /** The bore's middle on the face, from the face's own middle to the right and up, mm. */
  readonly right: number;
  readonly up: number;
  /** Half the width of the bore's rim along them, mm. */
  readonly rim: readonly [number, number];
  /** Of the drill from the face's normal, and where it leans to: anticlockwise from the right, 0 to 360; degrees. */
  readonly tilt: number;
  readonly turn: number;
}

const DEGREES = 180 / Math.PI;

export function cubeSetting(hub: Pick<HubPart, 'sockets'>, socket: Socket): CubeSetting {
  const half = cubeHalf(hub);
  const { face, at, rim, tilt, turn } = cubeEntry(socket);
  return {
    face,
    edge: 2 * half,
    right: half * at[0],
    up: half * at[1],
    rim,
    tilt: tilt * DEGREES,
    turn: (turn * DEGREES + 360) % 360,
  };
}
