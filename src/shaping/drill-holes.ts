import { hubShape } from '../detailing/systems/hub-shape.js';
import { LEAST_WALL } from '../detailing/systems/printing.js';
import { dot } from '../maths/vec3.js';
import type { Job } from '../model/job/index.js';
import type { HubPart, StrutPart } from '../model/parts.js';
import { pinOf } from './channels.js';
import { HubSpace } from './hub-space.js';

/** A cross hole in a strut's end for the pin of its socket. */
export interface DrillHole {
  readonly strut: string;
  readonly node: string;
  /** From the strut's end to the hole's middle, mm. */
  readonly distance: number;
  readonly diameter: number;
  /** Turn of the hole from the strut's local y towards its local z about its x, rad, 0 to pi. */
  readonly angle: number;
}

/**
 * Holes that struts get before assembly so that each meets the pin hole of its socket, in the hubs' order. A pin that
 * stands behind the strut's end instead of going through it needs none; where the hub has no way for a pin there is none.
 */
export function drillHoles(hubs: readonly HubPart[], struts: readonly StrutPart[], job: Job): DrillHole[] {
  const partOf = new Map(struts.map((s) => [s.mark, s]));
  return hubs.flatMap((hub) => {
    if (!hub.makeable || hub.sockets.every((s) => s.pin <= 0)) return [];
    const space = new HubSpace(hubShape(hub, job));
    const web = LEAST_WALL[job.nodes['process']];
    return hub.sockets.flatMap((socket, i): DrillHole[] => {
      const end = partOf.get(socket.strut)?.ends.find((e) => e.node === hub.mark);
      if (socket.pin <= 0 || socket.travel !== undefined || end?.float == null) return [];
      const pin = pinOf(space, i, web);
      if (!pin) return [];
      const fromStop = dot(pin.from, socket.direction) - space.sleeves[i]!.stop;
      const turn = Math.atan2(dot(pin.direction, socket.z), dot(pin.direction, socket.y));
      return [
        {
          strut: socket.strut,
          node: hub.mark,
          distance: fromStop - end.float,
          diameter: socket.pin,
          angle: ((turn % Math.PI) + Math.PI) % Math.PI,
        },
      ];
    });
  });
}
