import { expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { jobSchema } from '../../../src/model/job/index.js';
import { printersSchema } from '../../../src/model/job/nodes.js';
import { printersOf } from '../../../src/model/printers.js';
import { type PrintPiece, planBeds } from '../../../src/planning/beds/plan-beds.js';

const piece = (mark: string, x: number, y: number, z = 20): PrintPiece => ({
  mark,
  piece: '',
  box: [x, y, z],
  volume: x * y,
  mass: 0.001,
});

it('keeps spacing and margin on rectangular and round beds, and places every piece once', () => {
  const random = seededRandom(2);
  for (const bed of ['rectangle', 'circle'] as const) {
    const printers = printersSchema.parse([{ bed, width_mm: 180, depth_mm: 140 }]);
    const pieces = Array.from({ length: 60 }, (_, i) => piece(`N${i}`, 15 + 45 * random(), 15 + 45 * random()));
    const { beds, unplaced } = planBeds(pieces, printers);
    expect(unplaced).toEqual([]);
    expect(beds.flatMap((b) => b.items.map((i) => i.mark)).sort()).toEqual(pieces.map((p) => p.mark).sort());
    for (const b of beds) {
      const boxes = b.items.map((i) => {
        const [w, d] = pieces.find((p) => p.mark === i.mark)!.box;
        return { x: i.x, y: i.y, w: i.turned ? d : w, d: i.turned ? w : d };
      });
      boxes.forEach((p, i) => {
        if (bed === 'rectangle') {
          expect(p.x).toBeGreaterThan(2 - 1e-5);
          expect(p.y).toBeGreaterThan(2 - 1e-5);
          expect(p.x + p.w).toBeLessThan(178 + 1e-5);
          expect(p.y + p.d).toBeLessThan(138 + 1e-5);
        } else
          for (const x of [p.x, p.x + p.w])
            for (const y of [p.y, p.y + p.d]) expect(Math.hypot(x - 90, y - 90)).toBeLessThan(88 + 1e-5);
        for (const q of boxes.slice(i + 1)) {
          const apart = Math.max(q.x - p.x - p.w, p.x - q.x - q.w, q.y - p.y - p.d, p.y - q.y - q.d);
          expect(apart).toBeGreaterThan(4 - 1e-5);
        }
      });
    }
  }
});

it('fills a bed that the pieces fill exactly: 16 squares of 48 mm with 4 mm between on 204 mm', () => {
  const printers = printersSchema.parse([{ width_mm: 208, depth_mm: 208 }]);
  const { beds } = planBeds(
    Array.from({ length: 17 }, (_, i) => piece(`N${i}`, 48, 48)),
    printers,
  );
  expect(beds.map((b) => b.items.length)).toEqual([16, 1]);
});

it('takes the second printer for what the first is too small for, and names what fits none', () => {
  const printers = printersSchema.parse([
    { name: 'small', width_mm: 100, depth_mm: 100, height_mm: 50 },
    { name: 'large', width_mm: 300, depth_mm: 300, height_mm: 300 },
  ]);
  const { beds, unplaced } = planBeds(
    [piece('N1', 40, 40), piece('N2', 40, 40, 80), piece('N3', 120, 40), piece('N4', 400, 40)],
    printers,
  );
  expect(unplaced).toEqual(['N4']);
  expect(Object.fromEntries(beds.flatMap((b) => b.items.map((i) => [i.mark, b.printer])))).toEqual({
    // The large bed is open by then: one bed is better than two.
    N1: 'large',
    N2: 'large',
    N3: 'large',
  });
});

it('reckons time as volume over flow plus layers times change', () => {
  const printers = printersSchema.parse([{ flow_mm3_per_s: 8, layer_mm: 0.2, layerChange_s: 4 }]);
  const { beds } = planBeds([{ ...piece('N1', 40, 40, 30), volume: 16000 }], printers);
  // 16000 / 8 = 2000 s and 150 layers x 4 s = 600 s.
  expect(beds[0]).toMatchObject({ layers: 150, time: 2600 });
});

it('gives the same plan whatever the order of the pieces', () => {
  const printers = printersSchema.parse([{}]);
  const pieces = Array.from({ length: 30 }, (_, i) => piece(`N${i}`, 20 + (i % 7) * 5, 30));
  expect(planBeds([...pieces].reverse(), printers)).toEqual(planBeds(pieces, printers));
});

it('fills the beds of printers of the hubs’ own process alone', () => {
  const job = jobSchema.parse({
    format: 'strutwright-job/1',
    title: 'T',
    truss: 't.json',
    nodes: { process: 'powder' },
    printers: [{ name: 'desk', process: 'filament' }, { name: 'powder bed', process: 'powder' }, { name: 'any' }],
  });
  expect(printersOf(job).map((p) => p.name)).toEqual(['powder bed', 'any']);
  const { beds } = planBeds([piece('N1', 20, 20)], printersOf(job));
  expect(beds.map((b) => b.printer)).toEqual(['powder bed']);
});
