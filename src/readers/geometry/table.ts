import { type CsvError, parse } from 'csv-parse/sync';
import { isUsable } from '../../model/limits.js';
import { quoted } from '../fault.js';
import type { LineFaults } from './text-lines.js';

/** A table with a header line, as spreadsheets export it. */
export interface Table {
  /** Names of the columns, as written. */
  readonly columns: readonly string[];
  readonly rows: readonly { readonly cells: readonly string[]; readonly line: number }[];
  /** A number of the table, NaN where the cell is none; with a decimal comma where the delimiter leaves that free. */
  number(cell: string): number;
}

/** Reads comma, semicolon or tab separated text, with or without a byte-order mark; null, with the faults told, where it is none. */
export function readTable(text: string, log: LineFaults): Table | null {
  if (log.tooLarge(text)) return null;
  const delimiter = delimiterOf(text);
  let records: { record: string[]; info: { lines: number } }[];
  try {
    records = parse(text, {
      bom: true,
      delimiter,
      info: true,
      relax_column_count: true,
      skip_empty_lines: true,
      trim: true,
      // A quotation mark that is never closed would swallow the rest of the file.
      max_record_size: 100_000,
    }) as unknown as typeof records;
  } catch (error) {
    const { code, lines } = error as CsvError & { lines?: number };
    if (!code) throw error;
    log.tell(
      lines ?? 1,
      'a cell has a quotation mark in the wrong place',
      'close it, or double it inside a quoted cell',
    );
    return null;
  }
  const [head, ...body] = records;
  if (!head || body.length === 0) {
    log.tell(1, 'has no rows under a header line', 'name the columns in the first line');
    return null;
  }
  // An empty row of a spreadsheet is exported as delimiters alone.
  const rows = body
    .filter(({ record }) => record.some((cell) => cell !== ''))
    .map(({ record, info }) => ({ cells: record, line: info.lines }));
  for (const { cells, line } of rows) mustFit(cells, head.record, delimiter, line, log);
  return { columns: head.record, rows, number: (cell) => numberIn(cell) };
}

/** A row wider than its header has shifted cells: a decimal comma in a comma separated file. Blank ones are a spreadsheet's margin. */
function mustFit(
  cells: readonly string[],
  columns: readonly string[],
  delimiter: string,
  line: number,
  log: LineFaults,
): void {
  const filled = cells.findLastIndex((cell) => cell !== '') + 1;
  if (filled <= columns.length) return;
  log.tell(
    line,
    `has ${filled} cells under ${columns.length} column${columns.length === 1 ? '' : 's'}`,
    delimiter === ','
      ? 'write decimal points, or separate cells by semicolons where commas are decimal; quote a text that holds a comma'
      : 'name every column in the first line, or take out the cells too many',
  );
}

/** The delimiter that stands most often in the header line, outside quotation marks. */
function delimiterOf(text: string): string {
  const head = (/^[^\r\n]*/.exec(text.replace(/^\ufeff/, ''))?.[0] ?? '').replace(/"[^"]*"/g, '');
  const count = (c: string): number => head.split(c).length - 1;
  return [';', '\t', ','].reduce((best, c) => (count(c) > count(best) ? c : best), ';');
}

/** 12.5, 12,5, 1e-3, with a minus of either kind; a comma is a decimal comma, since thousands are never grouped with it here. */
function numberIn(cell: string): number {
  const text = cell.replace(/[\u2212\u2013]/g, '-').replace(',', '.');
  if (!/^[-+]?(\d+\.?\d*|\.\d+)([eE][-+]?\d+)?$/.test(text)) return Number.NaN;
  const value = Number(text);
  return isUsable(value) ? value : Number.NaN;
}

/** A column found by name: its place, and what stands in brackets or after an underscore as its unit. */
export interface Column {
  readonly index: number;
  readonly unit: string | null;
}

/** The column whose name, without its unit and whatever the case, is one of `names`; null where there is none. */
export function columnNamed(table: Table, names: readonly string[]): Column | null {
  for (const name of names) {
    const index = table.columns.findIndex((column) => split(column).name === name);
    if (index >= 0) return { index, unit: split(table.columns[index]!).unit };
  }
  return null;
}

const UNIT = /^(.*?)\s*[[(_ ]\s*(mm|cm|m|in|ft|N|kN|lbf|kip)\s*[\])]?$/i;

function split(column: string): { readonly name: string; readonly unit: string | null } {
  const match = UNIT.exec(column.trim());
  const [name, unit] = match?.[1] ? [match[1], match[2]!] : [column, null];
  return { name: plain(name), unit };
}

const plain = (name: string): string =>
  name
    .toLowerCase()
    .replace(/[_\s.-]+/g, ' ')
    .trim();

/** The cell of a row under a column; empty where the row is short or there is no column. */
export const cellOf = (row: { readonly cells: readonly string[] }, column: Column | null): string =>
  column ? (row.cells[column.index] ?? '').trim() : '';

/** Tells that a table lacks a column. */
export function missingColumn(log: LineFaults, table: Table, what: string, names: readonly string[]): void {
  log.tell(
    1,
    `has no column for ${what}: it has ${table.columns.map(quoted).join(', ').slice(0, 200)}`,
    `name one ${names.slice(0, 3).map(quoted).join(' or ')}`,
  );
}
