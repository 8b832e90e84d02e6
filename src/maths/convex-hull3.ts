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
  const live = [
    makeFace(points, a, b, c),
    makeFace(points, a, c, d),
    makeFace(points, a, d, b),
    makeFace(points, b, d, c),
  ];
  const visible: Face[] = [];
  const edges = new Set<number>();
  for (let p = 0; p < n; p++) {
    if (p === a || p === b || p === c || p === d) continue;
    const [x, y, z] = points[p]!;
    visible.length = 0;
    let hidden = 0;
    for (let i = 0; i < live.length; i++) {
      const f = live[i]!;
      if (f.nx * x + f.ny * y + f.nz * z > f.d) visible.push(f);
      else live[hidden++] = f;
    }
    if (visible.length === 0) continue;
    live.length = hidden;
    // An edge of one visible face whose reverse belongs to no visible face lies on the horizon.
    edges.clear();
    for (const f of visible)
      edges
        .add(f.a * n + f.b)
        .add(f.b * n + f.c)
        .add(f.c * n + f.a);
    for (const f of visible) {
      if (!edges.has(f.b * n + f.a)) live.push(makeFace(points, f.a, f.b, p));
      if (!edges.has(f.c * n + f.b)) live.push(makeFace(points, f.b, f.c, p));
      if (!edges.has(f.a * n + f.c)) live.push(makeFace(points, f.c, f.a, p));
    }
  }
  const planes = new Float64Array(4 * live.length);
  let volume = 0;
  live.forEach((f, i) => {
    planes.set([f.nx, f.ny, f.nz, f.d], 4 * i);
    volume += triple(points[f.a]!, points[f.b]!, points[f.c]!) / 6;
  });
  return { points, faces: live.map((f) => [f.a, f.b, f.c] as const), planes, volume };
}

interface Face {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly nx: number;
  readonly ny: number;
  readonly nz: number;
  readonly d: number;
}

function makeFace(points: readonly Vec3[], a: number, b: number, c: number): Face {
  const p = points[a]!;
  const q = points[b]!;
  const r = points[c]!;
  const ux = q[0] - p[0];
  const uy = q[1] - p[1];
  const uz = q[2] - p[2];
  const vx = r[0] - p[0];
  const vy = r[1] - p[1];
  const vz = r[2] - p[2];
  let nx = uy * vz - uz * vy;
  let ny = uz * vx - ux * vz;
  let nz = ux * vy - uy * vx;
  const l = Math.hypot(nx, ny, nz) || 1;
  nx /= l;
  ny /= l;
  nz /= l;
  return { a, b, c, nx, ny, nz, d: nx * p[0] + ny * p[1] + nz * p[2] };
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
  const f = makeFace(points, a, b, c);
  const height = (p: Vec3): number => f.nx * p[0] + f.ny * p[1] + f.nz * p[2] - f.d;
  const d = farthest((p) => Math.abs(height(p)));
  if (Math.abs(height(points[d]!)) < flat) return null;
  return height(points[d]!) < 0 ? [a, b, c, d] : [a, c, b, d];
}
