import type { Cache } from '../machine/cache.js';
import { sha256 } from '../machine/hash.js';
import { fromBytes, toBytes } from '../machine/plain-bytes.js';
import type { Run } from '../model/run.js';

/**
 * `each` with a memory: what was done before for an equal input is read, the rest is done and kept. Outputs come in the
 * inputs' order all the same, and hits are read one at a time.
 */
export function cachedEach(each: Run['each'], cache: Cache): Run['each'] {
  return async <Input, Output>(
    task: string,
    inputs: readonly Input[],
    take: (output: Output, index: number) => void | Promise<void>,
  ): Promise<void> => {
    const keys = inputs.map((input) => sha256(`${task} ${JSON.stringify(input)}`));
    const missing: number[] = [];
    for (const [i, key] of keys.entries()) if (!(await cache.has(key))) missing.push(i);
    let next = 0;
    const deliverUpTo = async (end: number): Promise<void> => {
      for (; next < end; next++) {
        const bytes = await cache.get(keys[next]!);
        const kept = bytes && (fromBytes(bytes) as { output: Output } | null);
        const index = next;
        if (kept) await take(kept.output, index);
        else await each<Input, Output>(task, [inputs[index]!], (output) => take(output, index));
      }
    };
    await each<Input, Output>(
      task,
      missing.map((i) => inputs[i]!),
      async (output, k) => {
        const index = missing[k]!;
        await deliverUpTo(index);
        await cache.put(keys[index]!, toBytes({ output }));
        next = index + 1;
        await take(output, index);
      },
    );
    await deliverUpTo(inputs.length);
  };
}
