import { DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

/** panel-list.csv: one row a panel, always; `sheet` is the mark of the nested sheet, blank where there is none. */
export function panelListCsv(records: PackRecords): Uint8Array {
  const { topology, parts, nesting, job } = records;
  const sheets = new Map(
    (nesting?.sheets ?? []).flatMap((sheet) => sheet.placements.map((placed) => [placed.mark, sheet.mark] as const)),
  );
  return writeCsv(
    [
      { name: 'mark', value: (p) => p.mark },
      { name: 'corners', value: (p) => topology.truss.faces[topology.faceIndex.get(p.face)!]!.nodes.length },
      { name: 'area_mm2', decimals: DECIMALS.area, value: (p) => (p.outline.length > 0 ? p.area : null) },
      { name: 'thickness_mm', decimals: DECIMALS.length, value: (p) => p.thickness },
      { name: 'flatness_mm', decimals: 6, value: (p) => p.flatness },
      { name: 'sheet', value: (p) => sheets.get(p.mark) ?? null },
    ],
    parts.panels,
    job.output.csv,
  );
}
