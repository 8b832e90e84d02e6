import { INK, LINE } from './ink.js';
import type { Pen } from './pen.js';

/** Draws a 100 mm bar along x and one along y from their common corner: whoever prints can measure whether the sheet is full size. */
export function drawCheckBars(pen: Pen, x: number, y: number): void {
  const style = { width: LINE.normal };
  pen.line([x, y], [x + 100, y], style);
  pen.line([x, y], [x, y - 100], style);
  for (let i = 0; i <= 10; i++) {
    const tick = i % 5 === 0 ? 2 : 1.2;
    pen.line([x + 10 * i, y], [x + 10 * i, y - tick], style);
    pen.line([x, y - 10 * i], [x + tick, y - 10 * i], style);
  }
  pen.text('100 mm both ways: print at 100 %, then measure', x + 4, y - 3, { size: 7, colour: INK.black });
}
