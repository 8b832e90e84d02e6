import type { Box, Point } from '../../geometry2.js';
import { INK } from '../../ink.js';
import { capHeight, type Pen } from '../../pen.js';
import type { Label, Place } from '../place-labels.js';
import { nodeMarkHeight } from './node-mark.js';

/** What stands on a strut: its mark in bold, a number behind it; `pennant`: white on black. */
export interface StrutMark {
  readonly bold: string;
  readonly plain: string;
  readonly pennant?: boolean;
}

/** Height of the white break over the type size, mm a pt. */
const BREAK = 0.44;
/** White before and behind the text, mm. */
const PAD = 0.7;
/** Where along the strut a mark may stand, best first. */
const ALONG = [0.5, 0.42, 0.58, 0.34, 0.66, 0.26, 0.74, 0.18, 0.82] as const;

export const strutMarkHeight = (size: number): number => BREAK * size;

export const strutMarkWidth = (pen: Pen, mark: StrutMark, size: number): number =>
  pen.widthOf(mark.bold, { size, bold: true }) +
  (mark.plain === '' ? 0 : pen.widthOf(` ${mark.plain}`, { size })) +
  2 * PAD;

/** Whether the mark finds room on the strut itself, between the marks of its nodes. */
export const fitsOnStrut = (width: number, length: number, size: number): boolean =>
  width + nodeMarkHeight(size) + 1.6 <= length;

/** A strut's mark on a white break of its line, read along it and never upside down; else beside it, level, with a leader. */
export function strutLabel(
  pen: Pen,
  key: string,
  owner: string,
  mark: StrutMark,
  from: Point,
  to: Point,
  size: number,
): Label {
  const [width, height] = [strutMarkWidth(pen, mark, size), strutMarkHeight(size)];
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  const along = (t: number): Point => [from[0] + t * dx, from[1] + t * dy];
  const places: Place[] = [];
  for (const t of ALONG) {
    if (Math.min(t, 1 - t) * length - width / 2 < nodeMarkHeight(size) / 2 + 0.8) continue;
    const [x, y] = along(t);
    places.push({
      box: { x, y, width, height, angle: readable(dx, dy) },
      leader: null,
      cost: 4 * Math.abs(t - 0.5),
    });
  }
  const [nx, ny] = length > 0 ? [-dy / length, dx / length] : [0, -1];
  for (const t of [0.5, 0.35, 0.65, 0.22, 0.78])
    for (const off of [3, 5, 8, 12, 17])
      for (const sign of [1, -1]) {
        const [px, py] = along(t);
        const reach = off + (Math.abs(nx) * width + Math.abs(ny) * height) / 2;
        places.push({
          box: { x: px + sign * nx * reach, y: py + sign * ny * reach, width, height, angle: 0 },
          leader: [px, py],
          cost: 6 + off + 4 * Math.abs(t - 0.5),
        });
      }
  return { key, owner, width, height, anchors: [0.5, 0.3, 0.7, 0.12, 0.88].map(along), places };
}

/** A mark that belongs to a point: on it, else aside with a leader. */
export function spotLabel(pen: Pen, key: string, mark: StrutMark, at: Point, size: number): Label {
  const [width, height] = [strutMarkWidth(pen, mark, size), strutMarkHeight(size)];
  const places: Place[] = [{ box: { x: at[0], y: at[1], width, height, angle: 0 }, leader: null, cost: 0 }];
  for (const off of [3, 5, 8, 12, 17])
    for (let k = 0; k < 12; k++) {
      const [c, s] = [Math.cos((k * Math.PI) / 6), Math.sin((k * Math.PI) / 6)];
      places.push({
        box: { x: at[0] + c * (off + width / 2), y: at[1] + s * (off + height / 2), width, height, angle: 0 },
        leader: at,
        cost: 4 + off,
      });
    }
  return { key, owner: mark.bold, width, height, anchors: [at], places };
}

/** Angle of a line on the sheet, turned so that what is written along it is never upside down: -90° <= angle < 90°. */
export function readable(dx: number, dy: number): number {
  let angle = Math.atan2(dy, dx);
  if (angle > Math.PI / 2 - UPRIGHT) angle -= Math.PI;
  if (angle <= -Math.PI / 2 - UPRIGHT) angle += Math.PI;
  return angle;
}

/** Upright lines read from the right-hand side of the sheet (ISO 129-1), also when a hair off upright: rad. */
const UPRIGHT = 1e-6;

export function drawStrutMark(pen: Pen, box: Box, mark: StrutMark, size: number): void {
  pen.blot(box, mark.pennant ? INK.black : INK.white);
  const colour = mark.pennant ? INK.white : INK.black;
  const { angle } = box;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const base = capHeight(size) / 2;
  const put = (u: number): Point => [box.x + u * c - base * s, box.y + u * s + base * c];
  const left = -box.width / 2 + PAD;
  const width = pen.text(mark.bold, ...put(left), { size, bold: true, colour }, angle);
  if (mark.plain === '') return;
  pen.text(
    mark.plain,
    ...put(left + width + pen.widthOf(' ', { size })),
    { size, colour, bold: mark.pennant ?? false },
    angle,
  );
}
