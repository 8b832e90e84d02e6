import fc from 'fast-check';
import { expect, it } from 'vitest';
import { planStock } from '../../../src/planning/stock/plan-stock.js';
import { leastPrice, planFaults } from './verify.js';

const stock = [
  { name: 'short', length: 1000, price: 3 },
  { name: 'long', length: 2000, price: 5 },
];
const pieces = [{ mark: 'S', length: 900, quantity: 1 }];

it('buys the longer bar where what it leaves is worth more than it costs', async () => {
  const plain = { pieces, stock, kerf: 0 };
  const kept = { ...plain, offcuts: { least: 200, share: 1 } };
  const [a, b] = [await planStock(plain), await planStock(kept)];
  expect(planFaults(plain, a)).toEqual([]);
  expect(planFaults(kept, b)).toEqual([]);
  expect(a.bars.map((x) => x.stock)).toEqual(['short']);
  // 5 - 1100 x 5 / 2000 = 2.25 against 3: nothing of the short bar is long enough to keep.
  expect(b.bars.map((x) => x.stock)).toEqual(['long']);
  expect(b.cost).toBeCloseTo(2.25, 9);
  expect(b.credit).toBeCloseTo(2.75, 9);
  expect(b.proven).toBe(true);
});

it('counts no offcut below the least length', async () => {
  const answer = await planStock({ pieces, stock, kerf: 0, offcuts: { least: 1200, share: 1 } });
  expect(answer.bars.map((x) => x.stock)).toEqual(['short']);
  expect(answer.credit).toBe(0);
  expect(answer.cost).toBe(3);
});

it('says a share that is none', async () => {
  const answer = await planStock({ pieces, stock, kerf: 0, offcuts: { least: -1, share: 2 } });
  expect(answer.faults.map((f) => f.place)).toEqual(['offcuts', 'offcuts']);
});

it('claims no bound above what any plan reaches', async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.array(fc.record({ length: fc.integer({ min: 100, max: 900 }), quantity: fc.integer({ min: 1, max: 2 }) }), {
        minLength: 1,
        maxLength: 3,
      }),
      fc.integer({ min: 1, max: 10 }),
      async (list, tenths) => {
        const request = {
          pieces: list.map((p, i) => ({ ...p, mark: `P${i}` })),
          stock,
          kerf: 3,
          offcuts: { least: 150, share: tenths / 10 },
        };
        const answer = await planStock(request);
        expect(planFaults(request, answer)).toEqual([]);
        expect(answer.lowerBound).toBeLessThanOrEqual(leastPrice(request) + 1e-9);
      },
    ),
    { numRuns: 30, seed: 9 },
  );
});
