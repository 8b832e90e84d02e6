import type { CubeFace } from '../../detailing/systems/cube-faces.js';
import type { Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { capHeight, type Pen } from '../kit/pen.js';
import { type Label, type Place, placeLabels } from '../kit/view/place-labels.js';
import type { CubeSetting } from './cube-setting.js';

/** Points of a rim. */
const ROUND = 32;
/** Arms of a centre's cross, and how far the arrow of a lean reaches past the rim, mm. */
const [ARM, ARROW] = [2.5, 3] as const;
/** Height of a mark, mm. */
const HEIGHT = 2.8;
/** A tilt that rounds to nothing, degrees. */
export const LEAST_TILT = 0.05;

type Bore = CubeSetting & { readonly strut: string };

/** A face at full size, seen from outside, from its top left corner: its edges, its name, and each bore's rim, centre, lean and mark. */
export function drawCubeFace(pen: Pen, [x, y]: Point, edge: number, face: CubeFace, bores: readonly Bore[]): void {
  const middle: Point = [x + edge / 2, y + edge / 2];
  // y runs down the sheet.
  const on = ([right, up]: Point): Point => [middle[0] + right, middle[1] - up];
  pen.polyline(
    [
      [x, y],
      [x + edge, y],
      [x + edge, y + edge],
      [x, y + edge],
    ],
    { width: LINE.thin },
    true,
  );
  const name = { size: SIZE.note, colour: INK.grey };
  const nameWidth = pen.text(face.name, x + 1, y + 3.2, name);
  for (const bore of bores) {
    pen.polyline(rimOf(bore).map(on), { width: LINE.thin }, true);
    const [cx, cy] = on([bore.right, bore.up]);
    pen.line([cx - ARM, cy], [cx + ARM, cy], { width: LINE.hair });
    pen.line([cx, cy - ARM], [cx, cy + ARM], { width: LINE.hair });
    if (bore.tilt >= LEAST_TILT) drawLean(pen, [cx, cy], bore);
  }
  const labels = bores.map((bore, i): Label => labelOf(pen, bore, i, on));
  const rims = bores.map((bore) => {
    const [cx, cy] = on([bore.right, bore.up]);
    return { x: cx, y: cy, width: 2 * bore.rim[0], height: 2 * bore.rim[1], angle: 0, entered: true };
  });
  const obstacles = [...rims, { x: x + 1 + nameWidth / 2, y: y + 2.2, width: nameWidth + 1, height: HEIGHT, angle: 0 }];
  for (const [strut, place] of placeLabels(labels, { x, y, width: edge, height: edge }, [], obstacles)) {
    if (place.leader) pen.line([place.box.x, place.box.y], place.leader, { width: LINE.hair });
    pen.blot(place.box);
    pen.text(strut, place.box.x, place.box.y + capHeight(SIZE.note) / 2, { ...BOLD, align: 'centre' });
  }
}

const BOLD = { size: SIZE.note, bold: true } as const;

/** The ellipse in which a round bore meets the face: its long half is the radius over the cosine of the tilt, along the lean. */
function rimOf({ right, up, rim, tilt, turn }: Bore): Point[] {
  const [t, a] = [(tilt * Math.PI) / 180, (turn * Math.PI) / 180];
  const radius = rim[0] / Math.hypot(1, Math.tan(t) * Math.cos(a));
  const [c, s] = [Math.cos(a), Math.sin(a)];
  return Array.from({ length: ROUND }, (_, k): Point => {
    const p = (2 * Math.PI * k) / ROUND;
    const [along, across] = [(radius / Math.cos(t)) * Math.cos(p), radius * Math.sin(p)];
    return [right + along * c - across * s, up + along * s + across * c];
  });
}

/** The arrow from a bore's middle to where its drill leans. */
function drawLean(pen: Pen, [x, y]: Point, { turn, rim }: Bore): void {
  const a = (turn * Math.PI) / 180;
  const [c, s] = [Math.cos(a), -Math.sin(a)];
  const length = Math.min(rim[0], rim[1]) + ARROW;
  const at = (along: number, off: number): Point => [x + c * along - s * off, y + s * along + c * off];
  pen.line([x, y], at(length, 0), { width: LINE.thin });
  pen.polygon([at(length, 0), at(length - 2, -0.8), at(length - 2, 0.8)], INK.black);
}

/** Beside the rim, away from the lean first. */
function labelOf(pen: Pen, bore: Bore, i: number, on: (p: Point) => Point): Label {
  const width = pen.widthOf(bore.strut, BOLD) + 1;
  const [x, y] = on([bore.right, bore.up]);
  const back = (-bore.turn * Math.PI) / 180 + Math.PI;
  const places: Place[] = [];
  for (const off of [0.8, 2, 4, 7])
    for (let k = 0; k < 12; k++) {
      const angle = back + ((k % 2 ? 1 : -1) * Math.ceil(k / 2) * Math.PI) / 6;
      const [c, s] = [Math.cos(angle), Math.sin(angle)];
      const [far, high] = [bore.rim[0] + off + width / 2, bore.rim[1] + off + HEIGHT / 2];
      places.push({
        box: { x: x + c * far, y: y + s * high, width, height: HEIGHT, angle: 0 },
        leader: off > 2 ? [x, y] : null,
        cost: off + k / 2,
      });
    }
  return { key: bore.strut, owner: `${i}`, width, height: HEIGHT, anchors: [[x, y]], places };
}
