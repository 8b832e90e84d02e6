import fc from 'fast-check';
import { expect } from 'vitest';
import { type Fault, sayFault } from '../../src/readers/fault.js';
import { mutated, RUNS, SEED } from './mutate.js';

export const options = { numRuns: RUNS, seed: SEED };
/** No single file may take longer than this, ms; a sound one takes a few. */
const LONGEST = 5000;

/** Every fault is one visible line of file:line:column: what: mend. */
export function mustBeFaults(faults: readonly Fault[]): void {
  for (const fault of faults) {
    expect(sayFault(fault)).toMatch(/^f:[1-9]\d*:[1-9]\d*: [^\p{Cc}\p{Zl}\p{Zp}]+: [^\p{Cc}\p{Zl}\p{Zp}]+$/u);
    expect(sayFault(fault).length).toBeLessThan(1500);
  }
}

/** Whatever is done to a file, its reader gives a value or faults, never both, never neither, and soon. */
export function holds(source: string, read: (text: string) => { value: unknown; faults: readonly Fault[] }): void {
  fc.assert(
    fc.property(mutated(source), (text) => {
      const begun = performance.now();
      const { value, faults } = read(text);
      expect(performance.now() - begun).toBeLessThan(LONGEST);
      expect(value === null).toBe(faults.length > 0);
      mustBeFaults(faults);
    }),
    options,
  );
}
