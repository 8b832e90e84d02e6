import { add, addScaled, scale, type Vec3 } from '../../maths/vec3.js';
import type { Socket } from '../../model/parts.js';
import { measuredSize } from './printing.js';

/**
 * The shape of a printed hub, in one place for its mass, its cover and its solid.
 *
 * A sleeve runs along its strut from a root behind the stop to the mouth, with a cone where it leaves the body. The body is the
 * convex hull of two rings a sleeve, front and back. Faces of body and sleeve never coincide: solids united along a common face
 * leave slivers.
 */
export interface Sleeve {
  readonly socket: Socket;
  /** Distances from the node along the strut, mm. */
  readonly root: number;
  readonly stop: number;
  readonly mouth: number;
  /** Where the cone at the root is widest and where it has run out. */
  readonly coneFoot: number;
  readonly coneTop: number;
  /** Outer half-sizes of the sleeve: a radius, or half width and half height. */
  readonly outer: Half;
  readonly cone: Half;
  /** The bore; of a spigot or plate, the strut itself. */
  readonly inner: Half;
  /** Outer half-sizes at the root: the sleeve's, or a spigot's shoulder. */
  readonly rootHalf: Half;
  /** Whether the strut goes in; a spigot or plate goes into the strut and is solid. */
  readonly hollow: boolean;
  /** Rings of the body: [distance, half-sizes] front and back. */
  readonly rings: readonly (readonly [number, Half])[];
}

export type Half = number | readonly [number, number];

/** Body's front ring behind the stop, and inside the cone, mm: far above the kernel's tolerance, far below what shows. */
const RING_BEHIND = 0.3;
const RING_INSIDE = 0.05;
/** Share of the setback that a root keeps clear of the node's middle, so that opposite sleeves do not meet face to face. */
const ROOT_CLEAR = 0.4;
/** The body's back ring is this much of the sleeve: its sides taper towards the node. */
const BACK_SHARE = 0.85;
/** Slope of the cone at the root: run over rise. */
const CONE_RUN = 1;

/** Half-sizes grown by an amount on every side. */
export const grow = (half: Half, by: number): Half =>
  typeof half === 'number' ? half + by : [half[0] + by, half[1] + by];
const shrink = (half: Half, share: number): Half =>
  typeof half === 'number' ? half * share : [half[0] * share, half[1] * share];
export const largest = (half: Half): number => (typeof half === 'number' ? half : Math.max(half[0], half[1]));
export const smallest = (half: Half): number => (typeof half === 'number' ? half : Math.min(half[0], half[1]));
export const areaOf = (half: Half): number =>
  typeof half === 'number' ? Math.PI * half * half : 4 * half[0] * half[1];
export const perimeterOf = (half: Half): number =>
  typeof half === 'number' ? 2 * Math.PI * half : 4 * (half[0] + half[1]);

/** Half-sizes of what must stay clear of the rest of the hub from the stop outwards: the bore, or the strut that goes over a spigot. */
export function pathHalf(socket: Socket): Half {
  if (socket.form === undefined || socket.form === 'sleeve') return boreHalf(socket);
  const { shape } = socket.section;
  return shape.kind === 'rectangle'
    ? [shape.width / 2 + OVER_STRUT, shape.height / 2 + OVER_STRUT]
    : measuredSize(socket.section) / 2 + OVER_STRUT;
}

/** Room round a strut that goes over its spigot, mm: its oversize and a little air; common practice, no source. */
const OVER_STRUT = 0.3;

/** Half-sizes of the bore, or of the spigot or plate. */
export const boreHalf = (socket: Socket): Half =>
  typeof socket.bore === 'number' ? socket.bore / 2 : [socket.bore[0] / 2, socket.bore[1] / 2];

/** Sleeves of a hub's sockets whose setback is known, in their order; `based`: a single one has a body too, to stand on a plate. */
export function sleevesOf(sockets: readonly Socket[], based = false): Sleeve[] {
  const known = sockets.filter((s) => s.setback !== null);
  return known.map((socket) => sleeve(socket, known.length === 1 && !based));
}

function sleeve(socket: Socket, alone: boolean): Sleeve {
  if (socket.form === 'spigot' || socket.form === 'plate') return spigot(socket, alone);
  const stop = socket.setback!;
  const inner = boreHalf(socket);
  const outer = grow(inner, socket.wall);
  const cone = grow(outer, socket.wall);
  const floor = Math.max(socket.wall, LEAST_FLOOR);
  const root = alone ? stop - floor : Math.max(stop - floor, ROOT_CLEAR * stop);
  const coneFoot = stop - RING_BEHIND + 0.1;
  const back = Math.max(stop - largest(outer), ROOT_CLEAR * stop);
  return {
    socket,
    root,
    stop,
    mouth: stop + socket.depth,
    coneFoot: alone ? stop - floor : coneFoot,
    coneTop: alone ? stop - floor : Math.min(coneFoot + CONE_RUN * socket.wall, stop + socket.depth / 2),
    outer,
    cone: alone ? outer : cone,
    inner,
    rootHalf: outer,
    hollow: true,
    rings: alone
      ? []
      : [
          [stop - RING_BEHIND, grow(cone, -RING_INSIDE)],
          [Math.min(back, stop - 2 * RING_BEHIND), shrink(outer, BACK_SHARE)],
        ],
  };
}

/** A spigot or plate with a shoulder of the strut's own size that the strut's end stands on. */
function spigot(socket: Socket, alone: boolean): Sleeve {
  const stop = socket.setback!;
  const inner = pathHalf(socket);
  const shoulder = grow(inner, -OVER_STRUT);
  const root = alone ? stop - largest(shoulder) : Math.max(stop - largest(shoulder), ROOT_CLEAR * stop);
  const front = stop - RING_BEHIND;
  return {
    socket,
    root,
    stop,
    mouth: stop + socket.depth,
    coneFoot: stop,
    coneTop: stop,
    outer: boreHalf(socket),
    cone: shoulder,
    inner,
    rootHalf: shoulder,
    hollow: false,
    rings: alone
      ? []
      : [
          [front, grow(shoulder, -RING_INSIDE)],
          [Math.min(root, front - RING_BEHIND), shrink(shoulder, BACK_SHARE)],
        ],
  };
}

/** Least thickness of a stop's floor, mm: two layers of a good wall; common practice, no source. */
const LEAST_FLOOR = 1.6;

/** Corners of a section of the sleeve at a distance from the node: a polygon that contains the circle, or the rectangle. */
export function ringPoints(socket: Socket, distance: number, half: Half, sides: number): Vec3[] {
  const centre = scale(socket.direction, distance);
  return outlineOf(half, sides).map(([a, b]) => add(centre, addScaled(scale(socket.y, a), socket.z, b)));
}

/** A section's outline in its y and z, anticlockwise about the strut's direction. */
export function outlineOf(half: Half, sides: number): [number, number][] {
  if (typeof half !== 'number') {
    const [a, b] = half;
    return [
      [a, -b],
      [a, b],
      [-a, b],
      [-a, -b],
    ];
  }
  const r = half / Math.cos(Math.PI / sides);
  return Array.from({ length: sides }, (_, k): [number, number] => {
    const angle = (2 * Math.PI * (k + 0.5)) / sides;
    return [r * Math.cos(angle), r * Math.sin(angle)];
  });
}
