import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import type { Units } from '../../kit/units.js';
import type { PackRecords } from '../../records.js';
import { sceneOf } from './scene.js';
import { exaggeration, largestMovement, SHAPE_HEIGHT, shapePicture } from './shape.js';

/** The deflected shape of the combination, or without combinations the case, under which a node moves farthest. */
export function deflectionPicture(paper: Paper, flow: Flow, records: PackRecords, units: Units): void {
  const { solution, topology } = records;
  const combinations = solution?.combinations.filter((c) => c.displacements) ?? [];
  const results = combinations.length > 0 ? combinations : (solution?.cases.filter((c) => c.displacements) ?? []);
  const moved = results
    .map((result) => ({ result, most: largestMovement(result.displacements!) }))
    .filter((r) => r.most !== null)
    .sort((a, b) => b.most!.size - a.most!.size)[0];
  if (!moved) return;
  const { node, size } = moved.most!;
  const factor = exaggeration(size, sceneOf(records).size);
  flow.heading('Deflected shape', SHAPE_HEIGHT + 12);
  flow.paragraph(
    `Under ${moved.result.name}, movements drawn ${factor} times as large: ${topology.truss.nodes[node]!.mark} moves farthest, ${units.length(size, 2)} ${units.lengthUnit}. Thin: the truss without load.`,
  );
  shapePicture(paper, flow, records, moved.result.displacements!, factor);
}
