import type { Vec3 } from '../../../../maths/vec3.js';
import type { Point } from '../../geometry2.js';
import { INK, LINE } from '../../ink.js';
import type { Pen } from '../../pen.js';
import { type Camera, project } from '../camera.js';
import type { Label, Place } from '../place-labels.js';
import { strutMarkHeight, strutMarkWidth } from './strut-mark.js';

export interface ViewArrow {
  readonly node: number;
  /** In the truss's axes; only its direction is drawn. */
  readonly direction: Vec3;
  /** mm on the sheet, seen from the side. */
  readonly length: number;
  readonly label: string;
  /** to: it ends at the node, as a load arrives; from: it starts there, as a node moves. */
  readonly end?: 'to' | 'from';
}

/** An arrow of which less than this share is seen points at the viewer. */
const END_ON = 0.1;

/** Both ends of the arrow on the sheet, `clear` mm from the node. */
export function arrowOnSheet(
  arrow: ViewArrow,
  at: Point,
  camera: Camera,
  clear: number,
): { readonly from: Point; readonly to: Point } {
  const [u, v] = project(camera, arrow.direction);
  const size = Math.hypot(...arrow.direction);
  const [dx, dy] = size > 0 ? [u / size, -v / size] : [0, 0];
  const seen = Math.hypot(dx, dy);
  const stop = seen > END_ON ? clear / seen : 0;
  const sign = arrow.end === 'from' ? 1 : -1;
  const far: Point = [at[0] + sign * dx * (arrow.length + stop), at[1] + sign * dy * (arrow.length + stop)];
  const near: Point = [at[0] + sign * dx * stop, at[1] + sign * dy * stop];
  return arrow.end === 'from' ? { from: near, to: far } : { from: far, to: near };
}

/** The arrow's number beside its free end. */
export function arrowLabel(pen: Pen, arrow: ViewArrow, key: string, from: Point, to: Point, size: number): Label {
  const width = strutMarkWidth(pen, { bold: arrow.label, plain: '' }, size);
  const height = strutMarkHeight(size);
  const [free, back] = arrow.end === 'from' ? [to, from] : [from, to];
  const away: Point = [free[0] - back[0], free[1] - back[1]];
  const length = Math.hypot(...away);
  const places: Place[] = [];
  for (const [u, v] of AROUND)
    for (const off of [0.8, 3.5]) {
      const along = length > 0 ? (u * away[0] + v * away[1]) / (length * Math.hypot(u, v)) : 0;
      places.push({
        box: { x: free[0] + u * (width / 2 + off), y: free[1] + v * (height / 2 + off), width, height, angle: 0 },
        leader: null,
        cost: off + 3 * (1 - along),
      });
    }
  return { key, owner: key, width, height, anchors: [free], places };
}

const AROUND = [
  [0, -1],
  [1, 0],
  [-1, 0],
  [0, 1],
  [1, -1],
  [-1, -1],
  [1, 1],
  [-1, 1],
] as const;

/** Draws an arrow with a filled head at `to`; one that points at the viewer is a circle round its node. */
export function drawArrow(pen: Pen, from: Point, to: Point, colour: string = INK.black): void {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  if (length < 1) {
    pen.circle(to[0], to[1], 3.4, { width: LINE.normal, colour });
    return;
  }
  const [ux, uy] = [dx / length, dy / length];
  const head = Math.min(2.8, length * 0.6);
  const neck: Point = [to[0] - ux * head, to[1] - uy * head];
  const half = head * 0.34;
  pen.line(from, neck, { width: LINE.normal, colour });
  pen.polygon([to, [neck[0] - uy * half, neck[1] + ux * half], [neck[0] + uy * half, neck[1] - ux * half]], colour);
}
