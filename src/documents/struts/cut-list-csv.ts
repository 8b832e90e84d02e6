import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import { type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { type PrintedLengths, printedLengths } from './printed-lengths.js';

type Row = MemberRow & { readonly lengths: PrintedLengths };

/** cut-list.csv: one row a strut, always; what is unknown is blank. In every row axis = setbacks + floats + cut. */
export function cutListCsv(records: PackRecords): Uint8Array {
  const mm = (name: string, value: (lengths: PrintedLengths) => number | null): CsvColumn<Row> => ({
    name,
    decimals: DECIMALS.length,
    value: (r) => value(r.lengths),
  });
  return writeCsv<Row>(
    [
      { name: 'mark', value: (r) => r.member.mark },
      { name: 'from', value: (r) => r.member.ends[0] },
      { name: 'to', value: (r) => r.member.ends[1] },
      { name: 'section', value: (r) => r.part.section?.name ?? null },
      mm('axis_length_mm', (l) => l.axis),
      mm('setback_from_mm', (l) => l.setbackFrom),
      mm('setback_to_mm', (l) => l.setbackTo),
      mm('cut_length_mm', (l) => l.cut),
      mm('float_from_mm', (l) => l.floatFrom),
      mm('float_to_mm', (l) => l.floatTo),
      { name: 'force_N', decimals: DECIMALS.force, value: (r) => r.force },
      { name: 'utilisation', decimals: DECIMALS.ratio, value: (r) => r.worst?.utilisation ?? null },
      { name: 'bar', value: (r) => r.bar },
      ...(records.job.struts.shareStops
        ? [{ name: 'stop_misfit_mm', decimals: DECIMALS.length, value: (r: Row) => r.part.misfit ?? null }]
        : []),
    ],
    memberRows(records).map((row) => ({ ...row, lengths: printedLengths(row.part) })),
    records.job.output.csv,
  );
}
