import { crc32 } from '../../maths/crc32.js';
import { type DeflateBlocks, LAST_BLOCK } from './zip.js';

const SIGNATURE = Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a);
/** Eight bits a sample, red green blue, no interlacing. */
const [DEPTH, TRUE_COLOUR] = [8, 2] as const;
/** First two bytes of a zlib stream (RFC 1950): deflate with a window of 32 KB. */
const ZLIB = Uint8Array.of(0x78, 0x9c);
const ADLER = 65521;

/**
 * A picture as PNG (ISO/IEC 15948): true colour, each line unfiltered.
 *
 * @param rgb red, green, blue a pixel, rows from the top, 3 x width x height bytes
 */
export function writePng(width: number, height: number, rgb: Uint8Array, deflate: DeflateBlocks): Uint8Array {
  const stride = 3 * width;
  const lines = new Uint8Array((stride + 1) * height);
  for (let y = 0; y < height; y++) lines.set(rgb.subarray(y * stride, (y + 1) * stride), y * (stride + 1) + 1);
  const header = new Uint8Array(13);
  const view = new DataView(header.buffer);
  view.setUint32(0, width);
  view.setUint32(4, height);
  header.set([DEPTH, TRUE_COLOUR, 0, 0, 0], 8);
  const sum = new Uint8Array(4);
  new DataView(sum.buffer).setUint32(0, adler32(lines));
  const packed = join([ZLIB, deflate(lines), LAST_BLOCK, sum]);
  return join([SIGNATURE, chunk('IHDR', header), chunk('IDAT', packed), chunk('IEND', new Uint8Array(0))]);
}

function chunk(type: string, data: Uint8Array): Uint8Array {
  const out = new Uint8Array(12 + data.length);
  const view = new DataView(out.buffer);
  view.setUint32(0, data.length);
  for (let i = 0; i < 4; i++) out[4 + i] = type.charCodeAt(i);
  out.set(data, 8);
  view.setUint32(8 + data.length, crc32(out.subarray(4, 8 + data.length)));
  return out;
}

/** RFC 1950, 8.2. */
function adler32(bytes: Uint8Array): number {
  let [a, b] = [1, 0];
  for (let from = 0; from < bytes.length; from += BEFORE_OVERFLOW) {
    const to = Math.min(bytes.length, from + BEFORE_OVERFLOW);
    for (let i = from; i < to; i++) b += a += bytes[i]!;
    a %= ADLER;
    b %= ADLER;
  }
  return b * 65536 + a;
}

/** Bytes that can be added before the sums must be reduced. */
const BEFORE_OVERFLOW = 3800;

function join(parts: readonly Uint8Array[]): Uint8Array {
  const out = new Uint8Array(parts.reduce((sum, p) => sum + p.length, 0));
  let at = 0;
  for (const p of parts) {
    out.set(p, at);
    at += p.length;
  }
  return out;
}
