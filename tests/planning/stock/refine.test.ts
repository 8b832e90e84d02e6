import { expect, it } from 'vitest';
import { planStock } from '../../../src/planning/stock/plan-stock.js';
import type { StockAnswer } from '../../../src/planning/stock/request.js';
import { planFaults } from './verify.js';

const patterns = (answer: StockAnswer): number =>
  new Set(answer.bars.map((b) => `${b.stock}: ${b.cuts.map((c) => c.length)}`)).size;

it('saws alike bars for alike struts: one pattern for twelve bars of a symmetric job', async () => {
  const request = {
    pieces: [450, 320, 210].map((length) => ({ mark: `L${length}`, length, quantity: 12 })),
    stock: [{ name: 'bar', length: 1000 }],
    kerf: 5,
  };
  const answer = await planStock(request);
  expect(planFaults(request, answer)).toEqual([]);
  expect(answer.bars).toHaveLength(12);
  expect(patterns(answer)).toBe(1);
});

it('repeats a plan for one share of the pieces where that costs nothing', async () => {
  // Seven lengths, 18 of each: a plan for three of each, cut six times, has at most a sixth of the bars as patterns.
  const request = {
    pieces: [713, 655, 512, 431, 377, 298, 203].map((length) => ({ mark: `L${length}`, length, quantity: 18 })),
    stock: [{ name: 'bar', length: 2000 }],
    kerf: 3,
    endTrim: 5,
  };
  const answer = await planStock(request);
  expect(planFaults(request, answer)).toEqual([]);
  expect(answer.proven).toBe(true);
  expect(patterns(answer)).toBeLessThanOrEqual(Math.ceil(answer.bars.length / 3));
});

it('leaves what is over in one piece', async () => {
  // 1500 mm of pieces on two bars of 1000: all of one bar and half of the other.
  const request = {
    pieces: [500, 400, 300, 200, 100].map((length) => ({ mark: `L${length}`, length, quantity: 1 })),
    stock: [{ name: 'bar', length: 1000 }],
    kerf: 0,
  };
  const answer = await planStock(request);
  expect(planFaults(request, answer)).toEqual([]);
  expect(answer.bars.map((b) => b.offcut).sort((a, b) => a - b)).toEqual([0, 500]);
});
