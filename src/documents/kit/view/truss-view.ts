import type { Vec3 } from '../../../maths/vec3.js';
import { drawingScale } from '../drawing-scale.js';
import { type Area, type Box, type Point, shrink } from '../geometry2.js';
import { INK, LINE, SIZE } from '../ink.js';
import { CAP, capHeight, type Pen, POINTS } from '../pen.js';
import { type Camera, project } from './camera.js';
import { type Label, type Place, placeLabels } from './place-labels.js';
import { drawStroke, type Stroke, strokeWidth } from './stroke.js';

export interface ViewNode {
  readonly mark: string;
  readonly at: Vec3;
  /** false: no mark; a dot. */
  readonly labelled?: boolean;
  readonly support?: boolean;
}

export interface ViewStrut {
  readonly mark: string;
  readonly from: number;
  readonly to: number;
  readonly stroke: Stroke;
  /** null: no label. */
  readonly label: { readonly bold: string; readonly plain: string } | null;
}

export interface ViewArrow {
  readonly node: number;
  /** In the truss's axes; only its direction is drawn. */
  readonly direction: Vec3;
  /** mm on the sheet. */
  readonly length: number;
  readonly label: string;
}

export interface TrussView {
  readonly camera: Camera;
  readonly nodes: readonly ViewNode[];
  readonly struts: readonly ViewStrut[];
  readonly arrows?: readonly ViewArrow[];
  /** iso: the largest scale of ISO 5455 that fits; fill: as large as the area allows, not to scale; a number: that scale. */
  readonly scale: 'iso' | 'fill' | { readonly factor: number; readonly name: string };
  /** Room round the figure for marks that move outward, mm. */
  readonly edge?: number;
  /** own: a node's mark stands on its node or, where a nearer node's mark is in the way, not at all; all (usual): it moves aside. */
  readonly marks?: 'all' | 'own';
}

export interface DrawnView {
  readonly scale: string;
  readonly factor: number;
  /** Labels for which the sheet had no room. */
  readonly unplaced: readonly string[];
}

const EDGE = 9;
const PILL = 4.4;
/** White on both sides of a nearer strut where it passes a farther one, mm. */
const HALO = 0.5;

/** Draws a truss in orthographic view into the area: farther struts first, nearer ones with a white edge, then marks where none touches another. */
export function drawTrussView(pen: Pen, area: Area, view: TrussView): DrawnView {
  const flat = view.nodes.map((n) => project(view.camera, n.at));
  const [low, high] = bounds(flat);
  const room = shrink(area, view.edge ?? EDGE);
  const { factor, name } = scaleOf(view.scale, [high[0] - low[0], high[1] - low[1]], [room.width, room.height]);
  const middle: Point = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  const centre: Point = [area.x + area.width / 2, area.y + area.height / 2];
  const onSheet = (p: Vec3): Point => [
    centre[0] + factor * (p[0] - middle[0]),
    centre[1] - factor * (p[1] - middle[1]),
  ];
  const at = flat.map(onSheet);

  const order = view.struts.map((strut, i) => ({ strut, i, depth: flat[strut.from]![2] + flat[strut.to]![2] }));
  order.sort((a, b) => faintFirst(a.strut) - faintFirst(b.strut) || a.depth - b.depth || a.i - b.i);
  for (const { strut } of order) drawStrut(pen, at[strut.from]!, at[strut.to]!, strut.stroke);
  view.nodes.forEach((node, i) => {
    if (node.support) drawSupport(pen, at[i]!);
  });

  const arrows = (view.arrows ?? []).map((arrow) => ({ arrow, ...arrowOnSheet(arrow, at[arrow.node]!, view.camera) }));
  for (const { from, to } of arrows) drawArrow(pen, from, to);

  const lines = view.struts
    .filter((s) => s.stroke.kind !== 'faint')
    .map((s) => ({ owner: s.mark, from: at[s.from]!, to: at[s.to]! }))
    .concat(arrows.map(({ arrow, from, to }) => ({ owner: `arrow ${arrow.node}`, from, to })));
  const nodeLabels = view.nodes.flatMap((node, i) =>
    node.labelled === false ? [] : [{ ...nodeLabel(pen, node, at[i]!, view.marks === 'own'), depth: flat[i]![2] }],
  );
  nodeLabels.sort((a, b) => b.depth - a.depth);
  // A node's own place covers the ends of its struts, and should: lines cost a node's mark nothing.
  const nodePlaces = placeLabels(nodeLabels, area, []);
  const strutLabels = view.struts.flatMap((strut) =>
    strut.label ? [strutLabel(pen, strut, at[strut.from]!, at[strut.to]!)] : [],
  );
  const arrowLabels = arrows.map(({ arrow, from, to }) => arrowLabel(pen, arrow, from, to));
  const taken = [...nodePlaces.values()].map((p) => p.box);
  const dots = at.map(([x, y]): Box => ({ x, y, width: 1.2, height: 1.2, angle: 0 }));
  const strutPlaces = placeLabels([...arrowLabels, ...strutLabels], area, lines, [...taken, ...dots]);

  for (const place of [...nodePlaces.values(), ...strutPlaces.values()]) drawLeader(pen, place);
  view.nodes.forEach((node, i) => {
    const place = nodePlaces.get(node.mark);
    if (!place || place.leader) pen.circle(at[i]![0], at[i]![1], 0.6, { fill: INK.black });
  });
  for (const [mark, place] of nodePlaces) drawNodeMark(pen, place.box, mark);
  for (const strut of view.struts) {
    const place = strutPlaces.get(strutKey(strut));
    if (place && strut.label) drawStrutMark(pen, place.box, strut.label);
  }
  for (const { arrow } of arrows) {
    const place = strutPlaces.get(`arrow ${arrow.node}`);
    if (place) drawStrutMark(pen, place.box, { bold: arrow.label, plain: '' });
  }
  const missing = [
    ...nodeLabels.filter((l) => !nodePlaces.has(l.key)),
    ...strutLabels.filter((l) => !strutPlaces.has(l.key)),
  ];
  return { scale: name, factor, unplaced: missing.map((l) => l.owner) };
}

function scaleOf(
  wanted: TrussView['scale'],
  size: readonly [number, number],
  room: readonly [number, number],
): { readonly factor: number; readonly name: string } {
  if (typeof wanted === 'object') return wanted;
  if (wanted === 'iso') return drawingScale(size, room);
  const fits = Math.min(...size.map((s, i) => (s > 0 ? room[i]! / s : Number.POSITIVE_INFINITY)));
  return { factor: Number.isFinite(fits) ? fits : 1, name: 'not to scale' };
}

const faintFirst = (strut: ViewStrut): number => (strut.stroke.kind === 'faint' ? 0 : 1);
const strutKey = (strut: ViewStrut): string => `strut ${strut.mark}`;

function bounds(points: readonly Vec3[]): readonly [Point, Point] {
  const low: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const p of points)
    for (const axis of [0, 1] as const) {
      low[axis] = Math.min(low[axis], p[axis]);
      high[axis] = Math.max(high[axis], p[axis]);
    }
  return points.length > 0
    ? [low, high]
    : [
        [0, 0],
        [0, 0],
      ];
}

function drawStrut(pen: Pen, from: Point, to: Point, stroke: Stroke): void {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const width = strokeWidth(stroke);
  if (stroke.kind !== 'faint' && length > 8) {
    // The white edge stops short of the nodes, where struts meet and none passes another.
    const share = 3 / length;
    const along = (t: number): Point => [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])];
    pen.line(along(share), along(1 - share), { width: width + 2 * HALO, colour: INK.white });
  }
  drawStroke(pen, from, to, stroke);
}

function drawSupport(pen: Pen, [x, y]: Point): void {
  pen.polygon(
    [
      [x, y],
      [x - 2.4, y + 4.2],
      [x + 2.4, y + 4.2],
    ],
    INK.white,
    { width: LINE.thin },
  );
  pen.line([x - 3.4, y + 4.2], [x + 3.4, y + 4.2], { width: LINE.normal });
}

function nodeLabel(pen: Pen, node: ViewNode, at: Point, stays: boolean): Label {
  const width = Math.max(PILL, pen.widthOf(node.mark, { size: SIZE.note, bold: true }) + 2);
  const box = (x: number, y: number): Box => ({ x, y, width, height: PILL, angle: 0 });
  const places: Place[] = [{ box: box(...at), leader: null, cost: 0 }];
  for (const radius of stays ? [] : [5, 7.5, 11, 16])
    for (let k = 0; k < 16; k++) {
      const angle = (k * Math.PI) / 8;
      const reachOut = radius + (width / 2 - PILL / 2) * Math.abs(Math.cos(angle));
      places.push({
        box: box(at[0] + reachOut * Math.cos(angle), at[1] + reachOut * Math.sin(angle)),
        leader: at,
        cost: radius,
      });
    }
  return { key: node.mark, owner: node.mark, width, height: PILL, anchor: at, places, stays };
}

function strutLabel(pen: Pen, strut: ViewStrut, from: Point, to: Point): Label {
  const { bold, plain } = strut.label!;
  const width = labelWidth(pen, bold, plain);
  const height = LABEL_HEIGHT;
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  const along = (t: number): Point => [from[0] + t * dx, from[1] + t * dy];
  const places: Place[] = [];
  for (const t of [0.5, 0.42, 0.58, 0.34, 0.66, 0.26, 0.74, 0.18, 0.82]) {
    const clear = Math.min(t, 1 - t) * length - width / 2;
    if (clear < PILL / 2 + 0.8) continue;
    const [x, y] = along(t);
    places.push({
      box: { x, y, width, height, angle: readable(dx, dy) },
      leader: null,
      cost: 4 * Math.abs(t - 0.5),
    });
  }
  const [nx, ny] = length > 0 ? [-dy / length, dx / length] : [0, -1];
  for (const t of [0.5, 0.35, 0.65, 0.22, 0.78])
    for (const off of [3, 5, 8, 12, 17])
      for (const sign of [1, -1]) {
        const [px, py] = along(t);
        const reachOut = off + (Math.abs(nx) * width + Math.abs(ny) * height) / 2;
        places.push({
          box: { x: px + sign * nx * reachOut, y: py + sign * ny * reachOut, width, height, angle: 0 },
          leader: [px, py],
          cost: 6 + off + 4 * Math.abs(t - 0.5),
        });
      }
  return { key: strutKey(strut), owner: strut.mark, width, height, anchor: along(0.5), places };
}

/** Angle of a line on the sheet, turned so that what is written along it is never upside down: -90° < angle <= 90°. */
export function readable(dx: number, dy: number): number {
  let angle = Math.atan2(dy, dx);
  if (angle > Math.PI / 2 - UPRIGHT) angle -= Math.PI;
  if (angle <= -Math.PI / 2 - UPRIGHT) angle += Math.PI;
  return angle;
}

/** Upright lines read from the right-hand side of the sheet (ISO 129-1), also when a hair off upright: rad. */
const UPRIGHT = 1e-6;
const LABEL_HEIGHT = 3.1;

const labelWidth = (pen: Pen, bold: string, plain: string): number =>
  pen.widthOf(bold, { size: SIZE.note, bold: true }) +
  (plain === '' ? 0 : pen.widthOf(` ${plain}`, { size: SIZE.note })) +
  1.4;

function drawNodeMark(pen: Pen, box: Box, mark: string): void {
  pen.pill(box, { fill: INK.white, width: LINE.normal });
  pen.text(mark, box.x, box.y + capHeight(SIZE.note) / 2, { size: SIZE.note, bold: true, align: 'centre' });
}

function drawStrutMark(pen: Pen, box: Box, label: { readonly bold: string; readonly plain: string }): void {
  pen.blot(box);
  const { angle } = box;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const put = (u: number, v: number): Point => [box.x + u * c - v * s, box.y + u * s + v * c];
  const left = -box.width / 2 + 0.7;
  const base = (SIZE.note * CAP) / POINTS / 2;
  const [x, y] = put(left, base);
  const width = pen.text(label.bold, x, y, { size: SIZE.note, bold: true }, angle);
  if (label.plain === '') return;
  const [px, py] = put(left + width + pen.widthOf(' ', { size: SIZE.note }), base);
  pen.text(label.plain, px, py, { size: SIZE.note }, angle);
}

function drawLeader(pen: Pen, place: Place): void {
  if (!place.leader) return;
  pen.line([place.box.x, place.box.y], place.leader, { width: LINE.hair });
  pen.circle(place.leader[0], place.leader[1], 0.35, { fill: INK.black });
}

function arrowOnSheet(arrow: ViewArrow, at: Point, camera: Camera): { readonly from: Point; readonly to: Point } {
  const [u, v] = project(camera, arrow.direction);
  const size = Math.hypot(...arrow.direction);
  const [dx, dy] = size > 0 ? [u / size, -v / size] : [0, 0];
  // The arrow ends at the node, as a load arrives.
  return { from: [at[0] - dx * arrow.length, at[1] - dy * arrow.length], to: at };
}

function arrowLabel(pen: Pen, arrow: ViewArrow, from: Point, to: Point): Label {
  const width = labelWidth(pen, arrow.label, '');
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const places: Place[] = [];
  for (const [u, v] of [
    [0, -1],
    [1, 0],
    [-1, 0],
    [0, 1],
    [1, -1],
    [-1, -1],
    [1, 1],
    [-1, 1],
  ] as const)
    for (const off of [1, 4])
      places.push({
        box: {
          x: from[0] + u * (width / 2 + off),
          y: from[1] + v * (LABEL_HEIGHT / 2 + off),
          width,
          height: LABEL_HEIGHT,
          angle: 0,
        },
        leader: null,
        cost: off + (u * dx + v * dy > 0 ? 3 : 0),
      });
  const owner = `arrow ${arrow.node}`;
  return { key: owner, owner, width, height: LABEL_HEIGHT, anchor: from, places };
}

/** Draws an arrow with a filled head at `to`; one that points at the viewer is a dot in a circle. */
export function drawArrow(pen: Pen, from: Point, to: Point, colour: string = INK.black): void {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  if (length < 1) {
    pen.circle(to[0], to[1], 2.9, { width: LINE.normal, colour });
    return;
  }
  const [ux, uy] = [dx / length, dy / length];
  const head = Math.min(2.6, length / 2);
  const neck: Point = [to[0] - ux * head, to[1] - uy * head];
  pen.line(from, neck, { width: LINE.normal, colour });
  pen.polygon(
    [
      to,
      [neck[0] - uy * head * 0.32, neck[1] + ux * head * 0.32],
      [neck[0] + uy * head * 0.32, neck[1] - ux * head * 0.32],
    ],
    colour,
  );
}
