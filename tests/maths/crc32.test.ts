import { expect, it } from 'vitest';
import { crc32, crc32Combine } from '../../src/maths/crc32.js';
import { seededRandom } from '../../src/maths/random.js';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

it('gives the published check value', () => {
  // "123456789" -> 0xCBF43926: the check value of CRC-32/ISO-HDLC in the catalogue of parametrised CRC algorithms (seen).
  expect(crc32(bytes('123456789'))).toBe(0xcbf43926);
  expect(crc32(bytes(''))).toBe(0);
});

it('joins the CRCs of two blocks of any length', () => {
  const random = seededRandom(4);
  for (const [n, m] of [
    [0, 0],
    [0, 5],
    [5, 0],
    [1, 1],
    [70000, 3],
    [33, 100003],
  ] as const) {
    const whole = Uint8Array.from({ length: n + m }, () => Math.floor(256 * random()));
    expect(crc32Combine(crc32(whole.subarray(0, n)), crc32(whole.subarray(n)), m)).toBe(crc32(whole));
  }
});
