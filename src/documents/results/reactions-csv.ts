import type { Vec3 } from '../../maths/vec3.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import type { Assessment } from '../records.js';
import { casesOf } from './cases.js';

type Row = { readonly node: string; readonly case: string; readonly kind: string; readonly force: Vec3 };

/** reactions.csv: what each support gives to the truss in each load case and combination, N in the truss's axes. */
export function reactionsCsv(a: Assessment): Uint8Array {
  const analysed = casesOf(a).flatMap((c) => c.reactions.map((r): Row => ({ ...r, case: c.name, kind: c.kind })));
  // Forces that were given have the reactions of their own balance where nothing was analysed.
  const claimed =
    analysed.length > 0 || !a.equilibrium
      ? []
      : a.equilibrium.reactions.map((r): Row => ({ ...r, case: a.equilibrium!.case, kind: 'given' }));
  const column = (name: string, k: 0 | 1 | 2): CsvColumn<Row> => ({
    name,
    decimals: DECIMALS.force,
    value: (r) => r.force[k],
  });
  return writeCsv<Row>(
    [
      { name: 'node', value: (r) => r.node },
      { name: 'case', value: (r) => r.case },
      { name: 'kind', value: (r) => r.kind },
      column('x_N', 0),
      column('y_N', 1),
      column('z_N', 2),
    ],
    [...analysed, ...claimed],
    a.job.output.csv,
  );
}
