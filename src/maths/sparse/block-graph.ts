import type { SparseMatrix } from './csc.js';

/**
 * The graph of a symmetric pattern with unknowns gathered into blocks (the freedoms of a node are one block):
 * neighbours of block b are `neighbours[starts[b]..starts[b + 1])`, without b itself; `weights[b]` unknowns lie in b.
 */
export interface BlockGraph {
  readonly count: number;
  readonly starts: Int32Array;
  readonly neighbours: Int32Array;
  readonly weights: Int32Array;
}

/**
 * The block graph of a symmetric matrix; block b holds the unknowns `blockStarts[b]` to `blockStarts[b + 1] - 1`.
 * Throws RangeError where the blocks do not cover the matrix.
 */
export function blockGraph(lower: SparseMatrix, blockStarts: Int32Array): BlockGraph {
  const count = blockStarts.length - 1;
  if (blockStarts[0] !== 0 || blockStarts[count] !== lower.columns)
    throw new RangeError('blocks do not cover the matrix');
  const blockOf = new Int32Array(lower.columns);
  const weights = new Int32Array(count);
  for (let b = 0; b < count; b++) {
    weights[b] = blockStarts[b + 1] - blockStarts[b];
    blockOf.fill(b, blockStarts[b], blockStarts[b + 1]);
  }
  const pairs: number[] = [];
  const seen = new Int32Array(count).fill(-1);
  const degree = new Int32Array(count + 1);
  for (let b = 0; b < count; b++)
    for (let p = lower.starts[blockStarts[b]]; p < lower.starts[blockStarts[b + 1]]; p++) {
      const c = blockOf[lower.indices[p]];
      if (c === b || seen[c] === b) continue;
      seen[c] = b;
      pairs.push(b, c);
      degree[b + 1]++;
      degree[c + 1]++;
    }
  for (let b = 0; b < count; b++) degree[b + 1] += degree[b];
  const next = degree.slice();
  const neighbours = new Int32Array(pairs.length);
  for (let k = 0; k < pairs.length; k += 2) {
    neighbours[next[pairs[k]]++] = pairs[k + 1];
    neighbours[next[pairs[k + 1]]++] = pairs[k];
  }
  return { count, starts: degree, neighbours, weights };
}
