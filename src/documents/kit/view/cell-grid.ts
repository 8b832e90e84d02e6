import type { Box, Point } from '../geometry2.js';
import { reach } from '../geometry2.js';

/** Size of a cell, mm: about a label's. */
const CELL = 7;

/** Things on a sheet found again by where they are: a hash of square cells. */
export class CellGrid<T> {
  private readonly cells = new Map<number, { readonly item: T; readonly id: number }[]>();
  private seen = new Uint32Array(64);
  private query = 0;
  private count = 0;

  addBox(box: Box, item: T): void {
    const [w, h] = [reach(box, 1, 0), reach(box, 0, 1)];
    this.put(box.x - w, box.y - h, box.x + w, box.y + h, { item, id: this.newId() });
  }

  /** A segment is put into the cells round each piece of it no longer than a cell. */
  addSegment([x0, y0]: Point, [x1, y1]: Point, item: T): void {
    const entry = { item, id: this.newId() };
    const pieces = Math.max(1, Math.ceil(Math.hypot(x1 - x0, y1 - y0) / CELL));
    for (let k = 0; k < pieces; k++) {
      const [s, t] = [k / pieces, (k + 1) / pieces];
      const [ax, ay, bx, by] = [x0 + s * (x1 - x0), y0 + s * (y1 - y0), x0 + t * (x1 - x0), y0 + t * (y1 - y0)];
      this.put(Math.min(ax, bx), Math.min(ay, by), Math.max(ax, bx), Math.max(ay, by), entry);
    }
  }

  /** Calls `visit` once for each thing near the rectangle until it answers true; returns whether it did. */
  some(x0: number, y0: number, x1: number, y1: number, visit: (item: T) => boolean): boolean {
    const stamp = ++this.query;
    const seen = this.seen;
    const lastRow = Math.floor(y1 / CELL);
    const lastColumn = Math.floor(x1 / CELL);
    for (let i = Math.floor(x0 / CELL); i <= lastColumn; i++)
      for (let j = Math.floor(y0 / CELL); j <= lastRow; j++) {
        const cell = this.cells.get(key(i, j));
        if (cell === undefined) continue;
        for (let k = 0; k < cell.length; k++) {
          const { item, id } = cell[k]!;
          if (seen[id] === stamp) continue;
          seen[id] = stamp;
          if (visit(item)) return true;
        }
      }
    return false;
  }

  private put(x0: number, y0: number, x1: number, y1: number, entry: { readonly item: T; readonly id: number }): void {
    for (let i = Math.floor(x0 / CELL); i <= Math.floor(x1 / CELL); i++)
      for (let j = Math.floor(y0 / CELL); j <= Math.floor(y1 / CELL); j++) {
        const cell = this.cells.get(key(i, j));
        if (!cell) this.cells.set(key(i, j), [entry]);
        else if (cell.at(-1) !== entry) cell.push(entry);
      }
  }

  private newId(): number {
    if (this.count === this.seen.length) {
      const larger = new Uint32Array(2 * this.count);
      larger.set(this.seen);
      this.seen = larger;
    }
    return this.count++;
  }
}

/** Cells of a sheet and some way round it: indices within ±1000. */
const key = (i: number, j: number): number => (i + 1000) * 4096 + (j + 1000);
