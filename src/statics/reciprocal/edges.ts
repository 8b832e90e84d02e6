import type { Topology } from '../../model/topology.js';

/** The sides of all faces as undirected edges, each with a direction of its own. */
export interface EdgeTable {
  readonly from: Int32Array;
  readonly to: Int32Array;
  /** Index of the strut along the edge; -1 where there is none. An edge with a strut runs from its "from" to its "to". */
  readonly member: Int32Array;
  /** By face: node indices round its loop, and the edge from each node to the next. */
  readonly faces: readonly Int32Array[];
  readonly faceEdges: readonly Int32Array[];
  /** By face: +1 where the loop runs along the edge's direction, -1 where against. */
  readonly along: readonly Int8Array[];
}

export function edgeTable(topology: Topology): EdgeTable {
  const { truss, nodeIndex } = topology;
  const n = truss.nodes.length;
  const from: number[] = [];
  const to: number[] = [];
  const member: number[] = [];
  const memberOf = new Map<number, number>();
  truss.members.forEach((m, i) => {
    const [a, b] = [nodeIndex.get(m.ends[0])!, nodeIndex.get(m.ends[1])!];
    memberOf.set(Math.min(a, b) * n + Math.max(a, b), i);
  });
  const edgeOf = new Map<number, number>();
  const edge = (a: number, b: number): number => {
    const key = Math.min(a, b) * n + Math.max(a, b);
    const known = edgeOf.get(key);
    if (known !== undefined) return known;
    const m = memberOf.get(key) ?? -1;
    const start = m >= 0 ? nodeIndex.get(truss.members[m].ends[0])! : Math.min(a, b);
    edgeOf.set(key, from.length);
    from.push(start);
    to.push(start === a ? b : a);
    member.push(m);
    return from.length - 1;
  };
  const faces = truss.faces.map((face) => Int32Array.from(face.nodes, (mark) => nodeIndex.get(mark)!));
  const faceEdges = faces.map((loop) => loop.map((node, k) => edge(node, loop[(k + 1) % loop.length])));
  const along = faces.map((loop, f) => Int8Array.from(faceEdges[f], (e, k) => (from[e] === loop[k] ? 1 : -1)));
  return {
    from: Int32Array.from(from),
    to: Int32Array.from(to),
    member: Int32Array.from(member),
    faces,
    faceEdges,
    along,
  };
}
