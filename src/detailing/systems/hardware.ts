import { add, addScaled, cross, perpendicular, scale, type Vec3 } from '../../maths/vec3.js';
import { SCREW } from './clamp-parts.js';
import type { HubShape } from './hub-shape.js';
import { grow, ringPoints, type Sleeve } from './sleeve.js';
import { between, COVER_SIDES } from './sleeve-cover.js';
import type { ConvexPiece } from './system.js';

/** A pin's ends stand out by its diameter on either side, as a nail's head does; common practice, no source. */
const PIN_OUT = 1;
/** A pin stands at a share of the socket's depth, from the stop; which one its neighbours decide. */
const [PIN_FROM, PIN_TO] = [0.5, 0.7] as const;
/** Head of an M3 screw with a hexagon socket: diameter and height, mm (ISO 4762). */
const SCREW_HEAD = { diameter: 5.5, height: 3 } as const;
/** Washer of a bolt in timber, over the bolt's diameter (EN 1995-1-1 10.4.3 (2)), and how far washer, nut and thread stand out. */
const [WASHER, BOLT_OUT] = [3, 1.6] as const;
/** Washer and head of an anchor over its diameter; common practice, no source. */
const [ANCHOR_WASHER, ANCHOR_OUT] = [2.2, 1] as const;
/** A cable tie round cradle and cap: its width, and how far it stands out of its groove; mm. Its head is turned from the panel. */
const [TIE_WIDTH, TIE_OUT] = [4, 0.6] as const;

/**
 * What stands out of a hub beside the hub itself, as convex pieces relative to the node: ends of pins, screw heads, bolts, anchors, the ties of
 * caps. A pin or a tie may be turned about its strut, so a collar round the sleeve stands for it.
 */
export function hardwareCover({ sleeves, base, clamp }: HubShape): ConvexPiece[] {
  const pieces: ConvexPiece[] = [];
  for (const s of sleeves) {
    const { pin, depth, travel, bolted, detail } = s.socket;
    if (pin > 0) {
      const at = travel === undefined ? [PIN_FROM * depth, PIN_TO * depth] : [travel - pin, travel];
      pieces.push(collar(s, s.stop + at[0]! - pin, s.stop + at[1]! + pin, PIN_OUT * pin));
    }
    if (detail === 'drop-in' && s.hollow) pieces.push(collar(s, s.mouth - TIE_WIDTH, s.mouth, TIE_OUT));
    if (bolted) {
      const along = bolted.along === 'y' ? s.socket.y : s.socket.z;
      const { shape } = s.socket.section;
      const through = shape.kind === 'rectangle' ? (bolted.along === 'y' ? shape.width : shape.height) / 2 : 0;
      for (let k = 0; k < bolted.bolts; k++) {
        const centre = scale(s.socket.direction, s.stop + bolted.endDistance + k * bolted.spacing);
        const out = through + BOLT_OUT * bolted.diameter;
        pieces.push(cylinder(addScaled(centre, along, -out), along, 2 * out, (WASHER / 2) * bolted.diameter));
      }
    }
  }
  for (const at of clamp?.screws ?? [])
    pieces.push(
      cylinder(
        addScaled(at, clamp!.normal, clamp!.half),
        clamp!.normal,
        SCREW_HEAD.height,
        Math.max(SCREW_HEAD.diameter, SCREW.clear) / 2,
      ),
    );
  if (base)
    for (let k = 0; k < base.anchors.count; k++) {
      const { circle, turn, count, diameter } = base.anchors;
      const a = turn + (2 * Math.PI * k) / count;
      const foot: Vec3 = [circle * Math.cos(a), circle * Math.sin(a), base.top];
      pieces.push(cylinder(foot, [0, 0, 1], ANCHOR_OUT * diameter, (ANCHOR_WASHER / 2) * diameter));
    }
  return pieces;
}

/** The sleeve between two distances, grown by `out`. */
const collar = (s: Sleeve, from: number, to: number, out: number): ConvexPiece =>
  between(
    ringPoints(s.socket, from, grow(s.outer, out), COVER_SIDES),
    ringPoints(s.socket, to, grow(s.outer, out), COVER_SIDES),
  );

/** A prism that contains the cylinder of `length` from `foot` along the unit vector. */
function cylinder(foot: Vec3, along: Vec3, length: number, radius: number): ConvexPiece {
  const u = perpendicular(along);
  const v = cross(along, u);
  const r = radius / Math.cos(Math.PI / COVER_SIDES);
  const ring = (h: number): Vec3[] =>
    Array.from({ length: COVER_SIDES }, (_, k) => {
      const a = (2 * Math.PI * k) / COVER_SIDES;
      return addScaled(add(foot, addScaled(scale(u, r * Math.cos(a)), v, r * Math.sin(a))), along, h);
    });
  return between(ring(0), ring(length));
}
