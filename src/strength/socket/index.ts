import type { Joint } from '../../model/parts.js';
import { governing, type Verdict } from '../standard.js';
import { bolted } from './bolted.js';
import type { SocketCase, SocketPath } from './case.js';
import { glued } from './glued.js';
import { loose } from './loose.js';
import { pinned } from './pinned.js';
import { screwChecks } from './screws.js';
import { seated } from './seated.js';

const PATHS: Readonly<Record<Joint, SocketPath>> = { glued, pinned, seated, loose };

/** The check that governs a strut's end in its socket; null: nothing in the joint carries a force of this sign. */
export function judgeSocket(socket: SocketCase): Verdict | null {
  const path = socket.socket.bolted ? bolted : PATHS[socket.socket.joint];
  const checks = path(socket);
  if (checks === null) return null;
  const all = [...checks, ...screwChecks(socket)];
  return all.length === 0 ? { utilisation: 0, rule: 'socket' } : governing(all);
}
