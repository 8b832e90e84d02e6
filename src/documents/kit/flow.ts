import { wrapText } from './fit-text.js';
import type { Area } from './geometry2.js';
import { SIZE } from './ink.js';
import type { Paper } from './paper.js';
import { lineHeight } from './pen.js';
import { type Column, drawTable, type TableOptions } from './table.js';

/** Sets headings, paragraphs, tables and pictures one under the other, on a new sheet where the last is full. */
export class Flow {
  private y: number;

  constructor(private readonly paper: Paper) {
    this.y = paper.room.y;
  }

  /** A heading keeps at least `keep` mm of what follows on its sheet. */
  heading(text: string, keep = 20): void {
    if (this.y > this.paper.room.y + 1) this.y += 3;
    this.need(8 + keep);
    this.y = this.paper.heading(text, this.y);
  }

  paragraph(text: string, style: { readonly bold?: boolean; readonly size?: number } = {}): void {
    const size = style.size ?? SIZE.body;
    const { pen } = this.paper;
    for (const line of wrapText(pen, text, Math.min(READABLE, this.paper.room.width), { size, ...style })) {
      this.need(lineHeight(size));
      pen.text(line, this.paper.room.x, this.y + lineHeight(size) * 0.8, { size, ...style });
      this.y += lineHeight(size);
    }
    this.y += lineHeight(size) * 0.45;
  }

  table<Row>(columns: readonly Column<Row>[], rows: readonly Row[], options: TableOptions<Row> = {}): void {
    this.y = drawTable(this.paper, this.y, columns, rows, options);
  }

  picture(height: number, draw: (area: Area) => void): void {
    const fits = Math.min(height, this.paper.room.height);
    this.need(fits);
    draw({ x: this.paper.room.x, y: this.y, width: this.paper.room.width, height: fits });
    this.y += fits + 3;
  }

  /** What is left of the sheet, mm. */
  get left(): number {
    return this.paper.room.y + this.paper.room.height - this.y;
  }

  newSheet(): void {
    this.y = this.paper.continueSheet().y;
  }

  private need(height: number): void {
    if (height > this.left) this.newSheet();
  }
}

/** Widest column of running text, mm: about 110 characters of body text. */
const READABLE = 190;
