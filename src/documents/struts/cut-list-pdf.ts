import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import type { Fonts } from '../kit/fonts.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Column, drawTable } from '../kit/table.js';
import { type Units, unitsOf } from '../kit/units.js';
import { byMark, largestForce, type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** cut-list.pdf: by section, longest first, the cut length in bold and first; the length from node to node last and grey. */
export async function cutListPdf(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, largestForce(records));
  const paper = new Paper(issueOf(records, fonts), 'Cut list', CAUTION, units.words);
  const area = paper.addSheet({
    title: 'Cut list',
    instruction:
      'Cut to the bold length, longest first. Write the strut’s mark in its middle and at each end the mark of the node that stands in that column. Tick when cut and marked.',
  });
  const rows = memberRows(records);
  const sections = [...new Set(rows.map(sectionOf))].sort(byMark);
  const runs = sections.flatMap((section) => rows.filter((r) => sectionOf(r) === section).sort(longestFirst));
  const heading = new Map(
    sections.map((section) => {
      const own = rows.filter((r) => sectionOf(r) === section);
      const cut = own.filter((r) => r.part.cutLength !== null);
      const sum = cut.reduce((total, r) => total + r.part.cutLength!, 0);
      const material = own[0]!.part.material?.title;
      const metres = units.lengthUnit === 'mm' ? `${(sum / 1000).toFixed(2)} m` : `${(sum / 304.8).toFixed(1)} ft`;
      const missing = own.length - cut.length;
      return [
        section,
        `${section}${material ? `, ${material}` : ''}: ${own.length} struts, ${metres} in all${missing > 0 ? `, ${missing} without a length (see the report)` : ''}`,
      ];
    }),
  );
  const length = `, ${units.lengthUnit}`;
  const columns: Column<MemberRow>[] = [
    { head: 'Done', tick: true },
    { head: `Cut length${length}`, align: 'right', bold: true, value: (r) => units.cut(r.part.cutLength) },
    { head: 'Strut', bold: true, value: (r) => r.member.mark },
    { head: 'End A', value: (r) => r.member.ends[0] },
    { head: 'End B', value: (r) => r.member.ends[1] },
  ];
  if (rows.some((r) => r.bar)) columns.push({ head: 'Bar', value: (r) => r.bar ?? '' });
  if (rows.some((r) => r.part.misfit !== undefined))
    columns.push({
      head: `Shared stop\nadds${length}`,
      align: 'right',
      grey: true,
      value: (r) => signedLength(r.part.misfit, units),
    });
  columns.push(
    {
      head: `Setback A\n${units.lengthUnit}`,
      align: 'right',
      grey: true,
      value: (r) => units.length(r.part.ends[0].setback),
    },
    {
      head: `Setback B\n${units.lengthUnit}`,
      align: 'right',
      grey: true,
      value: (r) => units.length(r.part.ends[1].setback),
    },
    {
      head: `Node to node${length}\ndo not cut`,
      align: 'right',
      grey: true,
      value: (r) => units.length(r.part.axisLength),
    },
  );
  drawTable(paper, area.y, columns, runs, { group: (r) => heading.get(sectionOf(r))! });
  return paper.finish();
}

function signedLength(mm: number | undefined, units: Units): string {
  if (mm === undefined) return '';
  const text = units.length(Math.abs(mm));
  return Number.parseFloat(text) === 0 ? '0' : `${mm < 0 ? '−' : '+'}${text}`;
}

const sectionOf = (row: MemberRow): string => row.part.section?.name ?? row.member.section ?? 'No section';

/** Longest first; equal lengths by mark; unknown ones last. */
const longestFirst = (a: MemberRow, b: MemberRow): number =>
  (b.part.cutLength ?? -1) - (a.part.cutLength ?? -1) || byMark(a.member.mark, b.member.mark);
