import { writeFitted } from './fit-text.js';
import type { Area } from './geometry2.js';
import { INK } from './ink.js';
import { lineHeight, type Pen } from './pen.js';

const TEXT = 8.5;
/** Reasons printed, one line each; the others are counted. */
const MOST = 2;

/** Draws the black band of a hold across the head of a sheet, its reasons in words; returns its height in mm. */
export function drawHoldStamp(pen: Pen, area: Area, reasons: readonly string[]): number {
  if (reasons.length === 0) return 0;
  const word = 'HOLD';
  const wordWidth = pen.widthOf(word, { size: 18, bold: true });
  const room = area.width - wordWidth - 12;
  const more = reasons.length - MOST;
  const lines = more > 0 ? [...reasons.slice(0, MOST), `and ${more} more: see the report`] : reasons;
  const height = Math.max(11, 3.4 + lines.length * lineHeight(TEXT));
  pen.rectangle(area.x, area.y, area.width, height, { fill: INK.black });
  pen.text(word, area.x + 4, area.y + height / 2 + 2.2, { size: 18, bold: true, colour: INK.white });
  const top = area.y + (height - lines.length * lineHeight(TEXT)) / 2 + lineHeight(TEXT) * 0.74;
  lines.forEach((line, i) => {
    writeFitted(
      pen,
      line,
      area.x + 4 + wordWidth + 5,
      top + i * lineHeight(TEXT),
      room,
      { size: TEXT, bold: true, colour: INK.white },
      TEXT,
    );
  });
  return height;
}
