import { clearanceAt } from './clearance.js';
import { boundsOf, type Ring } from './ring.js';

/**
 * The inner point farthest from the boundary, to within `precision`: a grid of cells, each split in four while the
 * distance at its middle plus its half diagonal can still beat the best (Garcia-Castellanos and Lombardo 2007).
 * `stretch` weighs y: 2 looks for room that is twice as wide as high. [x, y, distance]
 */
export function poleOfInaccessibility(
  rings: readonly Ring[],
  precision: number,
  stretch = 1,
): [number, number, number] {
  const scaled = rings.map((r) => r.map((v, i) => (i % 2 === 1 ? v * stretch : v)));
  const [x0, y0, x1, y1] = scaled
    .map(boundsOf)
    .reduce((a, b) => [Math.min(a[0], b[0]), Math.min(a[1], b[1]), Math.max(a[2], b[2]), Math.max(a[3], b[3])]);
  const size = Math.min(x1 - x0, y1 - y0);
  if (!(size > 0)) return [x0, y0 / stretch, 0];
  let best: [number, number, number] = [x0, y0, -Infinity];
  const cells: { x: number; y: number; h: number; most: number }[] = [];
  const offer = (x: number, y: number, h: number): void => {
    const d = clearanceAt(scaled, x, y);
    if (d > best[2]) best = [x, y, d];
    if (d + h * Math.SQRT2 > best[2] + precision) cells.push({ x, y, h, most: d + h * Math.SQRT2 });
  };
  const half = size / 2;
  for (let x = x0 + half; x < x1 + half; x += size) for (let y = y0 + half; y < y1 + half; y += size) offer(x, y, half);
  while (cells.length > 0) {
    cells.sort((a, b) => a.most - b.most);
    const { x, y, h, most } = cells.pop()!;
    if (most <= best[2] + precision) break;
    for (const sx of [-h / 2, h / 2]) for (const sy of [-h / 2, h / 2]) offer(x + sx, y + sy, h / 2);
  }
  return [best[0], best[1] / stretch, best[2]];
}
