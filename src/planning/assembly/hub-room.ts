import { ballRadius } from '../../detailing/systems/drilled-ball.js';
import { cubeCover, cubeHalf } from '../../detailing/systems/drilled-cube.js';
import { hubShape } from '../../detailing/systems/hub-shape.js';
import { type Half, largest, pathHalf, ringPoints, type Sleeve } from '../../detailing/systems/sleeve.js';
import { bodyHull, COVER_SIDES } from '../../detailing/systems/sleeve-cover.js';
import { insidePath } from '../../detailing/systems/sleeve-inside.js';
import { type Convex, cylinderOf, hullOf } from '../../maths/convex-distance.js';
import { add, addScaled, dot, length, scale, type Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import { HubSpace } from '../../shaping/hub-space.js';

/** The solid of a hub as the building of the truss sees it: in closed form, no mesh. mm. */
export interface HubRoom {
  readonly at: Vec3;
  /** Farthest that the solid reaches from the node. */
  readonly reach: number;
  /** Whether a point, from the node, lies in the solid, the sleeve of `strut` left out: struts' paths are cut out of it. */
  readonly solidAt: (p: Vec3, strut: string) => boolean;
  /** Convex pieces that contain the solid, in the truss's axes, the sleeve of `strut` left out. */
  readonly piecesBut: (strut: string | null) => readonly Convex[];
  /** Distance of a socket's mouth from the node, and the largest half-size of its sleeve. */
  readonly sleeveOf: (strut: string) => { readonly mouth: number; readonly half: number } | null;
}

/** null where none of the hub's setbacks is known: nothing is made there. */
export function hubRoom(hub: HubPart, job: Job): HubRoom | null {
  if (!hub.sockets.some((s) => s.setback !== null)) return null;
  if (hub.system === 'drilled-ball') return boredRoom(hub, ballBody(hub));
  return hub.system === 'drilled-cube' ? boredRoom(hub, cubeBody(hub)) : sleeveRoom(hub, job);
}

function sleeveRoom(hub: HubPart, job: Job): HubRoom {
  const space = new HubSpace(hubShape(hub, job));
  const { sleeves, shape, reach } = space;
  const indexOf = new Map(sleeves.map((s, i) => [s.socket.strut, i]));
  const { at } = hub;
  let pieces: { readonly sleeve: number; readonly convex: Convex }[] | null = null;
  const made = () => {
    const body = bodyHull(shape);
    const { base, clamp } = shape;
    const placed = (points: readonly Vec3[]): Convex => hullOf(points.map((p) => add(at, p)));
    return [
      ...(body ? [{ sleeve: -1, convex: placed(body.points) }] : []),
      ...(clamp?.arms ?? []).map((arm) => ({ sleeve: -1, convex: placed(arm.points) })),
      ...(base
        ? [
            {
              sleeve: -1,
              convex: cylinderOf(
                [at[0], at[1], at[2] + base.top - base.thickness],
                [at[0], at[1], at[2] + base.top],
                base.radius,
              ),
            },
          ]
        : []),
      ...sleeves.flatMap((s, sleeve) => sleevePieces(s, at).map((convex) => ({ sleeve, convex }))),
    ];
  };
  return {
    at,
    reach,
    solidAt: (p, strut) => {
      const own = indexOf.get(strut) ?? -2;
      const found = space.piecesAt(p, 0, own);
      return found.some((piece) => {
        const hollow = piece < 0 || sleeves[piece]!.hollow;
        // The path of a spigot's strut goes round the spigot.
        return !sleeves.some((s, i) => (hollow || i !== piece) && insidePath(s, p));
      });
    },
    piecesBut: (strut) => {
      pieces ??= made();
      const own = strut === null ? -2 : (indexOf.get(strut) ?? -2);
      return pieces.filter((p) => p.sleeve !== own).map((p) => p.convex);
    },
    sleeveOf: (strut) => {
      const s = sleeves[indexOf.get(strut) ?? -1];
      return s ? { mouth: s.mouth, half: largest(s.hollow ? s.outer : s.rootHalf) } : null;
    },
  };
}

function sleevePieces(s: Sleeve, at: Vec3): Convex[] {
  const between = (from: number, to: number, half: Half): Convex =>
    typeof half === 'number'
      ? cylinderOf(addScaled(at, s.socket.direction, from), addScaled(at, s.socket.direction, to), half)
      : hullOf([from, to].flatMap((x) => ringPoints(s.socket, x, half, COVER_SIDES).map((p) => add(at, p))));
  return [
    ...(s.coneTop > s.root ? [between(s.root, s.coneTop, s.cone)] : []),
    between(Math.max(s.root, Math.min(s.coneTop, s.mouth)), s.mouth, s.outer),
  ];
}

/** A convex body, where it stands, that bores are drilled into; `holds` tells whether a point from the node is in it. */
interface Body {
  readonly convex: Convex;
  readonly reach: number;
  readonly holds: (p: Vec3) => boolean;
}

function ballBody(hub: HubPart): Body {
  const radius = ballRadius(hub);
  return {
    convex: { support: (d) => addScaled(hub.at, d, radius / length(d)) },
    reach: radius,
    holds: (p) => length(p) < radius,
  };
}

function cubeBody(hub: HubPart): Body {
  const half = cubeHalf(hub);
  return {
    convex: hullOf(cubeCover(half).flatMap((piece) => piece.points.map((p) => add(hub.at, p)))),
    reach: half * Math.sqrt(3),
    holds: (p) => Math.max(...p.map(Math.abs)) < half,
  };
}

function boredRoom(hub: HubPart, { convex, reach, holds }: Body): HubRoom {
  const known = hub.sockets.filter((s) => s.setback !== null);
  const socketOf = new Map(known.map((s) => [s.strut, s]));
  return {
    at: hub.at,
    reach,
    solidAt: (p) =>
      holds(p) &&
      !known.some((s) => {
        const along = dot(p, s.direction);
        return along > s.setback! && length(addScaled(p, s.direction, -along)) < largest(pathHalf(s));
      }),
    piecesBut: () => [convex],
    sleeveOf: (strut) => {
      const s = socketOf.get(strut);
      return s ? { mouth: s.setback! + s.depth, half: largest(pathHalf(s)) } : null;
    },
  };
}

/** Corners of a strut's section at a place on its axis: twelve of a round one, eight of a rectangle. */
export function sectionRing(centre: Vec3, y: Vec3, z: Vec3, half: Half): Vec3[] {
  const at = (a: number, b: number): Vec3 => add(add(centre, scale(y, a)), scale(z, b));
  if (typeof half !== 'number') {
    const [a, b] = half;
    return [-1, 0, 1].flatMap((i) => [-1, 0, 1].flatMap((j) => (i === 0 && j === 0 ? [] : [at(i * a, j * b)])));
  }
  return Array.from({ length: 12 }, (_, k) =>
    at(half * Math.cos((k * Math.PI) / 6), half * Math.sin((k * Math.PI) / 6)),
  );
}
