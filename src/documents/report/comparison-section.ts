import { ROUND_OFF } from '../../model/tolerance.js';
import type { ForceComparison, ForceSource } from '../../statics/reciprocal/compare.js';
import type { Flow } from '../kit/flow.js';
import type { Paper } from '../kit/paper.js';
import { fixed, type Units } from '../kit/units.js';
import { ISOMETRIC } from '../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../kit/view/force-legend.js';
import { strokeOfForce } from '../kit/view/stroke.js';
import { drawTrussView } from '../kit/view/truss-view.js';
import type { PackRecords } from '../records.js';
import { sceneOf } from './pictures/scene.js';

const WORDS: Readonly<Record<ForceSource, string>> = {
  given: 'the given forces',
  reciprocal: 'the reciprocal figure',
  analysis: 'the analysis',
};
/** Struts named in the table: those that differ most. */
const NAMED = 24;
/** Height of the picture, mm. */
const PICTURE = 110;

/** Sources of member forces held against each other: the difference as a picture, and its split strut by strut. */
export function comparisonSection(paper: Paper, flow: Flow, records: PackRecords, units: Units): void {
  for (const comparison of records.reciprocal?.comparisons ?? []) {
    flow.heading(`${capital(WORDS[comparison.first])} beside ${WORDS[comparison.second]}`, 20);
    if (comparison.relative <= ROUND_OFF.forceScale.value) {
      flow.paragraph('The two agree to the last digit that a file carries.');
      continue;
    }
    if (units.force(comparison.largest) === units.force(0)) {
      flow.paragraph('The two differ by less than the last digit printed here; check.json has the rest.');
      continue;
    }
    flow.paragraph(
      `The largest difference is ${units.force(comparison.largest).replace('+', '')} ${units.forceUnit}, ${fixed(100 * comparison.relative, 2)} % of the largest force. It is split into a part that loads nothing (self-stress) and a remainder.`,
    );
    differencePicture(paper, flow, records, comparison, units);
    differenceTable(flow, records, comparison, units);
  }
}

function differencePicture(
  paper: Paper,
  flow: Flow,
  records: PackRecords,
  comparison: ForceComparison,
  units: Units,
): void {
  const { nodes, struts } = sceneOf(records);
  flow.picture(PICTURE, (area) => {
    drawTrussView(
      paper.pen,
      { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 2 },
      {
        camera: ISOMETRIC,
        scale: 'fill',
        marks: 'own',
        nodes,
        struts: struts.map((strut, i) => ({
          ...strut,
          stroke: strokeOfForce(comparison.difference[i]!, comparison.largest, 1e-3 * comparison.largest),
        })),
      },
    );
    drawForceLegend(paper.pen, area.x, area.y + area.height - FORCE_LEGEND_HEIGHT, comparison.largest, units);
  });
}

function differenceTable(flow: Flow, records: PackRecords, comparison: ForceComparison, units: Units): void {
  const { members } = records.topology.truss;
  const { difference, selfStress, remainder } = comparison;
  const order = [...members.keys()].sort((a, b) => Math.abs(difference[b]!) - Math.abs(difference[a]!) || a - b);
  const number = (head: string, values: Float64Array, bold = false) => ({
    head: `${head}\n${units.forceUnit}`,
    align: 'right' as const,
    bold,
    value: (i: number) => units.force(values[i]!),
  });
  if (members.length > NAMED) flow.paragraph(`The ${NAMED} struts that differ most; check.json has all.`);
  flow.table(
    [
      { head: 'Strut', bold: true, value: (i: number) => members[i]!.mark },
      number('Difference', difference, true),
      number('Self-stress', selfStress),
      number('Remainder', remainder),
    ],
    order.slice(0, NAMED),
  );
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
