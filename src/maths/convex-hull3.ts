import { seededRandom } from './random.js';
import type { Vec3 } from './vec3.js';

/** Triangles of a hull as indices into its points, anticlockwise seen from outside, and a plane n·p = d for each (n unit, outward). */
export interface Hull3 {
  readonly points: readonly Vec3[];
  readonly faces: readonly (readonly [number, number, number])[];
  /** nx, ny, nz, d a face. */
  readonly planes: Float64Array;
  readonly volume: number;
}

/** Share of the extent by which points are moved so that no four are coplanar: far below any length that is made. */
const JITTER = 1e-7;

/**
 * Convex hull of points in space by insertion, O(points x faces); null where they span no volume.
 *
 * The points are first moved by a fixed pseudo-random 1e-7 of their extent, which puts them in general position: rings of coplanar
 * corners, the usual input here, then need no special case. The hull's planes are off by as much.
 */
export function convexHull3(input: readonly Vec3[]): Hull3 | null {
  const n = input.length;
  if (n < 4) return null;
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  for (const p of input)
    for (let k = 0; k < 3; k++) {
      low[k] = Math.min(low[k]!, p[k]!);
      high[k] = Math.max(high[k]!, p[k]!);
    }
  const extent = Math.max(high[0]! - low[0]!, high[1]! - low[1]!, high[2]! - low[2]!);
  if (!(extent > 0)) return null;
  const random = seededRandom(7);
  const move = (): number => (random() - 0.5) * 2 * JITTER * extent;
  const points = input.map((p): Vec3 => [p[0] + move(), p[1] + move(), p[2] + move()]);
  const start = firstTetrahedron(points, extent);
  if (!start) return null;

  const [a, b, c, d] = start;
  const at = new Float64Array(3 * n);
  points.forEach((p, i) => {
    at.set(p, 3 * i);
  });
  const faces = new FaceList(at);
  faces.add(a, b, c);
  faces.add(a, c, d);
  faces.add(a, d, b);
  faces.add(b, d, c);
  const edges = new Set<number>();
  for (let p = 0; p < n; p++) {
    if (p === a || p === b || p === c || p === d) continue;
    const visible = faces.takeVisible(at[3 * p]!, at[3 * p + 1]!, at[3 * p + 2]!);
    if (visible.length === 0) continue;
    // An edge of one visible face whose reverse belongs to no visible face lies on the horizon.
    edges.clear();
    for (let k = 0; k < visible.length; k += 3)
      for (let m = 0; m < 3; m++) edges.add(visible[k + m]! * n + visible[k + ((m + 1) % 3)]!);
    for (let k = 0; k < visible.length; k += 3)
      for (let m = 0; m < 3; m++) {
        const u = visible[k + m]!;
        const v = visible[k + ((m + 1) % 3)]!;
        if (!edges.has(v * n + u)) faces.add(u, v, p);
      }
  }
  const corners: [number, number, number][] = [];
  let volume = 0;
  for (let f = 0; f < faces.count; f++) {
    const [i, j, k] = [faces.corners[3 * f]!, faces.corners[3 * f + 1]!, faces.corners[3 * f + 2]!];
    corners.push([i, j, k]);
    volume += triple(points[i]!, points[j]!, points[k]!) / 6;
  }
  return { points, faces: corners, planes: faces.planes.slice(0, 4 * faces.count), volume };
}

/** Triangles over points, three corners and a plane n·p = d each, in the order in which they were added. */
class FaceList {
  count = 0;
  corners = new Int32Array(3 * 64);
  planes = new Float64Array(4 * 64);
  readonly #at: Float64Array;

  constructor(at: Float64Array) {
    this.#at = at;
  }

  add(a: number, b: number, c: number): void {
    const f = this.count++;
    if (3 * f === this.corners.length) {
      this.corners = grown(this.corners, new Int32Array(6 * f));
      this.planes = grown(this.planes, new Float64Array(8 * f));
    }
    this.corners[3 * f] = a;
    this.corners[3 * f + 1] = b;
    this.corners[3 * f + 2] = c;
    setPlane(this.planes, 4 * f, this.#at, 3 * a, 3 * b, 3 * c);
  }

  /** Takes out the faces that see a point; their corners, three a face. The others keep their order. */
  takeVisible(x: number, y: number, z: number): number[] {
    const { planes, corners } = this;
    const visible: number[] = [];
    let kept = 0;
    for (let f = 0; f < this.count; f++) {
      const k = 4 * f;
      if (planes[k]! * x + planes[k + 1]! * y + planes[k + 2]! * z > planes[k + 3]!) {
        visible.push(corners[3 * f]!, corners[3 * f + 1]!, corners[3 * f + 2]!);
        continue;
      }
      if (kept < f) {
        corners.copyWithin(3 * kept, 3 * f, 3 * f + 3);
        planes.copyWithin(4 * kept, k, k + 4);
      }
      kept++;
    }
    this.count = kept;
    return visible;
  }
}

function grown<T extends Int32Array | Float64Array>(from: T, to: T): T {
  to.set(from);
  return to;
}

/** n = (q - p) x (r - p) / |...| and d = n·p of the points at p, q and r of `at`. */
function setPlane(into: Float64Array, k: number, at: Float64Array, p: number, q: number, r: number): void {
  const ux = at[q]! - at[p]!;
  const uy = at[q + 1]! - at[p + 1]!;
  const uz = at[q + 2]! - at[p + 2]!;
  const vx = at[r]! - at[p]!;
  const vy = at[r + 1]! - at[p + 1]!;
  const vz = at[r + 2]! - at[p + 2]!;
  const nx = uy * vz - uz * vy;
  const ny = uz * vx - ux * vz;
  const nz = ux * vy - uy * vx;
  const l = Math.hypot(nx, ny, nz) || 1;
  into[k] = nx / l;
  into[k + 1] = ny / l;
  into[k + 2] = nz / l;
  into[k + 3] = into[k]! * at[p]! + into[k + 1]! * at[p + 1]! + into[k + 2]! * at[p + 2]!;
}

const triple = (a: Vec3, b: Vec3, c: Vec3): number =>
  a[0] * (b[1] * c[2] - b[2] * c[1]) + a[1] * (b[2] * c[0] - b[0] * c[2]) + a[2] * (b[0] * c[1] - b[1] * c[0]);

/** Four points that span a volume, wound so that each face looks outward; null where all lie nearly in a plane. */
function firstTetrahedron(points: readonly Vec3[], extent: number): [number, number, number, number] | null {
  const flat = 1e-5 * extent;
  const farthest = (measure: (p: Vec3) => number): number => {
    let best = 0;
    for (let i = 1; i < points.length; i++) if (measure(points[i]!) > measure(points[best]!)) best = i;
    return best;
  };
  const a = 0;
  const A = points[a]!;
  const away = (p: Vec3): Vec3 => [p[0] - A[0], p[1] - A[1], p[2] - A[2]];
  const b = farthest((p) => Math.hypot(...away(p)));
  const [ex, ey, ez] = away(points[b]!);
  const el = Math.hypot(ex, ey, ez);
  if (el < flat) return null;
  const offLine = (p: Vec3): number => {
    const [x, y, z] = away(p);
    return Math.hypot(ey * z - ez * y, ez * x - ex * z, ex * y - ey * x) / el;
  };
  const c = farthest(offLine);
  if (offLine(points[c]!) < flat) return null;
  const f = new Float64Array(4);
  setPlane(f, 0, Float64Array.from([...points[a]!, ...points[b]!, ...points[c]!]), 0, 3, 6);
  const height = (p: Vec3): number => f[0]! * p[0] + f[1]! * p[1] + f[2]! * p[2] - f[3]!;
  const d = farthest((p) => Math.abs(height(p)));
  if (Math.abs(height(points[d]!)) < flat) return null;
  return height(points[d]!) < 0 ? [a, b, c, d] : [a, c, b, d];
}
