import type { Vec3 } from '../../maths/vec3.js';
import { isUsable, LIMITS } from '../../model/limits.js';
import { bareLine, type RawLine, type RawLoop, type RawReading } from '../../model/raw-geometry.js';
import { type Fault, quoted } from '../fault.js';
import { type PlyElement, plyHeader } from './ply-header.js';
import { type PlyValues, plyValues } from './ply-values.js';
import { LineFaults } from './text-lines.js';

/**
 * Reads a PLY file (Turk, The PLY Polygon File Format, 1994), ASCII or binary of either byte order: vertices with x, y, z;
 * edges with vertex1, vertex2; faces with a list vertex_indices (or vertex_index). A PLY file says neither its unit nor which
 * way is up.
 */
export function readPly(bytes: Uint8Array, name: string): RawReading<Fault> {
  const log = new LineFaults(name);
  const header = plyHeader(bytes, log);
  if (!header) return { geometry: null, faults: log.faults };
  const vertices: Vec3[] = [];
  const lines: RawLine[] = [];
  const loops: RawLoop[] = [];
  const leftOut = new Map<string, number>();
  const values = plyValues(bytes, header);
  try {
    for (const element of header.elements) {
      if (element.count > LIMITS.members * 4)
        throw new PlyFault(`has ${element.count} of ${quoted(element.name)}`, 'read a smaller model');
      if (element.name === 'vertex') readVertices(element, values, vertices);
      else if (element.name === 'edge' || element.name === 'face') {
        for (let i = 0; i < element.count; i++) {
          const read = row(element, values);
          if (element.name === 'edge') lines.push(edge(read, vertices, i));
          else loops.push(face(read, vertices, i));
        }
      } else {
        leftOut.set(element.name, element.count);
        for (let i = 0; i < element.count; i++) row(element, values);
      }
    }
  } catch (error) {
    if (!(error instanceof PlyFault) && !(error instanceof RangeError)) throw error;
    const [what, mend] =
      error instanceof PlyFault ? [error.what, error.mend] : ['ends before its last element', 'export it again'];
    log.tell(values.line(), what, mend);
    return { geometry: null, faults: log.faults };
  }
  return { geometry: { unit: null, up: null, points: [], lines, loops, leftOut }, faults: [] };
}

class PlyFault extends Error {
  constructor(
    readonly what: string,
    readonly mend: string,
  ) {
    super(what);
  }
}

type Row = ReadonlyMap<string, number | readonly number[]>;

/** More corners than any face has: a wrong byte order makes numbers like this. */
const MOST_IN_LIST = 100_000;

function row(element: PlyElement, values: PlyValues): Row {
  const out = new Map<string, number | readonly number[]>();
  for (const property of element.properties) {
    if (!property.count) {
      out.set(property.name, values.next(property.type));
      continue;
    }
    const count = values.next(property.count);
    if (!Number.isInteger(count) || count < 0 || count > MOST_IN_LIST)
      throw new PlyFault(`a list of ${quoted(element.name)} has ${count} entries`, 'export it again');
    out.set(
      property.name,
      Array.from({ length: count }, () => values.next(property.type)),
    );
  }
  return out;
}

function readVertices(element: PlyElement, values: PlyValues, vertices: Vec3[]): void {
  for (let i = 0; i < element.count; i++) {
    const read = row(element, values);
    const at = ['x', 'y', 'z'].map((axis) => read.get(axis)) as unknown as Vec3;
    if (!at.every((v) => typeof v === 'number' && isUsable(v)))
      throw new PlyFault(`vertex ${i} has no finite x, y and z`, 'export it again');
    vertices.push(at);
  }
}

function vertexAt(index: unknown, vertices: readonly Vec3[], who: string): Vec3 {
  const at = typeof index === 'number' ? vertices[index] : undefined;
  if (!at) throw new PlyFault(`${who} names vertex ${quoted(String(index))}, which is not there`, 'export it again');
  return at;
}

function edge(read: Row, vertices: readonly Vec3[], i: number): RawLine {
  const [a, b] = [read.get('vertex1') ?? read.get('vertex_1'), read.get('vertex2') ?? read.get('vertex_2')];
  return bareLine(vertexAt(a, vertices, `edge ${i}`), vertexAt(b, vertices, `edge ${i}`), null);
}

function face(read: Row, vertices: readonly Vec3[], i: number): RawLoop {
  const list = read.get('vertex_indices') ?? read.get('vertex_index');
  if (!Array.isArray(list) || list.length < 3)
    throw new PlyFault(`face ${i} has fewer than 3 vertices`, 'export it again');
  return { points: list.map((index) => vertexAt(index, vertices, `face ${i}`)), layer: null };
}
