import { cubeEntry } from '../../detailing/systems/cube-rim.js';
import { cubeHalf } from '../../detailing/systems/drilled-cube.js';
import { convexHull2 } from '../../maths/convex-hull2.js';
import { addScaled, dot, scale, type Vec3 } from '../../maths/vec3.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { drawingScale } from '../kit/drawing-scale.js';
import type { Area, Box, Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { capHeight, type Pen } from '../kit/pen.js';
import { type Camera, project } from '../kit/view/camera.js';
import { type Label, type Place, placeLabels } from '../kit/view/place-labels.js';
import { cubePicture } from './cube-picture.js';

/** Points of a round end. */
const ROUND = 28;
/** Room for the marks round the picture, mm. */
const EDGE = 6.5;
const BORE = '#d9d9d9';
/** Share of a mouth that must be seen before its bore is drawn. */
const OPEN = 0.08;

/** A hub in one view, measured before it is drawn: mm at full size, from the node. */
export interface HubPicture {
  readonly arms: readonly Arm[];
  /** Radius of the round middle; of a drilled ball: the ball; of a drilled cube: what it reaches on the sheet. */
  readonly body: number;
  /** The arms are bores in the body, not sleeves round it. */
  readonly bored: boolean;
  /** Faces of a drilled cube that are seen; empty: the body is round. */
  readonly faces: readonly (readonly Point[])[];
  readonly low: Point;
  readonly high: Point;
}

/** What holds one strut, as it is seen. */
interface Arm {
  readonly strut: string;
  /** Middle of the mouth. */
  readonly tip: Point;
  /** Unit direction on the sheet; any where the arm points at the viewer. */
  readonly along: Point;
  /** Silhouette, rim of the mouth, rim of the bore (empty where nothing goes in). */
  readonly silhouette: readonly Point[];
  readonly mouth: readonly Point[];
  readonly bore: readonly Point[];
  /** Half the width across, for the room that the marks must leave. */
  readonly radius: number;
  /** Share of the mouth that is seen: 1 end on, 0 from the side; negative where it points away. */
  readonly open: number;
  readonly depth: number;
}

/** The picture of a hub as its sleeves, spigots or bores in an orthographic view. */
export function hubPicture(hub: HubPart, camera: Camera): HubPicture {
  const cube = hub.system === 'drilled-cube' ? cubeHalf(hub) : 0;
  const bored = hub.system === 'drilled-ball' || cube > 0;
  const arms = hub.sockets.map((socket) => (cube > 0 ? boreOf(socket, cube, camera) : armOf(socket, camera)));
  const faces = cube > 0 ? cubePicture(cube, camera) : [];
  const body =
    cube > 0
      ? Math.max(...faces.flat(2).map(Math.abs))
      : bored
        ? Math.max(1, ...hub.sockets.map((s) => Math.hypot((s.setback ?? 0) + s.depth, Math.max(...boreHalf(s)))))
        : Math.max(1, ...arms.map((s) => s.radius)) * 1.15;
  const low: [number, number] = [-body, -body];
  const high: [number, number] = [body, body];
  for (const arm of arms)
    for (const p of arm.silhouette)
      for (const axis of [0, 1] as const) {
        low[axis] = Math.min(low[axis], p[axis]);
        high[axis] = Math.max(high[axis], p[axis]);
      }
  return { arms, body, bored, faces, low, high };
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
 * Draws a hub into the area: farthest arm first, the body a ball between those that point away and those that point to
 * the viewer; each strut's mark beside its mouth.
 */
export function drawHubPicture(pen: Pen, area: Area, picture: HubPicture, factor: number): void {
  const { arms, body, bored, faces, low, high } = picture;
  const middle: Point = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  const centre: Point = [area.x + area.width / 2, area.y + area.height / 2];
  const at = ([x, y]: Point): Point => [centre[0] + factor * (x - middle[0]), centre[1] - factor * (y - middle[1])];
  const order = arms.map((arm, i) => ({ arm, i })).sort((a, b) => a.arm.depth - b.arm.depth || a.i - b.i);
  const [nx, ny] = at([0, 0]);
  const drawBody = (): void => {
    if (faces.length === 0) pen.circle(nx, ny, body * factor, { fill: INK.white, width: LINE.normal });
    for (const face of faces) pen.polygon(face.map(at), INK.white, { width: LINE.normal });
  };
  let bodyDrawn = false;
  for (const { arm } of order) {
    if (arm.depth > 0 && !bodyDrawn) {
      drawBody();
      bodyDrawn = true;
    }
    if (!bored) pen.polygon(arm.silhouette.map(at), INK.white, { width: LINE.normal });
    if (arm.open >= 0 && !bored) pen.polygon(arm.mouth.map(at), INK.white, { width: LINE.normal });
    if (arm.open > OPEN && arm.bore.length > 0) pen.polygon(arm.bore.map(at), BORE, { width: LINE.thin });
  }
  if (!bodyDrawn) drawBody();
  drawMarks(pen, area, arms, at, factor, {
    x: nx,
    y: ny,
    width: 2 * body * factor,
    height: 2 * body * factor,
    angle: 0,
  });
}

/** Half the clear size of a bore along its own y and z, mm. */
const boreHalf = ({ bore }: Socket): readonly [number, number] =>
  typeof bore === 'number' ? [bore / 2, bore / 2] : [bore[0] / 2, bore[1] / 2];

function armOf(socket: Socket, camera: Camera): Arm {
  const [u, v, w] = project(camera, socket.direction);
  const length = (socket.setback ?? 0) + socket.depth;
  const flat = Math.hypot(u, v);
  const sleeve = (socket.form ?? 'sleeve') === 'sleeve';
  const clear = boreHalf(socket);
  const outer = sleeve ? ([clear[0] + socket.wall, clear[1] + socket.wall] as const) : clear;
  const ring = (half: readonly [number, number], along: number): Point[] =>
    rim(socket, half, along).map((p) => {
      const [x, y] = project(camera, p);
      return [x, y];
    });
  const mouth = ring(outer, length);
  return {
    strut: socket.strut,
    tip: [u * length, v * length],
    along: flat > 1e-9 ? [u / flat, v / flat] : [1, 0],
    silhouette: convexHull2([...mouth, ...ring(outer, 0)]),
    mouth,
    bore: sleeve ? ring(clear, length) : [],
    radius: Math.max(...outer),
    open: w,
    depth: w * length,
  };
}

/** A bore of a cube: its rim lies on the face, and is seen where the face is. */
function boreOf(socket: Socket, half: number, camera: Camera): Arm {
  const { face, cosine } = cubeEntry(socket);
  const arm = armOf(socket, camera);
  const open = dot(face.normal, camera.toward);
  const bore = rim(socket, boreHalf(socket), (socket.setback ?? 0) + socket.depth).map((p): Point => {
    const [x, y] = project(camera, addScaled(p, socket.direction, (half - dot(p, face.normal)) / cosine));
    return [x, y];
  });
  return { ...arm, bore, open, depth: open };
}

/** Points of a socket's outline, half as large as `half` along its y and z, at a distance along it from the node. */
function rim(socket: Socket, half: readonly [number, number], along: number): Vec3[] {
  const at = (a: number, b: number): Vec3 =>
    addScaled(addScaled(scale(socket.direction, along), socket.y, a * half[0]), socket.z, b * half[1]);
  if (typeof socket.bore !== 'number') return [at(-1, -1), at(1, -1), at(1, 1), at(-1, 1)];
  return Array.from({ length: ROUND }, (_, k) =>
    at(Math.cos((2 * Math.PI * k) / ROUND), Math.sin((2 * Math.PI * k) / ROUND)),
  );
}

function drawMarks(
  pen: Pen,
  area: Area,
  arms: readonly Arm[],
  at: (p: Point) => Point,
  factor: number,
  body: Box,
): void {
  const style = { size: SIZE.note, bold: true };
  const bodies: Box[] = arms.map((s) => {
    const [x, y] = at([s.tip[0] / 2, s.tip[1] / 2]);
    const length = Math.hypot(...s.tip) * factor + 2 * s.radius * Math.abs(s.open) * factor;
    return { x, y, width: length, height: 2 * s.radius * factor, angle: Math.atan2(-s.along[1], s.along[0]) };
  });
  const labels = arms.map((arm, i): Label => {
    const width = pen.widthOf(arm.strut, style) + 1;
    const [x, y] = at(arm.tip);
    const places: Place[] = [];
    for (const off of [2.2, 4, 6, 9, 13])
      for (const turn of [0, 0.3, -0.3, 0.6, -0.6, 1, -1, 1.5, -1.5]) {
        const angle = Math.atan2(-arm.along[1], arm.along[0]) + turn;
        const [c, s] = [Math.cos(angle), Math.sin(angle)];
        const past = arm.radius * Math.abs(arm.open) * factor;
        places.push({
          box: { x: x + c * (past + off + width / 2), y: y + s * (past + off + 1), width, height: 2.8, angle: 0 },
          leader: off > 4 ? [x, y] : null,
          cost: off + 3 * Math.abs(turn),
        });
      }
    return { key: arm.strut, owner: `${i}`, width, height: 2.8, anchors: [[x, y]], places };
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
