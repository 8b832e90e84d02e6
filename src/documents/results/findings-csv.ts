import { checkReport, type FindingReport } from '../check-json.js';
import { writeCsv } from '../formats/csv.js';
import type { Assessment } from '../records.js';

/** findings.csv: everything that the checks found, worst first, as check.json has it; waived ones say so. */
export function findingsCsv(a: Assessment): Uint8Array {
  const { findings, waived } = checkReport(a);
  type Row = FindingReport & { readonly waived: boolean };
  return writeCsv<Row>(
    [
      { name: 'level', value: (f) => f.level },
      { name: 'code', value: (f) => f.code },
      { name: 'kind', value: (f) => f.kind },
      { name: 'subject', value: (f) => f.subject },
      { name: 'value', decimals: 6, value: (f) => f.value },
      { name: 'limit', decimals: 6, value: (f) => f.limit },
      { name: 'waived', value: (f) => (f.waived ? 'yes' : 'no') },
      { name: 'message', value: (f) => f.message },
    ],
    [...findings.map((f) => ({ ...f, waived: false })), ...waived.map((f) => ({ ...f, waived: true }))],
    a.job.output.csv,
  );
}
