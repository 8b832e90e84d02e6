import { writePng } from '../formats/png.js';
import type { DeflateBlocks } from '../formats/zip.js';
import { type DepthImage, depthImage, EYE_LIGHT, seenSize } from '../kit/mesh/depth-image.js';
import { ISOMETRIC, PLAN } from '../kit/view/camera.js';

/** A piece as it lies, from above: brightness a pixel, 0 where there is nothing; rows from the front edge of its box to the back. */
export interface PlanImage {
  readonly width: number;
  readonly depth: number;
  readonly shade: Uint8Array;
}

/** Pixels a millimetre of pictures from above. */
export const PLAN_PER_MM = 2;
/** Side of a piece's own picture, pixels, and of what it is drawn at before it is smoothed. */
const [ICON, FINER] = [128, 2] as const;
/** Share of brightness that is left at the bed's own height: what stands high is bright. */
const AT_BED = 0.55;
/** Print plastic, and the ground behind it. */
const [PLASTIC, GROUND] = [
  [226, 190, 140],
  [255, 255, 255],
] as const;

/** The picture of a piece from above, lit from above, so that it can be turned on the bed. */
export function planImage(positions: Float32Array, triangles: Uint32Array): PlanImage {
  const {
    width,
    height: depth,
    shade,
    depth: heights,
  } = depthImage(positions, triangles, PLAN, PLAN_PER_MM, EYE_LIGHT);
  const top = heights.reduce((a, b) => Math.max(a, b), 1);
  for (let i = 0; i < shade.length; i++)
    if (shade[i]! > 0) shade[i] = Math.max(1, Math.round(shade[i]! * (AT_BED + ((1 - AT_BED) * heights[i]!) / top)));
  return { width, depth, shade };
}

/** A small PNG of a piece as it is printed, seen from the front, the right and above. */
export function pieceIcon(positions: Float32Array, triangles: Uint32Array, deflate: DeflateBlocks): Uint8Array {
  const { width, height } = seenSize(positions, ISOMETRIC);
  const image = depthImage(positions, triangles, ISOMETRIC, (FINER * ICON - 2 * FINER) / Math.max(width, height, 1e-6));
  return writePng(ICON, ICON, smoothed(image), deflate);
}

/** The image in the middle of a square picture, each pixel the mean of those it covers. */
function smoothed({ width, height, shade }: DepthImage): Uint8Array {
  const dx = (ICON * FINER - width) >> 1;
  const dy = (ICON * FINER - height) >> 1;
  // Brightness and how many of a pixel's finer ones show anything.
  const sum = new Uint16Array(ICON * ICON);
  const shown = new Uint8Array(ICON * ICON);
  for (let v = 0; v < height; v++)
    for (let u = 0; u < width; u++) {
      const s = shade[v * width + u]!;
      if (s === 0) continue;
      // Rows of the image run upwards, those of the picture down.
      const i = (ICON - 1 - Math.floor((v + dy) / FINER)) * ICON + Math.floor((u + dx) / FINER);
      sum[i] = sum[i]! + s;
      shown[i] = shown[i]! + 1;
    }
  const rgb = new Uint8Array(3 * ICON * ICON);
  const n = FINER * FINER;
  for (let i = 0; i < sum.length; i++)
    for (let k = 0; k < 3; k++)
      rgb[3 * i + k] = Math.round((PLASTIC[k]! * sum[i]!) / 255 / n + (GROUND[k]! * (n - shown[i]!)) / n);
  return rgb;
}

/** Colour of a brightness; nothing is white. */
export const inked = (shade: number): readonly [number, number, number] =>
  shade === 0 ? GROUND : [(PLASTIC[0] * shade) / 255, (PLASTIC[1] * shade) / 255, (PLASTIC[2] * shade) / 255];
