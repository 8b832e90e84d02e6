import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import { type DxfThing, numberOf } from './dxf-groups.js';
import { planeOf } from './dxf-plane.js';
import { plainNumber } from './text-lines.js';

export interface Polyline {
  readonly points: readonly Vec3[];
  readonly closed: boolean;
  /** Segments that bulge: their chords are in `points`. */
  readonly bulges: number;
  /** Faces of a mesh that is written as a POLYLINE. */
  readonly faces: readonly (readonly Vec3[])[];
}

/** LWPOLYLINE: points in the entity's own plane at an elevation (38). null where a number is not finite. */
export function lightPolyline(thing: DxfThing): Polyline | null {
  const elevation = numberOf(thing, 38);
  const points: Vec3[] = [];
  let x = Number.NaN;
  let bulges = 0;
  for (const { code, text } of thing.groups) {
    if (code === 10) x = plainNumber(text);
    if (code === 20) points.push([x, plainNumber(text), elevation]);
    if (code === 42 && plainNumber(text) !== 0) bulges++;
  }
  return finish(points.map(planeOf(thing)), (numberOf(thing, 70) & 1) === 1, bulges);
}

/** POLYLINE with its VERTEX entities: 2D, 3D (flag 8), polygon mesh (16) or polyface mesh (64). */
export function polyline(thing: DxfThing, vertices: readonly DxfThing[]): Polyline | null {
  const flags = numberOf(thing, 70);
  const at = (v: DxfThing): Vec3 => [numberOf(v, 10), numberOf(v, 20), numberOf(v, 30)];
  if (flags & 64) return polyface(vertices, at);
  if (flags & 16) return polygonMesh(thing, vertices.map(at), flags);
  // Control points of a spline frame (16) are not on the line.
  const real = vertices.filter((v) => !(numberOf(v, 70) & 16));
  const bulges = real.filter((v) => numberOf(v, 42) !== 0).length;
  const points = real.map(at);
  return finish(flags & 8 ? points : points.map(planeOf(thing)), (flags & 1) === 1, bulges);
}

function finish(points: readonly Vec3[], closed: boolean, bulges: number): Polyline | null {
  if (!points.every(isFinite3)) return null;
  const last = points.at(-1);
  // A loop that repeats its first point is closed whether it says so or not.
  const repeats = points.length > 3 && last !== undefined && points[0]!.every((v, k) => v === last[k]);
  return { points: repeats ? points.slice(0, -1) : points, closed: closed || repeats, bulges, faces: [] };
}

/** Vertices (flag 64) first, then faces (128 alone) of up to four indices from 1; a negative one hides its edge. */
function polyface(vertices: readonly DxfThing[], at: (v: DxfThing) => Vec3): Polyline | null {
  const points = vertices.filter((v) => numberOf(v, 70) & 64).map(at);
  const faces: Vec3[][] = [];
  for (const face of vertices.filter((v) => (numberOf(v, 70) & 192) === 128)) {
    const indices = [71, 72, 73, 74].map((code) => Math.abs(numberOf(face, code))).filter((i) => i !== 0);
    const loop = indices.map((i) => points[i - 1]);
    if (loop.some((p) => !p || !isFinite3(p))) return null;
    if (loop.length >= 3) faces.push(loop as Vec3[]);
  }
  return { points: [], closed: false, bulges: 0, faces };
}

/** M by N vertices (71, 72), closed in M (flag 1) or N (flag 32); smoothed ones are not read. */
function polygonMesh(thing: DxfThing, points: readonly Vec3[], flags: number): Polyline | null {
  const [m, n] = [numberOf(thing, 71), numberOf(thing, 72)];
  if (!(m >= 2 && n >= 2) || m * n !== points.length || !points.every(isFinite3)) return null;
  const faces: Vec3[][] = [];
  const at = (i: number, j: number): Vec3 => points[(i % m) * n + (j % n)]!;
  for (let i = 0; i < (flags & 1 ? m : m - 1); i++)
    for (let j = 0; j < (flags & 32 ? n : n - 1); j++)
      faces.push([at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)]);
  return { points: [], closed: false, bulges: 0, faces };
}
