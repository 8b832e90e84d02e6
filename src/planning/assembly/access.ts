import { convexDistance, cylinderOf } from '../../maths/convex-distance.js';
import { addScaled, distance, negate, type Vec3 } from '../../maths/vec3.js';
import type { HubPart } from '../../model/parts.js';
import { clearAxis, linkRadius } from './fouls.js';
import type { AssemblySetting, Link } from './setting.js';

/** How far a hand and wrist reach in front of the fingers, mm: common practice, no source. */
const REACH_MM = 300;
const DIRECTIONS = 64;

/**
 * Whether a hand reaches a hub past the struts and hubs that stand: along one of 64 even directions a round bar of the hand's
 * diameter is free, from one hand's breadth off the node outward. Joints that are pinned need a driver square to each socket
 * too, free of the rest of the hub as well, from the socket's outside outward.
 */
export function hasAccess(setting: AssemblySetting, hub: HubPart, standing: ReadonlySet<Link>): boolean {
  const { hand_mm, driver_mm } = setting.job.assembly;
  const node = setting.topology.nodeIndex.get(hub.mark)!;
  const free = obstacles(setting, node, standing, REACH_MM + 2 * hand_mm);
  const hand = EVEN.some((u) =>
    free(addScaled(hub.at, u, hand_mm), addScaled(hub.at, u, hand_mm + REACH_MM), hand_mm / 2, null),
  );
  if (!hand) return false;
  return hub.sockets.every((s) => {
    // The pin that locks a sliding end is pushed in by hand; only a joint that is pinned needs a tool at each socket.
    if (s.joint !== 'pinned' || s.pin <= 0 || s.setback === null) return true;
    const at = addScaled(hub.at, s.direction, s.setback + s.depth / 2);
    const [diameter, long] = driver_mm;
    const off = setting.roomAt(node)?.sleeveOf(s.strut)?.half ?? 0;
    return [s.z, negate(s.z)].some((u) =>
      free(addScaled(at, u, off), addScaled(at, u, off + long), diameter / 2, s.strut),
    );
  });
}

/**
 * Tells whether a round bar is free of all that stands near a node. `socket`: the strut whose socket a tool works on; it and its
 * sleeve are left out, the rest of the hub is not. Without one the hub itself is what is reached for.
 */
function obstacles(setting: AssemblySetting, node: number, standing: ReadonlySet<Link>, reach: number) {
  const { topology } = setting;
  const at = topology.truss.nodes[node]!.at;
  const links = setting
    .near(at, reach)
    .map((s) => setting.links[s]!)
    .filter((l) => standing.has(l) && linkRadius(l) > 0);
  const bars = links.map((l) => ({
    mark: topology.truss.members[l.strut]!.mark,
    bar: cylinderOf(...clearAxis(setting, l), linkRadius(l)),
  }));
  const rooms = [...new Set(links.flatMap((l) => l.ends))]
    .sort((a, b) => a - b)
    .flatMap((n) => {
      const room = n === node ? null : setting.roomAt(n);
      return room && distance(room.at, at) <= reach + room.reach ? [room] : [];
    });
  const own = setting.roomAt(node);
  return (from: Vec3, to: Vec3, radius: number, socket: string | null): boolean => {
    const tool = cylinderOf(from, to, radius);
    const hits = (other: Parameters<typeof convexDistance>[0]): boolean => convexDistance(tool, other) === 0;
    if (bars.some((b) => b.mark !== socket && hits(b.bar))) return false;
    for (const room of rooms) if (hits(ballOf(room.at, room.reach)) && room.piecesBut(null).some(hits)) return false;
    return socket === null || !own || !own.piecesBut(socket).some(hits);
  };
}

const ballOf = (at: Vec3, radius: number) => ({
  support: (d: Vec3): Vec3 => addScaled(at, d, radius / Math.hypot(d[0], d[1], d[2])),
});

/** Even directions by the golden angle (Fibonacci lattice on the sphere). */
const EVEN: readonly Vec3[] = Array.from({ length: DIRECTIONS }, (_, i) => {
  const z = 1 - (2 * i + 1) / DIRECTIONS;
  const turn = i * Math.PI * (3 - Math.sqrt(5));
  const r = Math.sqrt(1 - z * z);
  return [r * Math.cos(turn), r * Math.sin(turn), z];
});
