import { drawingToDxf } from '../../documents/formats/dxf.js';
import { drawingToSvg } from '../../documents/formats/svg.js';
import { sheetDrawing } from '../../documents/panels/sheet-drawing.js';
import type { PackRecords } from '../../documents/records.js';
import { isWithheld } from '../../model/hold.js';
import type { PackWriter } from '../pack-writer.js';
import { writeKerfComb } from './gauge.js';

export interface SheetFiles {
  /** Panels without a place in any machine file: unsound, or on no sheet. */
  readonly withheld: readonly string[];
  /** Files that a panel is cut from. */
  filesOf(mark: string): readonly string[];
}

/** Writes the machine files of every sheet and the kerf comb; panels that are withheld are left out of them. */
export async function writeSheetFiles(records: PackRecords, writer: PackWriter): Promise<SheetFiles> {
  const { parts, job, findings, nesting } = records;
  const panels = new Map(parts.panels.map((p) => [p.mark, p]));
  const withheld = new Set(
    parts.panels
      .filter((p) => p.outline.length === 0 || !p.makeable || isWithheld('panel', p.mark, findings))
      .map((p) => p.mark),
  );
  const files = new Map<string, string[]>();
  for (const sheet of nesting?.sheets ?? []) {
    const kind = job.sheets.find((s) => s.name === sheet.sheet);
    const title = `${job.title}, ${sheet.mark}, ${sheet.material} ${sheet.thickness} mm, revision ${job.revision}`;
    const drawing = sheetDrawing(
      sheet,
      { width: sheet.width, height: sheet.height, outline: kind?.outline },
      panels,
      job.cutter,
      title,
      withheld,
    );
    if (sheet.placements.every((p) => withheld.has(p.mark))) continue;
    const paths = [`panels/sheets/${sheet.mark}.svg`, `panels/sheets/${sheet.mark}.dxf`];
    await writer.put(paths[0]!, drawingToSvg(drawing));
    await writer.put(paths[1]!, drawingToDxf(drawing));
    for (const p of sheet.placements) if (!withheld.has(p.mark)) files.set(p.mark, paths);
  }
  // The comb is cut from the panels' own sheet: of a material that must not be cut so there is none.
  const hazards = new Set(findings.flatMap((f) => (f.code === 'panel-hazard' ? [f.subject] : [])));
  if (parts.panels.some((p) => !hazards.has(p.mark))) await writeKerfComb(job, writer, 'panels/');
  for (const p of parts.panels) if (!files.has(p.mark)) withheld.add(p.mark);
  return { withheld: [...withheld], filesOf: (mark) => files.get(mark) ?? [] };
}
