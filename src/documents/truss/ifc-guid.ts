const DIGITS = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz_$';

/**
 * An IfcGloballyUniqueId (22 digits to base 64, the first at most 3: ISO 16739, IfcGloballyUniqueId) that depends on a text
 * alone, so that a part keeps it from issue to issue: four FNV-1a hashes (RFC 9923) with different beginnings.
 */
export function ifcGuid(text: string): string {
  let bits = 0n;
  for (let k = 0; k < 4; k++) bits = (bits << 32n) | BigInt(fnv1a(`${k}:${text}`));
  let out = '';
  for (let i = 0; i < 22; i++) {
    out = DIGITS[Number(bits & 63n)] + out;
    bits >>= 6n;
  }
  return out;
}

function fnv1a(text: string): number {
  let hash = 0x811c9dc5;
  for (const byte of new TextEncoder().encode(text)) hash = Math.imul(hash ^ byte, 0x01000193);
  // The last bits of FNV-1a mix poorly in short texts (MurmurHash3 finaliser, Appleby, 2011).
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) >>> 0;
}
