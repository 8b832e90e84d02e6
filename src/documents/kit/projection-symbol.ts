import { LINE } from './ink.js';
import type { Pen } from './pen.js';

/**
 * The symbol of the method of projection (ISO 5456-2): a truncated cone lying down with its small end on the left, and
 * its view from the left, two circles. First angle sets that view on the right, third angle on the left.
 */
export function drawProjectionSymbol(
  pen: Pen,
  x: number,
  y: number,
  height: number,
  method: 'first-angle' | 'third-angle',
): void {
  const [big, small] = [height / 2, height / 4];
  const gap = height * 0.35;
  const style = { width: LINE.thin };
  const axis = { width: LINE.hair, dash: [1.2, 0.5] as const };
  const coneAt = method === 'first-angle' ? x - height - gap / 2 : x + gap / 2;
  const circleAt = method === 'first-angle' ? x + gap / 2 + big : x - gap / 2 - big;
  pen.polyline(
    [
      [coneAt, y - small],
      [coneAt + height, y - big],
      [coneAt + height, y + big],
      [coneAt, y + small],
    ],
    style,
    true,
  );
  pen.circle(circleAt, y, big, style);
  pen.circle(circleAt, y, small, style);
  pen.line([coneAt - 0.8, y], [coneAt + height + 0.8, y], axis);
  pen.line([circleAt - big - 0.8, y], [circleAt + big + 0.8, y], axis);
  pen.line([circleAt, y - big - 0.8], [circleAt, y + big + 0.8], axis);
}
