import type { PlannedBed } from '../../model/plan.js';
import { writePng } from '../formats/png.js';
import type { DeflateBlocks } from '../formats/zip.js';
import { inked, PLAN_PER_MM, type PlanImage } from './piece-pictures.js';

/** Kept white round the bed, pixels. */
const EDGE = 6;
const [BED, RIM] = [
  [238, 238, 238],
  [90, 90, 90],
] as const;

/** PNG of a filled bed from above, x to the right and y up, as the printer's screen shows it. @param imageOf the picture of a piece */
export function bedPicture(
  bed: PlannedBed,
  imageOf: (mark: string, piece: string) => PlanImage,
  deflate: DeflateBlocks,
): Uint8Array {
  const [width, depth] = [Math.round(bed.width * PLAN_PER_MM), Math.round(bed.depth * PLAN_PER_MM)];
  const [w, h] = [width + 2 * EDGE, depth + 2 * EDGE];
  const rgb = new Uint8Array(3 * w * h).fill(255);
  /** x and y in pixels from the bed's lower left corner. */
  const put = (x: number, y: number, colour: readonly number[]): void => {
    const [column, row] = [x + EDGE, h - 1 - (y + EDGE)];
    if (column >= 0 && row >= 0 && column < w && row < h) rgb.set(colour, 3 * (row * w + column));
  };
  const round = bed.shape === 'circle';
  for (let y = 0; y < depth; y++)
    for (let x = 0; x < width; x++) {
      const out = round
        ? Math.hypot(x + 0.5 - width / 2, y + 0.5 - depth / 2) - width / 2
        : Math.max(-x, x - width + 1, -y, y - depth + 1) - 0.5;
      if (out < 0.25) put(x, y, out > -2 ? RIM : BED);
    }
  for (const item of bed.items) {
    const image = imageOf(item.mark, item.piece);
    const [left, front] = [Math.round(item.x * PLAN_PER_MM), Math.round(item.y * PLAN_PER_MM)];
    for (let v = 0; v < image.depth; v++)
      for (let u = 0; u < image.width; u++) {
        const shade = image.shade[v * image.width + u]!;
        if (shade === 0) continue;
        // A quarter turn about the corner, then the box's corner back: (u, v) goes to (depth - v, u).
        if (item.turned) put(left + image.depth - 1 - v, front + u, inked(shade));
        else put(left + u, front + v, inked(shade));
      }
  }
  return writePng(w, h, rgb, deflate);
}
