import type { Vec3 } from '../maths/vec3.js';

/** A closed mesh as its corners and triangles, anticlockwise seen from outside. */
export interface ClosedMesh {
  readonly positions: Float32Array;
  readonly triangles: Uint32Array;
}

/** Sections of a closed mesh square to one direction, mm²: of each plane, the part that the axis runs through. */
export interface Sections {
  /**
   * Area of the section at a distance from `middle`: of its parts the one that the axis meets or lies in a hole of, else the one
   * nearest to the axis; 0 where the plane meets nothing. Of that part only what lies `within` so much of the axis along u and along
   * v counts. `beside` moves the axis along u and v.
   */
  at(distance: number, within: number, beside?: readonly [number, number]): number;
}

/**
 * Cuts a mesh across an axis. Every edge that a plane crosses is passed down by one of its triangles and up by the other, so the
 * crossings of a closed mesh chain into closed loops; a loop round a hole runs the other way and its area is negative.
 *
 * @param middle a point of the axis
 * @param direction unit vector along the axis
 * @param u, v unit vectors square to it and to each other
 */
export function sectionsAcross(mesh: ClosedMesh, middle: Vec3, direction: Vec3, u: Vec3, v: Vec3): Sections {
  const { positions: p, triangles: t } = mesh;
  const n = p.length / 3;
  const along = (i: number, d: Vec3): number =>
    (p[3 * i]! - middle[0]) * d[0] + (p[3 * i + 1]! - middle[1]) * d[1] + (p[3 * i + 2]! - middle[2]) * d[2];
  const height = Float64Array.from({ length: n }, (_, i) => along(i, direction));
  return {
    at(distance, within, beside = [0, 0]) {
      // From the edge that a triangle goes down by to the one it comes up by; an edge is named by its corners, lower index first.
      const next = new Map<number, number>();
      const name = (i: number, j: number): number => (i < j ? i * n + j : j * n + i);
      for (let k = 0; k < t.length; k += 3) {
        const [a, b, c] = [t[k]!, t[k + 1]!, t[k + 2]!];
        const [high, mid, low] = [height[a]! >= distance, height[b]! >= distance, height[c]! >= distance];
        if (high === mid && mid === low) continue;
        const down = high && !mid ? name(a, b) : mid && !low ? name(b, c) : name(c, a);
        const up = !high && mid ? name(a, b) : !mid && low ? name(b, c) : name(c, a);
        next.set(down, up);
      }
      return partAtAxis(
        loopsOf(next, (edge) => {
          const [i, j] = [Math.floor(edge / n), edge % n];
          const share = (distance - height[i]!) / (height[j]! - height[i]!);
          const [xi, yi] = [along(i, u), along(i, v)];
          return [xi + share * (along(j, u) - xi) - beside[0], yi + share * (along(j, v) - yi) - beside[1]];
        }),
        within,
      );
    },
  };
}

interface Loop {
  /** x, y a corner. */
  readonly points: Float64Array;
  readonly area: number;
}

function loopsOf(next: Map<number, number>, place: (edge: number) => readonly [number, number]): Loop[] {
  const loops: Loop[] = [];
  let total = 0;
  for (const start of next.keys()) {
    const points: number[] = [];
    for (let edge: number | undefined = start; edge !== undefined; ) {
      const to = next.get(edge);
      if (to === undefined) break;
      next.delete(edge);
      points.push(...place(edge));
      edge = to;
    }
    const area = areaOf(points);
    total += area;
    loops.push({ points: Float64Array.from(points), area });
  }
  // Seen from the other side all loops run the other way round: plastic counts as positive.
  return total >= 0 ? loops : loops.map((l) => ({ points: l.points, area: -l.area }));
}

/** A loop cut off at a square about the axis, side after side (Sutherland and Hodgman 1974); its area is right where it falls apart. */
function clipped(points: ArrayLike<number>, half: number): ArrayLike<number> {
  let loop = points;
  for (const [axis, sense] of [
    [0, 1],
    [0, -1],
    [1, 1],
    [1, -1],
  ] as const) {
    const kept: number[] = [];
    const n = loop.length;
    for (let i = 0; i < n; i += 2) {
      const j = (i + 2) % n;
      const [a, b] = [half - sense * loop[i + axis]!, half - sense * loop[j + axis]!];
      if (a >= 0) kept.push(loop[i]!, loop[i + 1]!);
      if (a >= 0 !== b >= 0) {
        const t = a / (a - b);
        kept.push(loop[i]! + t * (loop[j]! - loop[i]!), loop[i + 1]! + t * (loop[j + 1]! - loop[i + 1]!));
      }
    }
    loop = kept;
  }
  return loop;
}

function areaOf(points: ArrayLike<number>): number {
  let twice = 0;
  const n = points.length;
  for (let i = 0; i < n; i += 2) {
    const j = (i + 2) % n;
    twice += points[i]! * points[j + 1]! - points[j]! * points[i + 1]!;
  }
  return twice / 2;
}

function partAtAxis(loops: readonly Loop[], within: number): number {
  const rims = loops.filter((l) => l.area > 0);
  const smallestRound = (x: number, y: number): Loop | null =>
    rims.reduce<Loop | null>((best, l) => (contains(l, x, y) && (!best || l.area < best.area) ? l : best), null);
  const rim =
    smallestRound(0, 0) ??
    rims.reduce<Loop | null>((best, l) => (!best || awayFrom(l) < awayFrom(best) ? l : best), null);
  if (!rim) return 0;
  const counted = (l: Loop): number => Math.sign(l.area) * Math.abs(areaOf(clipped(l.points, within)));
  let area = counted(rim);
  for (const hole of loops)
    if (hole.area < 0 && smallestRound(hole.points[0]!, hole.points[1]!) === rim) area += counted(hole);
  return area;
}

/** Whether a point lies in a loop: crossings of a ray to the right. */
function contains({ points }: Loop, x: number, y: number): boolean {
  let inside = false;
  const n = points.length;
  for (let i = 0, j = n - 2; i < n; j = i, i += 2) {
    const [ax, ay, bx, by] = [points[i]!, points[i + 1]!, points[j]!, points[j + 1]!];
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
  }
  return inside;
}

function awayFrom({ points }: Loop): number {
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < points.length; i += 2) least = Math.min(least, Math.hypot(points[i]!, points[i + 1]!));
  return least;
}
