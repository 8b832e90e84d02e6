import { frameToWorld, type Mat4, multiply4 } from '../../maths/mat4.js';
import { addScaled, cross, dot, length, normalise, type Vec3 } from '../../maths/vec3.js';
import { defaultJob, type Job } from '../../model/job/index.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { printersOf } from '../../model/printers.js';
import type { ShapedHub } from '../../model/shaped.js';
import type { ShapeHubInput } from './shape-hub-task.js';

/** Direction cosines are kept to 1e-7 (0.02 mm at 200 m), lengths to 1e-4 mm: finer than any printer steps. */
const DIRECTION_STEPS = 1e7;
const LENGTH_STEPS = 1e4;
/** The outward side and up only choose where letters go: in eighths, so that these do not follow every move of the far side. */
const OUTWARD_STEPS = 8;
/** Tension only weighs print orientations: two digits, so that a part does not change with the last digit of a force. */
const TENSION_DIGITS = 2;
/** Sine of the least angle between two struts that fix a frame. */
const ASKEW = 0.05;

/** What a hub's solid is made from. */
export type HubMaking = Omit<ShapeHubInput, 'object'>;

/** A hub as it is made, and the motion from there to where it stands. */
export interface CanonicalHub {
  readonly input: HubMaking;
  readonly toTruss: Mat4;
}

/**
 * What a hub's solid is made from and nothing else, to the machine's resolution: its first strut along x, the next one
 * beside it in the plane of x and y, whatever the rest of the truss and of the job says. Equal inputs give equal bytes, so
 * this is what a part's digest and the memory of earlier runs are taken over.
 */
export function canonicalHub(hub: HubPart, job: Job, tension: readonly number[]): CanonicalHub {
  const [x, y, z] = frameFor(hub);
  const turned = (v: Vec3): Vec3 => [dot(v, x), dot(v, y), dot(v, z)];
  const canonical: HubPart = {
    ...hub,
    at: [0, 0, 0],
    outward: steps(turned(hub.outward), OUTWARD_STEPS),
    up: steps(turned(Z), OUTWARD_STEPS),
    mass: null,
    sockets: hub.sockets.map((s) => canonicalSocket(s, turned)),
  };
  return {
    input: {
      hub: canonical,
      job: { ...REST, nodes: shapingOf(job.nodes), printers: printersOf(job).map(sizeOnly) },
      tension: tension.map((n) => Number(n.toPrecision(TENSION_DIGITS))),
    },
    toTruss: frameToWorld(hub.at, x, y),
  };
}

/** A hub as it was made, moved to where it stands. */
export const placeHub = (shaped: ShapedHub, toTruss: Mat4): ShapedHub => ({
  ...shaped,
  pieces: shaped.pieces.map((piece) => ({ ...piece, placement: multiply4(toTruss, piece.placement) })),
});

/** The same hub without its labels: two hubs with the same form differ in their letters at most. */
export const formOf = ({ hub, job, tension }: HubMaking): HubMaking => ({
  hub: { ...hub, up: Z, mark: '', revision: '', sockets: hub.sockets.map((s) => ({ ...s, strut: '', farNode: '' })) },
  job,
  tension,
});

const REST = defaultJob('Untitled');

/**
 * What of the job's node settings a solid is made from: those that say only how sockets were sized, which the sockets themselves
 * carry, go back to their defaults, so that no part changes because a value was marked as measured or another node has another system.
 */
function shapingOf(nodes: Job['nodes']): Job['nodes'] {
  const { clearance_mm, depth_mm, gap_mm, wall_mm, bondStrength_MPa, ...rest } = nodes;
  const usual = REST.nodes;
  return {
    ...rest,
    system: usual.system,
    systems: usual.systems,
    material: usual.material,
    ball: usual.ball,
    cube: usual.cube,
    clearances: usual.clearances,
    clearanceMeasured: usual.clearanceMeasured,
    setbacks: usual.setbacks,
    depthFactor: usual.depthFactor,
    joint: usual.joint,
  };
}

function frameFor({ system, sockets }: HubPart): readonly [Vec3, Vec3, Vec3] {
  // The faces of a cube are square to the truss's axes.
  if (system === 'drilled-cube') return [X, Y, Z];
  return system === 'foot' ? uprightFrameOf(sockets) : frameOf(sockets);
}

function frameOf(sockets: readonly Socket[]): readonly [Vec3, Vec3, Vec3] {
  const first = sockets[0];
  if (!first) return [X, Y, Z];
  const x = normalise(first.direction);
  const beside = sockets.find((s) => length(cross(x, s.direction)) > ASKEW)?.direction ?? first.y;
  const y = normalise(square(beside, x));
  return [x, y, cross(x, y)];
}

/** A foot stands upright: its frame turns about the upright alone, to its first strut that is not upright itself. */
function uprightFrameOf(sockets: readonly Socket[]): readonly [Vec3, Vec3, Vec3] {
  const leaning = sockets.find((s) => Math.hypot(s.direction[0], s.direction[1]) > ASKEW)?.direction;
  if (!leaning) return [X, Y, Z];
  const x = normalise([leaning[0], leaning[1], 0]);
  return [x, cross(Z, x), Z];
}

/** Of a printer only its room says anything about a hub. */
const sizeOnly = (p: Job['printers'][number]): Job['printers'][number] => ({
  ...REST.printers[0]!,
  bed: p.bed,
  width_mm: p.width_mm,
  depth_mm: p.depth_mm,
  height_mm: p.height_mm,
  margin_mm: p.margin_mm,
});

const X: Vec3 = [1, 0, 0];
const Y: Vec3 = [0, 1, 0];
const Z: Vec3 = [0, 0, 1];

function canonicalSocket(s: Socket, turned: (v: Vec3) => Vec3): Socket {
  const x = normalise(steps(turned(s.direction), DIRECTION_STEPS));
  // Rounded apart, the axes would be out of square by as much as they are rounded.
  const z = normalise(square(steps(turned(s.z), DIRECTION_STEPS), x));
  const y = normalise(square(square(steps(turned(s.y), DIRECTION_STEPS), x), z));
  const size = (v: number): number => Math.round(v * LENGTH_STEPS) / LENGTH_STEPS;
  return {
    ...s,
    direction: x,
    y,
    z,
    setback: s.setback === null ? null : size(s.setback),
    depth: size(s.depth),
    bore: typeof s.bore === 'number' ? size(s.bore) : [size(s.bore[0]), size(s.bore[1])],
    wall: size(s.wall),
  };
}

const steps = (v: Vec3, n: number): Vec3 => v.map((c) => Math.round(c * n) / n + 0) as unknown as Vec3;
const square = (v: Vec3, axis: Vec3): Vec3 => addScaled(v, axis, -dot(v, axis));
