/** A linear map by what it does: x (columns) to A x (rows), and r (rows) to A' r (columns). */
export interface LinearMap {
  readonly rows: number;
  readonly columns: number;
  forward(x: Float64Array): Float64Array;
  back(r: Float64Array): Float64Array;
}

export interface LeastSquares {
  readonly x: Float64Array;
  /** |A'(b - A x)| over |A' b| at the end, the damping included. */
  readonly residual: number;
  readonly steps: number;
}

/** Stop when the normal residual has come down to this share of its start: a few digits above round-off. */
const CONVERGED = 1e-14;

/**
 * min |A x - b|² + damping |x|², of all minimisers the shortest, by conjugate gradients on the normal equations
 * (Björck, Numerical Methods for Least Squares Problems, 1996, 7.4.1, CGLS). Needs no rank.
 */
export function leastSquares(
  map: LinearMap,
  b: Float64Array,
  damping = 0,
  mostSteps = 4 * map.columns + 50,
  converged = CONVERGED,
): LeastSquares {
  const x = new Float64Array(map.columns);
  const r = Float64Array.from(b);
  let s = map.back(r);
  const p = Float64Array.from(s);
  const first = dotOf(s, s);
  let gamma = first;
  let steps = 0;
  while (steps < mostSteps && gamma > converged * converged * first && gamma > 0) {
    const q = map.forward(p);
    const delta = dotOf(q, q) + damping * dotOf(p, p);
    if (!(delta > 0)) break;
    const alpha = gamma / delta;
    for (let i = 0; i < x.length; i++) x[i] += alpha * p[i];
    for (let i = 0; i < r.length; i++) r[i] -= alpha * q[i];
    s = map.back(r);
    if (damping > 0) for (let i = 0; i < s.length; i++) s[i] -= damping * x[i];
    const next = dotOf(s, s);
    const beta = next / gamma;
    gamma = next;
    for (let i = 0; i < p.length; i++) p[i] = s[i] + beta * p[i];
    steps++;
  }
  return { x, residual: first > 0 ? Math.sqrt(gamma / first) : 0, steps };
}

/** a . b of two lists of one length. */
export function dotOf(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
