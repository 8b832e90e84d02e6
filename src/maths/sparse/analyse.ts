import { blockGraph } from './block-graph.js';
import type { SparseMatrix } from './csc.js';
import { OVERSHOOT } from './front-kernel.js';
import { minimumDegree } from './minimum-degree.js';
import { nestedDissection } from './nested-dissection.js';
import { type Supernodes, supernodes } from './supernodes.js';

/** How a symmetric pattern is factorised: found once, used for every set of values on that pattern. */
export interface Analysis {
  readonly size: number;
  /** Which order of elimination won. */
  readonly ordering: 'minimum degree' | 'nested dissection';
  /** Unknown at each place of the order of elimination. */
  readonly order: Int32Array;
  /** Supernode s eliminates places `starts[s]` to `starts[s + 1] - 1`. */
  readonly starts: Int32Array;
  readonly parent: Int32Array;
  /** Places of the rows of supernode s, its own columns first, ascending: `rows[rowStarts[s]..rowStarts[s + 1])`. */
  readonly rowStarts: Int32Array;
  readonly rows: Int32Array;
  /** Where the front of s holds entry `entry[k]` of the matrix, k in [entryStarts[s], entryStarts[s + 1]): row x (height + OVERSHOOT) + column. */
  readonly entryStarts: Int32Array;
  readonly entry: Int32Array;
  readonly entryAt: Int32Array;
  /** Offset of supernode s in the factor; it stores height x width numbers by rows. */
  readonly factorStarts: Float64Array;
  /** Rows of the largest front, and the most numbers that waiting updates need at once. */
  readonly largestFront: number;
  readonly stackSize: number;
  readonly largestWidth: number;
  /** Entries of the factor in the chosen order before widening, and of the orders that were compared. */
  readonly fill: number;
  readonly fillOf: Readonly<Record<string, number>>;
}

export interface AnalyseOptions {
  /** Block b holds the unknowns `blockStarts[b]` to `blockStarts[b + 1] - 1`; absent: each unknown is a block. */
  readonly blockStarts?: Int32Array;
  /** x, y, z of each block, for nested dissection; absent: minimum degree alone. */
  readonly points?: ArrayLike<number>;
}

/** Cheaper factors (multiplications) are ordered by minimum degree alone: trying another order costs more than it can save. */
const DISSECT_FROM_WORK = 2e7;

/**
 * Order of elimination and supernodes of a symmetric matrix (lower triangle with a full diagonal). Minimum degree and,
 * where points are given, nested dissection are both worked out in symbols; the one with less fill is taken.
 */
export function analyse(lower: SparseMatrix, options: AnalyseOptions = {}): Analysis {
  const n = lower.columns;
  const blockStarts = options.blockStarts ?? Int32Array.from({ length: n + 1 }, (_, i) => i);
  const graph = blockGraph(lower, blockStarts);
  const byDegree = supernodes(graph, minimumDegree(graph));
  const fillOf: Record<string, number> = { 'minimum degree': byDegree.fill };
  let best = byDegree;
  let ordering: Analysis['ordering'] = 'minimum degree';
  if (options.points && byDegree.work >= DISSECT_FROM_WORK) {
    const dissected = supernodes(graph, nestedDissection(graph, options.points));
    fillOf['nested dissection'] = dissected.fill;
    if (dissected.fill < best.fill) {
      best = dissected;
      ordering = 'nested dissection';
    }
  }
  return expand(lower, blockStarts, best, ordering, fillOf);
}

/** Blocks to unknowns, and the place of every entry of the matrix in the fronts. */
function expand(
  lower: SparseMatrix,
  blockStarts: Int32Array,
  shape: Supernodes,
  ordering: Analysis['ordering'],
  fillOf: Readonly<Record<string, number>>,
): Analysis {
  const n = lower.columns;
  const count = shape.parent.length;
  const order = new Int32Array(n);
  const placeOf = new Int32Array(n);
  const firstPlace = new Int32Array(shape.order.length + 1);
  let at = 0;
  shape.order.forEach((b, k) => {
    firstPlace[k] = at;
    for (let u = blockStarts[b]; u < blockStarts[b + 1]; u++) {
      placeOf[u] = at;
      order[at++] = u;
    }
  });
  firstPlace[shape.order.length] = at;
  const starts = Int32Array.from(shape.starts, (k) => firstPlace[k]);
  const supernodeOf = new Int32Array(n);
  const rowStarts = new Int32Array(count + 1);
  const factorStarts = new Float64Array(count + 1);
  let largestFront = 0;
  let largestWidth = 0;
  for (let s = 0; s < count; s++) {
    supernodeOf.fill(s, starts[s], starts[s + 1]);
    const width = starts[s + 1] - starts[s];
    let height = width;
    for (const k of shape.rows[s]) height += firstPlace[k + 1] - firstPlace[k];
    rowStarts[s + 1] = rowStarts[s] + height;
    factorStarts[s + 1] = factorStarts[s] + height * width;
    largestFront = Math.max(largestFront, height);
    largestWidth = Math.max(largestWidth, width);
  }
  const rows = new Int32Array(rowStarts[count]);
  for (let s = 0; s < count; s++) {
    let r = rowStarts[s];
    for (let k = starts[s]; k < starts[s + 1]; k++) rows[r++] = k;
    for (const b of shape.rows[s]) for (let k = firstPlace[b]; k < firstPlace[b + 1]; k++) rows[r++] = k;
  }
  const entries = placeEntries(lower, placeOf, supernodeOf, rows, rowStarts, starts);
  return {
    size: n,
    ordering,
    order,
    starts,
    parent: shape.parent,
    rowStarts,
    rows,
    ...entries,
    factorStarts,
    largestFront,
    largestWidth,
    stackSize: stackNeed(shape.parent, starts, rowStarts),
    fill: shape.fill,
    fillOf,
  };
}

function placeEntries(
  lower: SparseMatrix,
  placeOf: Int32Array,
  supernodeOf: Int32Array,
  rows: Int32Array,
  rowStarts: Int32Array,
  starts: Int32Array,
) {
  const n = lower.columns;
  const count = rowStarts.length - 1;
  const entryStarts = new Int32Array(count + 1);
  const nonzeros = lower.starts[n];
  const low = new Int32Array(nonzeros);
  const high = new Int32Array(nonzeros);
  for (let j = 0; j < n; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) {
      const a = placeOf[j];
      const b = placeOf[lower.indices[p]];
      low[p] = Math.min(a, b);
      high[p] = Math.max(a, b);
      entryStarts[supernodeOf[low[p]] + 1]++;
    }
  for (let s = 0; s < count; s++) entryStarts[s + 1] += entryStarts[s];
  const next = entryStarts.slice();
  const entry = new Int32Array(nonzeros);
  for (let p = 0; p < nonzeros; p++) entry[next[supernodeOf[low[p]]]++] = p;
  const entryAt = new Int32Array(nonzeros);
  const local = new Int32Array(n);
  for (let s = 0; s < count; s++) {
    const height = rowStarts[s + 1] - rowStarts[s];
    for (let r = 0; r < height; r++) local[rows[rowStarts[s] + r]] = r;
    for (let k = entryStarts[s]; k < entryStarts[s + 1]; k++)
      entryAt[k] = local[high[entry[k]]] * (height + OVERSHOOT) + (low[entry[k]] - starts[s]);
  }
  return { entryStarts, entry, entryAt };
}

/** Most numbers on the stack of updates (packed triangles) at any time of the postorder walk. */
function stackNeed(parent: Int32Array, starts: Int32Array, rowStarts: Int32Array): number {
  const children = new Float64Array(parent.length);
  let now = 0;
  let most = 0;
  for (let s = 0; s < parent.length; s++) {
    const below = rowStarts[s + 1] - rowStarts[s] - (starts[s + 1] - starts[s]);
    const size = (below * (below + 1)) / 2;
    now += size - children[s];
    most = Math.max(most, now);
    if (parent[s] >= 0) children[parent[s]] += size;
  }
  return most;
}
