import { expect, it } from 'vitest';
import { writeStl } from '../../src/documents/formats/stl.js';
import { jobSchema } from '../../src/model/job/index.js';
import type { Section } from '../../src/model/section.js';
import { shapeGauge } from '../../src/shaping/gauge.js';
import { gaugeClearances, gaugeKind, gaugeWalls } from '../../src/shaping/gauge-steps.js';
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
  const own = jobSchema.parse({ ...job, nodes: { clearance_mm: 0.3, clearances: { r12: 0.5 } } });
  expect(gaugeClearances(round(8), own)).toEqual([0.1, 0.2, 0.3, 0.4, 0.5]);
  // A section's own value stands before the job's.
  expect(gaugeClearances(round(12), own)).toEqual([0.3, 0.4, 0.5, 0.6, 0.7]);
  // Near nothing the ladder keeps its steps: five sockets that differ.
  const tight = jobSchema.parse({ ...job, nodes: { clearance_mm: 0.1 } });
  expect(gaugeClearances(round(8), tight)).toEqual([0.05, 0.15, 0.25, 0.35, 0.45]);
  expect(gaugeWalls(job)).toEqual([0.4, 0.6, 0.8, 1.2, 1.6]);
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

it('has spigots in place of sockets for a tube that hubs go into, each smaller than the tube by its clearance', async () => {
  const tube: Section = {
    ...round(16),
    name: 't16',
    shape: { kind: 'tube', diameter: 16, wall: 1.5 },
    material: '6060-T6',
  };
  const spigots = jobSchema.parse({ ...job, nodes: { system: 'spigot', process: 'powder' } });
  expect(gaugeKind(tube, job)).toBe('socket');
  expect(gaugeKind(tube, spigots)).toBe('spigot');
  const piece = (await shapeGauge(tube, spigots))!;
  const stl = readStl(writeStl(piece.positions, piece.triangles, 'gauge'));
  expect(inspect(stl)).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
  expect(crossings(stl)).toBe(0);
  // Just under its top the middle one of the upright spigots, in the middle of the plate: a chord a row, the longest its diameter.
  const solid = makeProbe(stl);
  const chords: number[] = [];
  for (let y = 55; y < 67; y += 0.5) {
    const inside: number[] = [];
    for (let x = piece.box[0] / 2 - 9; x <= piece.box[0] / 2 + 9; x += 0.05)
      if (solid([x, y, 2 + 15 + 2 + 10])) inside.push(x);
    if (inside.length > 0) chords.push(inside[inside.length - 1]! - inside[0]!);
  }
  expect(Math.abs(Math.max(...chords) - (13 - 0.4))).toBeLessThan(0.1);
});
