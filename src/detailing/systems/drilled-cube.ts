import type { Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { boredStrength } from './bored-strength.js';
import { cubeEntry, halfForRim, shallowSide } from './cube-rim.js';
import { DRILLED_BALL_SYSTEM } from './drilled-ball.js';
import { areaOf, boreHalf, largest } from './sleeve.js';
import { outlineInSlab } from './sleeve-cover.js';
import { SLEEVE_HUB } from './socket.js';
import type { ConvexPiece, NodeSystem, Setbacks } from './system.js';

/** Edges are planed to fives of a millimetre; common practice, no source. */
const CUBE_STEP = 5;
/** A rim that asks for more than this times the cube that the stops ask for is refused: the cube would be mostly waste; own choice. */
const MOST_GROWTH = 2;
/** Round-off of half an edge, mm. */
const SAME = 1e-9;
const MM3_TO_M3 = 1e-9;

/**
 * A cube drilled at angles, its faces square to the truss's axes so that it can be set out with a square. Every bore enters one face, its
 * whole rim on it; its depth is along the axis, from the face to the stop, and longer by what the tilted face takes from the shallow side.
 */
export const DRILLED_CUBE_SYSTEM: NodeSystem = {
  ...DRILLED_BALL_SYSTEM,
  name: 'drilled-cube',
  title: 'Drilled cube',
  notPrinted: true,
  deepen: deeperCube,
  material: (job) => job.nodes.cube.material,
  socket(bar, job) {
    const bore = DRILLED_BALL_SYSTEM.socket(bar, job);
    const shallow = shallowSide(bore);
    return { ...bore, depth: bore.depth + shallow, shallow };
  },
  setbacks: cubeSetbacks,
  strength: (hub) => boredStrength(hub, (2 * cubeHalf(hub)) ** 2),
  cover: (hub) => cubeCover(cubeHalf(hub)),
  outline: (hub, slab) => outlineInSlab(cubeCover(cubeHalf(hub)), hub.at, slab),
  mass: (hub) =>
    hub.sockets.some((s) => s.setback === null) ? null : cubeVolume(hub) * MM3_TO_M3 * hub.material.density,
};

function cubeSetbacks(sockets: readonly Socket[], job: Job): Setbacks {
  const found = SLEEVE_HUB.setbacks(sockets, job);
  const square = sockets.map((s) => s.section.shape.kind === 'rectangle');
  const least = found.setbacks.map((s, i) => (square[i] ? null : s));
  const stops = sockets.map((s, i) =>
    least[i] === null ? 0 : Math.max((least[i]! + s.depth) * cubeEntry(s).cosine, largest(boreHalf(s)) + s.wall),
  );
  const own = job.nodes.cube.edge_mm;
  const most = Math.max(MOST_GROWTH * Math.max(0, ...stops), (own ?? 0) / 2);
  const rims = sockets.map((s) => halfForRim(s, s.wall));
  const onFace = sockets.map((_, i) => least[i] !== null && rims[i]! <= most + SAME);
  const needed = Math.max(0, ...sockets.map((_, i) => (onFace[i] ? Math.max(stops[i]!, rims[i]!) : 0)));
  const half = own === undefined ? cubeSize(needed) : own / 2;
  const tooSmall = half < needed - SAME;
  return {
    ...found,
    setbacks: sockets.map((s, i) => (onFace[i] && !tooSmall ? half / cubeEntry(s).cosine - s.depth : null)),
    notRound: sockets.filter((_, i) => square[i]).map((s) => s.strut),
    offFace: sockets.flatMap((s, i) =>
      least[i] === null || onFace[i]
        ? []
        : [{ strut: s.strut, edge: Number.isFinite(rims[i]!) ? 2 * rims[i]! : null, most: 2 * most }],
    ),
    ...(tooSmall ? { cubeNeeds: 2 * needed } : {}),
  };
}

/** A cube whose bores are deeper: no stop moves inwards, and it grows to the next size. One whose edge the job gives stays as it is. */
function deeperCube(hub: HubPart, depths: ReadonlyMap<string, number>, job: Job): HubPart {
  if (job.nodes.cube.edge_mm !== undefined || hub.sockets.some((s) => s.setback === null)) return hub;
  const sockets = hub.sockets.map((s) => ({ ...s, depth: Math.max(s.depth, depths.get(s.strut) ?? 0) }));
  const half = cubeSize(Math.max(cubeHalf(hub), ...sockets.map((s) => (s.setback! + s.depth) * cubeEntry(s).cosine)));
  return { ...hub, sockets: sockets.map((s) => ({ ...s, setback: half / cubeEntry(s).cosine - s.depth })) };
}

/** Half the edge of the least cube that is planed and at least as large, mm. */
const cubeSize = (needed: number): number => (CUBE_STEP / 2) * Math.ceil((2 * needed) / CUBE_STEP - SAME);

/** Half the cube's edge, mm: every bore's axis meets its face there. 0: no setback is known. */
export function cubeHalf(hub: Pick<HubPart, 'sockets'>): number {
  const known = hub.sockets.find((s) => s.setback !== null);
  return known ? (known.setback! + known.depth) * cubeEntry(known).cosine : 0;
}

/** mm³: the cube less its bores; a bore that a plane cuts at an angle holds its section times the depth of its axis. */
const cubeVolume = (hub: HubPart): number =>
  hub.sockets.reduce((sum, s) => sum - areaOf(boreHalf(s)) * s.depth, (2 * cubeHalf(hub)) ** 3);

const SIGNS: readonly Vec3[] = [-1, 1].flatMap((x) => [-1, 1].flatMap((y) => [-1, 1].map((z): Vec3 => [x, y, z])));
/** Corners whose numbers differ in one binary digit share an edge. */
const EDGES = SIGNS.flatMap((_, i) => [1, 2, 4].filter((bit) => !(i & bit)).map((bit) => [i, i | bit] as const));

/** The cube itself. */
export const cubeCover = (half: number): ConvexPiece[] =>
  half > 0 ? [{ points: SIGNS.map(([x, y, z]): Vec3 => [half * x, half * y, half * z]), edges: EDGES }] : [];
