import { dot, subtract, type Vec3 } from '../maths/vec3.js';

/**
 * One saw cut at a strut's end, rad.
 *
 * Convention: the strut lies on the saw with its local z up and its local y across the table; x points out of the strut at
 * the end that is cut, so that y lies to the left of x seen from above at the second end and to the right at the first.
 * Mitre turns the table about z, positive where the cut's outside turns towards +y; bevel tilts the blade, positive where
 * the cut's outside leans up. Both are 0 for a square cut.
 */
export interface SawCut {
  readonly mitre: number;
  readonly bevel: number;
  /** Index of the neighbour whose face it meets. */
  readonly against: number;
}

export interface FaceJointEnd {
  /** Cuts that the end needs, the largest face first. */
  readonly cuts: readonly SawCut[];
  /** From the node to the end's farthest point along the axis, mm: negative where it reaches past the node. */
  readonly longPoint: number;
}

/** Faces smaller than this share of the section are no cut: round-off of coincident planes. */
const LEAST_FACE = 1e-6;

/**
 * The end of a rectangular strut that meets its neighbours face to face, each pair in the plane midway between their axes.
 *
 * A neighbour in direction d_j leaves this strut, in direction d, the half-space p.(d - d_j) >= 0: in the strut's section the
 * plane x = -(n.Y y + n.Z z) / n.d, n = d - d_j. The end is the upper envelope of all these planes over the section;
 * a plane that is nowhere uppermost is no cut. `direction` and `others` are unit vectors from the node; `y` and `z` the
 * strut's local axes; `width` along y, `height` along z. A neighbour in the same direction is left out: nothing parts the two.
 */
export function faceJointEnd(
  direction: Vec3,
  y: Vec3,
  z: Vec3,
  width: number,
  height: number,
  others: readonly Vec3[],
): FaceJointEnd {
  const planes = others.flatMap((other, against) => {
    const n = subtract(direction, other);
    const along = dot(n, direction);
    if (along < SAME_DIRECTION) return [];
    const [ny, nz] = [dot(n, y), dot(n, z)];
    return [{ against, along, ny, nz, a: -ny / along, b: -nz / along }];
  });
  const section: Corner[] = [
    [-width / 2, -height / 2],
    [width / 2, -height / 2],
    [width / 2, height / 2],
    [-width / 2, height / 2],
  ];
  let longPoint = Infinity;
  const faces = planes.map((plane, i) => {
    let face = section;
    planes.forEach((other, j) => {
      if (i === j) return;
      // Of coincident planes the first one counts.
      const [a, b] = [plane.a - other.a, plane.b - other.b];
      if (Math.abs(a) + Math.abs(b) < SAME_DIRECTION) face = j < i ? [] : face;
      else face = clip(face, a, b);
    });
    const area = areaOf(face);
    if (area > LEAST_FACE * width * height)
      for (const [u, v] of face) longPoint = Math.min(longPoint, plane.a * u + plane.b * v);
    return { plane, area };
  });
  const cuts = faces
    .filter((f) => f.area > LEAST_FACE * width * height)
    .sort((p, q) => q.area - p.area || p.plane.against - q.plane.against)
    .map(({ plane }): SawCut => {
      // The cut's outside looks to the node, against n; x out of the strut is -direction.
      const size = Math.hypot(plane.along, plane.ny, plane.nz);
      return {
        mitre: Math.atan2(-plane.ny, plane.along),
        bevel: Math.asin(-plane.nz / size),
        against: plane.against,
      };
    });
  return { cuts, longPoint: longPoint === Infinity ? 0 : longPoint };
}

type Corner = readonly [number, number];

/** Two unit vectors whose difference is below this are one direction. */
const SAME_DIRECTION = 1e-9;

/** The part of a convex polygon where a u + b v >= 0 (Sutherland and Hodgman, Comm. ACM 17, 1974). */
function clip(polygon: readonly Corner[], a: number, b: number): Corner[] {
  const out: Corner[] = [];
  polygon.forEach((p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    const [f, g] = [a * p[0] + b * p[1], a * q[0] + b * q[1]];
    if (f >= 0) out.push(p);
    if (f * g < 0) {
      const t = f / (f - g);
      out.push([p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])]);
    }
  });
  return out;
}

function areaOf(polygon: readonly Corner[]): number {
  let twice = 0;
  polygon.forEach((p, i) => {
    const q = polygon[(i + 1) % polygon.length]!;
    twice += p[0] * q[1] - q[0] * p[1];
  });
  return Math.abs(twice) / 2;
}
