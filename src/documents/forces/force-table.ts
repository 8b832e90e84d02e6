import type { Paper } from '../kit/paper.js';
import { type Column, drawTable } from '../kit/table.js';
import { fixed, type Units } from '../kit/units.js';
import type { MemberRow } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** The forces by member, groups together: with an analysis the envelope, the utilisation and the governing combination. */
export function forceTable(paper: Paper, records: PackRecords, rows: readonly MemberRow[], units: Units): void {
  const area = paper.addSheet({
    title: 'Forces by member',
    instruction: `Forces ${SOURCE_WORDS[records.forces?.source ?? 'none']}, in ${units.forceUnit}; tension is positive.`,
  });
  const analysed = rows.some((r) => r.envelope);
  const judged = rows.some((r) => r.worst);
  const columns: Column<MemberRow>[] = [
    { head: 'Strut', bold: true, value: (r) => r.member.mark },
    { head: 'From', value: (r) => r.member.ends[0] },
    { head: 'To', value: (r) => r.member.ends[1] },
    { head: 'Section', value: (r) => r.part.section?.name ?? r.member.section ?? '' },
    { head: `Force\n${units.forceUnit}`, align: 'right', bold: true, value: (r) => units.force(r.force) },
    { head: '', value: (r) => units.sense(r.force) },
  ];
  if (analysed)
    columns.push(
      { head: `Least\n${units.forceUnit}`, align: 'right', value: (r) => units.force(r.envelope?.least ?? null) },
      { head: `Most\n${units.forceUnit}`, align: 'right', value: (r) => units.force(r.envelope?.most ?? null) },
    );
  if (judged)
    columns.push(
      { head: 'Utilisation', align: 'right', bold: true, value: (r) => fixed(r.worst?.utilisation, 2) },
      {
        head: 'Governing',
        wraps: rows.some((r) => (r.worst?.combination.length ?? 0) > SHORT),
        value: (r) => r.worst?.combination ?? '',
      },
    );
  if (!judged)
    columns.push({
      head: `Axis length\n${units.lengthUnit}`,
      align: 'right',
      grey: true,
      value: (r) => units.length(r.part.axisLength),
    });
  const grouped = rows.some((r) => r.member.group);
  drawTable(
    paper,
    area.y,
    columns,
    grouped ? groupRuns(rows) : rows,
    grouped ? { group: (r) => (r.member.group ? `Group ${r.member.group}` : 'No group') } : {},
  );
}

/** Rows of one group together, groups in the order in which they first come. */
function groupRuns(rows: readonly MemberRow[]): MemberRow[] {
  const runs = new Map<string, MemberRow[]>();
  for (const row of rows) {
    const key = row.member.group ?? '';
    runs.set(key, [...(runs.get(key) ?? []), row]);
  }
  return [...runs.values()].flat();
}

const SOURCE_WORDS = {
  given: 'as given in the truss file',
  reciprocal: 'from the areas of the reciprocal figure',
  analysis: 'from the analysis',
  none: 'not known',
} as const;

/** Names of combinations no longer than this keep to one line. */
const SHORT = 24;
