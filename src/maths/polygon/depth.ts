import type { Ring } from './ring.js';

/** Rings (boundaries anticlockwise, holes clockwise) laid out for depth queries: edges as x0 y0 x1 y1. */
export interface Region {
  readonly edges: readonly number[];
  readonly convex: boolean;
  /** Three numbers an edge: its inward unit normal n and c, so that n·p - c is the distance of p on the inner side. */
  readonly lines: readonly number[];
  /** Left, bottom, right, top. */
  readonly box: readonly number[];
  /** Which edges can be nearest, cell by cell over the box; made once a region that is not convex has been asked often. */
  cells: Cells | null;
  asked: number;
}

interface Cells {
  /** Signed distance of each cell's middle from the boundary, positive inside. */
  readonly middle: Float64Array;
  /** Cell k's edges stand in `list` from start[k] to start[k + 1], as places in `edges`. */
  readonly start: Int32Array;
  readonly list: Int32Array;
  readonly width: number;
  readonly height: number;
}

/** Cells each way, and questions after which they pay. */
const CELLS = 24;
const CELLS_PAY = 200;

/** A region of one convex ring, or of any set of rings. Plain arrays: hundreds of thousands are made, and typed ones are slow to make. */
export function regionOf(rings: readonly Ring[], convex: boolean): Region {
  const edges: number[] = [];
  const lines: number[] = [];
  let left = Infinity;
  let bottom = Infinity;
  let right = -Infinity;
  let top = -Infinity;
  for (const ring of rings) {
    const n = ring.length;
    for (let i = 0; i < n; i += 2) {
      const j = i + 2 === n ? 0 : i + 2;
      const x0 = ring[i]!;
      const y0 = ring[i + 1]!;
      const x1 = ring[j]!;
      const y1 = ring[j + 1]!;
      const dx = x1 - x0;
      const dy = y1 - y0;
      if (dx === 0 && dy === 0) continue;
      const length = Math.sqrt(dx * dx + dy * dy);
      edges.push(x0, y0, x1, y1);
      lines.push(-dy / length, dx / length, (dx * y0 - dy * x0) / length);
      if (x0 < left) left = x0;
      if (x0 > right) right = x0;
      if (y0 < bottom) bottom = y0;
      if (y0 > top) top = y0;
    }
  }
  return { edges, convex, lines, box: [left, bottom, right, top], cells: null, asked: 0 };
}

/**
 * How far (x, y) must move to be `clear` outside the region: max(0, clear + signed distance to its boundary), the
 * distance positive inside. 0 when it is clear already.
 */
export function depthIn(region: Region, x: number, y: number, clear: number): number {
  const box = region.box;
  if (x <= box[0]! - clear || y <= box[1]! - clear || x >= box[2]! + clear || y >= box[3]! + clear) return 0;
  return region.convex ? convexDepth(region, x, y, clear) : cellDepth(region, x, y, clear);
}

/** Exact like generalDepth, with the few edges of the point's own cell in place of all. */
function cellDepth(region: Region, x: number, y: number, clear: number): number {
  const { box, cells, edges } = region;
  if (!cells) {
    if (++region.asked >= CELLS_PAY) region.cells = cellsOf(region);
    return generalDepth(edges, x, y, clear);
  }
  const { width, height } = cells;
  const u = (x - box[0]!) / width;
  const v = (y - box[1]!) / height;
  if (!(u >= 0 && u < CELLS && v >= 0 && v < CELLS)) return generalDepth(edges, x, y, clear);
  const cell = Math.floor(v) * CELLS + Math.floor(u);
  const middle = cells.middle[cell]!;
  const half = Math.sqrt(width * width + height * height) / 2;
  if (middle + half + clear <= 0) return 0;
  const inside = middle > half || (middle >= -half && isInside(edges, x, y));
  if (!inside && clear === 0) return 0;
  const { list } = cells;
  let best = Infinity;
  for (let k = cells.start[cell]!, end = cells.start[cell + 1]!; k < end; k++) {
    const d = squaredDistance(edges, list[k]!, x, y);
    if (d < best) best = d;
  }
  const distance = Math.sqrt(best);
  return inside ? clear + distance : Math.max(0, clear - distance);
}

function cellsOf(region: Region): Cells {
  const { box, edges } = region;
  const width = (box[2]! - box[0]!) / CELLS;
  const height = (box[3]! - box[1]!) / CELLS;
  const diagonal = Math.sqrt(width * width + height * height);
  const middle = new Float64Array(CELLS * CELLS);
  const start = new Int32Array(CELLS * CELLS + 1);
  const list: number[] = [];
  const off = new Float64Array(edges.length / 4);
  for (let k = 0; k < CELLS * CELLS; k++) {
    const x = box[0]! + width * ((k % CELLS) + 0.5);
    const y = box[1]! + height * (Math.floor(k / CELLS) + 0.5);
    let least = Infinity;
    for (let e = 0; e < off.length; e++) {
      off[e] = Math.sqrt(squaredDistance(edges, 4 * e, x, y));
      if (off[e]! < least) least = off[e]!;
    }
    middle[k] = isInside(edges, x, y) ? least : -least;
    // A point of the cell is half a diagonal from its middle at most, so its nearest edge is at most one farther.
    for (let e = 0; e < off.length; e++) if (off[e]! <= least + diagonal) list.push(4 * e);
    start[k + 1] = list.length;
  }
  return { middle, start, list: Int32Array.from(list), width, height };
}

function convexDepth(region: Region, x: number, y: number, clear: number): number {
  const { lines } = region;
  let depth = Infinity;
  for (let k = 0; k < lines.length; k += 3) {
    const d = lines[k]! * x + lines[k + 1]! * y - lines[k + 2]!;
    if (d + clear <= 0) return 0;
    if (d < depth) depth = d;
  }
  if (depth >= 0) return clear + depth;
  // Outside, near an edge or a corner: only the spacing can be short.
  return Math.max(0, clear - boundaryDistance(region.edges, x, y));
}

function generalDepth(e: readonly number[], x: number, y: number, clear: number): number {
  if (isInside(e, x, y)) return clear + boundaryDistance(e, x, y);
  if (clear === 0) return 0;
  return Math.max(0, clear - boundaryDistance(e, x, y));
}

/** By the parity of crossings of the edges with the ray to the right. */
function isInside(e: readonly number[], x: number, y: number): boolean {
  let inside = false;
  for (let i = 0; i < e.length; i += 4) {
    const y0 = e[i + 1]!;
    const y1 = e[i + 3]!;
    if (y0 > y === y1 > y) continue;
    if (x < e[i]! + ((y - y0) * (e[i + 2]! - e[i]!)) / (y1 - y0)) inside = !inside;
  }
  return inside;
}

function boundaryDistance(e: readonly number[], x: number, y: number): number {
  let best = Infinity;
  for (let i = 0; i < e.length; i += 4) {
    const d = squaredDistance(e, i, x, y);
    if (d < best) best = d;
  }
  return Math.sqrt(best);
}

/** Squared distance of (x, y) from the edge at place i. */
function squaredDistance(e: readonly number[], i: number, x: number, y: number): number {
  const px = x - e[i]!;
  const py = y - e[i + 1]!;
  const dx = e[i + 2]! - e[i]!;
  const dy = e[i + 3]! - e[i + 1]!;
  const along = px * dx + py * dy;
  if (along <= 0) return px * px + py * py;
  const long = dx * dx + dy * dy;
  if (along >= long) return (px - dx) * (px - dx) + (py - dy) * (py - dy);
  const c = px * dy - py * dx;
  return (c * c) / long;
}
