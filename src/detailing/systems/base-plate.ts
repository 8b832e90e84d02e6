import type { Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import { largest, type Sleeve } from './sleeve.js';

/** The base plate of a foot, level, under the node: heights from the node, mm. */
export interface BasePlate {
  /** Of the plate's upper face; negative. */
  readonly top: number;
  readonly thickness: number;
  readonly radius: number;
  /** Radius of the body where it stands on the plate. */
  readonly pedestal: number;
  /** Anchor holes on a circle, the first at `turn` from x. */
  readonly anchors: {
    readonly count: number;
    readonly diameter: number;
    readonly circle: number;
    readonly turn: number;
  };
  /** Diameter of the levelling screw's hole in the middle, from below; 0: none. */
  readonly levelling: number;
}

/** Air between a strut and the plate, mm. */
const AIR = 1;
/** Play of an anchor in its hole, mm; common practice, no source. */
const ANCHOR_PLAY = 0.5;
/** Anchor circle to plate edge, and clear of the pedestal for a washer, over the anchor's diameter; common practice, no source. */
const [TO_EDGE, WASHER] = [1.3, 1.2] as const;
/** A strut that falls more steeply than this cannot leave over the plate, rad. */
export const STEEPEST_FALL = Math.PI / 6;
const TURNS = 24;

/** The plate under a node's sleeves: as high as every strut leaves it free over the plate's whole width. */
export function basePlate(sleeves: readonly Sleeve[], job: Job): BasePlate {
  const { plate_mm, thickness_mm, anchors, anchor_mm, levelling_mm } = job.nodes.foot;
  const radius = plate_mm / 2;
  let drop = 0;
  for (const s of sleeves) {
    const d = s.socket.direction;
    const level = Math.hypot(d[0], d[1]);
    const half = largest(s.cone) * (typeof s.cone === 'number' ? 1 : Math.SQRT2);
    // The lowest line of the strut's sleeve over the plate: at the root where it rises, at the plate's edge where it falls.
    const falls = d[2] < 0 ? Math.min(-d[2] / Math.max(level, 1e-9), Math.tan(STEEPEST_FALL)) * radius : 0;
    drop = Math.max(drop, falls + half * Math.max(level, 0.2) - Math.max(0, d[2]) * s.root);
  }
  const circle = radius - TO_EDGE * anchor_mm;
  const widest = Math.max(3, ...sleeves.map((s) => largest(s.outer)));
  return {
    top: -(drop + AIR),
    thickness: thickness_mm,
    radius,
    pedestal: Math.max(2, Math.min(anchors > 0 ? circle - WASHER * anchor_mm : radius - 1, 1.4 * widest)),
    anchors: { count: anchors, diameter: anchor_mm + ANCHOR_PLAY, circle, turn: bestTurn(sleeves, anchors) },
    levelling: levelling_mm,
  };
}

/** Turn of the anchors that keeps them farthest, in plan, from the struts above, so that a driver gets at them. */
function bestTurn(sleeves: readonly Sleeve[], count: number): number {
  if (count === 0) return 0;
  let [best, most] = [0, -1];
  for (let k = 0; k < TURNS; k++) {
    const turn = (2 * Math.PI * k) / count / TURNS;
    let least = Math.PI;
    for (let a = 0; a < count; a++)
      for (const s of sleeves) {
        const d = s.socket.direction;
        if (Math.hypot(d[0], d[1]) < 0.2) continue;
        const off = Math.abs(Math.atan2(d[1], d[0]) - turn - (2 * Math.PI * a) / count) % (2 * Math.PI);
        least = Math.min(least, off, 2 * Math.PI - off);
      }
    if (least > most + 1e-9) [best, most] = [turn, least];
  }
  return best;
}

/** Corners of a level circle about the node's upright: a polygon that contains it. */
export function levelRing(height: number, radius: number, sides: number): Vec3[] {
  const r = radius / Math.cos(Math.PI / sides);
  return Array.from({ length: sides }, (_, k): Vec3 => {
    const angle = (2 * Math.PI * (k + 0.5)) / sides;
    return [r * Math.cos(angle), r * Math.sin(angle), height];
  });
}

/** How far the pedestal reaches into the plate, mm, so that the two share no face. */
export const INTO_PLATE = 0.4;

/** mm³ of the plate without its holes' plastic. */
export function plateVolume(b: BasePlate): number {
  const hole = (Math.PI * b.anchors.diameter ** 2) / 4;
  return (Math.PI * b.radius ** 2 - b.anchors.count * hole - (Math.PI * b.levelling ** 2) / 4) * b.thickness;
}
