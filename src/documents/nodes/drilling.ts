import { addScaled, angleBetween, cross, dot, normalise, perpendicular, type Vec3 } from '../../maths/vec3.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';
import { cubeSetting } from './cube-setting.js';

const DEGREES = 180 / Math.PI;

/**
 * drilling.csv: every bore of the drilled balls and cubes, or null where there is none. Azimuth from the truss's x towards y, elevation from
 * level; for a jig with a turning and a tilting axis, the first bore upright: `tilt` from the first bore, `turn` about it from the
 * second, anticlockwise seen from its mouth.
 * A cube lies on the table of the drill: `face` upwards, its middle moved by `entry_right_mm` and `entry_up_mm` (as the face is looked at,
 * z up on the sides, x to the right on top and bottom), the drill `face_tilt_deg` from upright and leaning towards `face_turn_deg`,
 * anticlockwise from the right; `depth_mm` is along the axis, from the face to the stop.
 */
export function drillingCsv(records: PackRecords): Uint8Array | null {
  const rows = records.parts.hubs
    .filter((hub) => hub.makeable && (hub.system === 'drilled-ball' || hub.system === 'drilled-cube'))
    .flatMap((hub) => hub.sockets.map((socket) => rowOf(hub, socket)));
  if (rows.length === 0) return null;
  return writeCsv(
    [
      { name: 'node', value: (r) => r.hub.mark },
      { name: 'strut', value: (r) => r.socket.strut },
      { name: 'diameter_mm', decimals: DECIMALS.length, value: (r) => r.socket.bore as number },
      { name: 'depth_mm', decimals: DECIMALS.length, value: (r) => r.socket.depth },
      { name: 'azimuth_deg', decimals: DECIMALS.angle, value: (r) => azimuth(r.socket.direction) },
      { name: 'elevation_deg', decimals: DECIMALS.angle, value: (r) => elevation(r.socket.direction) },
      { name: 'jig_tilt_deg', decimals: DECIMALS.angle, value: (r) => r.jig?.tilt ?? null },
      { name: 'jig_turn_deg', decimals: DECIMALS.angle, value: (r) => r.jig?.turn ?? null },
      { name: 'face', value: (r) => r.cube?.face.name ?? null },
      { name: 'edge_mm', decimals: DECIMALS.length, value: (r) => r.cube?.edge ?? null },
      { name: 'entry_right_mm', decimals: DECIMALS.length, value: (r) => r.cube?.right ?? null },
      { name: 'entry_up_mm', decimals: DECIMALS.length, value: (r) => r.cube?.up ?? null },
      { name: 'face_tilt_deg', decimals: DECIMALS.angle, value: (r) => r.cube?.tilt ?? null },
      { name: 'face_turn_deg', decimals: DECIMALS.angle, value: (r) => r.cube?.turn ?? null },
    ],
    rows,
    records.job.output.csv,
  );
}

/** A ball is held by its first bore, a cube on the face that is drilled. */
const rowOf = (hub: HubPart, socket: Socket) =>
  hub.system === 'drilled-cube'
    ? { hub, socket, jig: null, cube: cubeSetting(hub, socket) }
    : { hub, socket, jig: jigSetting(hub, socket), cube: null };

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
