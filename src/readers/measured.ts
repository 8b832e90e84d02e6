import { nearest } from '../maths/nearest.js';
import type { Vec3 } from '../maths/vec3.js';
import { type Fault, quoted } from './fault.js';
import { readTable } from './geometry/table.js';
import { LineFaults } from './geometry/text-lines.js';

/** What a table of measurements says; mm. */
export interface MeasuredFile {
  readonly lengths: ReadonlyMap<string, number>;
  readonly nodes: ReadonlyMap<string, Vec3>;
}

const LENGTHS = ['mark', 'length_mm'];
const NODES = ['node', 'x_mm', 'y_mm', 'z_mm'];

/**
 * Reads measured cut lengths (`mark,length_mm`) or node places (`node,x_mm,y_mm,z_mm`), comma or semicolon with decimal
 * comma, of a truss with the given marks. The table, or every fault.
 */
export function readMeasured(
  text: string,
  name: string,
  marks: { readonly struts: ReadonlySet<string>; readonly nodes: ReadonlySet<string> },
): { readonly measured: MeasuredFile | null; readonly faults: readonly Fault[] } {
  const log = new LineFaults(name);
  const fault = (line: number, what: string, mend: string): void => log.tell(line, what, mend);
  const table = readTable(text, log);
  if (!table) return { measured: null, faults: log.faults };
  const header = table.columns.map((h) => h.trim().toLowerCase());
  const columns = [LENGTHS, NODES].find((c) => c.every((h) => header.includes(h)));
  if (!columns) {
    fault(1, 'its first line names neither mark,length_mm nor node,x_mm,y_mm,z_mm', 'name the columns so');
    return { measured: null, faults: log.faults };
  }
  const known = columns === LENGTHS ? marks.struts : marks.nodes;
  const lengths = new Map<string, number>();
  const nodes = new Map<string, Vec3>();
  for (const { cells, line } of table.rows) {
    const [mark, ...numbers] = columns.map((c) => cells[header.indexOf(c)]?.trim() ?? '');
    const values = numbers.map(table.number);
    if (!known.has(mark!)) {
      const near = nearest(mark!, known);
      fault(
        line,
        `${quoted(mark!)} is no ${columns === LENGTHS ? 'strut' : 'node'} of the truss`,
        near ? `did you mean ${near}?` : 'use the marks of the cut list',
      );
    } else if (values.some(Number.isNaN) || (columns === LENGTHS && values[0]! <= 0)) {
      fault(line, `${quoted(numbers.join(', '))} is no measurement in mm`, 'give a number');
    } else if (lengths.has(mark!) || nodes.has(mark!)) fault(line, `${mark} is measured twice`, 'keep one line of it');
    else if (columns === LENGTHS) lengths.set(mark!, values[0]!);
    else nodes.set(mark!, values as unknown as Vec3);
  }
  if (log.faults.length === 0 && lengths.size + nodes.size === 0)
    fault(1, 'measures nothing: there is no line under its header', 'add a line for each part measured');
  return { measured: log.faults.length === 0 ? { lengths, nodes } : null, faults: log.faults };
}
