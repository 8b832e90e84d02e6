import type { Sleeve } from '../detailing/systems/sleeve.js';
import { add, addScaled, cross, dot, length, scale, subtract, type Vec3 } from '../maths/vec3.js';
import type { Job } from '../model/job/index.js';
import type { Channel } from './channels.js';
import { type Lettering, type TextSurface, textSize } from './engraving.js';
import type { HubSpace } from './hub-space.js';

/** A line of text on a sleeve. */
export interface MarkPlace {
  readonly text: string;
  readonly sleeve: number;
  readonly lettering: Lettering;
  /** Maps the text to the sleeve's own axes (y, z, along). */
  readonly surface: TextSurface;
  /** Middle of the side it stands on: angle about the sleeve, rad. */
  readonly side: number;
  /** Half the angle it takes up. */
  readonly halfAngle: number;
  /** From and to along the strut, mm from the node. */
  readonly from: number;
  readonly to: number;
}

/** A part of a sleeve's surface where no mark may stand, as a mark's own. */
export type Taken = Pick<MarkPlace, 'side' | 'halfAngle' | 'from' | 'to'>;

/**
 * Capital height wanted and least legible, stroke and depth by process, mm; seen in published design guides. The stroke shrinks with
 * the letters down to the thinnest groove that stays open: a nozzle's line and a little (common practice, no source).
 */
const LETTERS: Readonly<
  Record<Job['nodes']['process'], { want: number; least: number; stroke: number; thinnest: number; depth: number }>
> = {
  filament: { want: 5, least: 2.4, stroke: 0.8, thinnest: 0.5, depth: 0.4 },
  powder: { want: 3.5, least: 2, stroke: 0.5, thinnest: 0.4, depth: 0.5 },
  resin: { want: 3.5, least: 1.6, stroke: 0.4, thinnest: 0.3, depth: 0.4 },
};

/** Letterings to try on a wall, largest first; none where the wall has nothing to spare. */
export function letteringsFor(job: Job, wall: number, leastWall: number): Lettering[] {
  const letters = LETTERS[job.nodes['process']];
  const depth = Math.min(job.nodes.markDepth_mm ?? letters.depth, wall - leastWall - CHORDS);
  if (depth < LEAST_DEPTH) return [];
  const want = job.nodes.markHeight_mm ?? letters.want;
  return [1, 0.85, 0.7, 0.6, 0.5]
    .map((share) => share * want)
    .filter((h, i) => i === 0 || h >= letters.least)
    .map((capHeight) => ({
      capHeight,
      stroke: Math.max(letters.thinnest, letters.stroke * Math.min(1, capHeight / letters.want)),
      depth,
    }));
}

/** Chords of the polygons that sleeves are made as cost a wall this much, mm. */
const CHORDS = 0.1;
/** Shallower than this a mark does not show, mm; common practice, no source. */
const LEAST_DEPTH = 0.2;
/** Clear of mouth and cone, mm. */
const MARGIN = 0.35;
const SIDES = 24;
/** Clear of other pieces, mm. */
const AIR = 0.3;
/** A line that bends round a sleeve takes up at most this much to either side: what can be read by turning it a little. */
const MOST_HALF_ANGLE = 1.35;

/**
 * A free place on a sleeve for a line of text, the largest letters first: along the strut or round it, on the side that looks most
 * towards `towards`, clear of other pieces, of holes, and of the sides already `taken`. null where no legible size fits.
 *
 * @param groove where a groove round the sleeve starts, along the strut
 * @param crowd whether to begin round the mouth instead of along the middle
 * @param words the line as it reads along the strut, and as it reads round it; null: it does not
 * @param least cosine of the angle to `towards` (a unit vector) that the side may look away by at most
 */
export function placeMark(
  space: HubSpace,
  sleeve: number,
  words: { readonly along: string; readonly round: string | null },
  letterings: readonly Lettering[],
  chamfer: number,
  towards: Vec3,
  taken: readonly Taken[],
  holes: readonly Channel[],
  groove = Number.POSITIVE_INFINITY,
  least = Number.NEGATIVE_INFINITY,
  crowd = false,
): MarkPlace | null {
  const s = space.sleeves[sleeve]!;
  const from = s.coneTop + MARGIN;
  const bolts = s.socket.bolted;
  // A plate is marked between the shoulder and its first bolt.
  const to = bolts ? s.stop + bolts.endDistance - 1.5 * bolts.diameter : Math.min(s.mouth - chamfer, groove) - MARGIN;
  // The flat sides of a rectangle part their marks by themselves.
  const gap = typeof s.outer === 'number' ? APART / s.outer : 0.1;
  for (const lettering of letterings)
    for (const turn of crowd ? (['round', 'along'] as const) : (['along', 'round'] as const)) {
      const text = words[turn];
      if (text === null) continue;
      const { width, height } = textSize(text, lettering);
      const [reach, across] = turn === 'along' ? [width, height] : [height, width];
      if (reach > to - from) continue;
      let best: MarkPlace | null = null;
      let bestScore = Number.NEGATIVE_INFINITY;
      for (const share of crowd ? FROM_MOUTH : FROM_MIDDLE) {
        const middle = from + reach / 2 + share * (to - from - reach);
        const [low, high] = [middle - reach / 2, middle + reach / 2];
        for (const { side, radius, room, halfAngle } of sidesOf(s, across)) {
          if (across > room) continue;
          const score = dot(outwardOf(s, side), towards);
          if (score <= bestScore + 1e-9 || score < least) continue;
          if (taken.some((t) => overlaps(t, side, halfAngle + gap, low, high))) continue;
          const surface = surfaceOf(s, side, radius, middle, turn);
          if (!patchIsFree(space, sleeve, surface, width, height, holes)) continue;
          bestScore = score;
          best = { text, sleeve, lettering, surface, side, halfAngle, from: low, to: high };
        }
        if (best) return best;
      }
    }
  return null;
}

/** Between two marks beside each other round a sleeve, mm: more than between their letters, so that they do not read as one. */
const APART = 1.6;

/** Whether a mark would come within a stroke of what is taken along the strut; `halfAngle` has the gap beside it in it. */
const overlaps = (t: Taken, side: number, halfAngle: number, from: number, to: number): boolean =>
  t.from < to + MARGIN && from < t.to + MARGIN && turnBetween(t.side, side) < t.halfAngle + halfAngle;

/** Where a line is tried between the root, 0, and the mouth, 1. */
const FROM_MIDDLE = [0.5, 1, 0, 0.75, 0.25] as const;
const FROM_MOUTH = [1, 0.75, 0.5, 0.25, 0] as const;

interface Side {
  readonly side: number;
  /** Distance of the surface from the axis. */
  readonly radius: number;
  /** Most that a line may take up across the strut. */
  readonly room: number;
  readonly halfAngle: number;
}

function sidesOf(s: Sleeve, across: number): Side[] {
  const { outer } = s;
  if (typeof outer === 'number')
    return Array.from({ length: SIDES }, (_, k) => ({
      side: (2 * Math.PI * k) / SIDES,
      radius: outer,
      room: 2 * MOST_HALF_ANGLE * outer,
      halfAngle: across / 2 / outer,
    }));
  return [0, 1, 2, 3].map((k) => ({
    side: (Math.PI * k) / 2,
    radius: outer[k % 2]!,
    room: 2 * (outer[(k + 1) % 2]! - MARGIN),
    halfAngle: Math.PI / 4 - 0.1,
  }));
}

const outwardOf = (s: Sleeve, side: number): Vec3 =>
  add(scale(s.socket.y, Math.cos(side)), scale(s.socket.z, Math.sin(side)));

function turnBetween(a: number, b: number): number {
  const d = Math.abs(a - b) % (2 * Math.PI);
  return Math.min(d, 2 * Math.PI - d);
}

/** Text seen from outside the sleeve: along reads towards the mouth, round has its top towards the mouth. */
function surfaceOf(s: Sleeve, side: number, radius: number, middle: number, turn: 'along' | 'round'): TextSurface {
  const bends = typeof s.outer === 'number';
  const [c, n] = [Math.cos(side), Math.sin(side)];
  return (x, y, height) => {
    const [across, along] = turn === 'round' ? [x, y] : [-y, x];
    const r = radius + height;
    if (bends) {
      const angle = side + across / radius;
      return [r * Math.cos(angle), r * Math.sin(angle), middle + along];
    }
    // Across a flat side runs square to its outward direction, anticlockwise about the strut.
    return [c * r - n * across, n * r + c * across, middle + along];
  };
}

function patchIsFree(
  space: HubSpace,
  sleeve: number,
  surface: TextSurface,
  width: number,
  height: number,
  holes: readonly Channel[],
): boolean {
  const { direction: d, y, z } = space.sleeves[sleeve]!.socket;
  for (let i = 0; i <= 8; i++)
    for (let j = 0; j <= 4; j++) {
      const [a, b, along] = surface((i / 8 - 0.5) * width, (j / 4 - 0.5) * height, 0.2);
      const p = addScaled(addScaled(scale(d, along), y, a), z, b);
      if (holes.some((h) => nearHole(h, p))) return false;
      if (i % 2 === 0 && j % 2 === 0 && !space.free(p, AIR, sleeve)) return false;
    }
  return true;
}

/** Whether a point lies in a hole or within a stroke of its rim. */
function nearHole(hole: Channel, p: Vec3): boolean {
  const away = subtract(p, hole.from);
  const along = dot(away, hole.direction);
  if (along < -AIR || along > hole.length + AIR) return false;
  return length(addScaled(away, hole.direction, -along)) < hole.radius + RIM;
}

/** Half the distance of the points that are looked at, and a little, mm. */
const RIM = 0.9;

/** A direction square to a strut that looks as much as may be towards `wanted`. */
export function sideTowards(direction: Vec3, wanted: Vec3): Vec3 {
  return cross(cross(direction, wanted), direction);
}
