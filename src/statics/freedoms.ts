/** The free freedoms of nodes with `perNode` freedoms each, numbered in the nodes' order; a node's free ones are a block. */
export interface Freedoms {
  readonly perNode: number;
  readonly count: number;
  /** By node x perNode + component: number of the free freedom, or -1 where held. */
  readonly of: Int32Array;
  /** Block b holds freedoms `blockStarts[b]` to `blockStarts[b + 1] - 1` of node `blockNode[b]`; nodes without any have no block. */
  readonly blockStarts: Int32Array;
  readonly blockNode: Int32Array;
}

/** Numbers the freedoms that `held` (perNode a node, 1: held) leaves free. */
export function numberFreedoms(held: ArrayLike<number>, perNode: number): Freedoms {
  const of = new Int32Array(held.length).fill(-1);
  const starts = [0];
  const nodes: number[] = [];
  let count = 0;
  for (let node = 0; node * perNode < held.length; node++) {
    const before = count;
    for (let k = 0; k < perNode; k++) if (!held[node * perNode + k]) of[node * perNode + k] = count++;
    if (count === before) continue;
    nodes.push(node);
    starts.push(count);
  }
  return { perNode, count, of, blockStarts: Int32Array.from(starts), blockNode: Int32Array.from(nodes) };
}

/** x, y, z of each block's node, for the ordering of elimination. */
export function blockPoints(freedoms: Freedoms, nodes: ArrayLike<number>): Float64Array {
  const points = new Float64Array(3 * freedoms.blockNode.length);
  freedoms.blockNode.forEach((node, b) => {
    for (let k = 0; k < 3; k++) points[3 * b + k] = nodes[3 * node + k];
  });
  return points;
}

/** Values on the free freedoms spread over all nodes, 0 where held. */
export function spread(freedoms: Freedoms, free: ArrayLike<number>): Float64Array {
  return Float64Array.from(freedoms.of, (f) => (f < 0 ? 0 : free[f]));
}

/** Values over all nodes gathered on the free freedoms. */
export function gather(freedoms: Freedoms, all: ArrayLike<number>): Float64Array {
  const out = new Float64Array(freedoms.count);
  freedoms.of.forEach((f, k) => {
    if (f >= 0) out[f] = all[k];
  });
  return out;
}
