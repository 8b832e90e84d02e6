import { z } from 'zod';
import { markKey, markProblem } from '../../model/marks.js';
import { type Fault, quoted } from '../fault.js';
import { parseJson } from '../json-document.js';
import { inOrder } from '../order.js';
import { checkSchema } from '../schema-faults.js';

const triple = z.tuple([z.number(), z.number(), z.number()]);
const list = z.record(z.string(), z.strictObject({ at: triple, nodes: z.array(z.string()).optional() }));

const memorySchema = z.strictObject({
  format: z.literal('strutwright-marks/1'),
  nodes: list.describe('Where the node of each mark is, mm; those of a strut or face by mark too.'),
  struts: list,
  faces: list,
  withdrawn: z.array(z.string()).describe('Marks that were used once and are never given again.'),
});

/** Which mark stands where: kept beside the truss, so that marks survive a change of the drawing. */
export type MarkMemory = z.infer<typeof memorySchema>;
export type Remembered = MarkMemory['nodes'];

/** Reads a memory of marks; null with every fault where it is none. */
export function readMarkMemory(
  text: string,
  name: string,
): { readonly memory: MarkMemory | null; readonly faults: readonly Fault[] } {
  const document = parseJson(text, name);
  if (document.value === undefined) return { memory: null, faults: document.faults };
  const { value, faults } = checkSchema(document, memorySchema);
  const all = [...document.faults, ...faults];
  for (const part of ['nodes', 'struts', 'faces'] as const) {
    const seen = new Set<string>();
    for (const mark of Object.keys(value?.[part] ?? {})) {
      const problem =
        markProblem(mark) ?? (seen.has(markKey(mark)) ? { what: 'stands twice', mend: 'remove one' } : null);
      if (problem)
        all.push(
          document.fault(
            document.offset([part, mark], 'key'),
            `the mark ${quoted(mark)} ${problem.what}`,
            problem.mend,
          ),
        );
      seen.add(markKey(mark));
    }
  }
  return { memory: all.length === 0 ? value : null, faults: inOrder(all) };
}

/** A memory as text, one mark a line. */
export function writeMarkMemory(memory: MarkMemory): string {
  const part = (name: 'nodes' | 'struts' | 'faces'): string => {
    const rows = Object.entries(memory[name]).map(
      ([mark, place]) => `    ${JSON.stringify(mark)}: ${JSON.stringify(place)}`,
    );
    return `  "${name}": {${rows.length > 0 ? `\n${rows.join(',\n')}\n  ` : ''}}`;
  };
  return `{\n  "format": "strutwright-marks/1",\n${(['nodes', 'struts', 'faces'] as const).map(part).join(',\n')},\n  "withdrawn": ${JSON.stringify(memory.withdrawn)}\n}\n`;
}
