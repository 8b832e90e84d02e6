import type { SupportDemand } from '../../model/solution.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import type { Assessment } from '../records.js';

const COLUMNS: readonly CsvColumn<SupportDemand>[] = [
  { name: 'node', value: (d) => d.node },
  { name: 'combination', value: (d) => d.combination },
  { name: 'pressure_N', decimals: DECIMALS.force, value: (d) => d.pressure },
  { name: 'uplift_N', decimals: DECIMALS.force, value: (d) => d.uplift },
  { name: 'shear_N', decimals: DECIMALS.force, value: (d) => d.shear },
  { name: 'ballast_kg', decimals: DECIMALS.force, value: (d) => d.ballast },
];

/** supports.csv: one row a support on the ground and combination: what its anchor or ballast must hold. null: nothing was analysed. */
export const supportsCsv = (records: Assessment): Uint8Array | null =>
  records.solution?.supports?.length ? writeCsv(COLUMNS, records.solution.supports, records.job.output.csv) : null;
