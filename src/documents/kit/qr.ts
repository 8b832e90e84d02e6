import qrcode from 'qrcode-generator';
import { INK } from './ink.js';
import type { Pen } from './pen.js';

/** White modules that a reader needs round the code (ISO/IEC 18004, 6.3.8). */
const QUIET = 4;

/** Draws a QR code (ISO/IEC 18004, error correction M) of the text into a square of `side` mm, quiet zone included. */
export function drawQr(pen: Pen, text: string, x: number, y: number, side: number): void {
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const n = code.getModuleCount();
  const module = side / (n + 2 * QUIET);
  const boxes: { x: number; y: number; width: number; height: number }[] = [];
  for (let row = 0; row < n; row++) {
    for (let from = 0; from < n; from++) {
      if (!code.isDark(row, from)) continue;
      let to = from;
      while (to + 1 < n && code.isDark(row, to + 1)) to++;
      boxes.push({
        x: x + (QUIET + from) * module,
        y: y + (QUIET + row) * module,
        width: (to - from + 1) * module,
        height: module,
      });
      from = to;
    }
  }
  pen.fillBoxes(boxes, INK.black);
}
