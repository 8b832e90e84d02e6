import { quoted } from '../fault.js';
import type { LineFaults } from './text-lines.js';

export type PlyType = 'i1' | 'u1' | 'i2' | 'u2' | 'i4' | 'u4' | 'f4' | 'f8';

export interface PlyProperty {
  readonly name: string;
  readonly type: PlyType;
  /** Type of a list's count; null: a single value. */
  readonly count: PlyType | null;
}

export interface PlyElement {
  readonly name: string;
  readonly count: number;
  readonly properties: PlyProperty[];
}

export interface PlyHeader {
  readonly format: 'ascii' | 'binary_little_endian' | 'binary_big_endian';
  readonly elements: readonly PlyElement[];
  /** Bytes and lines of the header. */
  readonly bytes: number;
  readonly lines: number;
}

const TYPES: ReadonlyMap<string, PlyType> = new Map(
  Object.entries({
    char: 'i1',
    int8: 'i1',
    uchar: 'u1',
    uint8: 'u1',
    short: 'i2',
    int16: 'i2',
    ushort: 'u2',
    uint16: 'u2',
    int: 'i4',
    int32: 'i4',
    uint: 'u4',
    uint32: 'u4',
    float: 'f4',
    float32: 'f4',
    double: 'f8',
    float64: 'f8',
  } as const),
);

/** A header is some twenty lines. */
const MOST_BYTES = 100_000;

/** Reads the header of a PLY file; null, with the fault told, where there is none. */
export function plyHeader(file: Uint8Array, log: LineFaults): PlyHeader | null {
  const start = new TextDecoder('latin1').decode(file.subarray(0, MOST_BYTES));
  const end = /(^|\n)[ \t]*end_header[ \t]*\r?\n?/.exec(start);
  if (!/^ply\s/.test(start) || !end) {
    log.tell(1, 'is not a PLY file', 'give a file that begins with "ply" and has an end_header');
    return null;
  }
  const elements: PlyElement[] = [];
  let format: PlyHeader['format'] | null = null;
  const lines = start.slice(0, end.index + end[0].length).split(/\r?\n/);
  lines.forEach((text, i) => {
    const [word, ...rest] = text.trim().split(/\s+/);
    const wrong = (): void => log.tell(i + 1, `${quoted(text.trim())} is not understood`, 'export the file again');
    if (word === 'format') {
      if (rest[0] === 'ascii' || rest[0] === 'binary_little_endian' || rest[0] === 'binary_big_endian')
        format = rest[0];
      else wrong();
    } else if (word === 'element') {
      if (/^\d{1,9}$/.test(rest[1] ?? '')) elements.push({ name: rest[0]!, count: Number(rest[1]), properties: [] });
      else wrong();
    } else if (word === 'property') {
      const list = rest[0] === 'list';
      const [count, type, name] = list
        ? [TYPES.get(rest[1] ?? ''), TYPES.get(rest[2] ?? ''), rest[3]]
        : [null, TYPES.get(rest[0] ?? ''), rest[1]];
      const element = elements.at(-1);
      if (element && type && name && count !== undefined) element.properties.push({ name, type, count });
      else wrong();
    }
  });
  if (!format && log.faults.length === 0) log.tell(1, 'has no format line', 'export the file again');
  if (log.faults.length > 0 || !format) return null;
  return { format, elements, bytes: end.index + end[0].length, lines: lines.length - 1 };
}
