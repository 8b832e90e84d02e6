import { expect, it } from 'vitest';
import { geometricStiffness } from '../../../src/statics/frame/geometric-stiffness.js';
import type { FrameMember } from '../../../src/statics/frame/member.js';
import { slopeProducts } from '../../../src/statics/frame/slope-products.js';

const L = 700;
const bar = (springs: FrameMember['springs'], cuts: readonly number[] = [L]): FrameMember => ({
  ends: [0, 1],
  axes: { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
  segments: cuts.map((length) => ({ length, axial: 4e6, bendingY: 2e9, bendingZ: 3e9, torsion: 1e9 })),
  springs,
});
const PLANES = [
  ['bendingZ', 1],
  ['bendingY', -1],
] as const;
/** A deflection counts 1, a rotation the length. */
const SIZE = [1, L, 1, L];
const close = (got: readonly (readonly number[])[], wanted: readonly (readonly number[])[]) =>
  got.forEach((row, i) => {
    row.forEach((v, j) => {
      expect(Math.abs(v - wanted[i][j])).toBeLessThan((1e-6 * SIZE[i] * SIZE[j]) / L);
    });
  });

it.each(PLANES)(
  'an even bar, in one piece or three, has the consistent matrix (Przemieniecki 1968, 15.2): %s',
  (b, s) => {
    const wanted = [
      [36, 3 * s * L, -36, 3 * s * L],
      [3 * s * L, 4 * L * L, -3 * s * L, -L * L],
      [-36, -3 * s * L, 36, -3 * s * L],
      [3 * s * L, -L * L, -3 * s * L, 4 * L * L],
    ].map((row) => row.map((v) => v / (30 * L)));
    close(slopeProducts(bar([]), b, s), wanted);
    close(slopeProducts(bar([], [100, 450, 150]), b, s), wanted);
  },
);

it.each(PLANES)(
  'with a pin at its first node: 6/5 L, 1/5, L/5, and none on the rotation there (by hand): %s',
  (b, s) => {
    // v' of a bar pinned at x = 0: 3/2 (1 - x²) / L for a unit deflection at 2, (3 x² - 1) / 2 for a unit turn there.
    const pinned = slopeProducts(bar([{ at: 0, stiffness: 0.1 }]), b, s);
    const [f, g, h] = [6 / (5 * L), s / 5, L / 5];
    close(pinned, [
      [f, 0, -f, g],
      [0, 0, 0, 0],
      [-f, 0, f, -g],
      [g, 0, -g, h],
    ]);
  },
);

it('with pins at both nodes is a string: N / L', () => {
  const k = geometricStiffness(
    bar([
      { at: 0, stiffness: 1e-3 },
      { at: L, stiffness: 1e-3 },
    ]),
    -50,
  );
  const u = [1, 2];
  for (const i of u) {
    expect(k[12 * i + i]).toBeCloseTo(-50 / L, 9);
    expect(k[12 * i + 6 + i]).toBeCloseTo(50 / L, 9);
  }
  for (const r of [4, 5, 10, 11]) expect(Math.abs(k[12 * r + r])).toBeLessThan(1e-6);
});
