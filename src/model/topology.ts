import { distance, normalise, subtract, type Vec3 } from '../maths/vec3.js';
import type { Member, Truss, TrussNode } from './truss.js';

/** One strut as seen from one of its nodes. */
export interface BarAtNode {
  readonly member: Member;
  readonly memberIndex: number;
  readonly far: TrussNode;
  /** Unit vector from the node along the strut. */
  readonly direction: Vec3;
  /** 0 where the node is the member's "from" end, 1 where it is its "to" end. */
  readonly end: 0 | 1;
}

/** The truss with what is asked of it again and again, made once: indices by mark, bars by node. */
export interface Topology {
  readonly truss: Truss;
  readonly nodeIndex: ReadonlyMap<string, number>;
  readonly memberIndex: ReadonlyMap<string, number>;
  readonly faceIndex: ReadonlyMap<string, number>;
  /** Bars at each node, by the node's index, in the members' order. */
  readonly barsAt: readonly (readonly BarAtNode[])[];
  /** Axis length of each member in mm, node to node. */
  readonly axisLength: Float64Array;
  /** Indices of the faces that run along each member, by the member's index. */
  readonly facesAlong: readonly (readonly number[])[];
  at(mark: string): Vec3;
}

/** Indexes a truss that its reader has found free of faults (every mark it names exists, no strut of no length). */
export function topologyOf(truss: Truss): Topology {
  const nodeIndex = new Map(truss.nodes.map((n, i) => [n.mark, i]));
  const memberIndex = new Map(truss.members.map((m, i) => [m.mark, i]));
  const faceIndex = new Map(truss.faces.map((f, i) => [f.mark, i]));
  const barsAt: BarAtNode[][] = truss.nodes.map(() => []);
  const axisLength = new Float64Array(truss.members.length);
  const byPair = new Map<string, number>();
  truss.members.forEach((member, i) => {
    const [from, to] = member.ends.map((mark) => nodeIndex.get(mark)!) as [number, number];
    const [a, b] = [truss.nodes[from]!, truss.nodes[to]!];
    axisLength[i] = distance(a.at, b.at);
    const direction = normalise(subtract(b.at, a.at));
    barsAt[from]!.push({ member, memberIndex: i, far: b, direction, end: 0 });
    barsAt[to]!.push({
      member,
      memberIndex: i,
      far: a,
      direction: normalise(subtract(a.at, b.at)),
      end: 1,
    });
    byPair.set(pairKey(from, to), i);
  });
  const facesAlong: number[][] = truss.members.map(() => []);
  truss.faces.forEach((face, f) => {
    const loop = face.nodes.map((mark) => nodeIndex.get(mark)!);
    loop.forEach((node, k) => {
      const member = byPair.get(pairKey(node, loop[(k + 1) % loop.length]!));
      if (member !== undefined) facesAlong[member]!.push(f);
    });
  });
  return {
    truss,
    nodeIndex,
    memberIndex,
    faceIndex,
    barsAt,
    axisLength,
    facesAlong,
    at: (mark) => truss.nodes[nodeIndex.get(mark)!]!.at,
  };
}

const pairKey = (a: number, b: number): string => (a < b ? `${a} ${b}` : `${b} ${a}`);

/** Largest extent of the truss along any axis, mm: what round-off tolerances are scaled by. */
export function sizeOf(truss: Truss): number {
  let size = 0;
  for (const axis of [0, 1, 2] as const) {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const node of truss.nodes) {
      low = Math.min(low, node.at[axis]);
      high = Math.max(high, node.at[axis]);
    }
    if (high > low) size = Math.max(size, high - low);
  }
  return size;
}
