import type { CaseResult } from '../../model/solution.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { eulerLoad } from '../../strength/euler.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import { type MemberRow, memberRows } from '../member-rows.js';
import type { Assessment } from '../records.js';

const effectiveLength = (r: MemberRow, records: Assessment): number =>
  r.part.axisLength * records.job.strength.effectiveLength;

/** Given forces claim to balance the case `given`; where that was analysed too, it has a column of its own. */
const nameOf = (c: CaseResult): string =>
  c.kind === 'combination'
    ? `combination ${c.name}`
    : `case ${c.name}${c.name === GIVEN_CASE && c.kind !== 'given' ? ' analysed' : ''}`;

/** forces.csv: one row a strut; then one column a load case or combination. */
export function forcesCsv(records: Assessment): Uint8Array {
  const { force } = DECIMALS;
  const index = records.topology.memberIndex;
  const cases = [...(records.solution?.cases ?? []), ...(records.solution?.combinations ?? [])].filter((c) => c.forces);
  const columns: CsvColumn<MemberRow>[] = [
    { name: 'mark', value: (r) => r.member.mark },
    { name: 'from', value: (r) => r.member.ends[0] },
    { name: 'to', value: (r) => r.member.ends[1] },
    { name: 'section', value: (r) => r.part.section?.name ?? null },
    { name: 'axis_length_mm', decimals: DECIMALS.length, value: (r) => r.part.axisLength },
    { name: 'force_N', decimals: force, value: (r) => r.force },
    { name: 'sense', value: (r) => (r.force === null || r.force === 0 ? null : r.force > 0 ? 'T' : 'C') },
    { name: 'least_N', decimals: force, value: (r) => r.envelope?.least ?? null },
    { name: 'most_N', decimals: force, value: (r) => r.envelope?.most ?? null },
    { name: 'utilisation', decimals: DECIMALS.ratio, value: (r) => r.worst?.utilisation ?? null },
    { name: 'combination', value: (r) => r.worst?.combination ?? null },
    { name: 'rule', value: (r) => r.worst?.rule ?? null },
    ...cases.map(
      (c): CsvColumn<MemberRow> => ({
        name: `${nameOf(c)} N`,
        decimals: force,
        value: (r) => c.forces![index.get(r.member.mark)!]!,
      }),
    ),
    { name: 'effective_length_mm', decimals: DECIMALS.length, value: (r) => effectiveLength(r, records) },
    { name: 'euler_N', decimals: force, value: (r) => eulerLoad(r.part, effectiveLength(r, records)) },
  ];
  return writeCsv(columns, memberRows(records), records.job.output.csv);
}
