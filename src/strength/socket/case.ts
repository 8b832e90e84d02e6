import type { ClampScrews } from '../../detailing/systems/system.js';
import type { Material } from '../../model/material.js';
import type { Socket } from '../../model/parts.js';
import type { MemberActions } from '../../model/solution.js';
import type { Rules, Verdict } from '../standard.js';

/** What a socket passes force through, by its node system. */
export interface SocketPasses {
  /** Section across the strut that carries its force into the hub, mm². */
  readonly wallArea: number;
  /** Surface that glue holds, for each mm of depth, mm. */
  readonly bondPerDepth: number;
  /** What the strut's end stands on, mm². */
  readonly stopArea: number;
  /** A sleeve round the strut, or a plug or solid body that has no bore of its own. */
  readonly hollow: boolean;
  /** Screws that hold the hub's halves together; absent: it is whole. */
  readonly screws?: ClampScrews;
}

/** One end of a strut in its socket, under one combination. */
export interface SocketCase {
  readonly socket: Socket;
  readonly strut: Material;
  readonly hub: Material;
  /** Play between the strut's end and the socket's stop, mm. */
  readonly float: number;
  readonly actions: MemberActions;
  readonly rules: Rules;
  /** What the node system says of this socket; null: it cannot be said, and the sleeve's own sizes are used. */
  readonly passes: SocketPasses | null;
  /** Shear strength of the glue line, short-term, MPa. */
  readonly bond: number;
}

/** Checks of one path; null: the path carries no force of this sign. */
export type SocketPath = (socket: SocketCase) => readonly Verdict[] | null;
