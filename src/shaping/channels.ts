import { SCREW } from '../detailing/systems/clamp-parts.js';
import type { Sleeve } from '../detailing/systems/sleeve.js';
import { add, addScaled, dot, scale, type Vec3 } from '../maths/vec3.js';
import { BODY, type HubSpace } from './hub-space.js';

/** A round hole through a hub: a vent or a pin. Relative to the node, mm. */
export interface Channel {
  readonly from: Vec3;
  /** Unit vector. */
  readonly direction: Vec3;
  readonly length: number;
  readonly radius: number;
  /** The sleeve it starts from. */
  readonly sleeve: number;
  /** Pieces that it must be cut from. */
  readonly meets: readonly number[];
}

const AZIMUTHS = 24;
/** A vent may rise towards the mouth to get past a neighbour, rad. */
const RISES = [0, Math.PI / 6, Math.PI / 4] as const;
const STEP = 0.5;
/** How far a channel is carried past the last plastic, mm. */
const PAST = 0.8;

/**
 * The vent of a socket: from the foot of the bore's side, outwards to the open by the least rise, then the shortest way, that keeps `web`
 * from every other strut's path; never through the node's middle, since it starts at the stop and runs outwards. It starts at the side, not
 * in the middle of the floor: one that rises would come through the wall half-way up, where the glue is. null where there is no way.
 */
export function ventOf(space: HubSpace, index: number, diameter: number, web: number): Channel | null {
  const s = space.sleeves[index]!;
  const radius = diameter / 2;
  const floor = scale(s.socket.direction, s.stop + radius + FLOOR_CLEAR);
  for (const rise of RISES) {
    const found = shortest(
      azimuths(s).map((side) =>
        march(
          space,
          index,
          addScaled(floor, side, Math.max(0, halfTowards(s, side) - START_INSIDE * radius)),
          add(scale(side, Math.cos(rise)), scale(s.socket.direction, Math.sin(rise))),
          radius,
          web,
        ),
      ),
    );
    if (found) return found;
  }
  return null;
}

/** The start's middle stands this share of a vent's radius inside the bore's side: open to the bore, and through the wall soon. */
const START_INSIDE = 0.4;

/** From the bore's axis to its side, along a direction of `azimuths`. */
const halfTowards = (s: Sleeve, side: Vec3): number =>
  typeof s.inner === 'number' ? s.inner : Math.abs(dot(side, s.socket.y)) > 0.5 ? s.inner[0] : s.inner[1];

/** Floor and vent must not share a tangent plane, mm. */
const FLOOR_CLEAR = 0.05;

/** The pin hole across a socket: both ways to the open, clear of every other strut's path; at mid-depth or nearer the mouth. */
export function pinOf(space: HubSpace, index: number, web: number): Channel | null {
  const s = space.sleeves[index]!;
  const radius = s.socket.pin / 2;
  const { depth, travel } = s.socket;
  // The pin of a slide stands right behind the strut's end; another holds the strut by its middle.
  const places = travel === undefined ? PIN_AT.map((share) => share * depth) : [travel - radius];
  for (const place of places) {
    const centre = scale(s.socket.direction, s.stop + place);
    const found = shortest(
      azimuths(s)
        .slice(0, AZIMUTHS / 2)
        .map((side) => {
          const out = march(space, index, centre, side, radius, web);
          const back = march(space, index, centre, scale(side, -1), radius, web);
          if (!out || !back) return null;
          return {
            from: addScaled(centre, side, -back.length),
            direction: side,
            length: back.length + out.length,
            radius,
            sleeve: index,
            meets: [...new Set([...out.meets, ...back.meets])].sort((a, b) => a - b),
          };
        }),
    );
    if (found) return found;
  }
  return null;
}

/** The bolt holes of a plate: through the plate alone, since the strut's path round it is clear. */
export function boltHolesOf(space: HubSpace, index: number): Channel[] {
  const s = space.sleeves[index]!;
  const end = s.socket.bolted;
  if (!end) return [];
  const side = end.along === 'y' ? s.socket.y : s.socket.z;
  const half = end.plate / 2 + PAST;
  return Array.from({ length: end.bolts }, (_, k) => ({
    from: addScaled(scale(s.socket.direction, s.stop + end.endDistance + k * end.spacing), side, -half),
    direction: side,
    length: 2 * half,
    radius: (end.diameter + BOLT_HOLE) / 2,
    sleeve: index,
    meets: [index],
  }));
}

/** Holes of a foot's plate: the anchors through it, and a blind one from below for the levelling screw, as deep as the struts allow. */
export function plateHolesOf(space: HubSpace, web: number): Channel[] {
  const { base } = space.shape;
  if (!base) return [];
  const { count, diameter, circle, turn } = base.anchors;
  const under = base.top - base.thickness;
  const up = (x: number, y: number, from: number, to: number, radius: number): Channel => ({
    from: [x, y, from],
    direction: [0, 0, 1],
    length: to - from,
    radius,
    sleeve: BODY,
    meets: [BODY],
  });
  const holes = Array.from({ length: count }, (_, k) => {
    const angle = turn + (2 * Math.PI * k) / count;
    return up(circle * Math.cos(angle), circle * Math.sin(angle), under - PAST, base.top + PAST, diameter / 2);
  });
  if (base.levelling > 0) {
    let top = base.top;
    while (top < 0 && space.clearOfPaths([0, 0, top + STEP], base.levelling / 2 + web, NONE)) top += STEP;
    holes.push(up(0, 0, under - PAST, top, base.levelling / 2));
  }
  return holes;
}

/** A clamp's screw holes: clear in the half that the normal points to, for the thread in the other. */
export function screwHolesOf(space: HubSpace): Channel[] {
  const { clamp } = space.shape;
  if (!clamp) return [];
  return clamp.screws.flatMap((at) =>
    (
      [
        [1, SCREW.clear],
        [-1, SCREW.thread],
      ] as const
    ).map(([side, diameter]) => ({
      from: at,
      direction: scale(clamp.normal, side),
      length: clamp.half + PAST,
      radius: diameter / 2,
      sleeve: BODY,
      meets: [BODY],
    })),
  );
}

/** No sleeve is left out of a search. */
const NONE = -2;

/** Play of a bolt in its hole, mm: within the 1 mm of EN 1995-1-1 10.4.3 (1). */
const BOLT_HOLE = 0.5;

/** Shares of the depth, from the stop: the middle first, then outwards where neighbours part. */
const PIN_AT = [0.5, 0.6, 0.7] as const;

/** Directions square to the sleeve; for a rectangle those square to its faces only. */
function azimuths(s: Sleeve): Vec3[] {
  const { y, z } = s.socket;
  const count = typeof s.inner === 'number' ? AZIMUTHS : 4;
  return Array.from({ length: count }, (_, k) => {
    const angle = (2 * Math.PI * k) / count;
    return add(scale(y, Math.cos(angle)), scale(z, Math.sin(angle)));
  });
}

/** Follows a hole from inside a bore to the open; null where it comes too near another strut's path. */
function march(
  space: HubSpace,
  index: number,
  from: Vec3,
  direction: Vec3,
  radius: number,
  web: number,
): Channel | null {
  const meets = new Set<number>();
  let last = 0;
  for (let t = 0; t <= 2 * space.reach; t += STEP) {
    const p = addScaled(from, direction, t);
    if (!space.clearOfPaths(p, radius + web, index)) return null;
    const pieces = space.piecesAt(p, radius + WIDE);
    for (const piece of pieces) meets.add(piece);
    if (pieces.length > 0) last = t;
    else if (t > last + PAST + STEP) break;
  }
  return { from, direction, length: last + PAST, radius, sleeve: index, meets: [...meets].sort((a, b) => a - b) };
}

/** Margin of the search over the hole itself, mm: polygons of the search contain their circles only nearly. */
const WIDE = 0.3;

/** The shortest of some channels; the first of equals, to a tenth of a millimetre. */
function shortest(list: readonly (Channel | null)[]): Channel | null {
  let best: Channel | null = null;
  for (const c of list) if (c && (!best || c.length < best.length - 0.1)) best = c;
  return best;
}
