import { segmentDistance } from '../../../maths/segment-distance.js';
import { ROUND_OFF } from '../../../model/tolerance.js';
import type { Topology } from '../../../model/topology.js';
import { OUTSIDE_CELL } from '../../../model/truss.js';
import { faceRegions } from './face-regions.js';
import { type HalfEdges, halfEdges } from './half-edges.js';
import type { PlaneFigure } from './plane-figure.js';

/** The regions that the struts of a plane truss cut its plane into. */
export interface Regions {
  readonly edges: HalfEdges;
  /** By half-edge: the region on its left. */
  readonly left: Int32Array;
  /** By region: its half-edges in order, the region on their left. */
  readonly loops: readonly (readonly number[])[];
  readonly marks: readonly string[];
  readonly outer: number;
}

/**
 * Regions by tracing: at each node turn into the next strut clockwise from the one arrived by, so that the region stays
 * on the left. Struts that cross without a node have no regions of their own; then the faces of the file serve, if every strut lies
 * between two of them or one and the outside. `reason` says why there are none.
 */
export function regionsOf(
  topology: Topology,
  figure: PlaneFigure,
): { readonly regions: Regions; readonly reason: null } | { readonly regions: null; readonly reason: string } {
  const edges = halfEdges(topology);
  const pieces = pieceCount(topology, edges);
  if (pieces !== 1) return { regions: null, reason: `its struts fall into ${pieces} separate pieces` };
  const crossing = firstCrossing(topology, figure);
  if (crossing !== null) {
    const byFaces = faceRegions(topology, edges);
    if (byFaces) return { regions: byFaces, reason: null };
    return { regions: null, reason: `${crossing} without a node and its faces do not say what lies beside each strut` };
  }
  const loops = traceLoops(topology, figure, edges);
  const left = new Int32Array(edges.count);
  loops.forEach((loop, r) => {
    for (const h of loop) left[h] = r;
  });
  const areas = loops.map((loop) => signedArea(figure, edges, loop));
  // A connected figure has one loop that runs clockwise; a tree has one loop in all, of no area.
  const outer = areas.indexOf(Math.min(...areas));
  return { regions: { edges, left, loops, marks: regionMarks(topology, edges, loops, outer), outer }, reason: null };
}

function traceLoops(topology: Topology, figure: PlaneFigure, edges: HalfEdges): number[][] {
  const out: number[][] = topology.truss.nodes.map(() => []);
  for (let h = 0; h < edges.count; h++) out[edges.start[h]].push(h);
  const angle = (h: number): number => {
    const [a, b] = [2 * edges.start[h], 2 * edges.end[h]];
    return Math.atan2(figure.at[b + 1] - figure.at[a + 1], figure.at[b] - figure.at[a]);
  };
  const next = new Int32Array(edges.count);
  for (const list of out) {
    list.sort((g, h) => angle(g) - angle(h) || g - h);
    // Arriving by the twin of list[k], the next strut clockwise is list[k - 1].
    list.forEach((h, k) => {
      next[h ^ 1] = list[(k + list.length - 1) % list.length];
    });
  }
  const seen = new Uint8Array(edges.count);
  const loops: number[][] = [];
  for (let first = 0; first < edges.count; first++) {
    if (seen[first]) continue;
    const loop: number[] = [];
    for (let h = first; !seen[h]; h = next[h]) {
      seen[h] = 1;
      loop.push(h);
    }
    loops.push(loop);
  }
  return loops;
}

export function signedArea(figure: PlaneFigure, edges: HalfEdges, loop: readonly number[]): number {
  let area = 0;
  for (const h of loop) {
    const [a, b] = [2 * edges.start[h], 2 * edges.end[h]];
    area += figure.at[a] * figure.at[b + 1] - figure.at[a + 1] * figure.at[b];
  }
  return area / 2;
}

/** A region that is a face of the file has its mark; the others are numbered. */
export function regionMarks(
  topology: Topology,
  edges: HalfEdges,
  loops: readonly (readonly number[])[],
  outer: number,
): string[] {
  const key = (nodes: readonly number[]): string => [...nodes].sort((a, b) => a - b).join(' ');
  const faces = new Map(
    topology.truss.faces.map((face) => [key(face.nodes.map((mark) => topology.nodeIndex.get(mark)!)), face.mark]),
  );
  const taken = new Set(topology.truss.faces.map((face) => face.mark));
  let number = 0;
  return loops.map((loop, r) => {
    if (r === outer) return OUTSIDE_CELL;
    const face = faces.get(key(loop.map((h) => edges.start[h])));
    if (face !== undefined) return face;
    do number++;
    while (taken.has(`R${number}`));
    return `R${number}`;
  });
}

function pieceCount(topology: Topology, edges: HalfEdges): number {
  const { nodes } = topology.truss;
  const out: number[][] = nodes.map(() => []);
  for (let h = 0; h < edges.count; h++) out[edges.start[h]].push(edges.end[h]);
  const seen = new Uint8Array(nodes.length);
  let count = 0;
  for (let first = 0; first < nodes.length; first++) {
    if (seen[first] || out[first].length === 0) continue;
    count++;
    seen[first] = 1;
    const queue = [first];
    for (let i = queue.pop(); i !== undefined; i = queue.pop()) {
      for (const j of out[i]) {
        if (seen[j]) continue;
        seen[j] = 1;
        queue.push(j);
      }
    }
  }
  return count;
}

/** The first two struts that cross or touch without a node between them, in words. */
function firstCrossing(topology: Topology, figure: PlaneFigure): string | null {
  const { members } = topology.truss;
  const edges = halfEdges(topology);
  const point = (i: number): readonly [number, number, number] => [figure.at[2 * i], figure.at[2 * i + 1], 0];
  const slack = ROUND_OFF.crossing.value * figure.size;
  const low = members.map((_, m) => Math.min(point(edges.start[2 * m])[0], point(edges.end[2 * m])[0]));
  const high = members.map((_, m) => Math.max(point(edges.start[2 * m])[0], point(edges.end[2 * m])[0]));
  const order = members.map((_, m) => m).sort((a, b) => low[a] - low[b] || a - b);
  for (let i = 0; i < order.length; i++) {
    const a = order[i];
    const [a0, a1] = [edges.start[2 * a], edges.end[2 * a]];
    for (let j = i + 1; j < order.length && low[order[j]] <= high[a] + slack; j++) {
      const b = order[j];
      const [b0, b1] = [edges.start[2 * b], edges.end[2 * b]];
      const shared = a0 === b0 || a0 === b1 ? a0 : a1 === b0 || a1 === b1 ? a1 : -1;
      const words = `${members[a].mark} and ${members[b].mark} cross`;
      if (shared < 0) {
        if (segmentDistance(point(a0), point(a1), point(b0), point(b1)).distance <= slack) return words;
        continue;
      }
      const [far, other] = [a0 === shared ? a1 : a0, b0 === shared ? b1 : b0];
      const onA = segmentDistance(point(other), point(other), point(a0), point(a1)).distance <= slack;
      const onB = segmentDistance(point(far), point(far), point(b0), point(b1)).distance <= slack;
      if (onA || onB) return words;
    }
  }
  return null;
}
