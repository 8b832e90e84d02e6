import { dot, type Vec3 } from '../../maths/vec3.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { drawingScale } from '../kit/drawing-scale.js';
import type { Area, Box, Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { capHeight, type Pen } from '../kit/pen.js';
import { type Camera, project } from '../kit/view/camera.js';
import { type Label, type Place, placeLabels } from '../kit/view/place-labels.js';

/** Points of a round end. */
const ROUND = 28;
/** Room for the marks round the picture, mm. */
const EDGE = 6.5;

/** A hub in one view, measured before it is drawn: mm at full size, from the node. */
export interface HubPicture {
  readonly sleeves: readonly Sleeve[];
  readonly body: number;
  readonly low: Point;
  readonly high: Point;
}

/** The picture of a hub as its sleeves in an orthographic view. */
export function hubPicture(hub: HubPart, camera: Camera): HubPicture {
  const sleeves = hub.sockets.map((socket) => sleeveOf(socket, camera));
  const body = Math.max(1, ...sleeves.map((s) => s.radius)) * 1.15;
  const low: [number, number] = [-body, -body];
  const high: [number, number] = [body, body];
  for (const { tip, radius } of sleeves)
    for (const axis of [0, 1] as const) {
      low[axis] = Math.min(low[axis], tip[axis] - radius);
      high[axis] = Math.max(high[axis], tip[axis] + radius);
    }
  return { sleeves, body, low, high };
}

/** The scale of ISO 5455, 1:1 at most, at which the picture and its marks fit into a box. */
export function hubPictureScale(
  picture: HubPicture,
  width: number,
  height: number,
): { readonly factor: number; readonly name: string } {
  const [w, h] = [picture.high[0] - picture.low[0], picture.high[1] - picture.low[1]];
  return drawingScale([w, h], [width - 2 * EDGE, height - 2 * EDGE], 1);
}

/** Height that the picture and its marks take at a scale, mm. */
export const hubPictureHeight = (picture: HubPicture, factor: number): number =>
  (picture.high[1] - picture.low[1]) * factor + 2 * EDGE;

/**
 * Draws a hub into the area: farthest sleeve first, each a band with its round mouth, the body a ball between those that
 * point away and those that point to the viewer; each strut's mark beside its mouth.
 */
export function drawHubPicture(pen: Pen, area: Area, picture: HubPicture, factor: number): void {
  const { sleeves, body, low, high } = picture;
  const middle: Point = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  const centre: Point = [area.x + area.width / 2, area.y + area.height / 2];
  const at = ([x, y]: Point): Point => [centre[0] + factor * (x - middle[0]), centre[1] - factor * (y - middle[1])];
  const order = sleeves
    .map((sleeve, i) => ({ sleeve, i }))
    .sort((a, b) => a.sleeve.depth - b.sleeve.depth || a.i - b.i);
  const [nx, ny] = at([0, 0]);
  const drawBody = (): void => pen.circle(nx, ny, body * factor, { fill: INK.white, width: LINE.normal });
  let bodyDrawn = false;
  for (const { sleeve } of order) {
    if (sleeve.depth > 0 && !bodyDrawn) {
      drawBody();
      bodyDrawn = true;
    }
    drawSleeve(pen, sleeve, at);
  }
  if (!bodyDrawn) drawBody();
  drawMarks(pen, area, sleeves, at, factor, {
    x: nx,
    y: ny,
    width: 2 * body * factor,
    height: 2 * body * factor,
    angle: 0,
  });
}

export interface Sleeve {
  readonly strut: string;
  /** Middle of the mouth, mm from the node on the view's axes. */
  readonly tip: Point;
  /** Unit direction on the sheet; any where the sleeve points at the viewer. */
  readonly along: Point;
  readonly radius: number;
  readonly bore: number;
  /** Share of the round mouth that is seen: 1 end on, 0 from the side; negative where it points away. */
  readonly open: number;
  readonly depth: number;
}

function sleeveOf(socket: Socket, camera: Camera): Sleeve {
  const [u, v, w] = project(camera, socket.direction);
  const length = (socket.setback ?? 0) + socket.depth;
  const flat = Math.hypot(u, v);
  const bore = typeof socket.bore === 'number' ? socket.bore / 2 : Math.hypot(...socket.bore) / 2;
  return {
    strut: socket.strut,
    tip: [u * length, v * length],
    along: flat > 1e-9 ? [u / flat, v / flat] : [1, 0],
    radius: bore + socket.wall,
    bore,
    open: w,
    depth: w * length,
  };
}

function drawSleeve(pen: Pen, sleeve: Sleeve, at: (p: Point) => Point): void {
  const { tip, along, radius } = sleeve;
  const across: Point = [-along[1], along[0]];
  const put = (base: Point, u: number, v: number): Point =>
    at([base[0] + u * along[0] + v * across[0], base[1] + u * along[1] + v * across[1]]);
  const band = [put([0, 0], 0, -radius), put(tip, 0, -radius), put(tip, 0, radius), put([0, 0], 0, radius)];
  const end = (r: number): Point[] =>
    Array.from({ length: ROUND }, (_, k) => {
      const angle = (2 * Math.PI * k) / ROUND;
      return put(tip, r * Math.abs(sleeve.open) * Math.cos(angle), r * Math.sin(angle));
    });
  if (sleeve.open < 0) pen.polygon(end(radius), INK.white, { width: LINE.normal });
  pen.polygon(band, INK.white);
  pen.line(band[0]!, band[1]!, { width: LINE.normal });
  pen.line(band[2]!, band[3]!, { width: LINE.normal });
  if (sleeve.open >= 0) {
    pen.polygon(end(radius), INK.white, { width: LINE.normal });
    if (sleeve.open > 0.08) pen.polygon(end(sleeve.bore), '#d9d9d9', { width: LINE.thin });
  }
}

function drawMarks(
  pen: Pen,
  area: Area,
  sleeves: readonly Sleeve[],
  at: (p: Point) => Point,
  factor: number,
  body: Box,
): void {
  const style = { size: SIZE.note, bold: true };
  const bodies: Box[] = sleeves.map((s) => {
    const [x, y] = at([s.tip[0] / 2, s.tip[1] / 2]);
    const length = Math.hypot(...s.tip) * factor + 2 * s.radius * Math.abs(s.open) * factor;
    return { x, y, width: length, height: 2 * s.radius * factor, angle: Math.atan2(-s.along[1], s.along[0]) };
  });
  const labels = sleeves.map((sleeve, i): Label => {
    const width = pen.widthOf(sleeve.strut, style) + 1;
    const [x, y] = at(sleeve.tip);
    const places: Place[] = [];
    for (const off of [2.2, 4, 6, 9, 13])
      for (const turn of [0, 0.3, -0.3, 0.6, -0.6, 1, -1, 1.5, -1.5]) {
        const angle = Math.atan2(-sleeve.along[1], sleeve.along[0]) + turn;
        const [c, s] = [Math.cos(angle), Math.sin(angle)];
        const past = sleeve.radius * Math.abs(sleeve.open) * factor;
        places.push({
          box: { x: x + c * (past + off + width / 2), y: y + s * (past + off + 1), width, height: 2.8, angle: 0 },
          leader: off > 4 ? [x, y] : null,
          cost: off + 3 * Math.abs(turn),
        });
      }
    return { key: sleeve.strut, owner: `${i}`, width, height: 2.8, anchors: [[x, y]], places };
  });
  const outlines = bodies.map((b, i) => {
    const [c, s] = [Math.cos(b.angle), Math.sin(b.angle)];
    const half = b.width / 2;
    return {
      owner: `body ${i}`,
      from: [b.x - c * half, b.y - s * half] as Point,
      to: [b.x + c * half, b.y + s * half] as Point,
    };
  });
  const placed = placeLabels(
    labels,
    area,
    outlines,
    [body, ...bodies].map((box) => ({ ...box, entered: true })),
  );
  for (const [strut, place] of placed) {
    if (place.leader) pen.line([place.box.x, place.box.y], place.leader, { width: LINE.hair });
    pen.blot(place.box);
    pen.text(strut, place.box.x, place.box.y + capHeight(SIZE.note) / 2, { ...style, align: 'centre' });
  }
}

/** View along the outward direction from outside, with the truss's up as near to up on the sheet as it goes. */
export function outsideCamera(outward: Vec3): Camera {
  const reference: Vec3 = Math.abs(outward[2]) > 0.98 ? [0, 1, 0] : [0, 0, 1];
  const along = dot(reference, outward);
  const raw: Vec3 = [
    reference[0] - along * outward[0],
    reference[1] - along * outward[1],
    reference[2] - along * outward[2],
  ];
  const size = Math.hypot(...raw);
  const up: Vec3 = [raw[0] / size, raw[1] / size, raw[2] / size];
  // right x up = toward
  const right: Vec3 = [
    up[1] * outward[2] - up[2] * outward[1],
    up[2] * outward[0] - up[0] * outward[2],
    up[0] * outward[1] - up[1] * outward[0],
  ];
  return { name: 'From outside', right, up, toward: outward };
}
