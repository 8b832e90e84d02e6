import { convexParts } from '../../maths/polygon/convex-parts.js';
import { coverRing } from '../../maths/polygon/cover.js';
import type { Region } from '../../maths/polygon/depth.js';
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
  /** Regions of a pose that a search made in passing: they go with it; null: a pose that is kept, whose regions the store holds. */
  readonly passing: Map<number, Region> | null;
}

/** One outline, however many panels have it. */
export interface Shape {
  /** What is kept clear: the outline, or a cover of it with fewer corners. */
  readonly ring: Ring;
  /** The outline itself where `ring` is a cover; else null. */
  readonly exact: Ring | null;
  readonly parts: readonly Ring[];
  /** Of the outline itself, mm². */
  readonly area: number;
  /** Degrees; null: any. */
  readonly rotations: readonly number[] | null;
  /** Poses that a search draws from at random; the exact angles allowed, or edge-aligned ones where any is. */
  readonly poses: Pose[];
  /** A pose at any angle, in degrees, that nobody keeps; null where the outline may not turn freely, or a search does without. */
  readonly turned: ((degrees: number) => Pose) | null;
}

/** Makes poses and gives each its number; a pose asked for twice is the same object. */
export interface PoseMaker {
  /** `exact`: the outline itself is kept clear, however many corners it has. */
  shape(ring: Ring, rotations: readonly number[] | null, exact?: boolean): Shape;
  pose(shape: Shape, degrees: number): Pose;
}

/** @param turning whether freely turning outlines get poses at other than edge-aligned angles */
export function poseMaker(turning: boolean): PoseMaker {
  let count = 0;
  const known = new Map<Shape, Map<number, Pose>>();
  const poseAt = (shape: Shape, angle: number, passing: Pose['passing']): Pose => {
    const turned = (ring: Ring): Ring => turnedRing(ring, angle);
    const ring = turned(shape.ring);
    return {
      id: count++,
      shape,
      degrees: angle,
      ring,
      parts: shape.parts.map(turned),
      box: boundsOf(ring),
      passing,
    };
  };
  const pose = (shape: Shape, degrees: number): Pose => {
    let ofShape = known.get(shape);
    if (!ofShape) {
      ofShape = new Map();
      known.set(shape, ofShape);
    }
    const angle = ((degrees % 360) + 360) % 360;
    const found = ofShape.get(angle);
    if (found) return found;
    const made = poseAt(shape, angle, null);
    ofShape.set(angle, made);
    return made;
  };
  const shape = (ring: Ring, rotations: readonly number[] | null, exact = false): Shape => {
    const cover = exact ? ring : coverOf(ring);
    const parts = convexParts(cover);
    const made: Shape = {
      ring: cover,
      exact: cover === ring ? null : ring,
      parts,
      area: signedArea(ring),
      rotations,
      poses: [],
      turned:
        turning && rotations === null && parts.length <= TURNED_PARTS
          ? (degrees) => poseAt(made, ((degrees % 360) + 360) % 360, new Map())
          : null,
    };
    for (const degrees of rotations ?? alignedAngles(cover, parts.length > 1 ? FEW_ALIGNED : MOST_ALIGNED)) {
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

/** Outlines of more corners than this are nested by a cover, and a cover that stays concave has at most so many. */
const PLAIN_CORNERS = 40;
/** How far a cover may reach beyond its outline, as a share of the outline's size; and how much larger a hull may be. */
const COVER_REACH = 0.005;
const HULL_SHARE = 0.03;

/** Rounded corners and notches cost the search dearly and gain it nothing: a cover stands in for them. */
function coverOf(ring: Ring): Ring {
  if (ring.length / 2 <= PLAIN_CORNERS) return ring;
  const [x0, y0, x1, y1] = boundsOf(ring);
  const reach = COVER_REACH * Math.max(x1 - x0, y1 - y0);
  return coverRing(ring, PLAIN_CORNERS / 2, reach, HULL_SHARE);
}

/** Outlines of more convex parts than this are turned to their edge-aligned angles alone: a no-fit region of theirs costs too much. */
const TURNED_PARTS = 3;

/** Most angles that a freely turning outline is tried at, convex and concave: the latter's no-fit regions are dear. */
const MOST_ALIGNED = 24;
const FEW_ALIGNED = 8;

/** Angles in degrees that lay an edge of the outline along a side of the sheet, longest edges first. */
function alignedAngles(ring: Ring, most: number): number[] {
  if (isRound(ring)) return [0];
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
      if (!near && angles.length < most)
        angles.push(Math.abs(degrees - Math.round(degrees)) < 1e-9 ? Math.round(degrees) % 360 : degrees);
    }
  return angles;
}

/** Whether turning changes nothing: the widths in all directions agree to a hundredth. */
function isRound(ring: Ring): boolean {
  const widths = Array.from({ length: 12 }, (_, k) => {
    const [x0, , x1] = boundsOf(movedRing(ring, (k * Math.PI) / 12, 0, 0));
    return x1 - x0;
  });
  return ring.length >= 24 && Math.max(...widths) < 1.01 * Math.min(...widths);
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
