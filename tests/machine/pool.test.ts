import { afterEach, describe, expect, it } from 'vitest';
import { openPool, type Pool } from '../../dist/machine/pool.js';

const entry = new URL('./fixtures/worker.mjs', import.meta.url);
let pool: Pool;
afterEach(() => pool.close());

describe.each([1, 2, 5])('with %i workers', (workers) => {
  it('outputs come in the order of the inputs, none of them left out', async () => {
    pool = openPool(entry, workers);
    const inputs = Array.from({ length: 60 }, (_, i) => ({ i, n: 60 }));
    const order: number[] = [];
    await pool.each('slow', inputs, (output: { i: number; bytes: Float64Array }, index) => {
      expect(output.i).toBe(index);
      expect(output.bytes[999]).toBe(index);
      order.push(index);
    });
    expect(order).toEqual(inputs.map(({ i }) => i));
  });

  it('a task that fails fails the whole with its own message, and the pool works on', async () => {
    pool = openPool(entry, workers);
    const taken: number[] = [];
    const inputs = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10];
    await expect(pool.each('fail', inputs, (x: number) => void taken.push(x))).rejects.toThrow('three cannot be done');
    expect(taken).toEqual([1, 2].slice(0, taken.length));
    const squares: number[] = [];
    await pool.each('square', [1, 2, 3], (x: number) => void squares.push(x));
    expect(squares).toEqual([1, 4, 9]);
  });
});

it('a worker that ends in the middle is a fault, not a hang, and is replaced', async () => {
  pool = openPool(entry, 2);
  await expect(pool.each('die', [1, 2, 3], () => {})).rejects.toThrow(/ended before/);
  const squares: number[] = [];
  await pool.each('square', [5], (x: number) => void squares.push(x));
  expect(squares).toEqual([25]);
});

it('an unknown task, an output that cannot be taken, no input at all', async () => {
  pool = openPool(entry, 2);
  await expect(pool.each('none', [1], () => {})).rejects.toThrow('there is no task none');
  await expect(
    pool.each('square', [1, 2, 3], () => {
      throw new Error('full');
    }),
  ).rejects.toThrow('full');
  await pool.each('square', [], () => {
    throw new Error('never called');
  });
});

it('never works far ahead of what has been taken', async () => {
  pool = openPool(entry, 2);
  let done = 0;
  let most = 0;
  // Each input tells when it is handed out: it is read by the structured clone.
  const inputs = Array.from({ length: 200 }, (_, i) => ({
    get i() {
      done++;
      return i;
    },
    n: 1,
  }));
  await pool.each('slow', inputs, async (_, index) => {
    most = Math.max(most, done - index);
    await new Promise((go) => setTimeout(go, 1));
  });
  expect(most).toBeGreaterThan(1);
  expect(most).toBeLessThanOrEqual(2 * 4 + 1);
});
