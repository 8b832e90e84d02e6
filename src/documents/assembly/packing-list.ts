import { writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

/** assembly/packing-list.csv: one row a part, every part once, by bag and step; then spares, whose bag is "spares". */
export function packingListCsv(records: PackRecords): Uint8Array {
  const plan = records.assembly;
  const stepOf = new Map<string, number>();
  for (const step of plan?.steps ?? [])
    for (const [kind, marks] of [
      ['node', step.hubs],
      ['strut', step.struts.map((s) => s.strut)],
      ['panel', step.panels],
    ] as const)
      for (const mark of marks) stepOf.set(`${kind} ${mark}`, step.number);
  const rows: { bag: string; kind: string; mark: string; step: number | null; count: number }[] = [];
  for (const bag of plan?.bags ?? [])
    for (const [kind, marks] of [
      ['node', bag.hubs],
      ['strut', bag.struts],
      ['panel', bag.panels],
    ] as const)
      for (const mark of marks)
        rows.push({ bag: bag.name, kind, mark, step: stepOf.get(`${kind} ${mark}`) ?? null, count: 1 });
  for (const spare of plan?.spares ?? [])
    rows.push({ bag: 'spares', kind: 'spare', mark: spare.what, step: null, count: spare.count });
  return writeCsv(
    [
      { name: 'bag', value: (r) => r.bag },
      { name: 'kind', value: (r) => r.kind },
      { name: 'mark', value: (r) => r.mark },
      { name: 'step', decimals: 0, value: (r) => r.step },
      { name: 'count', decimals: 0, value: (r) => r.count },
    ],
    rows,
    records.job.output.csv,
  );
}
