import { type Area, type Box, lengthInside, overlap, type Point, reach } from '../geometry2.js';
import { CellGrid } from './cell-grid.js';

/** One place that a label may take. */
export interface Place {
  readonly box: Box;
  /** Where a hair line from the label leads back to; null: the label stands on its own part. */
  readonly leader: Point | null;
  /** Lower is better; mm of displacement, about. */
  readonly cost: number;
}

export interface Label {
  readonly key: string;
  readonly width: number;
  readonly height: number;
  /** The part of the drawing it belongs to: lines of the same key cost nothing. */
  readonly owner: string;
  /** Where its leader may end when every place is taken, best first. */
  readonly anchors: readonly Point[];
  readonly places: readonly Place[];
  /** Where every place is taken it is left out instead of going elsewhere. */
  readonly stays?: boolean;
}

export interface DrawnLine {
  readonly owner: string;
  readonly from: Point;
  readonly to: Point;
}

/** What no label may touch. */
export interface Obstacle extends Box {
  /** Whether a leader may end inside it: a body whose label stands outside. */
  readonly entered?: boolean;
}

/** Clear space between two labels, mm. */
const CLEAR = 0.3;
/** mm of displacement that one mm of covered line is worth: under a label on its own line, and under one beside. */
const COVER = { on: 1.5, beside: 2.5 } as const;
/** mm of displacement that a leader crossing another leader is worth. */
const CROSSED = 15;
/** Step of the search over rings round the anchor when every place is taken, mm. */
const RING = 3;
/** A leader longer than this is not followed by the eye, mm. */
const FARTHEST = 70;

/**
 * Places labels one after the other, each at its cheapest place that touches no other label, no obstacle and not the
 * area's edge; the fewest places first. Where all are taken the nearest free spot of the area takes it, with a leader.
 * Labels for which there is none are missing from the answer. Order and answer depend on the input alone.
 */
export function placeLabels(
  labels: readonly Label[],
  area: Area,
  lines: readonly DrawnLine[],
  obstacles: readonly Obstacle[] = [],
): Map<string, Place> {
  const placed = new Map<string, Place>();
  const boxes = new CellGrid<Obstacle>();
  const leaders = new CellGrid<readonly [Point, Point]>();
  const drawn = new CellGrid<DrawnLine>();
  for (const box of obstacles) boxes.addBox(box, box);
  for (const line of lines) drawn.addSegment(line.from, line.to, line);
  const order = labels.map((label, i) => ({ label, i }));
  order.sort((a, b) => a.label.places.length - b.label.places.length || a.i - b.i);

  /** Cost of a place, or infinity where it is taken or not below `bound`; `hidden`: its leader may end under another label. */
  const costOf = (place: Place, owner: string, bound: number, hidden: boolean): number => {
    const { box, leader } = place;
    if (place.cost >= bound) return Number.POSITIVE_INFINITY;
    const w = reach(box, 1, 0);
    const h = reach(box, 0, 1);
    const x0 = box.x - w;
    const y0 = box.y - h;
    const x1 = box.x + w;
    const y1 = box.y + h;
    if (x0 < area.x || y0 < area.y || x1 > area.x + area.width || y1 > area.y + area.height)
      return Number.POSITIVE_INFINITY;
    if (boxes.some(x0 - CLEAR, y0 - CLEAR, x1 + CLEAR, y1 + CLEAR, (other) => overlap(box, other, -CLEAR)))
      return Number.POSITIVE_INFINITY;
    if (leaders.some(x0, y0, x1, y1, ([p, q]) => lengthInside(box, p, q) > 0)) return Number.POSITIVE_INFINITY;
    let cost = place.cost;
    if (leader) {
      const from: Point = [box.x, box.y];
      const l0 = Math.min(box.x, leader[0]);
      const m0 = Math.min(box.y, leader[1]);
      const l1 = Math.max(box.x, leader[0]);
      const m1 = Math.max(box.y, leader[1]);
      if (
        boxes.some(
          l0,
          m0,
          l1,
          m1,
          (other) => lengthInside(other, from, leader) > 0 && !((hidden || other.entered) && contains(other, leader)),
        )
      )
        return Number.POSITIVE_INFINITY;
      leaders.some(l0, m0, l1, m1, ([p, q]) => {
        if (cross(from, leader, p, q)) cost += CROSSED;
        return false;
      });
    }
    const weight = leader ? COVER.beside : COVER.on;
    const over = drawn.some(x0, y0, x1, y1, (line) => {
      if (leader || line.owner !== owner) cost += weight * lengthInside(box, line.from, line.to);
      return cost >= bound;
    });
    return over ? Number.POSITIVE_INFINITY : cost;
  };

  for (const { label } of order) {
    let best: Place | null = null;
    let least = Number.POSITIVE_INFINITY;
    const consider = (place: Place, hidden: boolean): void => {
      const cost = costOf(place, label.owner, least, hidden);
      if (cost < least) [best, least] = [place, cost];
    };
    for (const place of label.places) consider(place, false);
    // What is covered itself, as a node behind another, can only be pointed at under its cover.
    for (const hidden of [false, true])
      if (!best && !label.stays)
        for (let radius = RING; radius < Math.min(FARTHEST, least); radius += RING)
          for (const anchor of label.anchors) for (const place of ring(label, anchor, radius)) consider(place, hidden);
    if (!best) continue;
    const { box, leader }: Place = best;
    placed.set(label.key, best);
    boxes.addBox(box, box);
    if (leader) leaders.addSegment([box.x, box.y], leader, [[box.x, box.y], leader]);
  }
  return placed;
}

/** Places round an anchor at one distance, about one a ring's width apart. */
function ring(label: Label, anchor: Point, radius: number): Place[] {
  const count = Math.max(8, Math.ceil((2 * Math.PI * radius) / RING));
  return Array.from({ length: count }, (_, k) => {
    const angle = (2 * Math.PI * k) / count;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    return {
      box: {
        x: anchor[0] + c * (radius + label.width / 2),
        y: anchor[1] + s * (radius + label.height / 2),
        width: label.width,
        height: label.height,
        angle: 0,
      },
      leader: anchor,
      cost: radius,
    };
  });
}

function contains(box: Box, p: Point): boolean {
  const [c, s] = [Math.cos(box.angle), Math.sin(box.angle)];
  const [u, v] = [(p[0] - box.x) * c + (p[1] - box.y) * s, (p[1] - box.y) * c - (p[0] - box.x) * s];
  return Math.abs(u) <= box.width / 2 && Math.abs(v) <= box.height / 2;
}

const side = (a: Point, b: Point, c: Point): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);
const cross = (a: Point, b: Point, c: Point, d: Point): boolean =>
  side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
