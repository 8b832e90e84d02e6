import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { nestPanels } from '../../../src/index.js';
import { planErrors } from '../../planning/nesting/verify.js';

/**
 * Instances of ESICUP/datasets (EURO working group on cutting and packing), folder 2d_irregular, licence CC0 1.0:
 * fu (Fujita, Akagi, Hirokawa 1993), dighe1 (Dighe, Jakiela 1996), shapes1 (Oliveira, Gomes, Ferreira 2000), and two of
 * TERASHIMA1 class TB (Terashima-Marin et al. 2010), whose optimum is known: every sheet full.
 */
const load = (name: string) => JSON.parse(readFileSync(join(import.meta.dirname, name), 'utf8'));
type P = [number, number];
interface Strip {
  stripWidth: number;
  items: { id: number; quantity: number; rotations: number[]; polygon: P[]; area: number }[];
}
const strips = load('strip-instances.json') as Record<string, Strip>;

/** Everything on one long sheet; the used length over the sheet's width gives the density that papers print. */
async function densityOf(name: string, effort: number): Promise<number> {
  const strip = strips[name]!;
  const area = strip.items.reduce((sum, i) => sum + i.quantity * i.area, 0);
  const request = {
    panels: strip.items.map((i) => ({
      mark: `P${i.id}`,
      outline: i.polygon,
      quantity: i.quantity,
      rotations: i.rotations,
    })),
    sheets: [{ name: 'strip', width: (2 * area) / strip.stripWidth, height: strip.stripWidth }],
    spacing: 0,
    margin: 0,
    effort,
  };
  const answer = await nestPanels(request);
  expect(planErrors(request, answer)).toEqual([]);
  expect(answer.sheets.length).toBe(1);
  let used = 0;
  for (const p of answer.sheets[0]!.placements) {
    const panel = request.panels.find((q) => q.mark === p.mark)!;
    const [c, s] = [Math.cos((p.rotation_deg * Math.PI) / 180), Math.sin((p.rotation_deg * Math.PI) / 180)];
    for (const [x, y] of panel.outline) used = Math.max(used, c * x - s * y + p.x);
  }
  return (100 * area) / (strip.stripWidth * used);
}

describe('published strips', () => {
  it('fu comes near the best printed density, 92.41 %', async () => {
    const density = await densityOf('fu', 2);
    expect(density).toBeGreaterThan(87);
    expect(density).toBeLessThan(92.42);
  });

  it('the jigsaw dighe1 comes on its way to the known 100 %', async () => {
    const density = await densityOf('dighe1', 3);
    expect(density).toBeGreaterThan(85);
    expect(density).toBeLessThanOrEqual(100.01);
  });

  it('shapes1 stays below the best printed, 76.73 %, and above first fit', async () => {
    const density = await densityOf('shapes1', 0.4);
    expect(density).toBeGreaterThan(65);
    expect(density).toBeLessThan(76.74);
  });
});

describe('published jigsaws on sheets', () => {
  const set = load('jigsaw-instances.json') as {
    instances: { name: string; bin: [number, number]; pieces: P[][]; optimalBins: number }[];
  };
  for (const instance of set.instances)
    it(`${instance.name}: no plan below the known optimum, few sheets above it`, async () => {
      const request = {
        panels: instance.pieces.map((outline, i) => ({ mark: `P${i}`, outline, quantity: 1, rotations: [0] })),
        sheets: [{ name: 'S', width: instance.bin[0], height: instance.bin[1] }],
        spacing: 0,
        margin: 0,
      };
      const answer = await nestPanels(request);
      expect(planErrors(request, answer)).toEqual([]);
      expect(answer.lowerBound).toBe(instance.optimalBins);
      expect(answer.sheets.length).toBeGreaterThanOrEqual(instance.optimalBins);
      expect(answer.sheets.length).toBeLessThanOrEqual(instance.optimalBins + 2);
    });
});
