import { PNG } from 'pngjs';
import { expect, it } from 'vitest';
import { writePng } from '../../../src/documents/formats/png.js';
import { deflateBlocks } from '../../../src/machine/deflate.js';
import { seededRandom } from '../../../src/maths/random.js';

it('writes pictures that an outside decoder reads pixel for pixel, small and large', () => {
  for (const [width, height] of [
    [1, 1],
    [3, 2],
    [157, 91],
  ] as const) {
    const random = seededRandom(width);
    const rgb = Uint8Array.from({ length: 3 * width * height }, () => Math.floor(256 * random()));
    const read = PNG.sync.read(Buffer.from(writePng(width, height, rgb, deflateBlocks)), { checkCRC: true });
    expect([read.width, read.height]).toEqual([width, height]);
    const back = [...read.data].filter((_, i) => i % 4 !== 3);
    expect(back).toEqual([...rgb]);
  }
});
