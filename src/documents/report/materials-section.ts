import type { Material } from '../../model/material.js';
import type { Parts } from '../../model/parts.js';
import { materialRow, type ValueRow } from '../catalogue-rows.js';
import type { Flow } from '../kit/flow.js';
import { sayInUnits } from '../kit/say-in-units.js';
import type { PackRecords } from '../records.js';

/** What struts, hubs and panels are made of: every value that the checks rest on, with where it comes from. */
export function materialsSection(flow: Flow, { parts, job }: PackRecords): void {
  const materials = usedMaterials(parts);
  if (materials.length === 0) return;
  flow.heading('Materials, and where their values come from', 40);
  flow.paragraph(
    'Unverified values are starting values. Test a joint and enter your own under “materials” in the job.',
  );
  for (const material of materials) {
    flow.paragraph(material.title, { bold: true });
    for (const line of sourcedValues(material)) flow.paragraph(sayInUnits(line, job.output));
  }
}

/** Each material once, in the order of struts, hubs, panels. */
function usedMaterials({ struts, hubs, panels }: Parts): readonly Material[] {
  const all = [...struts, ...hubs, ...panels].map((part) => part.material).filter((m) => m !== null);
  return [...new Map(all.map((m) => [m.name, m])).values()];
}

/** A sentence a source: its values, then where they stand. */
function sourcedValues(material: Material): readonly string[] {
  const bySource = new Map<string, ValueRow[]>();
  for (const v of materialRow(material).values) {
    const key = `${v.source}\n${v.verified}`;
    bySource.set(key, [...(bySource.get(key) ?? []), v]);
  }
  return [...bySource.values()].map((values) => {
    const { source, verified } = values[0]!;
    const said = values.map((v) => `${v.value} ${short(v.amount)}${v.unit ? ` ${v.unit}` : ''}`).join(', ');
    return `${said}: ${source}${verified ? '' : '; unverified'}.`;
  });
}

const short = (amount: number | string): string =>
  typeof amount === 'number' ? String(Number(amount.toPrecision(4))) : amount;
