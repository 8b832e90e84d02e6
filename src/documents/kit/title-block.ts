import { writeFitted, writeWrapped } from './fit-text.js';
import type { Area } from './geometry2.js';
import { INK, LINE, SIZE } from './ink.js';
import type { Pen } from './pen.js';
import { drawProjectionSymbol } from './projection-symbol.js';

/** The fields of ISO 7200 (2004, 5.1 to 5.3), and what a workshop adds: units, projection, caution. */
export interface TitleBlock {
  readonly owner: string;
  readonly number: string;
  readonly date: string;
  readonly title: string;
  readonly approvedBy: string;
  readonly drawnBy: string;
  readonly documentType: string;
  readonly revision: string;
  readonly units: string;
  readonly caution: string;
  /** null: the sheet has no views that stand by projection. */
  readonly projection: 'first-angle' | 'third-angle' | null;
}

/** Height of the strip along the foot of every sheet, mm. */
export const TITLE_BLOCK_HEIGHT = 25;

/** Draws the strip along the foot: two rows of fields, and the caution under them. `page` counts from 1. */
export function drawTitleBlock(pen: Pen, area: Area, block: TitleBlock, page: number, pages: number): void {
  const { x, y, width } = area;
  pen.line([x, y], [x + width, y], { width: LINE.strong });
  const top: Cell[] = [
    ['Title', block.title, 0.5, true],
    ['Document', block.documentType, 0.24],
    ['Revision', block.revision, 0.1, true],
    ['Sheet', `${page} of ${pages}`, 0.16, true],
  ];
  const symbol = block.projection === null ? 0 : 0.1;
  const bottom: Cell[] = [
    ['Owner', block.owner, 0.24 - symbol / 4],
    ['Number', block.number, 0.16 - symbol / 4],
    ['Date of issue', block.date, 0.13],
    ['Drawn by', block.drawnBy, 0.17 - symbol / 4],
    ['Approved by', block.approvedBy, 0.17 - symbol / 4],
    ['Units', block.units, 0.13],
  ];
  drawRow(pen, x, y, width, top);
  drawRow(pen, x, y + ROW, width, bottom);
  if (block.projection) drawProjectionSymbol(pen, x + width - 14, y + ROW + 5.2, 7, block.projection);
  pen.line([x, y + 2 * ROW + 0.6], [x + width, y + 2 * ROW + 0.6], { width: LINE.hair });
  writeWrapped(pen, block.caution, x, y + 2 * ROW + 3.8, width, { size: 6.5, colour: INK.grey }, 2);
}

type Cell = readonly [caption: string, value: string, share: number, strong?: boolean];

const ROW = 9;

function drawRow(pen: Pen, x: number, y: number, width: number, cells: readonly Cell[]): void {
  let at = x;
  for (const [caption, value, share, strong] of cells) {
    const room = share * width - 3;
    pen.text(caption, at, y + 3.2, { size: 6.5, colour: INK.grey });
    writeFitted(pen, value === '' ? '–' : value, at, y + 7.4, room, {
      size: SIZE.body + (strong ? 1 : 0),
      bold: strong ?? false,
    });
    at += share * width;
  }
}
