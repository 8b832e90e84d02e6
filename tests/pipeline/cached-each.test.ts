import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { openCache } from '../../src/machine/cache.js';
import { runHere } from '../../src/machine/run-here.js';
import type { Task } from '../../src/machine/worker.js';
import { cachedEach } from '../../src/pipeline/cached-each.js';

const dir = mkdtempSync(join(tmpdir(), 'cached-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));

it('does again only what it has not done for an equal input, and hands all over in order', async () => {
  const done: number[] = [];
  const square = ({ x }: { x: number }): { bytes: Float64Array } => {
    done.push(x);
    return { bytes: new Float64Array([x * x]) };
  };
  const run = async (inputs: number[]): Promise<number[]> => {
    const each = cachedEach(runHere({ square: square as unknown as Task }), await openCache(dir, '1'));
    const taken: number[] = [];
    await each<{ x: number }, { bytes: Float64Array }>(
      'square',
      inputs.map((x) => ({ x })),
      (output, i) => {
        expect(output.bytes).toBeInstanceOf(Float64Array);
        taken.push(output.bytes[0]! + 1000 * i);
      },
    );
    return taken;
  };
  expect(await run([2, 3, 4])).toEqual([4, 1009, 2016]);
  expect(await run([5, 2, 6, 4, 3, 7])).toEqual([25, 1004, 2036, 3016, 4009, 5049]);
  expect(done).toEqual([2, 3, 4, 5, 6, 7]);
});
