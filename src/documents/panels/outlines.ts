import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';

/** outlines.json: the nominal outline of every panel that has one, mm, with its frame in the truss's axes. */
export function outlinesJson(records: PackRecords): Uint8Array {
  return writeJson(
    Object.fromEntries(
      records.parts.panels
        .filter((panel) => panel.outline.length > 0)
        .map((panel) => [
          panel.mark,
          {
            outline: panel.outline,
            holes: panel.holes,
            frame: { origin: panel.frame.origin, x: panel.frame.x, y: panel.frame.y, z: panel.frame.z },
          },
        ]),
    ),
  );
}
