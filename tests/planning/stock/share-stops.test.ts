import fc from 'fast-check';
import { expect, it } from 'vitest';
import { type StopCandidate, shareStops } from '../../../src/planning/stock/share-stops.js';

const settingsOf = (shared: ReturnType<typeof shareStops>): number[] =>
  [...new Set(shared.map((s) => s.setting))].sort((a, b) => a - b);

it('puts three lengths within the give on one stop, at their middle', () => {
  const shared = shareStops(
    [400.5, 400, 399.5, 410].map((length, i) => ({ mark: `S${i}`, length, give: 0.5 })),
    0.5,
  );
  expect(settingsOf(shared)).toEqual([400, 410]);
  expect(shared.map((s) => s.mark)).toEqual(['S0', 'S1', 'S2', 'S3']);
  expect(shared.map((s) => s.misfit)).toEqual([-0.5, 0, 0.5, 0]);
});

it('leaves lengths alone that have nothing to give', () => {
  const shared = shareStops(
    [400, 400.5, 401].map((length, i) => ({ mark: `S${i}`, length, give: 0 })),
    0.5,
  );
  expect(shared.every((s) => s.misfit === 0)).toBe(true);
});

it('moves the stop towards the piece that can give less', () => {
  const shared = shareStops(
    [
      { mark: 'A', length: 400, give: 1 },
      { mark: 'B', length: 400, give: 1 },
      { mark: 'C', length: 401, give: 0 },
    ],
    0.5,
  );
  expect(settingsOf(shared)).toEqual([401]);
});

/** Fewest settings by the classical greedy: stab intervals at their right ends (an independent count; settings off the step). */
function fewest(candidates: readonly StopCandidate[]): number {
  let [count, stab] = [0, -Infinity];
  for (const c of [...candidates].sort((a, b) => a.length + a.give - b.length - b.give)) {
    if (c.length - c.give > stab + 1e-9) {
      count++;
      stab = c.length + c.give;
    }
  }
  return count;
}

it('uses as few settings as intervals need, and never more than each piece gives', () => {
  const half = fc.integer({ min: 400, max: 440 }).map((n) => n / 2);
  fc.assert(
    fc.property(fc.array(half, { minLength: 1, maxLength: 30 }), fc.integer({ min: 0, max: 4 }), (lengths, give) => {
      const candidates = lengths.map((length, i) => ({ mark: `S${i}`, length, give: give / 2 }));
      const shared = shareStops(candidates, 0.5);
      shared.forEach((s, i) => {
        expect(s.setting - lengths[i]!).toBeCloseTo(s.misfit, 9);
        expect(Math.abs(s.misfit)).toBeLessThanOrEqual(give / 2 + 1e-9);
        expect(Number.isInteger(s.setting * 2)).toBe(true);
      });
      expect(settingsOf(shared)).toHaveLength(fewest(candidates));
    }),
    { numRuns: 300, seed: 3 },
  );
});
