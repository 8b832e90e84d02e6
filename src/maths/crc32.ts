/** CRC-32 of ISO 3309 and ITU-T V.42 (polynomial 0xEDB88320, reflected), as zip and PNG use it. */
export function crc32(bytes: Uint8Array): number {
  let c = 0xffffffff;
  for (let i = 0; i < bytes.length; i++) c = TABLE[(c ^ bytes[i]!) & 0xff]! ^ (c >>> 8);
  return (c ^ 0xffffffff) >>> 0;
}

const TABLE = Uint32Array.from({ length: 256 }, (_, n) => {
  let c = n;
  for (let k = 0; k < 8; k++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
  return c >>> 0;
});

/**
 * CRC-32 of two blocks one after the other from the CRC of each and the length of the second: `length` zero bytes are appended to the
 * first by repeated squaring of the operator that appends one zero bit (Adler, zlib, crc32_combine).
 */
export function crc32Combine(first: number, second: number, length: number): number {
  let operator: Matrix = Array.from({ length: 32 }, (_, i) => (i === 0 ? 0xedb88320 : 1 << (i - 1)));
  // Three squarings: from one zero bit to one zero byte.
  for (let k = 0; k < 3; k++) operator = square(operator);
  let crc = first | 0;
  for (let rest = length; rest > 0; rest = Math.floor(rest / 2)) {
    if (rest % 2 === 1) crc = times(operator, crc);
    operator = square(operator);
  }
  return (crc ^ second) >>> 0;
}

/** A linear map of 32 bits over the field of two elements, column by column. */
type Matrix = readonly number[];

function times(m: Matrix, vector: number): number {
  let sum = 0;
  for (let v = vector >>> 0, i = 0; v !== 0; v >>>= 1, i++) if (v & 1) sum ^= m[i]!;
  return sum;
}

const square = (m: Matrix): Matrix => m.map((column) => times(m, column));
