import type { Box, Point } from '../../geometry2.js';
import { INK, LINE } from '../../ink.js';
import { capHeight, type Pen } from '../../pen.js';
import type { Label, Place } from '../place-labels.js';

/** Height of the ring round a node's mark over the type size, mm a pt. */
const RING = 0.63;
const DIRECTIONS = 16;

export const nodeMarkHeight = (size: number): number => RING * size;

/** A node's mark in a circle, or a longer ring round a long mark: on the node itself, else aside with a leader. */
export function nodeLabel(pen: Pen, mark: string, at: Point, size: number, stays: boolean): Label {
  const height = nodeMarkHeight(size);
  const width = Math.max(height, pen.widthOf(mark, { size, bold: true }) + 2);
  const box = (x: number, y: number): Box => ({ x, y, width, height, angle: 0 });
  const places: Place[] = [{ box: box(...at), leader: null, cost: 0 }];
  for (const radius of stays ? [] : [5, 7.5, 11, 16])
    for (let k = 0; k < DIRECTIONS; k++) {
      const angle = (2 * Math.PI * k) / DIRECTIONS;
      const reach = radius + (width / 2 - height / 2) * Math.abs(Math.cos(angle));
      places.push({
        box: box(at[0] + reach * Math.cos(angle), at[1] + reach * Math.sin(angle)),
        leader: at,
        cost: radius,
      });
    }
  return { key: mark, owner: mark, width, height, anchors: [at], places, stays };
}

export function drawNodeMark(pen: Pen, box: Box, mark: string, size: number): void {
  pen.pill(box, { fill: INK.white, width: LINE.normal });
  pen.text(mark, box.x, box.y + capHeight(size) / 2, { size, bold: true, align: 'centre' });
}
