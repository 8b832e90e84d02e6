import type { BlockGraph } from './block-graph.js';
import { minimumDegree } from './minimum-degree.js';

/** Below this many blocks a part is ordered by minimum degree; cutting further no longer lowers the fill (measured). */
const LEAF_BLOCKS = 48;
/** Cuts are tried at these shares of a part's blocks; the spread keeps the two halves balanced. */
const SHARES = [0.5, 0.44, 0.56];
/** Directions along which a part is shorter than this share of its longest extent are not tried. */
const LEAST_EXTENT = 0.5;

/**
 * Nested dissection by coordinates: a part is cut by a plane across one of its long directions, the least set of blocks
 * that meets every cut edge goes last (a minimum vertex cover, König 1931), and the halves are cut in turn (George, SIAM
 * J. Numer. Anal. 10 (1973) 345-363). `points` holds x, y, z of each block. Returns the blocks in the order of elimination.
 */
export function nestedDissection(graph: BlockGraph, points: ArrayLike<number>): Int32Array {
  const order = new Int32Array(graph.count);
  const part = new Int32Array(graph.count); // the part that a block now lies in
  let end = graph.count;
  let parts = 0;
  const work: Int32Array[] = [Int32Array.from({ length: graph.count }, (_, b) => b)];
  // Filled from the back: a separator is placed behind both of its halves.
  for (let blocks = work.pop(); blocks !== undefined; blocks = work.pop()) {
    const cut = blocks.length > LEAF_BLOCKS ? bestCut(graph, points, blocks, part, ++parts) : undefined;
    if (!cut) {
      const leaf = orderLeaf(graph, blocks, part, ++parts);
      end -= leaf.length;
      order.set(leaf, end);
      continue;
    }
    end -= cut.separator.length;
    order.set(cut.separator, end);
    work.push(cut.left, cut.right);
  }
  return order;
}

interface Cut {
  readonly left: Int32Array;
  readonly right: Int32Array;
  readonly separator: Int32Array;
  readonly cost: number;
}

function bestCut(
  graph: BlockGraph,
  points: ArrayLike<number>,
  blocks: Int32Array,
  part: Int32Array,
  tag: number,
): Cut | undefined {
  for (const b of blocks) part[b] = tag;
  const along = new Float64Array(blocks.length);
  const spans = directions(points, blocks).map((d) => {
    let low = Infinity;
    let high = -Infinity;
    for (const b of blocks) {
      const t = d[0] * points[3 * b] + d[1] * points[3 * b + 1] + d[2] * points[3 * b + 2];
      low = Math.min(low, t);
      high = Math.max(high, t);
    }
    return { d, extent: high - low };
  });
  const longest = spans.reduce((most, s) => Math.max(most, s.extent), 0);
  let best: Cut | undefined;
  for (const { d, extent } of spans) {
    if (!(extent >= LEAST_EXTENT * longest) || extent === 0) continue;
    blocks.forEach((b, k) => {
      along[k] = d[0] * points[3 * b] + d[1] * points[3 * b + 1] + d[2] * points[3 * b + 2];
    });
    const sorted = along.slice().sort();
    for (const share of SHARES) {
      const cut = cutAt(graph, blocks, along, sorted[Math.floor(share * sorted.length)] - 1e-9 * extent, part, tag);
      if (cut && (!best || cut.cost < best.cost)) best = cut;
    }
  }
  return best;
}

/** x, y, z and the principal axes of the part's points: the latter serve structures that do not lie along the axes. */
function directions(points: ArrayLike<number>, blocks: Int32Array): (readonly [number, number, number])[] {
  const axes: [number, number, number][] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const mean = [0, 0, 0];
  for (const b of blocks) for (let k = 0; k < 3; k++) mean[k] += points[3 * b + k] / blocks.length;
  const m = [0, 0, 0, 0, 0, 0, 0, 0, 0];
  for (const b of blocks)
    for (let r = 0; r < 3; r++)
      for (let c = 0; c < 3; c++) m[3 * r + c] += (points[3 * b + r] - mean[r]) * (points[3 * b + c] - mean[c]);
  // Power iteration is exact enough for a heuristic; the second axis is taken square to the first.
  const first = powerAxis(m, undefined);
  if (!first) return axes;
  axes.push(first);
  const second = powerAxis(m, first);
  if (second) axes.push(second);
  return axes;
}

function powerAxis(m: readonly number[], square: readonly number[] | undefined): [number, number, number] | undefined {
  let v: [number, number, number] = [0.6, 0.64, 0.48];
  for (let step = 0; step < 30; step++) {
    const w: [number, number, number] = [
      m[0] * v[0] + m[1] * v[1] + m[2] * v[2],
      m[3] * v[0] + m[4] * v[1] + m[5] * v[2],
      m[6] * v[0] + m[7] * v[1] + m[8] * v[2],
    ];
    if (square) {
      const s = w[0] * square[0] + w[1] * square[1] + w[2] * square[2];
      for (let k = 0; k < 3; k++) w[k] -= s * square[k];
    }
    const size = Math.hypot(w[0], w[1], w[2]);
    if (!(size > 0)) return undefined;
    v = [w[0] / size, w[1] / size, w[2] / size];
  }
  return v;
}

function cutAt(
  graph: BlockGraph,
  blocks: Int32Array,
  along: Float64Array,
  threshold: number,
  part: Int32Array,
  tag: number,
): Cut | undefined {
  const low = new Set<number>();
  blocks.forEach((b, k) => {
    if (along[k] < threshold) low.add(b);
  });
  if (low.size === 0 || low.size === blocks.length) return undefined;
  const edges = new Map<number, number[]>(); // blocks on the low side -> neighbours on the high side
  for (const b of low)
    for (let p = graph.starts[b]; p < graph.starts[b + 1]; p++) {
      const c = graph.neighbours[p];
      if (part[c] !== tag || low.has(c)) continue;
      const list = edges.get(b);
      if (list) list.push(c);
      else edges.set(b, [c]);
    }
  const cover = vertexCover(edges);
  const left: number[] = [];
  const right: number[] = [];
  const separator: number[] = [];
  let weight = 0;
  for (const b of blocks)
    if (cover.has(b)) {
      separator.push(b);
      weight += graph.weights[b];
    } else (low.has(b) ? left : right).push(b);
  if (left.length === 0 || right.length === 0) return undefined;
  const imbalance = Math.abs(left.length - right.length) / blocks.length;
  return {
    left: Int32Array.from(left),
    right: Int32Array.from(right),
    separator: Int32Array.from(separator),
    cost: weight * (1 + imbalance),
  };
}

/** A least set of vertices that meets every edge of a bipartite graph, from a largest matching (König 1931). */
function vertexCover(edges: ReadonlyMap<number, readonly number[]>): Set<number> {
  const mate = new Map<number, number>(); // high -> low
  const mateOfLow = new Map<number, number>();
  for (const start of edges.keys()) {
    // An alternating path from `start` by breadth-first search.
    const cameFrom = new Map<number, number>(); // high -> low that reached it
    const queue = [start];
    let free = -1;
    for (let q = 0; q < queue.length && free < 0; q++)
      for (const h of edges.get(queue[q])!) {
        if (cameFrom.has(h)) continue;
        cameFrom.set(h, queue[q]);
        const other = mate.get(h);
        if (other === undefined) {
          free = h;
          break;
        }
        queue.push(other);
      }
    while (free >= 0) {
      const l = cameFrom.get(free)!;
      const before = mateOfLow.get(l);
      mate.set(free, l);
      mateOfLow.set(l, free);
      free = l === start || before === undefined ? -1 : before;
    }
  }
  const lowReached = new Set<number>();
  const highReached = new Set<number>();
  const stack = [...edges.keys()].filter((l) => !mateOfLow.has(l));
  for (const l of stack) lowReached.add(l);
  for (let l = stack.pop(); l !== undefined; l = stack.pop())
    for (const h of edges.get(l)!) {
      if (highReached.has(h)) continue;
      highReached.add(h);
      const other = mate.get(h);
      if (other !== undefined && !lowReached.has(other)) {
        lowReached.add(other);
        stack.push(other);
      }
    }
  const cover = new Set<number>(highReached);
  for (const l of edges.keys()) if (!lowReached.has(l)) cover.add(l);
  return cover;
}

/** A leaf's blocks by minimum degree of the graph that they span. */
function orderLeaf(graph: BlockGraph, blocks: Int32Array, part: Int32Array, tag: number): Int32Array {
  const local = new Map<number, number>();
  blocks.forEach((b, k) => {
    part[b] = tag;
    local.set(b, k);
  });
  const starts = new Int32Array(blocks.length + 1);
  const neighbours: number[] = [];
  blocks.forEach((b, k) => {
    for (let p = graph.starts[b]; p < graph.starts[b + 1]; p++) {
      const c = local.get(graph.neighbours[p]);
      if (c !== undefined) neighbours.push(c);
    }
    starts[k + 1] = neighbours.length;
  });
  const weights = Int32Array.from(blocks, (b) => graph.weights[b]);
  const order = minimumDegree({ count: blocks.length, starts, neighbours: Int32Array.from(neighbours), weights });
  return order.map((k) => blocks[k]);
}
