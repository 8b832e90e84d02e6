import { createHash } from 'node:crypto';

/** SHA-256 (FIPS 180-4) of bytes, or of a text in UTF-8, as 64 lower-case hexadecimal digits. */
export const sha256 = (data: Uint8Array | string): string => createHash('sha256').update(data).digest('hex');
