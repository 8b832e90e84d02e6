import { isMeasured } from '../../detailing/systems/printing.js';
import type { GaugePlan } from '../../pipeline/gauge.js';
import { gaugeMarks } from '../../pipeline/stages/gauge.js';
import { gaugeClearances } from '../../shaping/gauge-steps.js';

/** What was made and what to do with it, one fact a line. */
export function sayGauge({ job, sections }: GaugePlan, out: string): string {
  const marks = gaugeMarks(sections);
  const lines = sections.map((s, i) => {
    const file = `${marks[i]}.stl`;
    const values = gaugeClearances(s, job)
      .map((c) => c.toFixed(2))
      .join('  ');
    return `${file}: ${s.name}, clearances ${values} mm${isMeasured(job, s) ? '; the middle one is measured' : ''}\n`;
  });
  const first = sections[0]?.name ?? 'SECTION';
  return [
    ...lines,
    'kerf-comb.svg, kerf-comb.dxf: cut once from the panels’ sheet, nothing offset\n',
    `Wrote ${out}. gauge.pdf says how to print, cut and read them.\n`,
    `What fits goes into the job: "nodes": { "clearances": { "${first}": 0.00 } } and "cutter": { "kerf_mm": 0.00, "kerfMeasured": true }\n`,
  ].join('');
}
