import { expect, it } from 'vitest';
import { writeStl } from '../../src/documents/formats/stl.js';
import { jobSchema } from '../../src/model/job/index.js';
import type { Section } from '../../src/model/section.js';
import { gaugeClearances, shapeGauge } from '../../src/shaping/gauge.js';
import { crossings, inspect, makeProbe, readStl } from '../tools/mesh-check.mjs';

const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'gauge', truss: 'truss.json' });
const round = (diameter: number): Section => ({
  name: `r${diameter}`,
  shape: { kind: 'round', diameter },
  material: 'beech-dowel',
  measured: null,
});

it("steps the clearance about the job's own", () => {
  expect(gaugeClearances(round(8), job)).toEqual([0.2, 0.3, 0.4, 0.5, 0.6]);
  const own = jobSchema.parse({ ...job, nodes: { clearance_mm: 0.3 } });
  expect(gaugeClearances(round(8), own)).toEqual([0.1, 0.2, 0.3, 0.4, 0.5]);
});

it('is one closed solid whatever the section and process', async () => {
  const lath: Section = {
    name: '8x14',
    shape: { kind: 'rectangle', width: 8, height: 14 },
    material: 'beech-dowel',
    measured: null,
  };
  for (const process of ['filament', 'powder', 'resin'] as const)
    for (const section of process === 'filament' ? [round(3), round(25), lath] : [round(8)]) {
      const piece = (await shapeGauge(section, jobSchema.parse({ ...job, nodes: { process } })))!;
      const stl = readStl(writeStl(piece.positions, piece.triangles, 'gauge'));
      expect(inspect(stl)).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
      expect(crossings(stl)).toBe(0);
    }
});

it('bores the upright sockets to the size of the strut and the clearance', async () => {
  const piece = (await shapeGauge(round(8), job))!;
  const solid = makeProbe(readStl(writeStl(piece.positions, piece.triangles, 'gauge')));
  // The narrowest and the widest upright bore: along the row's middle the material ends a radius from the bore's axis.
  const [, , height] = piece.box;
  expect(height).toBeGreaterThan(15);
  const z = 2 + 9.6 + 2 - 1;
  const edges: number[] = [];
  let before = false;
  const y = 11.6 + 5 + 6.3;
  for (let x = 0; x <= piece.box[0]; x += 0.01) {
    const now = solid([x, y, z]);
    if (now !== before) edges.push(x);
    before = now;
  }
  // Outside, five bores of two edges each, outside.
  expect(edges.length).toBe(12);
  const bores = [0, 1, 2, 3, 4].map((i) => edges[2 * i + 2]! - edges[2 * i + 1]!);
  bores.forEach((bore, i) => {
    expect(bore).toBeCloseTo(8.2 + 0.1 * i, 1);
  });
});
