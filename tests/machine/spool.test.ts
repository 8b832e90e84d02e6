import { readdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { expect, it } from 'vitest';
import { MEMORY_SPOOL } from '../../src/machine/memory-spool.js';
import { openSpool } from '../../src/machine/spool.js';
import { seededRandom } from '../../src/maths/random.js';

it('gives back what was put into it, in any order and more than once, and leaves nothing behind', async () => {
  const before = readdirSync(tmpdir()).filter((n) => n.startsWith('strutwright-spool-'));
  const file = await openSpool();
  for (const spool of [MEMORY_SPOOL, file]) {
    const random = seededRandom(3);
    const all = Array.from({ length: 40 }, (_, i) =>
      Uint8Array.from({ length: i === 7 ? 0 : Math.floor(20_000 * random()) }, () => Math.floor(256 * random())),
    );
    // Put away at once, as hubs come from several workers.
    const back = await Promise.all(all.map((bytes) => spool.put(bytes)));
    for (const i of [39, 0, 7, 20, 20]) expect(Buffer.from(await back[i]!()).equals(Buffer.from(all[i]!))).toBe(true);
  }
  await file.close();
  const after = readdirSync(tmpdir()).filter((n) => n.startsWith('strutwright-spool-'));
  expect(after.filter((n) => !before.includes(n))).toEqual([]);
});
