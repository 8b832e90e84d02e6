import type { Topology } from '../../../model/topology.js';

/** Every strut as two half-edges: 2 m runs from its "from" to its "to", 2 m + 1 back. */
export interface HalfEdges {
  readonly count: number;
  readonly start: Int32Array;
  readonly end: Int32Array;
}

export function halfEdges(topology: Topology): HalfEdges {
  const { members } = topology.truss;
  const start = new Int32Array(2 * members.length);
  const end = new Int32Array(2 * members.length);
  members.forEach((member, m) => {
    const [a, b] = member.ends.map((mark) => topology.nodeIndex.get(mark)!);
    start[2 * m] = end[2 * m + 1] = a;
    start[2 * m + 1] = end[2 * m] = b;
  });
  return { count: 2 * members.length, start, end };
}
