import { type Half, largest } from '../../detailing/systems/sleeve.js';
import { convexDistance, cylinderOf, sweptBy } from '../../maths/convex-distance.js';
import { segmentDistance } from '../../maths/segment-distance.js';
import { addScaled, distance, dot, length, scale, type Vec3, ZERO } from '../../maths/vec3.js';
import type { Section } from '../../model/section.js';
import { sectionRing } from './hub-room.js';
import type { AssemblySetting, Link } from './setting.js';

/** Places on the way in at which a strut is looked at, and the spacing of places along it, mm: half of the thinnest wall. */
const PLACES = 4;
const SPACING = 2;
/** A strut may come this near to what stands, mm: it touches then, and wood gives as much. */
const TOUCH = 0.05;

/** Half-sizes of a strut's section. */
export const strutHalf = ({ shape }: Section): Half =>
  shape.kind === 'rectangle' ? [shape.width / 2, shape.height / 2] : shape.diameter / 2;

/** Radius of the bar round a strut. */
export const linkRadius = (link: Link): number => {
  const section = (link.sockets[0] ?? link.sockets[1])?.section;
  if (!section) return 0;
  const half = strutHalf(section);
  return typeof half === 'number' ? half : Math.hypot(half[0], half[1]);
};

/**
 * What a strut hits on its way in, by mark; null: nothing. `hub` is loose and drawn back by `move`, mm, with the strut in it; on
 * the way to its place the strut's far end goes straight into its socket while the strut tilts by what the hub is aside.
 * Against the solids of both hubs, its own sleeves left out, in which the play lets it tilt; and against the struts that stand.
 */
export function strutFouls(
  setting: AssemblySetting,
  hub: number,
  link: Link,
  move: Vec3,
  stands: (strut: number) => boolean,
): string | null {
  const far = link.ends[0] === hub ? link.ends[1] : link.ends[0];
  const outward = (node: number): Vec3 => directionFrom(setting, link, node);
  const back = dot(move, outward(far));
  const aside = addScaled(move, outward(far), -back);
  const memory = remembered(setting, move, `${hub} ${link.strut}`);
  if (memory.tilts === undefined) {
    const node = [far, hub].find((n) => tiltFouls(setting, n, link, scale(aside, n === far ? 1 : -1)));
    memory.tilts = node === undefined ? null : setting.topology.truss.nodes[node]!.mark;
  }
  return memory.tilts ?? passesBy(setting, hub, far, link, move, scale(outward(far), back), stands, memory.hits);
}

/** What one way in was found to do: of a strut, what its tilting runs into; of a strut or a hub, what it hits of each strut that may stand. */
interface WayIn {
  tilts?: string | null;
  readonly hits: Map<number, string | null>;
}

/** Orders are tried one after another, and a hub is looked at anew with each neighbour: by setting, movement, and who moves. */
const waysIn = new WeakMap<AssemblySetting, WeakMap<Vec3, Map<string, WayIn>>>();

/** Trusses of more struts are ordered once, so what is kept for them would only take room. */
const MOST_REMEMBERED = 4800;

function remembered(setting: AssemblySetting, move: Vec3, who: string): WayIn {
  if (setting.links.length > MOST_REMEMBERED) return { hits: new Map() };
  let here = waysIn.get(setting);
  if (!here) waysIn.set(setting, (here = new WeakMap()));
  let moves = here.get(move);
  if (!moves) here.set(move, (moves = new Map()));
  let way = moves.get(who);
  if (!way) moves.set(who, (way = { hits: new Map() }));
  return way;
}

/** The answer kept for a strut that stands, found when it is first asked for. */
function hitOf(hits: Map<number, string | null>, strut: number, find: () => string | null): string | null {
  let hit = hits.get(strut);
  if (hit === undefined) hits.set(strut, (hit = find()));
  return hit;
}

/** Whether a strut that tilts about the mouth of its socket, by `aside` at its other end, runs into the rest of the hub. */
function tiltFouls(setting: AssemblySetting, node: number, link: Link, aside: Vec3): boolean {
  const room = setting.roomAt(node);
  const mark = setting.topology.truss.members[link.strut]!.mark;
  const socket = link.sockets[link.ends[0] === node ? 0 : 1];
  const sleeve = room?.sleeveOf(mark);
  if (!room || !socket || !sleeve || length(aside) < TOUCH) return false;
  const half = strutHalf(socket.section);
  const less: Half = typeof half === 'number' ? half - TOUCH : [half[0] - TOUCH, half[1] - TOUCH];
  const to = Math.min(room.reach + largest(half), link.length / 2);
  for (let k = 1; k <= PLACES; k++)
    for (let x = sleeve.mouth + SPACING / 2; x < to; x += SPACING) {
      const share = ((k / PLACES) * (x - sleeve.mouth)) / (link.length - sleeve.mouth);
      const centre = addScaled(scale(socket.direction, x), aside, share);
      if (sectionRing(centre, socket.y, socket.z, less).some((p) => room.solidAt(p, mark))) return true;
    }
  return false;
}

/** The strut that stands, or the hub, that a strut on its way touches though it is clear of it in its place; by mark. */
function passesBy(
  setting: AssemblySetting,
  hub: number,
  far: number,
  link: Link,
  move: Vec3,
  back: Vec3,
  stands: (strut: number) => boolean,
  hits: Map<number, string | null>,
): string | null {
  const { nodes, members } = setting.topology.truss;
  const [atHub, atFar] = [nodes[hub]!.at, nodes[far]!.at];
  const radius = linkRadius(link);
  const middle = scale([atHub[0] + atFar[0], atHub[1] + atFar[1], atHub[2] + atFar[2]], 0.5);
  const inward = directionFrom(setting, link, far);
  const start = addScaled(atFar, inward, setbackAt(link, far));
  for (const s of setting.near(middle, link.length / 2 + length(move))) {
    if (s === link.strut || !stands(s)) continue;
    const hit = hitOf(hits, s, () => {
      const other = setting.links[s]!;
      // What is held by the loose hub goes with it.
      if (other.ends.includes(hub)) return null;
      const [c, d] = clearAxis(setting, other);
      const near = radius + linkRadius(other) - TOUCH;
      if (segmentDistance(start, atHub, c, d).distance < near) return null;
      for (let k = 1; k <= PLACES; k++) {
        const t = k / PLACES;
        const found = segmentDistance(addScaled(start, back, t), addScaled(atHub, move, t), c, d);
        if (found.distance < near) return members[s]!.mark;
      }
      return null;
    });
    if (hit !== null) return hit;
  }
  return null;
}

/** What a loose hub runs into on its way from where it is drawn back to, by mark; null: nothing. */
export function hubFouls(
  setting: AssemblySetting,
  hub: number,
  move: Vec3,
  stands: (strut: number) => boolean,
): string | null {
  const room = setting.roomAt(hub);
  if (!room || length(move) < TOUCH) return null;
  const { nodes, members } = setting.topology.truss;
  const reach = room.reach + length(move);
  const { hits } = remembered(setting, move, `${hub}`);
  for (const s of setting.near(room.at, reach + setting.thickest)) {
    const link = setting.links[s]!;
    if (!stands(s) || link.ends.includes(hub)) continue;
    const hit = hitOf(hits, s, () => {
      const [a, b] = clearAxis(setting, link);
      const radius = linkRadius(link);
      if (radius === 0 || segmentDistance(room.at, room.at, a, b).distance > reach + radius) return null;
      const pieces = room.piecesBut(null);
      const bar = cylinderOf(a, b, radius - TOUCH);
      if (pieces.some((p) => convexDistance(p, bar) > 0 && convexDistance(sweptBy(p, move), bar) === 0))
        return members[s]!.mark;
      for (const n of link.ends) {
        const other = setting.roomAt(n);
        if (!other || distance(other.at, room.at) > reach + other.reach) continue;
        for (const q of other.piecesBut(null))
          if (pieces.some((p) => convexDistance(p, q) > TOUCH && convexDistance(sweptBy(p, move), q) === 0))
            return nodes[n]!.mark;
      }
      return null;
    });
    if (hit !== null) return hit;
  }
  return null;
}

/** The axis of a strut from stop to stop. */
export function clearAxis(setting: AssemblySetting, link: Link): readonly [Vec3, Vec3] {
  const { nodes } = setting.topology.truss;
  return link.ends.map((n) =>
    addScaled(nodes[n]!.at, directionFrom(setting, link, n), setbackAt(link, n)),
  ) as unknown as readonly [Vec3, Vec3];
}

const setbackAt = (link: Link, node: number): number => link.sockets[link.ends[0] === node ? 0 : 1]?.setback ?? 0;

function directionFrom(setting: AssemblySetting, link: Link, node: number): Vec3 {
  const { nodes } = setting.topology.truss;
  const [a, b] = link.ends[0] === node ? link.ends : [link.ends[1], link.ends[0]];
  const [p, q] = [nodes[a]!.at, nodes[b]!.at];
  return link.length > 0 ? scale([q[0] - p[0], q[1] - p[1], q[2] - p[2]], 1 / link.length) : ZERO;
}
