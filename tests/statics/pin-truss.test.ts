import { describe, expect, it } from 'vitest';
import { elasticForces, solvePinTruss } from '../../src/statics/pin-truss.js';
import { prestressTest, splitForces } from '../../src/statics/prestress.js';
import { countStates } from '../../src/statics/state-counts.js';

/** Three bars in line between two walls: 1 m each, EA 1000 kN. */
const line = {
  nodes: Float64Array.from([0, 0, 0, 1000, 0, 0, 2000, 0, 0]),
  ends: Int32Array.of(0, 1, 1, 2),
  fixed: Uint8Array.of(1, 1, 1, 0, 1, 1, 1, 1, 1),
  axialStiffness: Float64Array.of(1e6, 1e6),
};

describe('initial strain', () => {
  it('a bar warmed between walls takes -EA alpha dT in every bar (by hand)', () => {
    const e0 = 12e-6 * 30 * 1000;
    const s = solvePinTruss(line, [{ forces: new Float64Array(9), freeElongation: Float64Array.of(e0, e0) }]);
    if (s.state !== 'solved') throw new Error(s.state);
    for (const t of s.cases[0].axial) expect(t).toBeCloseTo(-1e6 * 12e-6 * 30, 6);
    expect(s.cases[0].displacements[3]).toBeCloseTo(0, 12);
    expect(s.cases[0].reactions[0]).toBeCloseTo(360, 6);
    expect(s.cases[0].reactions[6]).toBeCloseTo(-360, 6);
  });

  it('one bar 1 mm too long shares the misfit: both at -EA 1/(2 L), the middle moves 0.5 mm (by hand)', () => {
    const s = solvePinTruss(line, [{ forces: new Float64Array(9), freeElongation: Float64Array.of(1, 0) }]);
    if (s.state !== 'solved') throw new Error(s.state);
    expect([...s.cases[0].axial].map((t) => Math.round(t * 1e6) / 1e6)).toEqual([-500, -500]);
    expect(s.cases[0].displacements[3]).toBeCloseTo(0.5, 12);
  });
});

it('names a node that can move instead of solving a singular stiffness', () => {
  const loose = { ...line, fixed: Uint8Array.of(1, 1, 1, 0, 0, 1, 1, 1, 1) };
  expect(solvePinTruss(loose, [{ forces: new Float64Array(9) }])).toEqual({ state: 'mechanism', node: 1 });
});

it('names a node that can move where round-off hides the zero pivot', () => {
  // Two bars in a slanted line: the pivot left over is round-off.
  const d = [1 / 3, 2 / 7, 3 / 11];
  const nodes = Float64Array.from([0, 0, 0, ...d.map((v) => 1000 * v), ...d.map((v) => 2000 * v)]);
  const s = solvePinTruss({ ...line, nodes, fixed: Uint8Array.of(1, 1, 1, 0, 0, 0, 1, 1, 1) }, [
    { forces: new Float64Array(9) },
  ]);
  expect(s).toEqual({ state: 'mechanism', node: 1 });
});

describe('self-stress', () => {
  const q = (Math.PI * 5) / 6; // twist of 150 degrees: 3 struts, 3 verticals, 6 horizontals
  const points = [0, 1].flatMap((top) =>
    [0, 1, 2].flatMap((i) => {
      const a = (2 * Math.PI * i) / 3 + top * q;
      return [Math.cos(a), Math.sin(a), 1.5 * top];
    }),
  );
  const prism = {
    nodes: Float64Array.from(points),
    ends: Int32Array.from([0, 1, 1, 2, 2, 0, 3, 4, 4, 5, 5, 3, 0, 3, 1, 4, 2, 5, 1, 3, 2, 4, 0, 5]),
    fixed: new Uint8Array(18),
    axialStiffness: new Float64Array(12).fill(1e5),
  };

  it('of the twisted prism of 3 sides holds its mechanism with cables pulled, not with struts pulled', () => {
    const counts = countStates(prism);
    expect([counts.selfStressStates, counts.mechanisms]).toEqual([1, 1]);
    const v = counts.selfStress(0);
    const t = new Float64Array(12);
    v.indices.forEach((e, k) => {
      t[e] = v.values[k];
    });
    if (t[0] < 0) for (let e = 0; e < 12; e++) t[e] = -t[e]; // horizontals in tension
    const held = prestressTest(
      prism,
      t,
      counts.mechanismShapes.map((m) => m.shape),
    );
    expect(held.holds).toBe(true);
    expect(
      prestressTest(
        prism,
        t.map((x) => -x),
        counts.mechanismShapes.map((m) => m.shape),
      ).holds,
    ).toBe(false);
    expect(
      prestressTest(
        prism,
        new Float64Array(12),
        counts.mechanismShapes.map((m) => m.shape),
      ).holds,
    ).toBe(false);
  });

  it('comes from one strut made too short, though the figure can move, and then carries a load across', () => {
    const free = { ...line, fixed: Uint8Array.of(1, 1, 1, 0, 0, 1, 1, 1, 1) };
    const t = elasticForces(free, { forces: new Float64Array(9), freeElongation: Float64Array.of(-1, 0) });
    // Both bars at EA 1 / (2 L) = 500 N, as where the middle is held (by hand).
    expect([...t].map((x) => Math.round(x * 1e6) / 1e6)).toEqual([500, 500]);
    const p = new Float64Array(9);
    p[4] = 2;
    const s = solvePinTruss({ ...free, prestress: t }, [{ forces: p }]);
    if (s.state !== 'solved') throw new Error(s.state);
    // Across: 2 t / L = 1 N/mm.
    expect(s.cases[0].displacements[4]).toBeCloseTo(2, 9);
  });

  it('is told apart from what the loads call for', () => {
    const p = new Float64Array(9);
    p[3] = 800;
    const s = solvePinTruss(line, [{ forces: p }]);
    if (s.state !== 'solved') throw new Error(s.state);
    const given = s.cases[0].axial.map((t) => t + 123);
    const split = splitForces(line, given);
    expect([...split.selfStress].map((x) => Math.round(x * 1e6) / 1e6)).toEqual([123, 123]);
    expect(split.byLoad[0]).toBeCloseTo(400, 9);
  });
});
