import { convexHull3 } from '../../maths/convex-hull3.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { boredStrength } from './bored-strength.js';
import { measuredSize, ownClearance } from './printing.js';
import { areaOf, boreHalf, largest } from './sleeve.js';
import { outlineInSlab } from './sleeve-cover.js';
import { SLEEVE_HUB, sizeSocket } from './socket.js';
import type { ConvexPiece, NodeSystem } from './system.js';

/** A drill makes its hole a little wide, and a rod must go in by hand, mm; common practice, no source. */
const DRILL_OVER = 0.2;
/** Wood left between two bores, mm, and as a share of the bore; common practice, no source. */
const [LEAST_WEB, WEB_SHARE] = [2, 0.25] as const;
/** Wooden balls are sold by fives of a millimetre; common practice, no source. */
const BALL_STEP = 5;
const MM3_TO_M3 = 1e-9;

/** A ball drilled at angles: every bore is drilled to one depth from the surface, the stop set once. */
export const DRILLED_BALL_SYSTEM: NodeSystem = {
  ...SLEEVE_HUB,
  name: 'drilled-ball',
  title: 'Drilled ball',
  ownSetbacks: true,
  deepen: deeperBall,
  material: (job) => job.nodes.ball.material,
  socket(bar, job) {
    const plain = sizeSocket({ ...bar, detail: 'plain' }, job);
    const size = measuredSize(bar.section);
    const bore = size + (ownClearance(job, bar.section) ?? DRILL_OVER);
    const web = job.nodes.gap_mm ?? Math.max(LEAST_WEB, WEB_SHARE * size);
    return { ...plain, bore, wall: web, detail: bar.detail };
  },
  setbacks(sockets, job) {
    const found = SLEEVE_HUB.setbacks(sockets, job);
    const square = sockets.map((s) => s.section.shape.kind === 'rectangle');
    const least = found.setbacks.map((s, i) => (square[i] ? null : s));
    const needed = Math.max(0, ...sockets.map((s, i) => (least[i] === null ? 0 : surfaceOver(s, least[i]! + s.depth))));
    const own = job.nodes.ball.diameter_mm;
    const radius = own === undefined ? ballSize(needed) : own / 2;
    return {
      ...found,
      setbacks: least.map((s, i) =>
        s === null || radius < needed - 1e-9 ? null : entryAt(sockets[i]!, radius) - sockets[i]!.depth,
      ),
      notRound: sockets.filter((_, i) => square[i]).map((s) => s.strut),
      ...(radius < needed - 1e-9 ? { ballNeeds: 2 * needed } : {}),
    };
  },
  strength: (hub) => boredStrength(hub, Math.PI * ballRadius(hub) ** 2),
  cover: (hub) => ballCover(ballRadius(hub)),
  outline: (hub, slab) => outlineInSlab(ballCover(ballRadius(hub)), hub.at, slab),
  mass: (hub) =>
    hub.sockets.some((s) => s.setback === null) ? null : ballVolume(hub) * MM3_TO_M3 * hub.material.density,
};

/**
 * A ball whose bores are deeper: no stop moves inwards, so that bores stay apart, and the ball grows to the next size that its rims
 * lie on. A ball whose diameter the job gives stays as it is.
 */
function deeperBall(hub: HubPart, depths: ReadonlyMap<string, number>, job: Job): HubPart {
  if (job.nodes.ball.diameter_mm !== undefined || hub.sockets.some((s) => s.setback === null)) return hub;
  const sockets = hub.sockets.map((s) => ({ ...s, depth: Math.max(s.depth, depths.get(s.strut) ?? 0) }));
  const radius = ballSize(Math.max(...sockets.map((s) => surfaceOver(s, s.setback! + s.depth))));
  return { ...hub, sockets: sockets.map((s) => ({ ...s, setback: entryAt(s, radius) - s.depth })) };
}

/** Radius of the least ball that is sold and at least as large, mm. */
const ballSize = (needed: number): number => (BALL_STEP / 2) * Math.ceil((2 * needed) / BALL_STEP - 1e-9);

/** Radius of a ball whose surface a bore's rim meets at a distance from its middle, and back. */
const surfaceOver = (s: Socket, entry: number): number => Math.hypot(entry, largest(boreHalf(s)));
const entryAt = (s: Socket, radius: number): number => Math.sqrt(radius ** 2 - largest(boreHalf(s)) ** 2);

/** The ball's radius, mm: every bore's rim lies on it. */
export function ballRadius(hub: Pick<HubPart, 'sockets'>): number {
  const known = hub.sockets.find((s) => s.setback !== null);
  return known ? surfaceOver(known, known.setback! + known.depth) : 0;
}

/** mm³: the ball less its bores and the cap of the ball over each. */
function ballVolume(hub: HubPart): number {
  const radius = ballRadius(hub);
  let volume = (4 / 3) * Math.PI * radius ** 3;
  for (const s of hub.sockets) {
    const height = radius - entryAt(s, radius);
    volume -= areaOf(boreHalf(s)) * s.depth + (Math.PI * height ** 2 * (3 * radius - height)) / 3;
  }
  return volume;
}

/** A polyhedron that contains the ball: corners on circles of latitude, moved out until its faces touch. */
function ballCover(radius: number): ConvexPiece[] {
  const points: Vec3[] = [];
  for (let i = 0; i <= ROWS; i++) {
    const polar = (Math.PI * i) / ROWS;
    const count = i === 0 || i === ROWS ? 1 : 2 * ROWS;
    for (let k = 0; k < count; k++) {
      const a = (Math.PI * k) / ROWS;
      points.push([Math.sin(polar) * Math.cos(a), Math.sin(polar) * Math.sin(a), Math.cos(polar)]);
    }
  }
  const hull = convexHull3(points);
  if (!hull || !(radius > 0)) return [];
  let inner = 1;
  for (let i = 3; i < hull.planes.length; i += 4) inner = Math.min(inner, hull.planes[i]!);
  const grown = hull.points.map(
    (p): Vec3 => [(p[0] * radius) / inner, (p[1] * radius) / inner, (p[2] * radius) / inner],
  );
  const edges = hull.faces.flatMap(([a, b, c]) =>
    (
      [
        [a, b],
        [b, c],
        [c, a],
      ] as const
    ).filter(([u, v]) => u < v),
  );
  return [{ points: grown, edges }];
}

const ROWS = 12;
