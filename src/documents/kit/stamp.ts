import { wrapText, writeFitted } from './fit-text.js';
import type { Area } from './geometry2.js';
import { INK } from './ink.js';
import { lineHeight, type Pen } from './pen.js';

const TEXT = 8.5;
/** Reasons printed; the others are counted. */
const MOST = 2;
/** Lines a reason may take, the last cut; all but the first stand in by some mm. */
const MOST_LINES = 3;
const INDENT = 4;

/** Draws the black band of a hold across the head of a sheet, its reasons in words; returns its height in mm. */
export function drawHoldStamp(pen: Pen, area: Area, reasons: readonly string[]): number {
  if (reasons.length === 0) return 0;
  const word = 'HOLD';
  const wordWidth = pen.widthOf(word, { size: 18, bold: true });
  const room = area.width - wordWidth - 12;
  const more = reasons.length - MOST;
  const style = { size: TEXT, bold: true, colour: INK.white };
  const lines = reasons.slice(0, MOST).flatMap((reason) => {
    const [first = '', ...rest] = wrapText(pen, reason, room, style);
    const behind = wrapText(pen, rest.join(' '), room - INDENT, style);
    const shown = [...behind.slice(0, MOST_LINES - 2), behind.slice(MOST_LINES - 2).join(' ')].filter((l) => l !== '');
    return [{ text: first, indent: 0 }, ...shown.map((text) => ({ text, indent: INDENT }))];
  });
  if (more > 0) lines.push({ text: `and ${more} more: see the report`, indent: 0 });
  const height = Math.max(11, 3.4 + lines.length * lineHeight(TEXT));
  pen.rectangle(area.x, area.y, area.width, height, { fill: INK.black });
  pen.text(word, area.x + 4, area.y + height / 2 + 2.2, { size: 18, bold: true, colour: INK.white });
  const top = area.y + (height - lines.length * lineHeight(TEXT)) / 2 + lineHeight(TEXT) * 0.74;
  lines.forEach(({ text, indent }, i) => {
    writeFitted(pen, text, area.x + 4 + wordWidth + 5 + indent, top + i * lineHeight(TEXT), room - indent, style, TEXT);
  });
  return height;
}
