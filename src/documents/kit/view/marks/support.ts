import type { Point } from '../../geometry2.js';
import { INK, LINE } from '../../ink.js';
import type { Pen } from '../../pen.js';

/** Draws a support under its node: a triangle on a ground line. */
export function drawSupport(pen: Pen, [x, y]: Point): void {
  pen.polygon(
    [
      [x, y],
      [x - 2.6, y + 4.8],
      [x + 2.6, y + 4.8],
    ],
    INK.white,
    { width: LINE.thin },
  );
  pen.line([x - 3.8, y + 4.8], [x + 3.8, y + 4.8], { width: LINE.normal });
}
