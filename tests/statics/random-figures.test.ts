import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { type Random, seededRandom } from '../../src/maths/random.js';
import { numberFreedoms } from '../../src/statics/freedoms.js';
import { equilibriumMatrix, type PinFigure } from '../../src/statics/pin-figure.js';
import { solvePinTruss } from '../../src/statics/pin-truss.js';
import { rigidMotions } from '../../src/statics/rigid-body.js';
import { countStates } from '../../src/statics/state-counts.js';
import { dense } from '../maths/sparse/random.js';

/** A seeded figure: a lattice, a triangulated strip or scattered nodes, with bars dropped or doubled and random supports. */
function randomFigure(random: Random): PinFigure {
  const kind = Math.floor(random() * 3);
  const n = 4 + Math.floor(random() * 12);
  const points: number[][] = [];
  for (let i = 0; i < n; i++)
    points.push(
      kind === 0
        ? [i % 3, Math.floor(i / 3) % 3, Math.floor(i / 9)]
        : kind === 1
          ? [i, i % 2, (i % 3) * 0.5]
          : [random() * 3, random() * 3, random() * 3],
    );
  const ends: number[] = [];
  for (let a = 0; a < n; a++)
    for (let b = a + 1; b < n; b++) {
      const near = Math.hypot(...points[a].map((v, k) => v - points[b][k]));
      if (near > 0 && near < (kind === 0 ? 1.1 + random() * 0.6 : 2.2) && random() < 0.85) ends.push(a, b);
    }
  if (ends.length === 0) ends.push(0, 1);
  const fixed = new Uint8Array(3 * n);
  for (let i = 0; i < n; i++) if (random() < 0.3) for (let k = 0; k < 3; k++) if (random() < 0.8) fixed[3 * i + k] = 1;
  return { nodes: Float64Array.from(points.flat()), ends: Int32Array.from(ends), fixed };
}

describe.each(Array.from({ length: 10 }, (_, i) => i))('random figures, batch %i', (batch) => {
  it('count as dense singular values do, and are solved where those allow it', () => {
    const random = seededRandom(1000 + batch);
    for (let k = 0; k < 30; k++) {
      const figure = randomFigure(random);
      const freedoms = numberFreedoms(figure.fixed, 3);
      const a = equilibriumMatrix(figure, freedoms);
      const c = countStates(figure);
      const values =
        a.rows > 0 && a.columns > 0 ? new SingularValueDecomposition(dense(a), { autoTranspose: true }).diagonal : [];
      const rank = values.filter((s) => s > 1e-9).length;
      expect(c.rank).toBe(rank);
      expect(c.mechanisms).toBe(freedoms.count - rank - rigidMotions(figure).length);
      expect(c.mechanismShapes.length).toBe(c.mechanisms);
      for (const m of c.mechanismShapes) expect(m.singularValue).toBeLessThan(1e-8);
      const bars = figure.ends.length / 2;
      const forces = Float64Array.from({ length: 3 * (figure.nodes.length / 3) }, () => random() - 0.5);
      const axialStiffness = Float64Array.from({ length: bars }, () => 1e4 * (0.5 + random()));
      const s = solvePinTruss({ ...figure, axialStiffness }, [{ forces }]);
      const least = values.length >= a.rows ? Math.min(...values.slice(0, a.rows)) : 0;
      if (rank < freedoms.count) expect(s.state).toBe('mechanism');
      else if (least > 1e-4) {
        if (s.state !== 'solved') throw new Error('a stiff figure was refused');
        const t = dense(a)
          .mmul(Matrix.columnVector(Array.from(s.cases[0].axial)))
          .getColumn(0);
        freedoms.of.forEach((f, i) => {
          if (f >= 0) expect(Math.abs(t[f] - forces[i])).toBeLessThan(1e-8);
        });
        expect(Math.max(...s.cases[0].imbalance.map(Math.abs))).toBeLessThan(1e-8);
      }
    }
  });
});
