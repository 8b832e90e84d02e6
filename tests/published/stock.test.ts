import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { planStock } from '../../src/planning/stock/plan-stock.js';
import type { StockRequest } from '../../src/planning/stock/request.js';
import { planFaults } from '../planning/stock/verify.js';

async function plan(request: StockRequest) {
  const answer = await planStock(request);
  expect(planFaults(request, answer)).toEqual([]);
  return answer;
}

/** Lines of [length, quantity] as pieces. */
const pieces = (lines: readonly (readonly [number, number])[]) =>
  lines.map(([length, quantity]) => ({ mark: `L${length}`, length, quantity }));

// V. Chvatal, Linear Programming, 1983, chapter 13: rolls of 100 in; linear optimum 452.25, so 453 (from memory).
it('Chvatal 1983: 453 rolls', async () => {
  const answer = await plan({
    pieces: pieces([
      [45, 97],
      [36, 610],
      [31, 395],
      [14, 211],
    ]),
    stock: [{ name: 'roll', length: 100 }],
    kerf: 0,
  });
  expect([answer.cost, answer.lowerBound, answer.proven]).toEqual([453, 453, true]);
});

// P. C. Gilmore and R. E. Gomory, Operations Research 9 (1961) 849-859, the example of section 2: stock 5, 6, 9 at 6, 7, 10;
// 20 of 2, 10 of 3, 20 of 4; least cost 170 (from memory). By hand: 150 units of length, each at least 10/9, give
// 166.7; 9 = 3 + 4 + 2 ten times and 6 = 4 + 2 ten times cost 170.
it('Gilmore and Gomory 1961: cost 170', async () => {
  const answer = await plan({
    pieces: pieces([
      [2, 20],
      [3, 10],
      [4, 20],
    ]),
    stock: [
      { name: '5', length: 5, price: 6 },
      { name: '6', length: 6, price: 7 },
      { name: '9', length: 9, price: 10 },
    ],
    kerf: 0,
  });
  expect([answer.cost, answer.proven]).toEqual([170, true]);
});

// The paper-machine example of the literature on cutting stock: reels of 5600 mm in 13 widths need 73 master rolls
// (0.401 % waste), from memory; the material alone asks for 72.7.
it('reels of 5600 mm: 73 master rolls', async () => {
  const answer = await plan({
    pieces: pieces([
      [1380, 22],
      [1520, 25],
      [1560, 12],
      [1710, 14],
      [1820, 18],
      [1880, 18],
      [1930, 20],
      [2000, 10],
      [2050, 12],
      [2100, 14],
      [2140, 16],
      [2150, 18],
      [2200, 20],
    ]),
    stock: [{ name: 'reel', length: 5600 }],
    kerf: 0,
  });
  expect([answer.cost, answer.proven]).toEqual([73, true]);
  const waste = answer.bars.reduce((sum, b) => sum + b.offcut, 0) / (73 * 5600);
  expect(waste).toBeCloseTo(0.00401, 5);
});

interface StoredJob {
  readonly kerf: number;
  readonly stock: readonly { readonly length: number; readonly price: number; readonly qty: number | null }[];
  readonly parts: readonly { readonly length: number; readonly qty: number }[];
  readonly lower_bound: number;
}

// Invented truss jobs in 0.1 mm whose optimum another solver of ours (column generation with an exact dual bound) proved.
const folder = join(import.meta.dirname, 'stock');
it.each(readdirSync(folder))('%s: the known optimum, proven', async (file) => {
  const job = JSON.parse(readFileSync(join(folder, file), 'utf8')) as StoredJob;
  const answer = await plan({
    pieces: job.parts.map((p, i) => ({ mark: `S${i + 1}`, length: p.length / 10, quantity: p.qty })),
    stock: job.stock.map((s, i) => ({
      name: `B${i + 1}`,
      length: s.length / 10,
      price: s.price,
      available: s.qty ?? undefined,
    })),
    kerf: job.kerf / 10,
  });
  expect([answer.cost, answer.lowerBound, answer.proven]).toEqual([job.lower_bound, job.lower_bound, true]);
});
