import type { Page } from 'playwright-core';
import { PNG } from 'pngjs';

/** A canvas of the page without what lies over it. */
export async function canvasOf(page: Page, id: 'truss' | 'marks' | 'printed'): Promise<PNG> {
  const url = (await page.evaluate(`document.getElementById('${id}').toDataURL('image/png')`)) as string;
  return PNG.sync.read(Buffer.from(url.slice(url.indexOf(',') + 1), 'base64'));
}

/** Red, green, blue of a pixel, 0 to 255. */
export const pixel = ({ width, data }: PNG, x: number, y: number): [number, number, number] => {
  const i = 4 * (y * width + x);
  return [data[i]!, data[i + 1]!, data[i + 2]!];
};

const apart = (a: readonly number[], b: readonly number[]): number =>
  a.reduce((sum, v, k) => sum + Math.abs(v - b[k]!), 0);

/** Pixels that differ from the one in the upper left corner. */
export function inkOf(png: PNG): {
  readonly count: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
} {
  const ground = pixel(png, 0, 0);
  let count = 0;
  let [left, right, top, bottom] = [png.width, -1, png.height, -1];
  for (let y = 0; y < png.height; y++)
    for (let x = 0; x < png.width; x++) {
      if (apart(pixel(png, x, y), ground) <= 40) continue;
      count += 1;
      [left, right, top, bottom] = [Math.min(left, x), Math.max(right, x), Math.min(top, y), Math.max(bottom, y)];
    }
  return { count, left, right, top, bottom };
}

export type Hue = 'orange' | 'purple' | 'grey';

const hueOf = ([r, g, b]: readonly [number, number, number]): Hue =>
  b - g > 25 && b > r - 20 ? 'purple' : r - b > 40 ? 'orange' : 'grey';

/** What a column of pixels crosses, from the top down: runs of ink with their first and last row and the hue of their middle. */
export function crossings(png: PNG, x: number): { readonly from: number; readonly to: number; readonly hue: Hue }[] {
  const ground = pixel(png, 0, 0);
  const runs: { from: number; to: number; hue: Hue }[] = [];
  let from = -1;
  for (let y = 0; y <= png.height; y++) {
    const ink = y < png.height && apart(pixel(png, x, y), ground) > 40;
    if (ink && from < 0) from = y;
    if (!ink && from >= 0) {
      runs.push({ from, to: y - 1, hue: hueOf(pixel(png, x, (from + y - 1) >> 1)) });
      from = -1;
    }
  }
  return runs;
}
