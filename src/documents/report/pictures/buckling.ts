import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import { fixed } from '../../kit/units.js';
import type { PackRecords } from '../../records.js';
import { sceneOf } from './scene.js';
import { exaggeration, largestMovement, SHAPE_HEIGHT, shapePicture } from './shape.js';

/** The shape in which the whole buckles first: of the combination with the lowest load factor. */
export function bucklingPicture(paper: Paper, flow: Flow, records: PackRecords): void {
  const lowest = (records.solution?.buckling ?? [])
    .filter((b) => b.shape && b.factors.length > 0)
    .sort((a, b) => a.factors[0]! - b.factors[0]!)[0];
  const most = lowest && largestMovement(lowest.shape!);
  if (!lowest || !most) return;
  // A bow within a strut does not show at the nodes, which the picture draws.
  const first = lowest.strut
    ? `${lowest.strut} bows first`
    : `${records.topology.truss.nodes[most.node]!.mark} moves most`;
  flow.heading('Lowest buckling shape', SHAPE_HEIGHT + 12);
  flow.paragraph(
    `The whole would buckle like this at ${fixed(lowest.factors[0]!, 2)} times the loads of ${lowest.combination}; ${first}. Only the form has a meaning, not its size.`,
  );
  shapePicture(paper, flow, records, lowest.shape!, exaggeration(most.size, sceneOf(records).size));
}
