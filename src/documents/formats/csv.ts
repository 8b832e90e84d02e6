import { stringify } from 'csv-stringify/sync';
import type { Job } from '../../model/job/index.js';

/** One column of a table that machines read. */
export interface CsvColumn<Row> {
  readonly name: string;
  /** Digits after the point; text where absent. */
  readonly decimals?: number;
  readonly value: (row: Row) => string | number | null;
}

/** Digits that the columns of every table carry: mm and N to 0.001, unit vectors to 1e-9. */
export const DECIMALS = { length: 3, force: 3, unitVector: 9, angle: 6, area: 3, ratio: 4 } as const;

/**
 * A table as UTF-8 bytes with a header line. `comma`: comma and decimal point; `semicolon`: semicolon, decimal comma and
 * a byte-order mark. Unknown (null) is blank. A text that a spreadsheet would take for a formula gets an apostrophe in
 * front (OWASP, CSV injection); numbers stay numbers.
 */
export function writeCsv<Row>(
  columns: readonly CsvColumn<Row>[],
  rows: readonly Row[],
  style: Job['output']['csv'] = 'comma',
): Uint8Array {
  const semicolon = style === 'semicolon';
  const text = stringify(
    rows.map((row) => columns.map((column) => column.value(row))),
    {
      header: true,
      columns: columns.map((c) => ({ key: c.name, header: c.name })),
      delimiter: semicolon ? ';' : ',',
      bom: semicolon,
      escape_formulas: true,
      cast: {
        number: (value, { index }) => {
          if (!Number.isFinite(value)) return '';
          const digits = plain(value, columns[index]!.decimals ?? 0);
          return semicolon ? digits.replace('.', ',') : digits;
        },
      },
    },
  );
  return new TextEncoder().encode(text);
}

/** Fixed decimals without minus nought. */
function plain(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return Number(text) === 0 ? text.replace('-', '') : text;
}
