import type { Ring } from './ring.js';

/** Rings (boundaries anticlockwise, holes clockwise) laid out for depth queries: edges as x0 y0 x1 y1. */
export interface Region {
  readonly edges: Float64Array;
  readonly convex: boolean;
  /** Left, bottom, right, top. */
  readonly box: Float64Array;
}

/** A region of one convex ring, or of any set of rings. */
export function regionOf(rings: readonly Ring[], convex: boolean): Region {
  const edges: number[] = [];
  const box = new Float64Array([Infinity, Infinity, -Infinity, -Infinity]);
  for (const ring of rings) {
    const n = ring.length;
    for (let i = 0; i < n; i += 2) {
      const j = (i + 2) % n;
      const [x0, y0, x1, y1] = [ring[i]!, ring[i + 1]!, ring[j]!, ring[j + 1]!];
      if (x0 === x1 && y0 === y1) continue;
      edges.push(x0, y0, x1, y1);
      box[0] = Math.min(box[0]!, x0);
      box[1] = Math.min(box[1]!, y0);
      box[2] = Math.max(box[2]!, x0);
      box[3] = Math.max(box[3]!, y0);
    }
  }
  return { edges: new Float64Array(edges), convex, box };
}

/**
 * How far (x, y) must move to be `clear` outside the region: max(0, clear + signed distance to its boundary), the
 * distance positive inside. 0 when it is clear already.
 */
export function depthIn(region: Region, x: number, y: number, clear: number): number {
  const box = region.box;
  if (x <= box[0]! - clear || y <= box[1]! - clear || x >= box[2]! + clear || y >= box[3]! + clear) return 0;
  return region.convex ? convexDepth(region.edges, x, y, clear) : generalDepth(region.edges, x, y, clear);
}

function convexDepth(e: Float64Array, x: number, y: number, clear: number): number {
  let depth = Infinity;
  let inside = true;
  for (let i = 0; i < e.length; i += 4) {
    const dx = e[i + 2]! - e[i]!;
    const dy = e[i + 3]! - e[i + 1]!;
    // Positive on the left of the edge, the inside.
    const d = (dx * (y - e[i + 1]!) - dy * (x - e[i]!)) / Math.sqrt(dx * dx + dy * dy);
    if (d + clear <= 0) return 0;
    if (d <= 0) inside = false;
    if (d < depth) depth = d;
  }
  if (inside) return clear + depth;
  if (clear === 0) return 0;
  return Math.max(0, clear - boundaryDistance(e, x, y));
}

function generalDepth(e: Float64Array, x: number, y: number, clear: number): number {
  let inside = false;
  for (let i = 0; i < e.length; i += 4) {
    const y0 = e[i + 1]!;
    const y1 = e[i + 3]!;
    if (y0 > y === y1 > y) continue;
    if (x < e[i]! + ((y - y0) * (e[i + 2]! - e[i]!)) / (y1 - y0)) inside = !inside;
  }
  if (inside) return clear + boundaryDistance(e, x, y);
  if (clear === 0) return 0;
  return Math.max(0, clear - boundaryDistance(e, x, y));
}

function boundaryDistance(e: Float64Array, x: number, y: number): number {
  let best = Infinity;
  for (let i = 0; i < e.length; i += 4) {
    const px = x - e[i]!;
    const py = y - e[i + 1]!;
    const dx = e[i + 2]! - e[i]!;
    const dy = e[i + 3]! - e[i + 1]!;
    const along = px * dx + py * dy;
    const long = dx * dx + dy * dy;
    let d: number;
    if (along <= 0) d = px * px + py * py;
    else if (along >= long) d = (px - dx) * (px - dx) + (py - dy) * (py - dy);
    else {
      const c = px * dy - py * dx;
      d = (c * c) / long;
    }
    if (d < best) best = d;
  }
  return Math.sqrt(best);
}
