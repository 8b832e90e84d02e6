import fc from 'fast-check';
import { expect, it } from 'vitest';
import { planStock } from '../../../src/planning/stock/plan-stock.js';
import type { StockRequest } from '../../../src/planning/stock/request.js';
import { leastPrice, planFaults } from './verify.js';

async function plan(request: StockRequest) {
  const answer = await planStock(request);
  expect(planFaults(request, answer)).toEqual([]);
  return answer;
}

const bar = (length: number, rest: object = {}) => ({ name: `${length}`, length, ...rest });

it('counts n - 1 kerfs for n pieces, and dust for a rest below a kerf', async () => {
  const three = { mark: 'S1', length: 330, quantity: 3 };
  // 3 x 330 + 2 x 5 = 1000: fits to the tenth.
  const full = await plan({ pieces: [three], stock: [bar(1000)], kerf: 5 });
  expect(full.bars).toHaveLength(1);
  expect(full.bars[0]!.offcut).toBe(0);
  // 4.9 mm beyond the last piece are less than the blade: nothing is left. 5.1 mm: 0.1 mm is left.
  expect((await plan({ pieces: [three], stock: [bar(1004.9)], kerf: 5 })).bars[0]!.offcut).toBe(0);
  expect((await plan({ pieces: [three], stock: [bar(1005.1)], kerf: 5 })).bars[0]!.offcut).toBe(0.1);
  expect((await plan({ pieces: [three], stock: [bar(999.9)], kerf: 5 })).bars).toHaveLength(2);
});

it('takes the trim off one end, both, or none, by kind of bar', async () => {
  const pieces = [{ mark: 'S1', length: 500, quantity: 2 }];
  const on = (extra: object, kind: object = {}) =>
    plan({ pieces, stock: [bar(1013, kind)], kerf: 3, endTrim: 10, ...extra }).then((a) => a.bars.length);
  expect(await on({})).toBe(1);
  expect(await on({ trimmedEnds: 2 })).toBe(2);
  expect(await on({ trimmedEnds: 0 })).toBe(1);
  expect(await on({ trimmedEnds: 2 }, { trimmedEnds: 0 })).toBe(1);
});

it('rounds pieces up and bars down to 0.1 mm, but not for a binary fraction', async () => {
  // 0.1 + 0.2 is 0.30000000000000004: three of them still fit 0.9 mm.
  const pieces = [{ mark: 'S1', length: 0.1 + 0.2, quantity: 3 }];
  expect((await plan({ pieces, stock: [bar(0.9)], kerf: 0 })).bars).toHaveLength(1);
  const over = [{ mark: 'S1', length: 100.01, quantity: 2 }];
  expect((await plan({ pieces: over, stock: [bar(200.1)], kerf: 0 })).bars).toHaveLength(2);
  expect((await plan({ pieces: over, stock: [bar(200.29)], kerf: 0 })).bars).toHaveLength(1);
});

it('names a piece that is too long with the longest that fits, and cuts the rest', async () => {
  const answer = await plan({
    pieces: [
      { mark: 'long', length: 2400, quantity: 2 },
      { mark: 'short', length: 700, quantity: 2 },
    ],
    stock: [bar(2000)],
    kerf: 3,
    endTrim: 5,
  });
  expect(answer.uncut).toEqual([{ mark: 'long', length: 2400, quantity: 2, reason: 'too-long', longest: 1995 }]);
  expect(answer.bars).toHaveLength(1);
  expect(answer.proven).toBe(false);
});

it('says what is left when the bars run out, and leaves as little as it can', async () => {
  const request = {
    pieces: [
      { mark: 'A', length: 900, quantity: 3 },
      { mark: 'B', length: 450, quantity: 4 },
    ],
    stock: [
      { name: '1000', length: 1000, available: 3 },
      { name: '500', length: 500, available: 1 },
    ],
    kerf: 3,
  };
  const answer = await plan(request);
  expect(answer.uncut.every((u) => u.reason === 'no-stock-left')).toBe(true);
  // Three bars of 1000 hold three A, or two B instead of one A; two more would be needed in any case.
  expect(answer.uncut.reduce((sum, u) => sum + u.quantity, 0)).toBeLessThanOrEqual(3);
  const idle = request.stock.filter((s) => answer.bars.filter((b) => b.stock === s.name).length < s.available);
  for (const s of idle) for (const u of answer.uncut) expect(u.length).toBeGreaterThan(s.length);
  for (const b of answer.bars) for (const u of answer.uncut) expect(u.length).toBeGreaterThan(b.offcut);
  expect(answer.lowerBound).toBe(0);
  expect(answer.proven).toBe(false);
});

it('does not run out where an exact plan uses every bar', async () => {
  const answer = await plan({
    pieces: [
      { mark: 'A', length: 600, quantity: 2 },
      { mark: 'B', length: 400, quantity: 2 },
      { mark: 'C', length: 500, quantity: 2 },
    ],
    stock: [bar(1000, { available: 3 })],
    kerf: 0,
  });
  expect(answer.uncut).toEqual([]);
  expect(answer.proven).toBe(true);
});

it('uses the rack first', async () => {
  const answer = await plan({
    pieces: [{ mark: 'S', length: 450, quantity: 5 }],
    stock: [bar(2000, { price: 6 }), { name: 'rack', length: 480, price: 0, available: 1, trimmedEnds: 0 as const }],
    kerf: 3,
    endTrim: 5,
  });
  expect(answer.bars.map((b) => b.stock).sort()).toEqual(['2000', 'rack']);
  expect(answer.cost).toBe(6);
  expect(answer.proven).toBe(true);
});

it('reports every fault at once, with its place, and cuts the pieces that have none', async () => {
  const pieces = [
    { mark: 'a', length: Number.NaN, quantity: 1 },
    { mark: 'b', length: -5, quantity: 1 },
    { mark: 'c', length: 5, quantity: 1.5 },
    { mark: 'd', length: 100, quantity: 2 },
  ];
  const answer = await planStock({ pieces, stock: [bar(1000)], kerf: 3 });
  expect(answer.faults.map((f) => f.place)).toEqual(['pieces[0] a', 'pieces[1] b', 'pieces[2] c']);
  expect(answer.bars.map((b) => b.cuts.length)).toEqual([2]);
  expect(answer.proven).toBe(false);
  const broken = await planStock({
    pieces,
    stock: [bar(Infinity), bar(10, { price: -1 }), bar(10, { available: 0.5 })],
    kerf: -1,
    endTrim: Number.NaN,
  });
  expect(broken.faults).toHaveLength(8);
  expect(broken.bars).toEqual([]);
  expect((await planStock({ pieces: [], stock: [], kerf: 0 })).faults.map((f) => f.place)).toEqual(['stock']);
});

it('refuses what would not end: a million pieces and more, bars of a kilometre and more', async () => {
  const many = await planStock({ pieces: [{ mark: 'a', length: 1, quantity: 2e6 }], stock: [bar(1000)], kerf: 0 });
  expect(many.faults.map((f) => f.place)).toEqual(['pieces']);
  const long = await planStock({ pieces: [{ mark: 'a', length: 1, quantity: 1 }], stock: [bar(1e9)], kerf: 0 });
  expect(long.faults.map((f) => f.place)).toEqual(['stock[0] 1000000000']);
});

it('has nothing to cut: no bars, and that is proven', async () => {
  const answer = await plan({ pieces: [{ mark: 'a', length: 10, quantity: 0 }], stock: [bar(100)], kerf: 1 });
  expect(answer).toEqual({ bars: [], cost: 0, lowerBound: 0, credit: 0, proven: true, uncut: [], faults: [] });
});

it('keeps prices exact: cents, thirds, nought', async () => {
  const pieces = [{ mark: 'a', length: 90, quantity: 3 }];
  expect((await plan({ pieces, stock: [bar(100, { price: 0.1 })], kerf: 1 })).cost).toBe(0.3);
  const thirds = await plan({ pieces, stock: [bar(100, { price: 1 / 3 })], kerf: 1 });
  expect(thirds.cost).toBeCloseTo(1, 12);
  expect(thirds.proven).toBe(true);
  expect((await plan({ pieces, stock: [bar(100, { price: 0 })], kerf: 1 })).cost).toBe(0);
});

it('gives the same bytes again, and a time limit of nought still gives a whole plan and says so', async () => {
  const pieces = Array.from({ length: 40 }, (_, i) => ({
    mark: `S${i}`,
    length: 251 + ((i * 137) % 400),
    quantity: 3,
  }));
  const request = {
    pieces,
    stock: [bar(1500, { price: 3 }), bar(2100, { price: 4, available: 9 })],
    kerf: 3,
    effort: 0.1,
  };
  const first = await plan(request);
  expect(JSON.stringify(await plan(request))).toBe(JSON.stringify(first));
  let now = 0;
  const hurried = await planStock({ ...request, timeLimitMs: 0 }, () => now++);
  expect(planFaults(request, hurried)).toEqual([]);
  expect(hurried.stopped).toBe('time');
  expect(first.stopped).toBeUndefined();
});

const requests = fc.record({
  pieces: fc.array(fc.record({ length: fc.integer({ min: 40, max: 700 }), quantity: fc.integer({ min: 1, max: 3 }) }), {
    minLength: 1,
    maxLength: 4,
  }),
  stock: fc.array(
    fc.record({
      length: fc.integer({ min: 300, max: 1000 }),
      price: fc.integer({ min: 0, max: 9 }),
      available: fc.option(fc.integer({ min: 1, max: 3 }), { nil: undefined }),
    }),
    { minLength: 1, maxLength: 3 },
  ),
  kerf: fc.integer({ min: 0, max: 60 }).map((k) => k / 10),
  endTrim: fc.integer({ min: 0, max: 20 }),
});

it('agrees with trying everything on small random jobs', async () => {
  await fc.assert(
    fc.asyncProperty(requests, async (r) => {
      const request: StockRequest = {
        ...r,
        pieces: r.pieces.map((p, i) => ({ ...p, mark: `P${i}` })),
        stock: r.stock.map((s, i) => ({ ...s, name: `B${i}` })),
      };
      const answer = await plan(request);
      const least = leastPrice(request);
      if (least === Infinity) expect(answer.uncut.length).toBeGreaterThan(0);
      else {
        expect(answer.uncut).toEqual([]);
        expect(answer.lowerBound).toBeLessThanOrEqual(least + 1e-9);
        expect(answer.cost).toBeCloseTo(least, 9);
      }
    }),
    { numRuns: 80, seed: 6 },
  );
});

it('plans larger random jobs soundly: every piece once, no bar over-full, bound <= cost', async () => {
  await fc.assert(
    fc.asyncProperty(
      fc.array(fc.record({ length: fc.integer({ min: 200, max: 9000 }), quantity: fc.integer({ min: 1, max: 12 }) }), {
        minLength: 5,
        maxLength: 25,
      }),
      fc.integer({ min: 1, max: 4 }),
      async (pieces, kinds) => {
        await plan({
          pieces: pieces.map((p, i) => ({ mark: `P${i}`, length: p.length / 10, quantity: p.quantity })),
          stock: Array.from({ length: kinds }, (_, k) => ({
            name: `B${k}`,
            length: 1000 + 350 * k,
            price: 5 + 2 * k,
            available: k === 1 ? 4 : undefined,
          })),
          kerf: 3.2,
          effort: 0.05,
        });
      },
    ),
    { numRuns: 15, seed: 7 },
  );
});
