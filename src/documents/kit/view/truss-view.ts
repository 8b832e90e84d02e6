import type { Vec3 } from '../../../maths/vec3.js';
import { drawingScale } from '../drawing-scale.js';
import { type Area, type Box, type Point, shrink } from '../geometry2.js';
import { INK, LINE } from '../ink.js';
import type { Pen } from '../pen.js';
import { type Camera, project } from './camera.js';
import { arrowLabel, arrowOnSheet, drawArrow, type ViewArrow } from './marks/arrow.js';
import { drawNodeMark, nodeLabel, nodeMarkHeight } from './marks/node-mark.js';
import {
  drawStrutMark,
  fitsOnStrut,
  type StrutMark,
  spotLabel,
  strutLabel,
  strutMarkWidth,
} from './marks/strut-mark.js';
import { drawSupport } from './marks/support.js';
import { type Place, placeLabels } from './place-labels.js';
import { drawStroke, type Stroke, strokeWidth } from './stroke.js';

export interface ViewNode {
  readonly mark: string;
  readonly at: Vec3;
  /** dot: no mark; none: nothing is drawn at all. */
  readonly show?: 'mark' | 'dot' | 'none';
  readonly support?: boolean;
}

export interface ViewStrut {
  readonly mark: string;
  readonly from: number;
  readonly to: number;
  readonly stroke: Stroke;
  /** null: no label. */
  readonly label: StrutMark | null;
}

export interface TrussView {
  readonly camera: Camera;
  readonly nodes: readonly ViewNode[];
  readonly struts: readonly ViewStrut[];
  readonly arrows?: readonly ViewArrow[];
  /** Marks that belong to points: of polygons, at their middles. */
  readonly spots?: readonly { readonly mark: StrutMark; readonly at: Vec3 }[];
  /** iso: the largest scale of ISO 5455 that fits; fill: as large as the area allows, not to scale; or that scale. */
  readonly scale: 'iso' | 'fill' | { readonly factor: number; readonly name: string };
  /** Nodes, by index, that the area is filled with; absent: all. Struts that leave the frame are not drawn. */
  readonly frame?: ReadonlySet<number>;
  /** Room round the figure for marks that move outward, mm. */
  readonly edge?: number;
  /** own: a node's mark stands on its node or, where a nearer node's mark is in the way, not at all; all (usual): it moves aside. */
  readonly marks?: 'all' | 'own';
}

export interface DrawnView {
  readonly scale: string;
  readonly factor: number;
  /** Marks of nodes and struts for which the sheet had no room. */
  readonly unplaced: readonly string[];
  /** Where a point of the truss stands on the sheet, mm. */
  readonly onSheet: (at: Vec3) => Point;
}

const EDGE = 9;
/** White on both sides of a nearer strut where it passes a farther one, mm. */
const HALO = 0.5;
/** Sizes of type that are tried, pt: the largest at which most struts carry their marks themselves. */
const SIZES = [9, 8, 7] as const;
const MOST = 0.75;

/** Draws a truss in orthographic view into the area: farther struts first, nearer ones with a white edge, then marks where none touches another. */
export function drawTrussView(pen: Pen, area: Area, view: TrussView): DrawnView {
  const flat = view.nodes.map((n) => project(view.camera, n.at));
  const { factor, name, onSheet } = fitted(flat, area, view);
  const at = flat.map(onSheet);
  const order = view.struts.map((strut, i) => ({ strut, i, depth: flat[strut.from]![2] + flat[strut.to]![2] }));
  order.sort((a, b) => faintFirst(a.strut) - faintFirst(b.strut) || a.depth - b.depth || a.i - b.i);
  const seen = (i: number): boolean => !view.frame || view.frame.has(i) || contains(area, at[i]!);
  for (const { strut } of order)
    if (seen(strut.from) && seen(strut.to)) drawStrut(pen, at[strut.from]!, at[strut.to]!, strut.stroke);
  view.nodes.forEach((node, i) => {
    if (node.support && seen(i)) drawSupport(pen, at[i]!);
  });
  const clear = nodeMarkHeight(SIZES[0]) / 2 + 0.2;
  const arrows = (view.arrows ?? []).map((arrow, i) => ({
    arrow,
    key: `arrow ${i}`,
    ...arrowOnSheet(arrow, at[arrow.node]!, view.camera, clear),
  }));
  for (const { from, to } of arrows) drawArrow(pen, from, to);

  const spots = (view.spots ?? []).map((spot) => onSheet(project(view.camera, spot.at)));
  const marks = placedMarks(pen, area, view, { at, flat, arrows, spots });
  const { nodes, struts, size } = marks;
  for (const place of [...nodes.values(), ...struts.values()]) drawLeader(pen, place);
  view.nodes.forEach((node, i) => {
    const place = nodes.get(node.mark);
    if (node.show !== 'none' && seen(i) && (!place || place.leader))
      pen.circle(at[i]![0], at[i]![1], 0.6, { fill: INK.black });
  });
  for (const [mark, place] of nodes) drawNodeMark(pen, place.box, mark, size);
  view.struts.forEach((strut, i) => {
    const place = struts.get(`strut ${i}`);
    if (place) drawStrutMark(pen, place.box, strut.label!, size);
  });
  view.spots?.forEach((spot, i) => {
    const place = struts.get(`spot ${i}`);
    if (place) drawStrutMark(pen, place.box, spot.mark, size);
  });
  for (const { arrow, key } of arrows) {
    const place = struts.get(key);
    if (place) drawStrutMark(pen, place.box, { bold: arrow.label, plain: '' }, size);
  }
  return { scale: name, factor, unplaced: marks.missing, onSheet: (p) => onSheet(project(view.camera, p)) };
}

interface DrawnArrow {
  readonly arrow: ViewArrow;
  readonly key: string;
  readonly from: Point;
  readonly to: Point;
}

/** Everything as it stands on the sheet. */
interface Drawn {
  readonly at: readonly Point[];
  readonly flat: readonly Vec3[];
  readonly arrows: readonly DrawnArrow[];
  readonly spots: readonly Point[];
}

interface PlacedMarks {
  readonly size: number;
  readonly nodes: ReadonlyMap<string, Place>;
  /** Of struts and arrows, by key. */
  readonly struts: ReadonlyMap<string, Place>;
  readonly missing: readonly string[];
}

/** Places all marks at the largest type at which each finds room; at the smallest, as many as do. */
function placedMarks(pen: Pen, area: Area, view: TrussView, drawn: Drawn): PlacedMarks {
  const largest = typeSize(pen, view, drawn.at);
  let placed: PlacedMarks | undefined;
  for (const size of SIZES)
    if (size <= largest && (!placed || placed.missing.length > 0)) placed = marksAt(pen, area, view, drawn, size);
  return placed!;
}

function marksAt(pen: Pen, area: Area, view: TrussView, drawn: Drawn, size: number): PlacedMarks {
  const { at, flat, arrows, spots } = drawn;
  const lines = [
    ...view.struts
      .filter((s) => s.stroke.kind !== 'faint')
      .map((s) => ({ owner: s.mark, from: at[s.from]!, to: at[s.to]! })),
    ...arrows.map(({ key, from, to }) => ({ owner: key, from, to })),
  ];
  const stays = view.marks === 'own';
  const nodeLabels = view.nodes
    .map((node, i) => ({ node, depth: flat[i]![2], at: at[i]! }))
    .filter(({ node }) => (node.show ?? 'mark') === 'mark')
    .sort((a, b) => b.depth - a.depth)
    .map(({ node, at }) => nodeLabel(pen, node.mark, at, size, stays));
  // A node's own place covers the ends of its struts, and should: lines cost a node's mark nothing.
  const nodes = placeLabels(nodeLabels, area, []);
  const strutLabels = view.struts.flatMap((s, i) =>
    s.label ? [strutLabel(pen, `strut ${i}`, s.mark, s.label, at[s.from]!, at[s.to]!, size)] : [],
  );
  const arrowLabels = arrows
    .filter(({ arrow }) => arrow.label !== '')
    .map(({ arrow, key, from, to }) => arrowLabel(pen, arrow, key, from, to, size));
  const spotLabels = spots.map((spot, i) => spotLabel(pen, `spot ${i}`, view.spots![i]!.mark, spot, size));
  const taken = [...nodes.values()].map((p) => p.box);
  const dots = at.map(([x, y]): Box => ({ x, y, width: 1.2, height: 1.2, angle: 0 }));
  const struts = placeLabels([...arrowLabels, ...strutLabels, ...spotLabels], area, lines, [...taken, ...dots]);
  const missing = [
    ...(stays ? [] : nodeLabels.filter((l) => !nodes.has(l.key))),
    ...[...strutLabels, ...spotLabels].filter((l) => !struts.has(l.key)),
  ];
  return { size, nodes, struts, missing: missing.map((l) => l.owner) };
}

/** How much of the sheet the figure would fill: mm on paper for one mm of it. */
export function fillFactor(
  nodes: readonly Pick<ViewNode, 'at'>[],
  camera: Camera,
  room: Pick<Area, 'width' | 'height'>,
): number {
  const [low, high] = bounds(nodes.map((n) => project(camera, n.at)));
  const fits = Math.min(
    ...([room.width, room.height] as const).map((r, i) => {
      const extent = high[i as 0 | 1] - low[i as 0 | 1];
      return extent > 0 ? (r - 2 * EDGE) / extent : Number.POSITIVE_INFINITY;
    }),
  );
  return Number.isFinite(fits) ? fits : 1;
}

function fitted(
  flat: readonly Vec3[],
  area: Area,
  view: TrussView,
): { readonly factor: number; readonly name: string; readonly onSheet: (p: Vec3) => Point } {
  const [low, high] = bounds(view.frame ? flat.filter((_, i) => view.frame!.has(i)) : flat);
  const room = shrink(area, view.edge ?? EDGE);
  const size = [high[0] - low[0], high[1] - low[1]] as const;
  const fills = Math.min(...size.map((s, i) => (s > 0 ? [room.width, room.height][i]! / s : Number.POSITIVE_INFINITY)));
  const { factor, name } =
    typeof view.scale === 'object'
      ? view.scale
      : view.scale === 'iso'
        ? drawingScale(size, [room.width, room.height])
        : { factor: Number.isFinite(fills) ? fills : 1, name: 'not to scale' };
  const middle: Point = [(low[0] + high[0]) / 2, (low[1] + high[1]) / 2];
  const centre: Point = [area.x + area.width / 2, area.y + area.height / 2];
  return {
    factor,
    name,
    onSheet: (p) => [centre[0] + factor * (p[0] - middle[0]), centre[1] - factor * (p[1] - middle[1])],
  };
}

function bounds(points: readonly Vec3[]): readonly [Point, Point] {
  if (points.length === 0)
    return [
      [0, 0],
      [0, 0],
    ];
  const low: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const high: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const p of points)
    for (const axis of [0, 1] as const) {
      low[axis] = Math.min(low[axis], p[axis]);
      high[axis] = Math.max(high[axis], p[axis]);
    }
  return [low, high];
}

function typeSize(pen: Pen, view: TrussView, at: readonly Point[]): number {
  const labelled = view.struts.filter((s) => s.label);
  const smallest = SIZES.at(-1)!;
  if (labelled.length === 0) return smallest;
  const fitting = (size: number): number =>
    labelled.filter((s) => {
      const [a, b] = [at[s.from]!, at[s.to]!];
      return fitsOnStrut(strutMarkWidth(pen, s.label!, size), Math.hypot(b[0] - a[0], b[1] - a[1]), size);
    }).length;
  return SIZES.find((size) => fitting(size) >= MOST * labelled.length) ?? smallest;
}

const contains = (area: Area, [x, y]: Point): boolean =>
  x >= area.x && x <= area.x + area.width && y >= area.y && y <= area.y + area.height;

const faintFirst = (strut: ViewStrut): number => (strut.stroke.kind === 'faint' ? 0 : 1);

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

function drawLeader(pen: Pen, place: Place): void {
  if (!place.leader) return;
  pen.line([place.box.x, place.box.y], place.leader, { width: LINE.hair });
  pen.circle(place.leader[0], place.leader[1], 0.35, { fill: INK.black });
}
