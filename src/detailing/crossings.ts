import { segmentDistance } from '../maths/segment-distance.js';
import type { Vec3 } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import { ROUND_OFF } from '../model/tolerance.js';
import { sizeOf, type Topology } from '../model/topology.js';

/** A box with its corners in mm. */
interface Box {
  readonly low: Vec3;
  readonly high: Vec3;
}

/**
 * Findings on nodes where no strut ends, nodes that lie on a strut without being its end, and pairs of struts that
 * cross without a node. `radii` (mm, one a strut) widens the last test from axes that meet to rods that touch;
 * without it only axes that meet within round-off count. Struts that share a node are the node's own business.
 */
export function crossingFindings(topology: Topology, radii: Float64Array | null = null): Finding[] {
  const { truss } = topology;
  const slack = ROUND_OFF.crossing.value * sizeOf(truss);
  const ends = truss.members.map((m) => m.ends.map((mark) => topology.nodeIndex.get(mark)!) as [number, number]);
  const at = (node: number): Vec3 => truss.nodes[node]!.at;
  const radius = (member: number): number => radii?.[member] ?? 0;

  const free = truss.nodes.filter((_, i) => topology.barsAt[i]!.length === 0);
  const found = free.map((node) => finding('node-free', node.mark));

  const widest = radii ? radii.reduce((a, b) => Math.max(a, b), 0) : 0;
  const struts = ends.map(([a, b]) => boxOf(at(a), at(b), slack + widest));
  const onStrut = new Set<string>();
  const points = truss.nodes.map((n) => boxOf(n.at, n.at, 0));
  overlaps(points, struts, (node, member) => {
    if (ends[member]!.includes(node)) return;
    const [a, b] = ends[member]!;
    const gap = segmentDistance(at(node), at(node), at(a), at(b)).distance;
    if (gap > slack) return;
    onStrut.add(`${node} ${member}`);
    found.push(
      finding('node-on-strut', truss.nodes[node]!.mark, { value: gap, about: { strut: truss.members[member]!.mark } }),
    );
  });

  overlaps(struts, struts, (i, j) => {
    if (i >= j) return;
    const [a, b] = ends[i]!;
    const [c, d] = ends[j]!;
    if (a === c || a === d || b === c || b === d) return;
    // Said already, and more exactly, as a node that lies on a strut.
    if ([`${a} ${j}`, `${b} ${j}`, `${c} ${i}`, `${d} ${i}`].some((key) => onStrut.has(key))) return;
    const gap = segmentDistance(at(a), at(b), at(c), at(d)).distance;
    const limit = Math.max(slack, radius(i) + radius(j));
    if (gap > limit) return;
    found.push(
      finding('struts-cross', truss.members[i]!.mark, {
        value: gap,
        limit,
        about: { other: truss.members[j]!.mark },
      }),
    );
  });
  return found;
}

function boxOf(a: Vec3, b: Vec3, margin: number): Box {
  return {
    low: [Math.min(a[0], b[0]) - margin, Math.min(a[1], b[1]) - margin, Math.min(a[2], b[2]) - margin],
    high: [Math.max(a[0], b[0]) + margin, Math.max(a[1], b[1]) + margin, Math.max(a[2], b[2]) + margin],
  };
}

/** Calls `meet(i, j)` for each first[i] and second[j] that overlap, i then j ascending: a sweep along the longest axis. */
function overlaps(first: readonly Box[], second: readonly Box[], meet: (i: number, j: number) => void): void {
  const axis = longestAxis(second);
  const order = second.map((_, j) => j).sort((i, j) => second[i]!.low[axis] - second[j]!.low[axis] || i - j);
  const lows = order.map((j) => second[j]!.low[axis]);
  let reach = 0;
  for (const box of second) reach = Math.max(reach, box.high[axis] - box.low[axis]);
  first.forEach((box, i) => {
    const near: number[] = [];
    for (let k = lowerBound(lows, box.low[axis] - reach); k < order.length && lows[k]! <= box.high[axis]; k++) {
      if (boxesMeet(box, second[order[k]!]!)) near.push(order[k]!);
    }
    for (const j of near.sort((a, b) => a - b)) meet(i, j);
  });
}

const boxesMeet = (a: Box, b: Box): boolean =>
  a.low[0] <= b.high[0] &&
  b.low[0] <= a.high[0] &&
  a.low[1] <= b.high[1] &&
  b.low[1] <= a.high[1] &&
  a.low[2] <= b.high[2] &&
  b.low[2] <= a.high[2];

function longestAxis(boxes: readonly Box[]): 0 | 1 | 2 {
  const extent = ([0, 1, 2] as const).map((axis) => {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const box of boxes) {
      low = Math.min(low, box.low[axis]);
      high = Math.max(high, box.high[axis]);
    }
    return high - low;
  });
  return extent[0]! >= extent[1]! && extent[0]! >= extent[2]! ? 0 : extent[1]! >= extent[2]! ? 1 : 2;
}

/** First index whose value is at least x, in an ascending list. */
function lowerBound(values: readonly number[], x: number): number {
  let [low, high] = [0, values.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle]! < x) low = middle + 1;
    else high = middle;
  }
  return low;
}
