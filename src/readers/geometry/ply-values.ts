import type { PlyHeader, PlyType } from './ply-header.js';
import { plainNumber } from './text-lines.js';

/** The numbers after a PLY header, one after the other. */
export interface PlyValues {
  /** Throws a RangeError where the file has ended. */
  next(type: PlyType): number;
  /** Line of the last number, from 1; the header's last line in a binary file. */
  line(): number;
}

export const plyValues = (file: Uint8Array, header: PlyHeader): PlyValues =>
  header.format === 'ascii' ? asciiValues(file, header) : binaryValues(file, header);

function asciiValues(file: Uint8Array, header: PlyHeader): PlyValues {
  const text = new TextDecoder('latin1').decode(file.subarray(header.bytes));
  const word = /\S+/g;
  let at = 0;
  return {
    next() {
      const match = word.exec(text);
      if (!match) throw new RangeError('the file has ended');
      at = match.index;
      return plainNumber(match[0]);
    },
    line: () => header.lines + (text.slice(0, at).match(/\n/g)?.length ?? 0) + 1,
  };
}

const SIZE: Readonly<Record<PlyType, number>> = { i1: 1, u1: 1, i2: 2, u2: 2, i4: 4, u4: 4, f4: 4, f8: 8 };

function binaryValues(file: Uint8Array, header: PlyHeader): PlyValues {
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  const little = header.format === 'binary_little_endian';
  let at = header.bytes;
  const read: Readonly<Record<PlyType, (offset: number) => number>> = {
    i1: (o) => view.getInt8(o),
    u1: (o) => view.getUint8(o),
    i2: (o) => view.getInt16(o, little),
    u2: (o) => view.getUint16(o, little),
    i4: (o) => view.getInt32(o, little),
    u4: (o) => view.getUint32(o, little),
    f4: (o) => view.getFloat32(o, little),
    f8: (o) => view.getFloat64(o, little),
  };
  return {
    // A DataView throws a RangeError itself past its end.
    next(type) {
      const value = read[type](at);
      at += SIZE[type];
      return value;
    },
    line: () => header.lines,
  };
}
