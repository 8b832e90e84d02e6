/** Legendre polynomials P_0 .. P_n at x with their first and second derivatives, by the three-term recurrence. */
export interface LegendreValues {
  readonly p: Float64Array;
  readonly d1: Float64Array;
  readonly d2: Float64Array;
}

export function legendre(n: number, x: number): LegendreValues {
  const p = new Float64Array(n + 1);
  const d1 = new Float64Array(n + 1);
  const d2 = new Float64Array(n + 1);
  p[0] = 1;
  if (n > 0) {
    p[1] = x;
    d1[1] = 1;
  }
  for (let k = 2; k <= n; k++) {
    p[k] = ((2 * k - 1) * x * p[k - 1]! - (k - 1) * p[k - 2]!) / k;
    // P'_k = P'_{k-2} + (2k - 1) P_{k-1}, and the same once more.
    d1[k] = d1[k - 2]! + (2 * k - 1) * p[k - 1]!;
    d2[k] = d2[k - 2]! + (2 * k - 1) * d1[k - 1]!;
  }
  return { p, d1, d2 };
}
