import { expect, it } from 'vitest';
import { gaussLegendre } from '../../src/maths/gauss-legendre.js';
import { legendre } from '../../src/maths/legendre.js';

it('five points as tabulated', () => {
  // Abramowitz and Stegun, table 25.4 (from memory).
  const { points, weights } = gaussLegendre(5);
  [-0.906179845938664, -0.538469310105683, 0, 0.538469310105683, 0.906179845938664].forEach((x, i) => {
    expect(points[i]).toBeCloseTo(x, 13);
  });
  [0.236926885056189, 0.478628670499366, 0.568888888888889].forEach((w, i) => {
    expect(weights[i]).toBeCloseTo(w, 13);
  });
});

it('Legendre polynomials are orthogonal: the integral of P_i P_j is 2 / (2i + 1) for i = j, else 0', () => {
  const { points, weights } = gaussLegendre(9);
  for (let i = 0; i <= 8; i++)
    for (let j = 0; j <= 8; j++) {
      let sum = 0;
      points.forEach((x, k) => {
        const { p } = legendre(8, x);
        sum += weights[k]! * p[i]! * p[j]!;
      });
      expect(sum).toBeCloseTo(i === j ? 2 / (2 * i + 1) : 0, 13);
    }
});

it('derivatives at 1: n(n+1)/2 and (n-1)n(n+1)(n+2)/8', () => {
  // Abramowitz and Stegun, chapter 22 (from memory).
  const { d1, d2 } = legendre(8, 1);
  for (let n = 0; n <= 8; n++) {
    expect(d1[n]).toBeCloseTo((n * (n + 1)) / 2, 10);
    expect(d2[n]).toBeCloseTo(((n - 1) * n * (n + 1) * (n + 2)) / 8, 9);
  }
});
