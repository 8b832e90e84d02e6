import { normalise, subtract } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';

/**
 * Forces by edge of a diagram with vertices a (3 numbers a cell): t_e(a) = 1/2 sum a_k x a_(k+1) . u_e, a quadratic form in a;
 * and a = sum x_m a_m over a basis of functions.
 */
export interface QuadraticForces {
  /** Number of basis functions, and of edges. */
  readonly size: number;
  readonly edges: number;
  /** a(x) */
  gradients(x: ArrayLike<number>): Float64Array;
  /** B(a, b) by edge, symmetric, with B(a, a) = t(a). */
  polarised(a: Float64Array, b: Float64Array): Float64Array;
  /** sum_e h_e B_e(a, a_m) for every basis function m. */
  pullBack(a: Float64Array, h: ArrayLike<number>): Float64Array;
}

export function quadraticForces(
  topology: Topology,
  complex: CellComplex,
  basis: readonly Float64Array[],
): QuadraticForces {
  const { nodes } = topology.truss;
  const edges = complex.loops.length;
  const starts = new Int32Array(edges + 1);
  for (let e = 0; e < edges; e++) starts[e + 1] = starts[e] + complex.loops[e].cells.length;
  // Three times the cell: where its gradient starts.
  const ring = new Int32Array(starts[edges]);
  const axis = new Float64Array(3 * edges);
  complex.loops.forEach((loop, e) => {
    loop.cells.forEach((c, k) => {
      ring[starts[e] + k] = 3 * c;
    });
    axis.set(normalise(subtract(nodes[complex.to[e]].at, nodes[complex.from[e]].at)), 3 * e);
  });

  return {
    size: basis.length,
    edges,
    gradients: (x) => {
      const a = new Float64Array(3 * complex.cells.length);
      basis.forEach((column, m) => {
        const xm = x[m];
        if (xm !== 0) for (let i = 0; i < a.length; i++) a[i] += xm * column[i];
      });
      return a;
    },
    // 1/4 sum over k of (a_(k+1) - a_(k-1)) x u . b_k, twice over: from either side, which makes it symmetric.
    polarised: (a, b) => {
      const t = new Float64Array(edges);
      for (let e = 0; e < edges; e++) {
        const [start, stop] = [starts[e], starts[e + 1]];
        const [u, v, w] = [axis[3 * e], axis[3 * e + 1], axis[3 * e + 2]];
        let sum = 0;
        for (let p = start; p < stop; p++) {
          const i = ring[p];
          const j = ring[p + 1 < stop ? p + 1 : start];
          sum +=
            u * (a[i + 1] * b[j + 2] - a[i + 2] * b[j + 1] + b[i + 1] * a[j + 2] - b[i + 2] * a[j + 1]) +
            v * (a[i + 2] * b[j] - a[i] * b[j + 2] + b[i + 2] * a[j] - b[i] * a[j + 2]) +
            w * (a[i] * b[j + 1] - a[i + 1] * b[j] + b[i] * a[j + 1] - b[i + 1] * a[j]);
        }
        t[e] = sum / 4;
      }
      return t;
    },
    pullBack: (a, h) => {
      const g = new Float64Array(a.length);
      for (let e = 0; e < edges; e++) {
        const [start, stop] = [starts[e], starts[e + 1]];
        const s = h[e] / 4;
        if (s === 0) continue;
        const [u, v, w] = [s * axis[3 * e], s * axis[3 * e + 1], s * axis[3 * e + 2]];
        for (let p = start; p < stop; p++) {
          const i = ring[p];
          const j = ring[p + 1 < stop ? p + 1 : start];
          // u . (a_i x b_j + b_i x a_j): on b_j comes u x a_i, on b_i comes a_j x u.
          g[j] += v * a[i + 2] - w * a[i + 1];
          g[j + 1] += w * a[i] - u * a[i + 2];
          g[j + 2] += u * a[i + 1] - v * a[i];
          g[i] += a[j + 1] * w - a[j + 2] * v;
          g[i + 1] += a[j + 2] * u - a[j] * w;
          g[i + 2] += a[j] * v - a[j + 1] * u;
        }
      }
      return Float64Array.from(basis, (column) => {
        let sum = 0;
        for (let i = 0; i < g.length; i++) sum += g[i] * column[i];
        return sum;
      });
    },
  };
}
