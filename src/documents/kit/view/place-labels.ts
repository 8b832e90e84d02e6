import { type Area, type Box, inside, lengthInside, overlap, type Point } from '../geometry2.js';

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

/** Clear space between two labels, mm. */
const CLEAR = 0.3;
/** mm of displacement that one mm of covered line is worth: under a label on its own line, and under one beside. */
const COVER = { on: 1.5, beside: 2.5 } as const;
/** mm of displacement that a leader crossing another leader is worth. */
const CROSSED = 15;
/** Step of the search over rings round the anchor when every place is taken, mm. */
const RING = 3;

/**
 * Places labels one after the other, each at its cheapest place that touches no other label, no obstacle and not the
 * area's edge; the fewest places first. Where all are taken the nearest free spot of the area takes it, with a leader.
 * Labels for which there is none are missing from the answer. Order and answer depend on the input alone.
 */
export function placeLabels(
  labels: readonly Label[],
  area: Area,
  lines: readonly DrawnLine[],
  obstacles: readonly Box[] = [],
): Map<string, Place> {
  const placed = new Map<string, Place>();
  const boxes: Box[] = [...obstacles];
  const leaders: (readonly [Point, Point])[] = [];
  const order = labels.map((label, i) => ({ label, i }));
  order.sort((a, b) => a.label.places.length - b.label.places.length || a.i - b.i);

  /** Cost of a place, or infinity where it is taken or not below `bound`. */
  const costOf = (place: Place, owner: string, bound: number): number => {
    const { box, leader } = place;
    if (place.cost >= bound || !inside(area, box)) return Number.POSITIVE_INFINITY;
    for (const other of boxes) if (overlap(box, other, -CLEAR)) return Number.POSITIVE_INFINITY;
    for (const [p, q] of leaders) if (lengthInside(box, p, q) > 0) return Number.POSITIVE_INFINITY;
    let cost = place.cost;
    if (leader) {
      const from: Point = [box.x, box.y];
      for (const other of boxes)
        if (lengthInside(other, from, leader) > 0 && !contains(other, leader)) return Number.POSITIVE_INFINITY;
      for (const [p, q] of leaders) if (cross(from, leader, p, q)) cost += CROSSED;
    }
    const weight = leader ? COVER.beside : COVER.on;
    for (const line of lines) {
      if (cost >= bound) return Number.POSITIVE_INFINITY;
      if (leader || line.owner !== owner) cost += weight * lengthInside(box, line.from, line.to);
    }
    return cost;
  };

  for (const { label } of order) {
    let best: Place | null = null;
    let least = Number.POSITIVE_INFINITY;
    const consider = (place: Place): void => {
      const cost = costOf(place, label.owner, least);
      if (cost < least) [best, least] = [place, cost];
    };
    for (const place of label.places) consider(place);
    const farthest = Math.hypot(area.width, area.height);
    if (!best && !label.stays)
      for (let radius = RING; radius < Math.min(farthest, least); radius += RING)
        for (const anchor of label.anchors) for (const place of ring(label, anchor, radius)) consider(place);
    if (!best) continue;
    const { box, leader }: Place = best;
    placed.set(label.key, best);
    boxes.push(box);
    if (leader) leaders.push([[box.x, box.y], leader]);
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
