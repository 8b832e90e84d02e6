import { segmentDistance } from '../../maths/segment-distance.js';
import { addScaled, negate, type Vec3 } from '../../maths/vec3.js';
import type { HubPart } from '../../model/parts.js';
import type { AssemblySetting, Link } from './setting.js';

/** How far a hand and wrist reach in front of the fingers, mm: common practice, no source. */
const REACH_MM = 300;
const DIRECTIONS = 64;

/** A strut as a thick line. */
interface Rod {
  readonly a: Vec3;
  readonly b: Vec3;
  readonly radius: number;
}

/**
 * Whether a hand reaches a hub past the struts that stand: along one of 64 even directions a tube of the hand's diameter
 * is free, from one hand's breadth off the node outward. Joints that are pinned need a driver square to each socket too.
 */
export function hasAccess(setting: AssemblySetting, hub: HubPart, standing: Iterable<Link>): boolean {
  const { hand_mm, driver_mm } = setting.job.assembly;
  const near = rodsNear(setting, standing, hub.at, REACH_MM + hand_mm);
  const free = (from: Vec3, to: Vec3, radius: number, ignore: string | null): boolean =>
    near.every((r) => r.mark === ignore || segmentDistance(from, to, r.a, r.b).distance >= radius + r.radius);
  const hand = EVEN.some((u) =>
    free(addScaled(hub.at, u, hand_mm), addScaled(hub.at, u, hand_mm + REACH_MM), hand_mm / 2, null),
  );
  if (!hand) return false;
  return hub.sockets.every((s) => {
    // The pin that locks a sliding end is pushed in by hand; only a joint that is pinned needs a tool at each socket.
    if (s.joint !== 'pinned' || s.pin <= 0 || s.setback === null) return true;
    const at = addScaled(hub.at, s.direction, s.setback + s.depth / 2);
    const [diameter, long] = driver_mm;
    const off = diameter / 2 + s.wall;
    return [s.z, negate(s.z)].some((u) =>
      free(addScaled(at, u, off), addScaled(at, u, off + long), diameter / 2, s.strut),
    );
  });
}

interface MarkedRod extends Rod {
  readonly mark: string;
}

function rodsNear(setting: AssemblySetting, links: Iterable<Link>, at: Vec3, reach: number): readonly MarkedRod[] {
  const { nodes, members } = setting.topology.truss;
  const rods: MarkedRod[] = [];
  for (const link of links) {
    const [a, b] = [nodes[link.ends[0]]!.at, nodes[link.ends[1]]!.at];
    if (segmentDistance(at, at, a, b).distance > reach) continue;
    const shape = link.sockets[0]?.section.shape;
    const radius = !shape
      ? 0
      : shape.kind === 'rectangle'
        ? Math.hypot(shape.width, shape.height) / 2
        : shape.diameter / 2;
    rods.push({ a, b, radius, mark: members[link.strut]!.mark });
  }
  return rods;
}

/** Even directions by the golden angle (Fibonacci lattice on the sphere). */
const EVEN: readonly Vec3[] = Array.from({ length: DIRECTIONS }, (_, i) => {
  const z = 1 - (2 * i + 1) / DIRECTIONS;
  const turn = i * Math.PI * (3 - Math.sqrt(5));
  const r = Math.sqrt(1 - z * z);
  return [r * Math.cos(turn), r * Math.sin(turn), z];
});
