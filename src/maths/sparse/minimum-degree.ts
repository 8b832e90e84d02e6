import type { BlockGraph } from './block-graph.js';

/**
 * An elimination order of few fill: approximate minimum degree on the quotient graph, with absorption of elements,
 * mass elimination and merging of blocks that cannot be told apart (Amestoy, Davis and Duff, SIAM J. Matrix Anal. Appl.
 * 17 (1996) 886-905). Returns the blocks in the order of elimination.
 */
export function minimumDegree(graph: BlockGraph): Int32Array {
  const n = graph.count;
  // Per variable: variables and elements next to it. Per element: its variables. A block merged into another has weight 0.
  const variables: number[][] = [];
  const elements: number[][] = [];
  const members: number[][] = [];
  const weight = new Int32Array(graph.weights);
  const degree = new Int32Array(n);
  const alive = new Uint8Array(n).fill(1); // 1 variable, 2 element, 0 gone
  const merged: number[][] = [];
  let total = 0;
  for (let b = 0; b < n; b++) {
    variables.push(Array.from(graph.neighbours.subarray(graph.starts[b], graph.starts[b + 1])));
    elements.push([]);
    members.push([]);
    merged.push([]);
    total += weight[b];
    for (const c of variables[b]) degree[b] += weight[c];
  }
  const buckets = new DegreeBuckets(total + 1, n);
  for (let b = n - 1; b >= 0; b--) buckets.insert(b, degree[b]);

  const mark = new Int32Array(n).fill(-1); // stamp of the current pivot's element
  const outside = new Int32Array(n); // weight of an element's variables outside the pivot's element
  const outsideStamp = new Int32Array(n).fill(-1);
  const order = new Int32Array(n);
  let placed = 0;
  let left = total;
  const place = (b: number): void => {
    order[placed++] = b;
    for (const c of merged[b]) place(c);
  };

  for (let stamp = 0; ; stamp++) {
    const pivot = buckets.takeLeast();
    if (pivot < 0) break;
    alive[pivot] = 2;
    left -= weight[pivot];
    mark[pivot] = stamp;
    const front: number[] = [];
    let frontWeight = 0;
    const gather = (list: readonly number[]): void => {
      for (const i of list)
        if (alive[i] === 1 && mark[i] !== stamp) {
          mark[i] = stamp;
          front.push(i);
          frontWeight += weight[i];
        }
    };
    gather(variables[pivot]);
    for (const e of elements[pivot])
      if (alive[e] === 2) {
        gather(members[e]);
        alive[e] = 0;
        members[e] = [];
      }
    variables[pivot] = [];
    elements[pivot] = [];

    for (const i of front)
      for (const e of elements[i])
        if (alive[e] === 2) {
          if (outsideStamp[e] !== stamp) {
            outsideStamp[e] = stamp;
            let sum = 0;
            for (const k of members[e]) if (alive[k] === 1) sum += weight[k];
            outside[e] = sum;
          }
          outside[e] -= weight[i];
        }

    const hashes = new Map<number, number[]>();
    for (const i of front) {
      buckets.remove(i);
      let bound = 0;
      const keptElements = [pivot];
      for (const e of elements[i]) {
        if (alive[e] !== 2) continue;
        if (outside[e] === 0) {
          alive[e] = 0; // all of it lies in the pivot's element
          members[e] = [];
          continue;
        }
        bound += outside[e];
        keptElements.push(e);
      }
      const keptVariables: number[] = [];
      let hash = 0;
      for (const k of variables[i])
        if (alive[k] === 1 && mark[k] !== stamp) {
          keptVariables.push(k);
          bound += weight[k];
          hash += k;
        }
      elements[i] = keptElements;
      variables[i] = keptVariables;
      if (keptElements.length === 1 && keptVariables.length === 0) {
        // Nothing outside the element: i may follow the pivot at once.
        alive[i] = 0;
        merged[pivot].push(i);
        frontWeight -= weight[i];
        left -= weight[i];
        continue;
      }
      for (const e of keptElements) hash += e;
      degree[i] = Math.min(degree[i] + frontWeight - weight[i], bound + frontWeight - weight[i]);
      const same = hashes.get(hash);
      if (same) same.push(i);
      else hashes.set(hash, [i]);
    }
    mergeAlike(hashes, variables, elements, (kept, gone) => {
      weight[kept] += weight[gone];
      degree[kept] -= weight[gone];
      weight[gone] = 0;
      alive[gone] = 0;
      merged[kept].push(gone);
    });
    const last: number[] = [];
    for (const i of front) {
      if (alive[i] !== 1) continue;
      last.push(i);
      degree[i] = Math.max(0, Math.min(degree[i], left - weight[i]));
      buckets.insert(i, degree[i]);
    }
    members[pivot] = last;
    if (last.length === 0) alive[pivot] = 0;
    place(pivot);
  }
  return order;
}

/** Blocks with the same lists next to them are merged: eliminated together they cost no more fill. */
function mergeAlike(
  groups: ReadonlyMap<number, readonly number[]>,
  variables: readonly number[][],
  elements: readonly number[][],
  merge: (kept: number, gone: number) => void,
): void {
  for (const group of groups.values()) {
    const gone = new Set<number>();
    for (let a = 0; a < group.length; a++) {
      const i = group[a];
      if (gone.has(i)) continue;
      const near = new Set([...variables[i], ...elements[i]]);
      for (let b = a + 1; b < group.length; b++) {
        const j = group[b];
        if (gone.has(j) || elements[j].length !== elements[i].length || variables[j].length !== variables[i].length)
          continue;
        if (elements[j].every((e) => near.has(e)) && variables[j].every((k) => near.has(k))) {
          merge(i, j);
          gone.add(j);
        }
      }
    }
  }
}

/** Variables in doubly linked lists by degree; the least degree's latest entry comes first. */
class DegreeBuckets {
  private readonly head: Int32Array;
  private readonly next: Int32Array;
  private readonly previous: Int32Array;
  private readonly at: Int32Array;
  private least = 0;

  constructor(degrees: number, count: number) {
    this.head = new Int32Array(degrees + 1).fill(-1);
    this.next = new Int32Array(count).fill(-1);
    this.previous = new Int32Array(count).fill(-1);
    this.at = new Int32Array(count).fill(-1);
  }

  insert(i: number, degree: number): void {
    const first = this.head[degree];
    this.next[i] = first;
    this.previous[i] = -1;
    if (first >= 0) this.previous[first] = i;
    this.head[degree] = i;
    this.at[i] = degree;
    if (degree < this.least) this.least = degree;
  }

  remove(i: number): void {
    if (this.at[i] < 0) return;
    const { next, previous } = this;
    if (previous[i] >= 0) next[previous[i]] = next[i];
    else this.head[this.at[i]] = next[i];
    if (next[i] >= 0) previous[next[i]] = previous[i];
    this.at[i] = -1;
  }

  takeLeast(): number {
    while (this.least < this.head.length && this.head[this.least] < 0) this.least++;
    if (this.least >= this.head.length) return -1;
    const i = this.head[this.least];
    this.remove(i);
    return i;
  }
}
