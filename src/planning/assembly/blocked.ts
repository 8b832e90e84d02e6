import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import { piecesOf } from '../../statics/analyse/figure.js';
import { orderPiece } from './search.js';
import { assemblySetting } from './setting.js';

/** Struts that cannot get in, in the best order found, with the details that their ends have. */
export function blockedStruts(topology: Topology, parts: Parts, job: Job): readonly string[] {
  const setting = assemblySetting(topology, parts, job);
  return piecesOf(topology).flatMap((piece) =>
    orderPiece(setting, piece, job.seed).moves.flatMap((move) =>
      move.entries.filter((e) => e.entry === 'blocked').map((e) => e.strut),
    ),
  );
}
