import { angleBetween } from '../../maths/vec3.js';
import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { commonSetback, leastSetback } from './half-strip.js';
import { hardwareCover } from './hardware.js';
import { hubShape } from './hub-shape.js';
import { leastSetbacks } from './least-setbacks.js';
import { boreAllowance, clearance, LEAST_WALL, measuredSize, sleeveWall, swelling } from './printing.js';
import { type BarPrism, commonOf, leastOf, type Separation, separations } from './prism-pair.js';
import { pathHalf } from './sleeve.js';
import { outlineInSlab, sleeveCover } from './sleeve-cover.js';
import { sleeveStiffness, sleeveStrength } from './sleeve-strength.js';
import { sleeveVolume } from './sleeve-volume.js';
import type { BarEnd, ClosePair, ConvexPiece, NodeSystem, Setbacks } from './system.js';
import { floorHoles } from './vent.js';

/** What every hub of sleeves and spigots on a body has in common. */
export const SLEEVE_HUB: Omit<NodeSystem, 'name' | 'title' | 'socket'> = {
  setbacks: socketSetbacks,
  cover: (hub, job) => coverOf(hub, job).hub,
  outline(hub, slab, job) {
    const known = coverOf(hub, job);
    return outlineInSlab([...known.hub, ...known.hardware], hub.at, slab);
  },
  mass: (hub, job) =>
    hub.sockets.some((s) => s.setback === null)
      ? null
      : sleeveVolume(hubShape(hub, job)) * MM3_TO_M3 * hub.material.density,
  stiffness: (hub) => sleeveStiffness(hub),
  strength: (hub, job) => sleeveStrength(hub, (s) => floorHoles(s, job)[0] ?? 0),
};

/** Every panel at a hub asks for its cover. */
const covers = new WeakMap<HubPart, Cover>();

interface Cover {
  readonly job: Job;
  readonly hub: readonly ConvexPiece[];
  readonly hardware: readonly ConvexPiece[];
}

function coverOf(hub: HubPart, job: Job): Cover {
  const known = covers.get(hub);
  if (known?.job === job) return known;
  const shape = hubShape(hub, job);
  const made: Cover = { job, hub: sleeveCover(shape), hardware: hardwareCover(shape) };
  covers.set(hub, made);
  return made;
}

/** A printed hub with one blind socket a strut, along the strut's true direction. */
export const SOCKET_SYSTEM: NodeSystem = {
  ...SLEEVE_HUB,
  name: 'socket',
  title: 'Printed sockets',
  socket: sizeSocket,
};

const MM3_TO_M3 = 1e-9;

/** Air behind the far end of a strut that has slid in, mm. */
const SLIDE_OVER = 1;

/**
 * A socket with its closing detail. A slide is deeper by the engagement, so that the strut goes in beyond its place, over its far
 * socket, and back; a pin behind its end then locks it.
 */
export function sizeSocket(bar: BarEnd, job: Job): Socket {
  const plain = plainSocket(bar, job);
  if (bar.detail !== 'slide') return plain;
  const travel = plain.depth + SLIDE_OVER;
  return { ...plain, depth: plain.depth + travel, travel, pin: Math.max(plain.pin, job.nodes.pin_mm, LEAST_LOCK) };
}

/** Least diameter of a locking pin, mm: a wire nail; common practice, no source. */
const LEAST_LOCK = 1.5;

/** Bore = largest measured strut + clearance (+ swelling of timber outdoors); depth = factor x size, of a rectangle's mean side. */
function plainSocket(bar: BarEnd, job: Job): Socket {
  const { section } = bar;
  const { shape } = section;
  const size = measuredSize(section);
  const material = materialNamed(job, section.material);
  const grown = (side: number): number => side + clearance(job, section, side) + swelling(job, material, side);
  const depthOf = (side: number): number => job.nodes.depth_mm ?? job.nodes.depthFactor * side;
  const common = {
    strut: bar.strut,
    farNode: bar.farNode,
    direction: bar.direction,
    y: bar.y,
    z: bar.z,
    section,
    setback: null,
    wall: sleeveWall(job, shape.kind === 'rectangle' ? Math.min(shape.width, shape.height) : size),
    joint: bar.joint,
    detail: bar.detail,
    pin: bar.joint === 'pinned' ? job.nodes.pin_mm : 0,
  };
  if (shape.kind !== 'rectangle') return { ...common, bore: grown(size), depth: depthOf(shape.diameter) };
  // A measured side stands for the larger one; the smaller is taken to be off by as much.
  const excess = size - Math.max(shape.width, shape.height);
  return {
    ...common,
    bore: [grown(shape.width + excess), grown(shape.height + excess)],
    depth: Math.max(depthOf(Math.sqrt(shape.width * shape.height)), job.nodes.depth_mm ?? size),
  };
}

const DEGREE = Math.PI / 180;

/**
 * Setbacks at a node. The web between two bores is the job's gap (absent: the wall); pairs nearer than `mergeBelow_deg` share their
 * sleeves and keep only the process's least wall between the bores; pairs nearer than `leastAngle_deg` are refused.
 */
export function socketSetbacks(sockets: readonly Socket[], job: Job): Setbacks {
  const tooClose: ClosePair[] = [];
  const refused = new Set<number>();
  sockets.forEach((a, i) => {
    sockets.slice(i + 1).forEach((b, k) => {
      const angle = angleBetween(a.direction, b.direction);
      if (angle >= job.nodes.leastAngle_deg * DEGREE) return;
      tooClose.push({ a: a.strut, b: b.strut, angle });
      refused.add(i).add(i + 1 + k);
    });
  });
  const kept = sockets.map((_, i) => i).filter((i) => !refused.has(i));
  const found = leastSetbacks(
    pairRule(
      kept.map((i) => sockets[i]!),
      job,
    ),
  );
  const setbacks = new Array<number | null>(sockets.length).fill(null);
  kept.forEach((i, k) => {
    setbacks[i] = found[k]!;
  });
  return { setbacks, tooClose };
}

/** Corners of the polygons that two bores are made as stand this much into the web between them, mm. */
const CHORDS = 0.1;

function pairRule(sockets: readonly Socket[], job: Job): Parameters<typeof leastSetbacks>[0] {
  const n = sockets.length;
  const web = (i: number, j: number, angle: number): number =>
    angle < job.nodes.mergeBelow_deg * DEGREE
      ? LEAST_WALL[job.nodes['process']] + CHORDS + boreAllowance(job)
      : (job.nodes.gap_mm ?? Math.max(sockets[i]!.wall, sockets[j]!.wall));
  const angles = sockets.map((a) => sockets.map((b) => angleBetween(a.direction, b.direction)));
  const prisms = sockets.map((s): BarPrism => ({ d: s.direction, u: s.y, v: s.z, half: pathHalf(s) }));
  const cache = new Map<number, readonly Separation[]>();
  const prismPair = (i: number, j: number): readonly Separation[] => {
    let list = cache.get(i * n + j);
    if (!list) {
      list = separations(prisms[i]!, prisms[j]!, web(i, j, angles[i]![j]!));
      cache.set(i * n + j, list);
    }
    return list;
  };
  return {
    count: n,
    common(i, j) {
      const [a, b] = [prisms[i]!.half, prisms[j]!.half];
      const angle = angles[i]![j]!;
      return typeof a === 'number' && typeof b === 'number'
        ? commonSetback(angle, a, b, web(i, j, angle))
        : commonOf(prismPair(i, j));
    },
    least(i, j, sj) {
      const [a, b] = [prisms[i]!.half, prisms[j]!.half];
      const angle = angles[i]![j]!;
      return typeof a === 'number' && typeof b === 'number'
        ? leastSetback(angle, a, b, sj, web(i, j, angle))
        : leastOf(prismPair(i, j), sj);
    },
  };
}
