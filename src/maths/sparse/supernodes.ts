import type { BlockGraph } from './block-graph.js';

/**
 * The shape of the factor for one order of elimination. Supernodes are runs of columns that share their rows; they stand
 * in postorder of the assembly tree, children before parents.
 */
export interface Supernodes {
  /** Blocks in the final order of elimination. */
  readonly order: Int32Array;
  /** Supernode s eliminates the blocks at places `starts[s]` to `starts[s + 1] - 1` of `order`. */
  readonly starts: Int32Array;
  /** Supernode that takes the update of s; -1 at a root. */
  readonly parent: Int32Array;
  /** Places in `order` of the blocks below s's own, ascending. */
  readonly rows: readonly Int32Array[];
  /** Entries of the factor with its diagonal, before supernodes were widened: the fill that orders are compared by. */
  readonly fill: number;
  /** Multiplications that the elimination takes, before supernodes were widened. */
  readonly work: number;
}

/** A supernode joins its parent while the explicit zeros stay below these shares of the joint front, by its width (measured). */
const WIDEN: readonly (readonly [width: number, zeros: number])[] = [
  [12, 1],
  [24, 0.5],
  [48, 0.15],
  [Infinity, 0.05],
];

/**
 * Elimination tree, row structures and widened supernodes of a graph in a given order (Liu, SIAM Review 34 (1992) 82-109;
 * Ashcraft and Grimes, ACM Trans. Math. Softw. 15 (1989) 291-309 for the widening).
 */
export function supernodes(graph: BlockGraph, eliminate: Int32Array): Supernodes {
  const n = graph.count;
  const { parent, rows } = columnStructures(graph, eliminate);
  const w = Float64Array.from(eliminate, (b) => graph.weights[b]);
  let fill = 0;
  let work = 0;
  const below = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    for (const i of rows[j]) below[j] += w[i];
    fill += w[j] * below[j] + (w[j] * (w[j] + 1)) / 2;
    work += w[j] * (below[j] + w[j] / 2) ** 2;
  }

  // A group is named by its last column; its rows are that column's.
  const width = w.slice();
  const zeros = new Float64Array(n);
  const into = new Int32Array(n).fill(-1); // the group's top column that this group joined
  const top = (j: number): number => {
    let t = j;
    while (into[t] >= 0) t = into[t];
    return t;
  };
  // Per parent the child with the most rows joins first: it brings the fewest zeros.
  const children: number[][] = Array.from({ length: n }, () => []);
  for (let j = 0; j < n; j++) if (parent[j] >= 0) children[parent[j]].push(j);
  for (let j = 0; j < n; j++) {
    children[j].sort((a, b) => below[b] - below[a] || b - a);
    for (const c of children[j]) {
      // Rows of the child are padded to all of the parent's columns and rows.
      const extra = width[c] * (width[j] + below[j] - below[c]);
      const joint = width[c] + width[j];
      const held = zeros[c] + zeros[j] + extra;
      const size = joint * below[j] + (joint * (joint + 1)) / 2;
      const share = held / size;
      const allowed = extra === 0 || WIDEN.find(([limit]) => joint <= limit)![1] >= share;
      if (!allowed) continue;
      into[c] = j;
      width[j] = joint;
      zeros[j] = held;
    }
  }
  return { ...number(n, parent, rows, eliminate, into, top), fill, work };
}

/** Postorder of the tree of groups, columns renumbered with it. */
function number(
  n: number,
  parent: Int32Array,
  rows: readonly Int32Array[],
  eliminate: Int32Array,
  into: Int32Array,
  top: (j: number) => number,
): Omit<Supernodes, 'fill' | 'work'> {
  const columns: number[][] = Array.from({ length: n }, () => []);
  for (let j = 0; j < n; j++) columns[top(j)].push(j); // ascending within a group: descendants first
  const kids: number[][] = Array.from({ length: n }, () => []);
  const roots: number[] = [];
  for (let j = 0; j < n; j++) {
    if (into[j] >= 0) continue;
    if (parent[j] < 0) roots.push(j);
    else kids[top(parent[j])].push(j);
  }
  const place = new Int32Array(n);
  const order = new Int32Array(n);
  const starts: number[] = [];
  const heads: number[] = [];
  const indexOf = new Int32Array(n).fill(-1);
  let at = 0;
  const stack: [number, number][] = [];
  for (const root of roots) {
    stack.push([root, 0]);
    while (stack.length > 0) {
      const frame = stack[stack.length - 1];
      const list = kids[frame[0]];
      if (frame[1] < list.length) {
        stack.push([list[frame[1]++], 0]);
        continue;
      }
      stack.pop();
      indexOf[frame[0]] = heads.length;
      heads.push(frame[0]);
      starts.push(at);
      for (const j of columns[frame[0]]) {
        order[at] = eliminate[j];
        place[j] = at++;
      }
    }
  }
  starts.push(at);
  return {
    order,
    starts: Int32Array.from(starts),
    parent: Int32Array.from(heads, (j) => (parent[j] < 0 ? -1 : indexOf[top(parent[j])])),
    rows: heads.map((j) => rows[j].map((i) => place[i]).sort()),
  };
}

/** Parent in the elimination tree and the rows below the diagonal of each column, in numbers of the elimination order. */
function columnStructures(graph: BlockGraph, eliminate: Int32Array) {
  const n = graph.count;
  const at = new Int32Array(n);
  eliminate.forEach((b, k) => {
    at[b] = k;
  });
  const parent = new Int32Array(n).fill(-1);
  const rows: Int32Array[] = [];
  const mark = new Int32Array(n).fill(-1);
  const firstChild = new Int32Array(n).fill(-1);
  const nextChild = new Int32Array(n).fill(-1);
  const scratch = new Int32Array(n);
  for (let j = 0; j < n; j++) {
    let count = 0;
    mark[j] = j;
    const b = eliminate[j];
    for (let p = graph.starts[b]; p < graph.starts[b + 1]; p++) {
      const i = at[graph.neighbours[p]];
      if (i > j && mark[i] !== j) {
        mark[i] = j;
        scratch[count++] = i;
      }
    }
    for (let c = firstChild[j]; c >= 0; c = nextChild[c])
      for (const i of rows[c])
        if (mark[i] !== j) {
          mark[i] = j;
          scratch[count++] = i;
        }
    const list = scratch.slice(0, count).sort();
    rows.push(list);
    if (count > 0) {
      parent[j] = list[0];
      nextChild[j] = firstChild[list[0]];
      firstChild[list[0]] = j;
    }
  }
  return { parent, rows };
}
