import { markProblem } from '../model/marks.js';
import { LENGTH_IN_MM, type LengthUnit } from '../model/units.js';
import { type Fault, quoted } from './fault.js';
import { cellOf, columnNamed, missingColumn, readTable } from './geometry/table.js';
import { LineFaults } from './geometry/text-lines.js';

/** A line of a table of pieces to cut; length in mm. */
export interface PieceLine {
  readonly mark: string;
  readonly length: number;
  readonly quantity: number;
  /** null where the table does not say. */
  readonly section: string | null;
}

const MARK = ['mark', 'id', 'name', 'piece', 'strut', 'part'];
const LENGTH = ['cut length', 'length'];
const QUANTITY = ['quantity', 'qty', 'count', 'number'];
const SECTION = ['section', 'profile', 'material'];

/**
 * Reads pieces from a table: a length in mm (another unit in brackets behind the column's name), and perhaps a mark, a
 * quantity (1 where there is none) and a section. A pack's cut-list.csv is such a table. Rows without a length are faults.
 */
export function readPieces(
  text: string,
  name: string,
): { readonly pieces: readonly PieceLine[]; readonly faults: readonly Fault[] } {
  const log = new LineFaults(name);
  const table = readTable(text, log);
  if (!table) return { pieces: [], faults: log.faults };
  const length = columnNamed(table, LENGTH);
  const [mark, quantity, section] = [MARK, QUANTITY, SECTION].map((names) => columnNamed(table, names));
  if (!length) {
    missingColumn(log, table, 'the length', ['length_mm', 'cut_length_mm']);
    return { pieces: [], faults: log.faults };
  }
  const unit = (length.unit ?? 'mm').toLowerCase();
  const inMm = unit in LENGTH_IN_MM ? LENGTH_IN_MM[unit as LengthUnit] : Number.NaN;
  if (Number.isNaN(inMm)) log.tell(1, `the length is in ${quoted(unit)}`, 'use mm, cm, m, in or ft');
  const pieces = table.rows.map((row, i): PieceLine => {
    const value = table.number(cellOf(row, length)) * inMm;
    if (!(value > 0))
      log.tell(row.line, `the length ${quoted(cellOf(row, length))} is not a length above 0`, 'write a number above 0');
    const amount = cellOf(row, quantity ?? null);
    const count = amount === '' ? 1 : table.number(amount);
    if (!(Number.isSafeInteger(count) && count >= 0))
      log.tell(row.line, `the quantity ${quoted(amount)} is not a whole number`, 'write 0, 1, 2 ...');
    const given = cellOf(row, mark ?? null);
    const problem = given === '' ? null : markProblem(given);
    if (problem) log.tell(row.line, `${quoted(given)} ${problem.what}`, problem.mend);
    return {
      mark: given === '' ? `P${i + 1}` : given,
      length: value,
      quantity: count,
      section: cellOf(row, section ?? null) || null,
    };
  });
  return { pieces, faults: log.faults };
}
