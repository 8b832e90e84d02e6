import type { Vec3 } from '../maths/vec3.js';
import type { LengthUnit } from './units.js';

/** Lines and loops as a modeller or a spreadsheet holds them: no nodes shared yet, in the file's own unit and axes. */
export interface RawGeometry {
  /** What the file itself says of its unit; null: nothing. */
  readonly unit: LengthUnit | null;
  /** Which axis points up, where the format says so; null: the file does not say. */
  readonly up: UpAxis | null;
  /** Points that are nodes in their own right, as rows of a table. */
  readonly points: readonly RawPoint[];
  readonly lines: readonly RawLine[];
  readonly loops: readonly RawLoop[];
  /** What stood in the file and was left out, by name, with its count. */
  readonly leftOut: ReadonlyMap<string, number>;
}

export type UpAxis = 'y' | 'z';

export interface RawPoint {
  readonly at: Vec3;
  /** Identifier in the file; null: none. */
  readonly mark: string | null;
}

/** One straight line between two points: a strut to be. */
export interface RawLine {
  readonly ends: readonly [Vec3, Vec3];
  readonly mark: string | null;
  readonly layer: string | null;
  /** N, tension positive; null: none. */
  readonly force: number | null;
  readonly section: string | null;
}

/** A closed loop of points, the first not repeated: a face to be. */
export interface RawLoop {
  readonly points: readonly Vec3[];
  readonly layer: string | null;
}

/** What a reader of geometry gives: the geometry, or null with every fault of the file. */
export interface RawReading<F> {
  readonly geometry: RawGeometry | null;
  readonly faults: readonly F[];
}

/** A line without marks and forces, as drawings have them. */
export const bareLine = (a: Vec3, b: Vec3, layer: string | null): RawLine => ({
  ends: [a, b],
  mark: null,
  layer,
  force: null,
  section: null,
});
