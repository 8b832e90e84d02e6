import { fitText, wrapText } from './fit-text.js';
import { INK, LINE, SIZE } from './ink.js';
import type { Paper } from './paper.js';
import { lineHeight, type Pen } from './pen.js';

export interface Column<Row> {
  /** One or two lines, parted by \n. */
  readonly head: string;
  readonly align?: 'left' | 'right' | 'centre';
  readonly bold?: boolean;
  /** What the hand must not use. */
  readonly grey?: boolean;
  /** Wraps to several lines and takes what room is left. */
  readonly wraps?: boolean;
  /** An empty square to tick, drawn; `value` is not asked. */
  readonly tick?: boolean;
  readonly value?: (row: Row) => string;
}

export interface TableOptions<Row> {
  /** A heading above the first row of each run of rows that share it. */
  readonly group?: (row: Row) => string;
  readonly size?: number;
}

/** Draws rows from y down over as many sheets as they need, the head repeated, a hair rule under every fifth row. Returns where the next thing may start. */
export function drawTable<Row>(
  paper: Paper,
  y: number,
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  options: TableOptions<Row> = {},
): number {
  const { pen } = paper;
  const layout = layOut(pen, paper.room.width, columns, rows, options.size ?? SIZE.body);
  const foot = (): number => paper.room.y + paper.room.height;
  // A narrow table stands side by side on a sheet that is wide enough.
  const across = columns.some((c) => c.wraps)
    ? 1
    : Math.max(1, Math.floor((paper.room.width + BESIDE) / (layout.total + BESIDE)));
  let top = y;
  if (top + layout.headHeight + 3 * layout.rowHeight > foot()) top = paper.continueSheet().y;
  let [strip, deepest] = [0, top];
  const left = (): number => paper.room.x + strip * (layout.total + BESIDE);
  let at = drawHead(pen, left(), top, columns, layout);
  let group: string | undefined;
  let inGroup = 0;
  for (const row of rows) {
    const cells = columns.map((column, i) => cellLines(pen, column, row, layout, i));
    const height = layout.rowHeight + (Math.max(1, ...cells.map((c) => c.length)) - 1) * lineHeight(layout.size);
    const heading = options.group?.(row);
    const starts = heading !== undefined && heading !== group;
    if (at + height + (starts ? GROUP + layout.rowHeight : 0) > foot()) {
      strip = (strip + 1) % across;
      if (strip === 0) deepest = top = paper.continueSheet().y;
      at = drawHead(pen, left(), top, columns, layout);
      if (heading !== undefined && !starts) at = drawGroup(pen, left(), layout.total, at, `${heading}, continued`);
      inGroup = 0;
    }
    if (starts) {
      group = heading;
      at = drawGroup(pen, left(), across > 1 ? layout.total : paper.room.width, at, heading);
      inGroup = 0;
    }
    drawRow(pen, left(), at, columns, cells, layout);
    at += height;
    deepest = Math.max(deepest, at);
    if (++inGroup % 5 === 0)
      pen.line([left(), at], [left() + layout.total, at], { width: LINE.hair, colour: INK.grey });
  }
  return Math.max(deepest, at) + 3;
}

/** Draws a table that stays on its sheet, no wider than `width`; returns where the next thing may start. */
export function drawSmallTable<Row>(
  pen: Pen,
  x: number,
  y: number,
  width: number,
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  size: number = SIZE.body,
): number {
  const layout = layOut(pen, width, columns, rows, size, GAP.close);
  let at = drawHead(pen, x, y, columns, layout);
  rows.forEach((row, k) => {
    const cells = columns.map((column, i) => cellLines(pen, column, row, layout, i));
    drawRow(pen, x, at, columns, cells, layout);
    at += layout.rowHeight + (Math.max(1, ...cells.map((c) => c.length)) - 1) * lineHeight(layout.size);
    if ((k + 1) % 5 === 0 && k + 1 < rows.length)
      pen.line([x, at], [x + layout.total, at], { width: LINE.hair, colour: INK.grey });
  });
  return at;
}

/** Height of a small table whose cells take one line each, mm. */
export const smallTableHeight = (rows: number, headLines: number, size: number = SIZE.body): number =>
  headLines * lineHeight(SIZE.note) + 1.9 + rows * (lineHeight(size) + ROW_PAD.close);

interface Layout {
  readonly widths: readonly number[];
  readonly gap: number;
  readonly total: number;
  readonly size: number;
  readonly rowHeight: number;
  readonly headHeight: number;
  readonly headLines: number;
}

const GROUP = 8;
/** Between two strips of one table that stand side by side, mm. */
const BESIDE = 14;
/** Between columns, mm: least and most. */
const GAP = { least: 2.5, most: 9, close: 5 } as const;
/** Added to a line of text, mm. */
const ROW_PAD = { usual: 1, close: 0.6 } as const;
const TICK = 3.2;
/** Type no smaller than this, pt. */
const LEAST_SIZE = 7;
/** Least width of a wrapping column, mm. */
const WRAP_LEAST = 30;

function layOut<Row>(
  pen: Pen,
  room: number,
  columns: readonly Column<Row>[],
  rows: readonly Row[],
  wanted: number,
  most: number = GAP.most,
): Layout {
  const headLines = Math.max(1, ...columns.map((c) => c.head.split('\n').length));
  const measure = (size: number): number[] =>
    columns.map((column) => {
      const head = Math.max(...column.head.split('\n').map((line) => pen.widthOf(line, { size: SIZE.note })));
      if (column.tick) return Math.max(TICK, head);
      if (column.wraps) return Math.max(WRAP_LEAST, head);
      const style = { size, bold: column.bold ?? false };
      return rows.reduce((most, row) => Math.max(most, pen.widthOf(column.value!(row), style)), head);
    });
  const gaps = (gap: number): number => gap * (columns.length - 1);
  const sum = (widths: readonly number[]): number => widths.reduce((a, b) => a + b, 0);
  let size = wanted;
  let widths = measure(size);
  while (sum(widths) + gaps(GAP.least) > room && size > LEAST_SIZE) widths = measure((size -= 0.5));
  widths = capped(widths, columns, room - gaps(GAP.least));
  const wraps = columns.findIndex((c) => c.wraps);
  const left = room - sum(widths) - gaps(GAP.least);
  const extra = columns.length > 1 ? Math.min(most - GAP.least, Math.max(0, left) / (columns.length - 1)) : 0;
  const gap = wraps >= 0 ? Math.min(GAP.least + extra, 4.5) : GAP.least + extra;
  if (wraps >= 0) widths = widths.map((w, i) => (i === wraps ? w + Math.max(0, room - sum(widths) - gaps(gap)) : w));
  return {
    widths,
    gap,
    total: sum(widths) + gaps(gap),
    size,
    rowHeight: lineHeight(size) + (most === GAP.close ? ROW_PAD.close : ROW_PAD.usual),
    headHeight: headLines * lineHeight(SIZE.note) + 2.5,
    headLines,
  };
}

/** Widths that add up to no more than the room: the widest columns of text give way, numbers never; their cells are cut there. */
function capped<Row>(widths: readonly number[], columns: readonly Column<Row>[], room: number): number[] {
  const gives = columns.map((c) => (c.align ?? 'left') === 'left' && !c.tick);
  const at = (cap: number): number[] => widths.map((w, i) => (gives[i] ? Math.min(w, cap) : w));
  const total = (cap: number): number => at(cap).reduce((a, b) => a + b, 0);
  let [low, high] = [NARROWEST, Math.max(NARROWEST, ...widths)];
  if (total(high) <= room) return [...widths];
  for (let i = 0; i < 40; i++) {
    const middle = (low + high) / 2;
    if (total(middle) <= room) low = middle;
    else high = middle;
  }
  return at(low);
}

/** No column of text gets narrower than this, mm. */
const NARROWEST = 6;

function drawHead<Row>(pen: Pen, x: number, y: number, columns: readonly Column<Row>[], layout: Layout): number {
  let at = x;
  columns.forEach((column, i) => {
    const lines = column.head.split('\n');
    const width = layout.widths[i]!;
    const align = column.align ?? 'left';
    lines.forEach((line, k) => {
      const baseline = y + (k + 1 + layout.headLines - lines.length) * lineHeight(SIZE.note);
      pen.text(line, anchor(at, width, align), baseline, {
        size: SIZE.note,
        align,
        colour: column.grey ? INK.grey : INK.black,
      });
    });
    at += width + layout.gap;
  });
  const rule = y + layout.headLines * lineHeight(SIZE.note) + 1.3;
  pen.line([x, rule], [x + layout.total, rule], { width: LINE.normal });
  return rule + 0.6;
}

function drawGroup(pen: Pen, x: number, width: number, y: number, heading: string): number {
  const fitted = fitText(pen, heading, width, { size: SIZE.body + 1, bold: true }, SIZE.note);
  pen.text(fitted.text, x, y + 5.5, { size: fitted.size, bold: true });
  return y + GROUP;
}

function cellLines<Row>(pen: Pen, column: Column<Row>, row: Row, layout: Layout, i: number): string[] {
  if (column.tick) return [''];
  const style = { size: layout.size, bold: column.bold ?? false };
  const text = column.value!(row);
  return column.wraps
    ? wrapText(pen, text, layout.widths[i]!, style)
    : [fitText(pen, text, layout.widths[i]! + 0.01, style, layout.size).text];
}

function drawRow<Row>(
  pen: Pen,
  x: number,
  y: number,
  columns: readonly Column<Row>[],
  cells: readonly (readonly string[])[],
  layout: Layout,
): void {
  let at = x;
  const baseline = y + layout.rowHeight * 0.74;
  columns.forEach((column, i) => {
    const width = layout.widths[i]!;
    const align = column.align ?? 'left';
    if (column.tick) pen.rectangle(at, baseline - TICK + 0.4, TICK, TICK, { width: LINE.thin });
    else
      cells[i]!.forEach((line, k) => {
        pen.text(line, anchor(at, width, align), baseline + k * lineHeight(layout.size), {
          size: layout.size,
          bold: column.bold ?? false,
          colour: column.grey ? INK.grey : INK.black,
          align,
        });
      });
    at += width + layout.gap;
  });
}

const anchor = (x: number, width: number, align: 'left' | 'right' | 'centre'): number =>
  align === 'left' ? x : align === 'right' ? x + width : x + width / 2;
