import { describe, expect, it } from 'vitest';
import { settleErrors } from '../../../src/planning/fit-up/elastic.js';
import { closer, loopsOf } from '../../../src/planning/fit-up/loops.js';
import type { PinFigure } from '../../../src/statics/pin-figure.js';
import { countStates } from '../../../src/statics/state-counts.js';

/** A square of side a with both diagonals, held out of its plane. Bars: four sides, then the diagonals. */
function crossedSquare(a: number): PinFigure {
  return {
    nodes: Float64Array.from([0, 0, 0, a, 0, 0, a, a, 0, 0, a, 0]),
    ends: Int32Array.from([0, 1, 1, 2, 2, 3, 3, 0, 0, 2, 1, 3]),
    fixed: Uint8Array.from([0, 0, 1, 0, 0, 1, 0, 0, 1, 0, 0, 1]),
  };
}

const stiffnessOf = (figure: PinFigure, ea: number): Float64Array =>
  Float64Array.from({ length: figure.ends.length / 2 }, (_, b) => {
    const [p, q] = [3 * figure.ends[2 * b]!, 3 * figure.ends[2 * b + 1]!];
    return ea / Math.hypot(...[0, 1, 2].map((c) => figure.nodes[p + c]! - figure.nodes[q + c]!));
  });

describe('a bar that does not fit', () => {
  it('locks X = EA d / (2 (1 + √2) a) into the diagonals of a crossed square (Timoshenko, Strength of Materials I, lack of fit; from memory, checked by the force method)', () => {
    const [a, ea, d] = [400, 650_000, 1.3];
    const square = crossedSquare(a);
    // One diagonal too short by d.
    const [settled] = settleErrors(square, stiffnessOf(square, ea), [Float64Array.from([0, 0, 0, 0, -d, 0])]);
    const x = (ea * d) / (2 * (1 + Math.SQRT2) * a);
    expect(settled!.forces[4]! / x).toBeCloseTo(1, 4);
    expect(settled!.forces[5]! / x).toBeCloseTo(1, 4);
    for (const side of [0, 1, 2, 3]) expect(settled!.forces[side]! / (-x / Math.SQRT2)).toBeCloseTo(1, 4);
  });

  it('locks nothing into a statically determinate tripod, whose apex goes where three spheres meet', () => {
    const feet = [
      [300, 0, 0],
      [-150, 260, 0],
      [-150, -260, 0],
    ];
    const apex = [10, 20, 400];
    const figure: PinFigure = {
      nodes: Float64Array.from([...feet.flat(), ...apex]),
      ends: Int32Array.from([0, 3, 1, 3, 2, 3]),
      fixed: Uint8Array.from([1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 0, 0]),
    };
    const e = Float64Array.from([0.2, -0.1, 0.15]);
    const [settled] = settleErrors(figure, stiffnessOf(figure, 5e5), [e]);
    for (const t of settled!.forces) expect(Math.abs(t)).toBeLessThan(1e-2);
    const moved = apex.map((v, c) => v + settled!.displacements[9 + c]!);
    feet.forEach((foot, b) => {
      const before = Math.hypot(...foot.map((v, c) => v - apex[c]!));
      const after = Math.hypot(...foot.map((v, c) => v - moved[c]!));
      // Linear: second order in the errors, 0.2²/500.
      expect(after - before).toBeCloseTo(e[b]!, 3);
    });
  });
});

describe('loops', () => {
  const square = crossedSquare(400);
  const loops = loopsOf(countStates(square));

  it('the crossed square has one, of all six bars', () => {
    expect(loops).toHaveLength(1);
    expect([...loops[0]!.indices].sort()).toEqual([0, 1, 2, 3, 4, 5]);
  });

  it('a diagonal too short closes within just enough play, and not with less', () => {
    const d = 1;
    const e = Float64Array.from([0, 0, 0, 0, -d, 0]);
    // Self-stress sides 1, diagonals -√2: miss √2 d against play f (4 + 2 √2).
    const enough = (Math.SQRT2 * d) / (4 + 2 * Math.SQRT2);
    expect(closer(loops, new Float64Array(6).fill(enough * 1.001))(e)).toBe(true);
    expect(closer(loops, new Float64Array(6).fill(enough * 0.999))(e)).toBe(false);
  });
});
