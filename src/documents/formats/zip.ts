import { crc32, crc32Combine } from '../../maths/crc32.js';

/** Compresses to whole deflate blocks on a byte boundary, none of them the last: handed in, so that no thread or platform is presumed. */
export type DeflateBlocks = (bytes: Uint8Array) => Uint8Array;

/** An empty stored block that ends a deflate stream (RFC 1951, 3.2.4). */
export const LAST_BLOCK = Uint8Array.of(1, 0, 0, 0xff, 0xff);

/** A stretch of a file, compressed to blocks that others can follow. */
export interface Packed {
  readonly bytes: Uint8Array;
  /** Length and CRC-32 before compression. */
  readonly size: number;
  readonly crc: number;
}

export function packText(content: string | Uint8Array, deflate: DeflateBlocks): Packed {
  const plain = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  return { bytes: deflate(plain), size: plain.length, crc: crc32(plain) };
}

/** One file of an archive; `bytes` is its whole raw deflate stream. */
export interface ZipEntry extends Packed {
  readonly path: string;
}

/** A file made of stretches one after the other. */
export function zipEntry(path: string, parts: readonly Packed[]): ZipEntry {
  const blocks = [...parts.map((p) => p.bytes), LAST_BLOCK];
  const bytes = new Uint8Array(blocks.reduce((sum, b) => sum + b.length, 0));
  let at = 0;
  for (const block of blocks) {
    bytes.set(block, at);
    at += block.length;
  }
  return {
    path,
    bytes,
    size: parts.reduce((sum, p) => sum + p.size, 0),
    crc: parts.reduce((crc, p) => crc32Combine(crc, p.crc, p.size), 0),
  };
}

/** 1 January 1980, the earliest that the format can say: archives carry no clock. */
const DOS_DATE = (0 << 9) | (1 << 5) | 1;
const VERSION = 20;
const DEFLATED = 8;
/** File names are UTF-8. */
const FLAGS = 0x0800;

/** A zip archive (PKWARE APPNOTE 6.3.x, 4.3) of entries in their order; at most 65535 entries and 4 GB. */
export function zip(entries: readonly ZipEntry[]): Uint8Array {
  const names = entries.map((e) => new TextEncoder().encode(e.path));
  const bodies = entries.reduce((sum, e, i) => sum + 30 + names[i]!.length + e.bytes.length, 0);
  const directory = names.reduce((sum, n) => sum + 46 + n.length, 0);
  const out = new Uint8Array(bodies + directory + 22);
  const view = new DataView(out.buffer);
  const common = (at: number, e: ZipEntry, name: Uint8Array): void => {
    view.setUint16(at, VERSION, true);
    view.setUint16(at + 2, FLAGS, true);
    view.setUint16(at + 4, DEFLATED, true);
    view.setUint16(at + 6, 0, true);
    view.setUint16(at + 8, DOS_DATE, true);
    view.setUint32(at + 10, e.crc, true);
    view.setUint32(at + 14, e.bytes.length, true);
    view.setUint32(at + 18, e.size, true);
    view.setUint16(at + 22, name.length, true);
  };
  let at = 0;
  const starts = entries.map((e, i) => {
    const start = at;
    const name = names[i]!;
    view.setUint32(at, 0x04034b50, true);
    common(at + 4, e, name);
    out.set(name, at + 30);
    out.set(e.bytes, at + 30 + name.length);
    at += 30 + name.length + e.bytes.length;
    return start;
  });
  entries.forEach((e, i) => {
    const name = names[i]!;
    view.setUint32(at, 0x02014b50, true);
    view.setUint16(at + 4, VERSION, true);
    common(at + 6, e, name);
    view.setUint32(at + 42, starts[i]!, true);
    out.set(name, at + 46);
    at += 46 + name.length;
  });
  view.setUint32(at, 0x06054b50, true);
  view.setUint16(at + 8, entries.length, true);
  view.setUint16(at + 10, entries.length, true);
  view.setUint32(at + 12, directory, true);
  view.setUint32(at + 16, bodies, true);
  return out;
}
