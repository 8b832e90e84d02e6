import { solve as denseSolve, EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { analyse } from '../../../src/maths/sparse/analyse.js';
import { blockGraph } from '../../../src/maths/sparse/block-graph.js';
import { fromTriplets, transpose } from '../../../src/maths/sparse/csc.js';
import { factorise } from '../../../src/maths/sparse/factorise.js';
import { minimumDegree } from '../../../src/maths/sparse/minimum-degree.js';
import { largest, multiply, multiplySymmetric, multiplyTransposed } from '../../../src/maths/sparse/multiply.js';
import { nestedDissection } from '../../../src/maths/sparse/nested-dissection.js';
import { solve } from '../../../src/maths/sparse/solve.js';
import { supernodes } from '../../../src/maths/sparse/supernodes.js';
import { dense, denseSymmetric, randomSymmetric } from './random.js';

const isPermutation = (order: Int32Array, n: number): boolean =>
  order.length === n && new Set(order).size === n && order.every((v) => v >= 0 && v < n);

describe('compressed columns', () => {
  it('adds up entries at the same place and sorts rows', () => {
    const a = fromTriplets(3, 2, [2, 0, 2, 1], [0, 0, 0, 1], [1, 5, 2, -4]);
    expect([...a.starts]).toEqual([0, 2, 3]);
    expect([...a.indices]).toEqual([0, 2, 1]);
    expect([...a.values]).toEqual([5, 3, -4]);
    expect([...transpose(a).values]).toEqual([5, -4, 3]);
    expect([...multiply(a, [2, 3])]).toEqual([10, -12, 6]);
    expect([...multiplyTransposed(a, [1, 1, 1])]).toEqual([8, -4]);
    expect(dense(a).to2DArray()).toEqual([
      [5, 0],
      [0, -4],
      [3, 0],
    ]);
  });

  it('refuses an index outside the matrix', () => {
    expect(() => fromTriplets(2, 2, [2], [0], [1])).toThrow(RangeError);
  });
});

describe.each([1, 2, 3, 4, 5, 6])('a random symmetric system, seed %i', (seed) => {
  const blocks = [1, 7, 40, 100, 160, 230][seed - 1];

  it.each([true, false])('agrees with the dense solution (definite: %s)', (definite) => {
    const { lower, blockStarts, points } = randomSymmetric(seed, blocks, definite);
    const n = lower.columns;
    const full = denseSymmetric(lower);
    const right = Array.from({ length: 6 }, (_, c) =>
      Float64Array.from({ length: n }, (_, i) => Math.sin(i * (c + 1) + c)),
    );
    const oracles = denseSolve(full, new Matrix(right.map((b) => Array.from(b))).transpose());
    for (const options of [{}, { blockStarts }, { blockStarts, points }]) {
      const factor = factorise(analyse(lower, options), lower);
      expect(factor.state).toBe('factorised');
      const { x, residual } = solve(factor, lower, right);
      x.forEach((xc, c) => {
        expect(residual[c]).toBeLessThan(1e-15);
        const oracle = oracles.getColumn(c);
        expect(largest(xc.map((v, i) => v - oracle[i]))).toBeLessThanOrEqual(1e-10 * largest(oracle));
      });
      if (n < 300) {
        const eigen = new EigenvalueDecomposition(full, { assumeSymmetric: true }).realEigenvalues;
        expect(factor.negative).toBe(eigen.filter((e) => e < 0).length);
      }
      if (definite) expect(factor.negative).toBe(0);
    }
  });

  it('both orderings are permutations and fill what the factor of the pattern fills', () => {
    const { lower, blockStarts, points } = randomSymmetric(seed, blocks, true);
    const graph = blockGraph(lower, blockStarts);
    for (const order of [minimumDegree(graph), nestedDissection(graph, points)]) {
      expect(isPermutation(order, graph.count)).toBe(true);
      const shape = supernodes(graph, order);
      expect(isPermutation(shape.order, graph.count)).toBe(true);
      expect(shape.fill).toBe(fillByElimination(graph, order));
      // Widened supernodes cannot hold less than the true fill.
      let stored = 0;
      shape.parent.forEach((parent, s) => {
        if (parent >= 0) expect(parent).toBeGreaterThan(s);
        const width = weight(shape.order.subarray(shape.starts[s], shape.starts[s + 1]), graph.weights);
        stored +=
          width *
            weight(
              shape.rows[s].map((k) => shape.order[k]),
              graph.weights,
            ) +
          (width * (width + 1)) / 2;
      });
      expect(stored).toBeGreaterThanOrEqual(shape.fill);
    }
  });
});

const weight = (blocks: Int32Array, weights: Int32Array): number => blocks.reduce((sum, b) => sum + weights[b], 0);

/** The elimination game on sets, the textbook definition of fill. */
function fillByElimination(graph: ReturnType<typeof blockGraph>, order: Int32Array): number {
  const near = Array.from(
    { length: graph.count },
    (_, b) => new Set(graph.neighbours.subarray(graph.starts[b], graph.starts[b + 1])),
  );
  let fill = 0;
  for (const b of order) {
    const list = [...near[b]];
    const w = graph.weights[b];
    fill += (w * (w + 1)) / 2 + w * list.reduce((sum, c) => sum + graph.weights[c], 0);
    for (const c of list) {
      near[c].delete(b);
      for (const d of list) if (c !== d) near[c].add(d);
    }
  }
  return fill;
}

describe('degenerate systems', () => {
  it('solves an empty system', () => {
    const lower = fromTriplets(0, 0, [], [], []);
    const factor = factorise(analyse(lower), lower);
    expect(factor.state).toBe('factorised');
    expect(solve(factor, lower, [new Float64Array(0)]).x[0].length).toBe(0);
  });

  it('names the unknown at a zero pivot and refuses to solve with such a factor', () => {
    const lower = fromTriplets(3, 3, [0, 1, 2, 1], [0, 1, 2, 0], [1, 1, 5, 1]);
    const factor = factorise(analyse(lower), lower);
    expect(factor.state).toBe('zero pivot');
    expect([0, 1]).toContain(factor.stoppedAt);
    expect(() => solve(factor, lower, [new Float64Array(3)])).toThrow(RangeError);
  });

  it('shows near-singularity in the pivot ratio', () => {
    const lower = fromTriplets(2, 2, [0, 1, 1], [0, 0, 1], [1, 1, 1 + 1e-10]);
    expect(factorise(analyse(lower), lower).pivotRatio).toBeLessThan(1e-9);
  });

  it('one analysis serves other values on the same pattern, not another pattern', () => {
    const { lower, blockStarts } = randomSymmetric(9, 30, true);
    const analysis = analyse(lower, { blockStarts });
    const doubled = { ...lower, values: lower.values.map((v) => 2 * v) };
    const b = Float64Array.from({ length: lower.columns }, (_, i) => i + 1);
    const x = solve(factorise(analysis, doubled), doubled, [b]).x[0];
    multiplySymmetric(lower, x).forEach((v, i) => {
      expect(2 * v).toBeCloseTo(b[i], 9);
    });
    const other = randomSymmetric(10, 31, true).lower;
    expect(() => factorise(analysis, other)).toThrow(RangeError);
  });

  it('is the same factor to the bit when it is made again', () => {
    const { lower, blockStarts, points } = randomSymmetric(11, 300, true);
    const a = factorise(analyse(lower, { blockStarts, points }), lower);
    const b = factorise(analyse(lower, { blockStarts, points }), lower);
    expect(Buffer.from(a.values.buffer).equals(Buffer.from(b.values.buffer))).toBe(true);
  });
});
