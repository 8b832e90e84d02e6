import type { Material } from '../../model/material.js';
import type { Socket } from '../../model/parts.js';
import type { MemberActions } from '../../model/solution.js';
import type { Rules, Verdict } from '../standard.js';

/** One end of a strut in its socket, under one combination. */
export interface SocketCase {
  readonly socket: Socket;
  readonly strut: Material;
  readonly hub: Material;
  /** Play between the strut's end and the socket's stop, mm. */
  readonly float: number;
  readonly actions: MemberActions;
  readonly rules: Rules;
  /** Shear strength of the glue line, short-term, MPa. */
  readonly bond: number;
}

/** Checks of one path; null: the path carries no force of this sign. */
export type SocketPath = (socket: SocketCase) => readonly Verdict[] | null;
