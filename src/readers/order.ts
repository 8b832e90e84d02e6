import { type Fault, sayFault } from './fault.js';

/** Faults by line, then column, each said once. */
export function inOrder(faults: readonly Fault[]): Fault[] {
  const said = new Set<string>();
  return faults
    .filter((f) => {
      const text = sayFault(f);
      return !said.has(text) && said.add(text);
    })
    .sort((a, b) => a.line - b.line || a.column - b.column);
}
