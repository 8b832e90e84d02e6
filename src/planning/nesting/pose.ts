import { convexParts } from '../../maths/polygon/convexParts.js';
import { boundsOf, movedRing, type Ring, signedArea } from '../../maths/polygon/ring.js';

/** A panel's outline turned about its own 0,0: what the search moves about, never mirrored. */
export interface Pose {
  /** Counts up from 0 in the order of making; the key of the store of no-fit regions. */
  readonly id: number;
  readonly shape: Shape;
  readonly degrees: number;
  readonly ring: Ring;
  readonly parts: readonly Ring[];
  readonly box: readonly [number, number, number, number];
}

/** One outline, however many panels have it. */
export interface Shape {
  readonly ring: Ring;
  readonly parts: readonly Ring[];
  readonly area: number;
  /** Degrees; null: any. */
  readonly rotations: readonly number[] | null;
  /** Poses that a search draws from at random; the exact angles allowed, or edge-aligned ones where any is. */
  readonly poses: Pose[];
}

/** Makes poses and gives each its number; a pose asked for twice is the same object. */
export interface PoseMaker {
  shape(ring: Ring, rotations: readonly number[] | null): Shape;
  pose(shape: Shape, degrees: number): Pose;
}

export function poseMaker(): PoseMaker {
  let count = 0;
  const known = new Map<Shape, Map<number, Pose>>();
  const pose = (shape: Shape, degrees: number): Pose => {
    let ofShape = known.get(shape);
    if (!ofShape) {
      ofShape = new Map();
      known.set(shape, ofShape);
    }
    const angle = ((degrees % 360) + 360) % 360;
    const found = ofShape.get(angle);
    if (found) return found;
    const turned = (ring: Ring): Ring => turnedRing(ring, angle);
    const ring = turned(shape.ring);
    const made: Pose = {
      id: count++,
      shape,
      degrees: angle,
      ring,
      parts: shape.parts.map(turned),
      box: boundsOf(ring),
    };
    ofShape.set(angle, made);
    return made;
  };
  const shape = (ring: Ring, rotations: readonly number[] | null): Shape => {
    const made: Shape = { ring, parts: convexParts(ring), area: signedArea(ring), rotations, poses: [] };
    for (const degrees of rotations ?? alignedAngles(ring)) {
      const p = pose(made, degrees);
      if (!made.poses.includes(p)) made.poses.push(p);
    }
    return made;
  };
  return { shape, pose };
}

/** Quarter turns without the round-off of cos(90°), so that a grid stays a grid. */
function turnedRing(ring: Ring, degrees: number): Ring {
  const quarter = [
    [1, 0],
    [0, 1],
    [-1, 0],
    [0, -1],
  ][degrees / 90];
  if (!quarter) return movedRing(ring, (degrees * Math.PI) / 180, 0, 0);
  const [c, s] = quarter as [number, number];
  const out = new Float64Array(ring.length);
  for (let i = 0; i < ring.length; i += 2) {
    out[i] = c * ring[i]! - s * ring[i + 1]!;
    out[i + 1] = s * ring[i]! + c * ring[i + 1]!;
  }
  return out;
}

/** Most angles that a freely turning outline is tried at before the search turns it further by itself. */
const MOST_ALIGNED = 24;

/** Angles in degrees that lay an edge of the outline along a side of the sheet, longest edges first. */
function alignedAngles(ring: Ring): number[] {
  const n = ring.length;
  const edges: { angle: number; length: number }[] = [];
  for (let i = 0; i < n; i += 2) {
    const [dx, dy] = [ring[(i + 2) % n]! - ring[i]!, ring[(i + 3) % n]! - ring[i + 1]!];
    edges.push({ angle: (-Math.atan2(dy, dx) * 180) / Math.PI, length: Math.hypot(dx, dy) });
  }
  edges.sort((a, b) => b.length - a.length);
  const angles: number[] = [];
  for (const { angle } of edges)
    for (const quarter of [0, 90, 180, 270]) {
      const degrees = (((angle + quarter) % 360) + 360) % 360;
      const near = angles.some((a) => Math.abs(((a - degrees + 540) % 360) - 180) < 1e-6);
      if (!near && angles.length < MOST_ALIGNED)
        angles.push(Math.abs(degrees - Math.round(degrees)) < 1e-9 ? Math.round(degrees) % 360 : degrees);
    }
  return angles;
}

/**
 * An angle in degrees at which a freely turning outline fits a field of w x h mm, or null: looked for every half
 * degree, the likeliest then closed in on (golden section, Kiefer 1953).
 */
export function angleThatFits(ring: Ring, w: number, h: number): number | null {
  const excess = (degrees: number): number => {
    const [x0, y0, x1, y1] = boundsOf(movedRing(ring, (degrees * Math.PI) / 180, 0, 0));
    return Math.max(x1 - x0 - w, y1 - y0 - h);
  };
  let best = 0;
  for (let a = 0; a < 180; a += 0.5) if (excess(a) < excess(best)) best = a;
  let [low, high] = [best - 0.5, best + 0.5];
  const golden = (Math.sqrt(5) - 1) / 2;
  for (let k = 0; k < 60; k++) {
    const [a, b] = [high - golden * (high - low), low + golden * (high - low)];
    if (excess(a) < excess(b)) high = b;
    else low = a;
  }
  const angle = (low + high) / 2;
  return excess(angle) <= 0 ? angle : null;
}
