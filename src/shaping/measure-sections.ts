import { areaOf, largest, type Sleeve } from '../detailing/systems/sleeve.js';
import { add, dot, scale, type Vec3 } from '../maths/vec3.js';
import type { ShapedPiece, WeakestSection } from '../model/shaped.js';
import { sectionsAcross } from './section-area.js';

/** Planes between a sleeve's root and its stop, and how far they keep from the stop's floor, mm. */
const PLANES = 2;
const BEFORE_STOP = 0.35;
/** Half-width of what counts in the core, as a share of the widest cone's. */
const CORE_SHARE = 1.5;

/** Section of a sleeve through which its strut's force comes, as it is drawn, mm²: the ring round a bore, the whole of a spigot. */
export const ownSection = (s: Sleeve): number => (s.hollow ? areaOf(s.outer) - areaOf(s.inner) : areaOf(s.outer));

/**
 * The section of a hub's plastic that is least for what it must pass on, measured on the made mesh by planes square to each strut:
 * from the sleeve's root to its stop it must be no less than that sleeve's own section, and through the middle of the body no less
 * than the largest sleeve's. Plastic counts as far from the strut's line as force spreads at 45 degrees from the cone, in the core to
 * one and a half cones: walls of other sleeves that a plane runs along carry nothing there. Of pieces that are screwed together the sections are added. null: no sleeves.
 *
 * @param at the node; each piece's placement says where its mesh lies about it
 */
export function weakestSection(
  pieces: readonly ShapedPiece[],
  sleeves: readonly Sleeve[],
  at: Vec3,
): WeakestSection | null {
  const largestOwn = Math.max(0, ...sleeves.map(ownSection));
  const core = CORE_SHARE * Math.max(0, ...sleeves.map((s) => largest(s.cone)));
  const centre = middleOf(sleeves);
  let weakest: WeakestSection | null = null;
  const weigh = (
    s: Sleeve,
    where: WeakestSection['where'],
    distance: number,
    within: number,
    area: number,
    needed: number,
  ): void => {
    if (needed > 0 && (!weakest || area * weakest.needed < weakest.area * needed))
      weakest = { strut: s.socket.strut, where, distance, within, area, needed };
  };
  const frames = pieces.map((piece) => intoPrint(piece, at));
  for (const s of sleeves) {
    const { direction, y, z } = s.socket;
    const cuts = pieces.map((piece, i) => {
      const { node, turn } = frames[i]!;
      return sectionsAcross(piece, node, turn(direction), turn(y), turn(z));
    });
    const areaAt = (distance: number, within: number, beside?: readonly [number, number]): number =>
      cuts.reduce((sum, c) => sum + c.at(distance, within, beside), 0);
    const [from, to] = [s.root + BEFORE_STOP, s.stop - BEFORE_STOP];
    for (let k = 0; k <= PLANES && from <= to; k++) {
      const distance = from + ((to - from) * k) / PLANES;
      const within = largest(s.cone) + s.stop - distance;
      weigh(s, 'root', distance, within, areaAt(distance, within), ownSection(s));
    }
    if (sleeves.length < 2) continue;
    const distance = dot(centre, direction);
    weigh(s, 'core', distance, core, areaAt(distance, core, [dot(centre, y), dot(centre, z)]), largestOwn);
  }
  return weakest;
}

/** The mean of the middles of the body's rings: inside the body, which is their hull. */
function middleOf(sleeves: readonly Sleeve[]): Vec3 {
  const middles = sleeves.flatMap((s) => s.rings.map(([at]) => scale(s.socket.direction, at)));
  const sum = middles.reduce<Vec3>(add, [0, 0, 0]);
  return scale(sum, 1 / Math.max(1, middles.length));
}

/** Where the node is in a piece's own axes, and directions turned into them: by the transpose of its placement's rotation. */
function intoPrint({ placement: m }: ShapedPiece, at: Vec3): { readonly node: Vec3; turn(d: Vec3): Vec3 } {
  const turn = (d: Vec3): Vec3 => [
    m[0]! * d[0] + m[4]! * d[1] + m[8]! * d[2],
    m[1]! * d[0] + m[5]! * d[1] + m[9]! * d[2],
    m[2]! * d[0] + m[6]! * d[1] + m[10]! * d[2],
  ];
  return { node: turn([at[0] - m[3]!, at[1] - m[7]!, at[2] - m[11]!]), turn };
}
