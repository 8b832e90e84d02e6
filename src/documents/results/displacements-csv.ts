import type { CaseResult } from '../../model/solution.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import type { Assessment } from '../records.js';
import { casesOf } from './cases.js';

type Row = { readonly node: string; readonly of: CaseResult; readonly at: number };

/** displacements.csv: how far each node moves in each load case and combination, mm in the truss's axes. */
export function displacementsCsv(a: Assessment): Uint8Array {
  const column = (name: string, k: number): CsvColumn<Row> => ({
    name,
    decimals: DECIMALS.length,
    value: ({ of, at }) => of.displacements![3 * at + k]!,
  });
  return writeCsv<Row>(
    [
      { name: 'node', value: (r) => r.node },
      { name: 'case', value: (r) => r.of.name },
      { name: 'kind', value: (r) => r.of.kind },
      column('x_mm', 0),
      column('y_mm', 1),
      column('z_mm', 2),
    ],
    casesOf(a)
      .filter((c) => c.displacements)
      .flatMap((of) => a.topology.truss.nodes.map(({ mark }, at) => ({ node: mark, of, at }))),
    a.job.output.csv,
  );
}
