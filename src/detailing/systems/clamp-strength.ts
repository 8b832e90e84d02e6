import { dot } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import { IN_PLANE, PARTING, SCREW } from './clamp-parts.js';
import { hubShape } from './hub-shape.js';
import { sleeveStrength } from './sleeve-strength.js';
import type { SocketStrength } from './system.js';
import { floorHoles } from './vent.js';

/** Diameter of an M3 screw and of its head, mm (ISO 7045: 5.5, from memory). */
const [THREAD, HEAD] = [3, 5.5] as const;

/**
 * Areas of a clamp's sockets: those of a sleeve, less the strips that are missing at the parting, and the screws that hold the halves
 * together. Bores are smooth, so no shoulder holds a strut, and friction is not counted on: nothing says how hard a screw is drawn.
 */
export function clampStrength(hub: HubPart, job: Job): SocketStrength[] {
  const clamp = hubShape(hub, job).clamp;
  return sleeveStrength(hub, (s) => floorHoles(s, job)[0] ?? 0).map((s, i) => {
    if (!clamp) return s;
    const socket = hub.sockets[i]!;
    const out = Math.abs(dot(clamp.normal, socket.direction));
    const parted = out < IN_PLANE;
    const depth = socket.depth - (socket.travel ?? 0);
    return {
      ...s,
      wallArea: s.wallArea - (parted ? 2 * PARTING * s.wall : 0),
      bondArea: s.bondArea - (parted ? 2 * PARTING * depth : 0),
      screws: {
        count: clamp.screws.length,
        out,
        threadArea: Math.PI * THREAD * (clamp.half - PARTING / 2),
        headArea: (Math.PI * (HEAD ** 2 - SCREW.clear ** 2)) / 4,
      },
    };
  });
}
