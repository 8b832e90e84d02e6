import { wrapText, writeFitted } from './fit-text.js';
import type { Area } from './geometry2.js';
import { INK, SIZE } from './ink.js';
import { lineHeight, type Pen } from './pen.js';

/** Draws the black band of a hold across the head of a sheet, its reasons in words; returns its height in mm. */
export function drawHoldStamp(pen: Pen, area: Area, reasons: readonly string[]): number {
  if (reasons.length === 0) return 0;
  const word = 'HOLD';
  const style = { size: SIZE.body, bold: true, colour: INK.white };
  const wordWidth = pen.widthOf(word, { size: 18, bold: true });
  const room = area.width - wordWidth - 12;
  const more = reasons.length - MOST;
  const said = [
    ...reasons.slice(0, more > 1 ? MOST : reasons.length),
    ...(more > 1 ? [`and ${more} more: see the report.`] : []),
  ];
  const lines = said.flatMap((reason) => wrapText(pen, reason, room, style));
  const height = Math.max(11, 4.5 + lines.length * lineHeight(SIZE.body));
  pen.rectangle(area.x, area.y, area.width, height, { fill: INK.black });
  pen.text(word, area.x + 4, area.y + 8, { size: 18, bold: true, colour: INK.white });
  lines.forEach((line, i) => {
    writeFitted(pen, line, area.x + 4 + wordWidth + 5, area.y + 5.2 + i * lineHeight(SIZE.body), room, style);
  });
  return height;
}

/** Reasons printed in full; the others are counted. */
const MOST = 3;
