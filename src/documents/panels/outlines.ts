import type { PanelPart } from '../../model/parts.js';
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
            ...bevelsOf(panel),
            frame: { origin: panel.frame.origin, x: panel.frame.x, y: panel.frame.y, z: panel.frame.z },
          },
        ]),
    ),
  );
}

/** Tilt from square of every edge that has one, where the outline runs along it; the outline is the larger face's. */
function bevelsOf(panel: PanelPart): object {
  const bevels = panel.edges.flatMap((e) =>
    e.bevel !== 0 && e.side ? [{ side: e.side, bevel_deg: (e.bevel * 180) / Math.PI }] : [],
  );
  return bevels.length > 0 ? { bevels } : {};
}
