import type { Vec3 } from '../../maths/vec3.js';
import { DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

interface Row {
  readonly node: string;
  readonly strut: string;
  readonly direction: Vec3;
  readonly setback: number | null;
  readonly depth: number | null;
}

/** bar-directions.csv: for every strut end the unit vector from the node along the strut, in the truss's axes. */
export function barDirectionsCsv(records: PackRecords): Uint8Array {
  const { topology, parts, job } = records;
  const hubs = new Map(parts.hubs.map((hub) => [hub.mark, hub]));
  const rows = topology.truss.nodes.flatMap((node, i) =>
    topology.barsAt[i]!.map((bar): Row => {
      const socket = hubs.get(node.mark)?.sockets.find((s) => s.strut === bar.member.mark);
      return {
        node: node.mark,
        strut: bar.member.mark,
        direction: bar.direction,
        setback: socket?.setback ?? null,
        depth: socket?.depth ?? null,
      };
    }),
  );
  const axis = (name: string, k: 0 | 1 | 2) => ({
    name,
    decimals: DECIMALS.unitVector,
    value: (r: Row) => r.direction[k],
  });
  return writeCsv<Row>(
    [
      { name: 'node', value: (r) => r.node },
      { name: 'strut', value: (r) => r.strut },
      axis('x', 0),
      axis('y', 1),
      axis('z', 2),
      { name: 'setback_mm', decimals: DECIMALS.length, value: (r) => r.setback },
      { name: 'socket_depth_mm', decimals: DECIMALS.length, value: (r) => r.depth },
    ],
    rows,
    job.output.csv,
  );
}
