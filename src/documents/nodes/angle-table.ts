import { angleBetween } from '../../maths/vec3.js';
import type { Socket } from '../../model/parts.js';
import { writeFitted } from '../kit/fit-text.js';
import { INK, SIZE } from '../kit/ink.js';
import { lineHeight, type Pen } from '../kit/pen.js';
import { fixed } from '../kit/units.js';

/** Type of the tables in a node's block, pt. */
export const TEXT = 7.5;
const ANGLE_ROW = lineHeight(TEXT) * 1.06;

/** Height of the table of angles of n sockets, mm. */
export const angleTableHeight = (n: number): number => (n > 1 ? 4 + n * ANGLE_ROW : 0);

/** The angles of all pairs in degrees: each row against the struts at the heads of the columns, by number where the marks are long. */
export function drawAngleTable(pen: Pen, x: number, y: number, width: number, sockets: readonly Socket[]): void {
  const bold = { size: TEXT, bold: true };
  const longest = Math.max(...sockets.map((s) => pen.widthOf(s.strut, bold)));
  const numbered = longest * sockets.length > width - pen.widthOf('Angles, °', bold);
  const rowMark = (i: number): string => (numbered ? `${i + 1}  ${sockets[i]!.strut}` : sockets[i]!.strut);
  const columnMark = (i: number): string => (numbered ? `${i + 1}` : sockets[i]!.strut);
  const widest = Math.max(pen.widthOf('180.0', bold), numbered ? 0 : longest);
  const left = Math.min(
    Math.max(pen.widthOf('Angles, °', { size: SIZE.note }), ...sockets.map((_, i) => pen.widthOf(rowMark(i), bold))),
    width - (sockets.length - 1) * (widest + 1.2),
  );
  const step = Math.min((width - left) / Math.max(1, sockets.length - 1), widest + 4);
  const column = (k: number): number => x + left + step * (k + 1);
  if (!numbered) pen.text('Angles, °', x, y + 3, { size: SIZE.note, colour: INK.grey });
  sockets.forEach((socket, i) => {
    const baseline = y + 3 + i * ANGLE_ROW;
    if (i > 0 || numbered) writeFitted(pen, rowMark(i), x, baseline, left, bold, TEXT);
    for (let k = 0; k < i; k++)
      pen.text(fixed((angleBetween(socket.direction, sockets[k]!.direction) * 180) / Math.PI, 1), column(k), baseline, {
        size: TEXT,
        align: 'right',
      });
    if (i < sockets.length - 1) pen.text(columnMark(i), column(i), baseline, { ...bold, align: 'right' });
  });
}
