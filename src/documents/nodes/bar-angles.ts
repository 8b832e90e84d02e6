import { angleBetween } from '../../maths/vec3.js';
import type { BarAtNode } from '../../model/topology.js';
import { DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

/** bar-angles.csv: the angle of every pair of struts at every node. */
export function barAnglesCsv(records: PackRecords): Uint8Array {
  const rows = records.topology.truss.nodes.flatMap((node, i) =>
    pairs(records.topology.barsAt[i]!).map(([a, b]) => ({ node: node.mark, a, b })),
  );
  return writeCsv(
    [
      { name: 'node', value: (r) => r.node },
      { name: 'strut_a', value: (r) => r.a.member.mark },
      { name: 'strut_b', value: (r) => r.b.member.mark },
      {
        name: 'angle_deg',
        decimals: DECIMALS.angle,
        value: (r) => (angleBetween(r.a.direction, r.b.direction) * 180) / Math.PI,
      },
    ],
    rows,
    records.job.output.csv,
  );
}

const pairs = (bars: readonly BarAtNode[]): (readonly [BarAtNode, BarAtNode])[] =>
  bars.flatMap((a, i) => bars.slice(i + 1).map((b) => [a, b] as const));
