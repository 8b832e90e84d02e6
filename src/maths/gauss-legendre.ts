/** Points and weights of n-point Gauss-Legendre quadrature on [-1, 1], exact to degree 2n - 1; by Newton on P_n (Press et al., Numerical Recipes, 4.6). */
export function gaussLegendre(n: number): { readonly points: Float64Array; readonly weights: Float64Array } {
  const points = new Float64Array(n);
  const weights = new Float64Array(n);
  for (let i = 0; i < (n + 1) >> 1; i++) {
    let x = Math.cos((Math.PI * (i + 0.75)) / (n + 0.5));
    let slope = 1;
    for (let step = 0; step < NEWTON_STEPS; step++) {
      let [previous, value] = [1, x];
      for (let k = 2; k <= n; k++) [previous, value] = [value, ((2 * k - 1) * x * value - (k - 1) * previous) / k];
      if (n === 0) value = 1;
      slope = (n * (x * value - previous)) / (x * x - 1);
      const move = value / slope;
      x -= move;
      if (Math.abs(move) < 1e-15) break;
    }
    points[i] = -x;
    points[n - 1 - i] = x;
    weights[i] = weights[n - 1 - i] = 2 / ((1 - x * x) * slope * slope);
  }
  if (n % 2 === 1) points[n >> 1] = 0;
  return { points, weights };
}

/** Newton from the cosine guess needs four; the rest is a net. */
const NEWTON_STEPS = 20;
