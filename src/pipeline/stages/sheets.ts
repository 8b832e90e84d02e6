import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { PanelPart } from '../../model/parts.js';
import type { NestingPlan, PlannedSheet } from '../../model/plan.js';
import type { Run } from '../../model/run.js';
import { nestPanels } from '../../planning/nesting/nest-panels.js';

const TURNS: Readonly<Record<Job['cutter']['rotations'], readonly number[] | undefined>> = {
  free: undefined,
  quarter: [0, 90, 180, 270],
  half: [0, 180],
  fixed: [0],
};

/** Lays every panel that has an outline on the job's sheets, each material and thickness for itself. */
export async function planSheets(
  panels: readonly PanelPart[],
  job: Job,
  run: Pick<Run, 'each'>,
): Promise<{ readonly plan: NestingPlan; readonly findings: readonly Finding[] }> {
  const findings: Finding[] = [];
  const sheets: PlannedSheet[] = [];
  let lowerBound = 0;
  for (const group of byMaterial(panels)) {
    const { material, thickness } = group[0]!;
    const fitting = job.sheets.filter(
      (s) =>
        (s.material === undefined || s.material === material?.name) &&
        (s.thickness_mm === undefined || s.thickness_mm === thickness),
    );
    const answer = await nestPanels(
      {
        panels: group.map((p) => ({
          mark: p.mark,
          outline: p.outline,
          quantity: 1,
          rotations: TURNS[job.cutter.rotations],
        })),
        sheets: fitting.map((s) => ({
          name: s.name,
          width: s.width_mm,
          height: s.height_mm,
          available: s.available,
          outline: s.outline,
        })),
        spacing: job.cutter.spacing_mm,
        margin: job.cutter.margin_mm,
        seed: job.seed,
        effort: job.cutter.effort,
      },
      { each: run.each },
    );
    for (const panel of answer.unplaced) {
      const code = panel.reason === 'too-large' ? 'panel-larger-than-sheet' : 'sheets-run-out';
      findings.push(finding(code, panel.mark));
    }
    const named = new Map(fitting.map((s) => [s.name, s]));
    for (const sheet of answer.sheets) {
      const kind = named.get(sheet.sheet)!;
      sheets.push({
        mark: `sheet-${String(sheets.length + 1).padStart(2, '0')}`,
        sheet: sheet.sheet,
        width: kind.width_mm,
        height: kind.height_mm,
        material: material?.name ?? '',
        thickness,
        placements: sheet.placements,
        yield: sheet.yield,
      });
    }
    lowerBound += answer.lowerBound;
  }
  return { plan: { sheets, lowerBound }, findings };
}

function byMaterial(panels: readonly PanelPart[]): readonly PanelPart[][] {
  const groups = new Map<string, PanelPart[]>();
  for (const panel of panels) {
    if (!panel.makeable || panel.outline.length < 3) continue;
    const key = `${panel.material?.name} ${panel.thickness}`;
    groups.set(key, [...(groups.get(key) ?? []), panel]);
  }
  return [...groups.values()];
}
