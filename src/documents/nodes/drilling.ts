import { addScaled, angleBetween, cross, dot, normalise, perpendicular, type Vec3 } from '../../maths/vec3.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

const DEGREES = 180 / Math.PI;

/**
 * drilling.csv: every bore of the drilled balls, or null where there is none. Azimuth from the truss's x towards y, elevation from
 * level; for a jig with a turning and a tilting axis, the first bore upright: `tilt` from the first bore, `turn` about it from the
 * second, anticlockwise seen from its mouth.
 */
export function drillingCsv(records: PackRecords): Uint8Array | null {
  const rows = records.parts.hubs
    .filter((hub) => hub.system === 'drilled-ball' && hub.makeable)
    .flatMap((hub) => hub.sockets.map((socket) => ({ hub, socket, jig: jigSetting(hub, socket) })));
  if (rows.length === 0) return null;
  return writeCsv(
    [
      { name: 'node', value: (r) => r.hub.mark },
      { name: 'strut', value: (r) => r.socket.strut },
      { name: 'diameter_mm', decimals: DECIMALS.length, value: (r) => r.socket.bore as number },
      { name: 'depth_mm', decimals: DECIMALS.length, value: (r) => r.socket.depth },
      { name: 'azimuth_deg', decimals: DECIMALS.angle, value: (r) => azimuth(r.socket.direction) },
      { name: 'elevation_deg', decimals: DECIMALS.angle, value: (r) => elevation(r.socket.direction) },
      { name: 'jig_tilt_deg', decimals: DECIMALS.angle, value: (r) => r.jig.tilt },
      { name: 'jig_turn_deg', decimals: DECIMALS.angle, value: (r) => r.jig.turn },
    ],
    rows,
    records.job.output.csv,
  );
}

const azimuth = (d: Vec3): number => (Math.atan2(d[1], d[0]) * DEGREES + 360) % 360;
const elevation = (d: Vec3): number => Math.atan2(d[2], Math.hypot(d[0], d[1])) * DEGREES;

/** Settings of a jig on which the first bore stands upright and the second gives the zero of the turn. */
export function jigSetting(
  hub: Pick<HubPart, 'sockets'>,
  socket: Socket,
): { readonly tilt: number; readonly turn: number } {
  const up = hub.sockets[0]!.direction;
  const square = (d: Vec3): Vec3 => addScaled(d, up, -dot(d, up));
  const second = hub.sockets.find(
    (s) => angleBetween(s.direction, up) > 1e-3 && angleBetween(s.direction, up) < Math.PI - 1e-3,
  );
  const x = second ? normalise(square(second.direction)) : perpendicular(up);
  const y = cross(up, x);
  const d = socket.direction;
  const tilt = angleBetween(d, up);
  const turn = Math.hypot(dot(d, x), dot(d, y)) > 1e-9 ? Math.atan2(dot(d, y), dot(d, x)) * DEGREES : 0;
  return { tilt: tilt * DEGREES, turn: (turn + 360) % 360 };
}
