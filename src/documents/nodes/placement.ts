import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';

/** nodes/placement.json: by mark (MARK.PIECE for a node in several pieces) the motion from the STL's mm to the truss's axes, 4 x 4, row-major. */
export function placementJson(records: PackRecords): Uint8Array {
  const placements: Record<string, readonly number[]> = {};
  for (const hub of records.made.values()) {
    for (const piece of hub.pieces) placements[piece.piece ? `${hub.mark}.${piece.piece}` : hub.mark] = piece.placement;
  }
  return writeJson(placements);
}
