import type { WeakestSection } from '../../model/shaped.js';
import type { Flow } from '../kit/flow.js';
import { fixed, type Units } from '../kit/units.js';
import { weakestWords } from '../nodes/weakest-words.js';
import type { PackRecords } from '../records.js';

interface Total {
  readonly what: string;
  readonly count: string;
  readonly amount: string;
  readonly mass: string;
}

/** Counts, amounts and masses of what is made. What is unknown of one part is unknown of the sum. */
export function totalsSection(flow: Flow, records: PackRecords, units: Units): void {
  const { struts, hubs, panels } = records.parts;
  const cut = sum(struts.map((s) => s.cutLength));
  const rows: Total[] = [
    {
      what: 'Struts',
      count: `${struts.length}`,
      amount: cut === null ? 'some without a length' : metres(cut, units),
      mass: units.mass(sum(struts.map((s) => s.mass))),
    },
    { what: 'Nodes', count: `${hubs.length}`, amount: '', mass: units.mass(sum(hubs.map((h) => h.mass))) },
    {
      what: 'Panels',
      count: `${panels.length}`,
      amount:
        units.lengthUnit === 'mm'
          ? `${fixed(panels.reduce((a, p) => a + p.area, 0) / 1e6, 3)} m²`
          : `${fixed(panels.reduce((a, p) => a + p.area, 0) / 92_903.04, 2)} ft²`,
      mass: units.mass(sum(panels.map((p) => p.mass))),
    },
  ];
  flow.heading('What is made');
  flow.table(
    [
      { head: 'Parts', bold: true, value: (t: Total) => t.what },
      { head: 'Number', align: 'right', value: (t) => t.count },
      { head: 'Amount', align: 'right', value: (t) => t.amount },
      { head: `Mass\n${units.massUnit}`, align: 'right', value: (t) => t.mass },
    ],
    rows.filter((row) => row.count !== '0'),
  );
  const weakest = weakestOf(records);
  if (weakest)
    flow.paragraph(
      `Of all printed nodes ${weakest.mark} has the least section for what it must pass on: ${weakestWords(weakest.section, units)}, as a multiple of the section of ${weakest.section.where === 'core' ? 'its largest sleeve' : 'that strut’s sleeve'}; measured on the solids.`,
    );
}

function weakestOf(records: PackRecords): { readonly mark: string; readonly section: WeakestSection } | null {
  let least: { mark: string; section: WeakestSection } | null = null;
  for (const { mark, weakest } of records.made.values())
    if (weakest && (!least || weakest.area * least.section.needed < least.section.area * weakest.needed))
      least = { mark, section: weakest };
  return least;
}

const metres = (mm: number, units: Units): string =>
  units.lengthUnit === 'mm' ? `${fixed(mm / 1000, 2)} m` : `${fixed(mm / 304.8, 1)} ft`;

function sum(values: readonly (number | null)[]): number | null {
  let total = 0;
  for (const value of values) {
    if (value === null) return null;
    total += value;
  }
  return total;
}
