import { convexHull2 } from '../maths/convex-hull2.js';
import { smallestBox } from '../maths/smallest-box.js';
import { addScaled, cross, dot, negate, normalise, perpendicular, scale, type Vec3 } from '../maths/vec3.js';
import type { Job } from '../model/job/index.js';
import type { Manifold } from './kernel.js';

/** How a solid lies on the bed. */
export interface Lie {
  /** The solid's direction that points up on the printer. */
  readonly up: Vec3;
  /** The level direction that becomes x: that of the smallest box round the footprint. */
  readonly level: Vec3;
  readonly contact: number;
  /** Stands safely on a face of its own; else it needs a raft. */
  readonly stable: boolean;
}

/** Struts by direction and the tension in them, N: tension across layers is what print orientation must avoid. */
export interface Pull {
  readonly direction: Vec3;
  readonly tension: number;
}

/** Least area on the bed, mm²: less does not hold while it prints. */
const LEAST_CONTACT = 10;
/** A face counts as on the bed within this much, mm, and this much of its direction. */
const ON_BED = 0.02;
const ALIKE = 1 - 1e-5;
/** Candidates that are weighed: the largest faces of the hull. */
const CANDIDATES = 24;
const STEEPEST = Math.SQRT1_2;

/**
 * The print orientation of least cost: weight x share of the surface that overhangs, plus weight x height over the largest extent,
 * plus weight x mean squared sine of the pull's angle to the layers. Candidates are the largest faces of the solid's hull on which it
 * stands with at least 10 mm² and its middle of mass over them; where there are none, the faces of the hull that it can balance on.
 */
export function chooseLie(
  solid: Manifold,
  pulls: readonly Pull[],
  weights: Job['nodes']['orientation'],
  fits: (box: readonly [number, number, number]) => boolean = () => true,
): Lie {
  const surface = surfaceOf(solid);
  const hull = solid.hull();
  const faces = hullFaces(hull);
  const hullCorners = pointsOf(hull);
  hull.delete();
  let best: Lie | null = null;
  let bestCost = Number.POSITIVE_INFINITY;
  for (const face of faces.slice(0, CANDIDATES)) {
    const up = negate(face.normal);
    const { contact, overhang, height, stable, width, depth, level } = weigh(surface, hullCorners, up);
    const raft = stable && contact >= LEAST_CONTACT ? 0 : RAFT;
    const cost =
      raft +
      (fits([width, depth, height]) ? 0 : TOO_LARGE) +
      (weights.overhang * overhang) / surface.area +
      (weights.height * height) / surface.extent +
      weights.tension * acrossLayers(pulls, up) -
      1e-3 * Math.min(1, contact / 200);
    if (cost < bestCost - 1e-9) {
      bestCost = cost;
      best = { up, level, contact, stable: raft === 0 };
    }
  }
  return best ?? { up: [0, 0, 1], level: [1, 0, 0], contact: 0, stable: false };
}

/** A lie that needs a raft is taken only when there is no other; so is one that no printer can hold. */
const RAFT = 10;
const TOO_LARGE = 100;

/** Mean of sin² of the angle between pull and layers, weighted by tension; struts in compression do not count. */
function acrossLayers(pulls: readonly Pull[], up: Vec3): number {
  let [sum, total] = [0, 0];
  for (const p of pulls) {
    const t = Math.max(0, p.tension);
    sum += t * dot(p.direction, up) ** 2;
    total += t;
  }
  return total > 0 ? sum / total : 0;
}

interface Surface {
  readonly positions: Float32Array;
  readonly triangles: Uint32Array;
  /** nx, ny, nz, area a triangle. */
  readonly normals: Float64Array;
  readonly area: number;
  readonly extent: number;
  readonly middle: Vec3;
}

function surfaceOf(solid: Manifold): Surface {
  const { vertProperties: positions, triVerts: triangles } = solid.getMesh();
  const count = triangles.length / 3;
  const normals = new Float64Array(4 * count);
  let area = 0;
  let [mx, my, mz, volume] = [0, 0, 0, 0];
  for (let t = 0; t < count; t++) {
    const [a, b, c] = corners(positions, triangles, t);
    const n = cross([b[0] - a[0], b[1] - a[1], b[2] - a[2]], [c[0] - a[0], c[1] - a[1], c[2] - a[2]]);
    const twice = Math.hypot(n[0], n[1], n[2]);
    if (twice > 0) normals.set([n[0] / twice, n[1] / twice, n[2] / twice, twice / 2], 4 * t);
    area += twice / 2;
    const v = dot(a, cross(b, c));
    volume += v;
    mx += v * (a[0] + b[0] + c[0]);
    my += v * (a[1] + b[1] + c[1]);
    mz += v * (a[2] + b[2] + c[2]);
  }
  const box = solid.boundingBox();
  const extent = Math.max(1e-9, ...[0, 1, 2].map((k) => box.max[k]! - box.min[k]!));
  const s = volume !== 0 ? 1 / (4 * volume) : 0;
  return { positions, triangles, normals, area: area || 1, extent, middle: [mx * s, my * s, mz * s] };
}

function corners(positions: Float32Array, triangles: Uint32Array, t: number): [Vec3, Vec3, Vec3] {
  const at = (k: number): Vec3 => {
    const i = 3 * triangles[3 * t + k]!;
    return [positions[i]!, positions[i + 1]!, positions[i + 2]!];
  };
  return [at(0), at(1), at(2)];
}

interface Weighed {
  readonly contact: number;
  readonly overhang: number;
  readonly height: number;
  readonly stable: boolean;
  /** Smallest box round the footprint, and the direction of its width. */
  readonly width: number;
  readonly depth: number;
  readonly level: Vec3;
}

function weigh(surface: Surface, corners: readonly Vec3[], up: Vec3): Weighed {
  const { positions, triangles, normals } = surface;
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  const levels = new Float64Array(positions.length / 3);
  for (let i = 0; i < levels.length; i++) {
    const h = up[0] * positions[3 * i]! + up[1] * positions[3 * i + 1]! + up[2] * positions[3 * i + 2]!;
    levels[i] = h;
    low = Math.min(low, h);
    high = Math.max(high, h);
  }
  const x = perpendicular(up);
  const y = cross(up, x);
  let [contact, overhang] = [0, 0];
  const feet: [number, number][] = [];
  for (let t = 0; 4 * t < normals.length; t++) {
    const down = -(normals[4 * t]! * up[0] + normals[4 * t + 1]! * up[1] + normals[4 * t + 2]! * up[2]);
    if (down < STEEPEST) continue;
    const area = normals[4 * t + 3]!;
    const ids = [triangles[3 * t]!, triangles[3 * t + 1]!, triangles[3 * t + 2]!];
    if (down > ALIKE && ids.every((i) => levels[i]! - low < ON_BED)) {
      contact += area;
      for (const i of ids) {
        const p: Vec3 = [positions[3 * i]!, positions[3 * i + 1]!, positions[3 * i + 2]!];
        feet.push([dot(p, x), dot(p, y)]);
      }
    } else overhang += area;
  }
  const middle: [number, number] = [dot(surface.middle, x), dot(surface.middle, y)];
  const footprint = smallestBox(convexHull2(corners.map((p): [number, number] => [dot(p, x), dot(p, y)])));
  return {
    contact,
    overhang,
    height: high - low,
    stable: contains(convexHull2(feet), middle),
    width: footprint.width,
    depth: footprint.depth,
    level: addScaled(scale(x, footprint.direction[0]), y, footprint.direction[1]),
  };
}

function contains(hull: readonly (readonly [number, number])[], p: readonly [number, number]): boolean {
  return (
    hull.length >= 3 &&
    hull.every((a, i) => {
      const b = hull[(i + 1) % hull.length]!;
      return (b[0] - a[0]) * (p[1] - a[1]) - (b[1] - a[1]) * (p[0] - a[0]) >= 0;
    })
  );
}

function pointsOf(solid: Manifold): Vec3[] {
  const { vertProperties: p } = solid.getMesh();
  return Array.from({ length: p.length / 3 }, (_, i): Vec3 => [p[3 * i]!, p[3 * i + 1]!, p[3 * i + 2]!]);
}

/** Faces of a convex solid, coplanar triangles together, largest first. */
function hullFaces(hull: Manifold): { normal: Vec3; area: number }[] {
  const { vertProperties, triVerts } = hull.getMesh();
  const faces: { normal: Vec3; area: number }[] = [];
  for (let t = 0; 3 * t < triVerts.length; t++) {
    const [a, b, c] = corners(vertProperties, triVerts, t);
    const n = cross([b[0] - a[0], b[1] - a[1], b[2] - a[2]], [c[0] - a[0], c[1] - a[1], c[2] - a[2]]);
    const area = Math.hypot(n[0], n[1], n[2]) / 2;
    if (!(area > 0)) continue;
    const normal = normalise(n);
    const same = faces.find((f) => dot(f.normal, normal) > ALIKE);
    if (same) same.area += area;
    else faces.push({ normal, area });
  }
  return faces.sort((p, q) => q.area - p.area);
}
