import { distance, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';

/** Struts that may come within a distance of a point: a superset, in their order. By cells of the mean strut length. */
export function nearLinks(topology: Topology): (at: Vec3, within: number) => readonly number[] {
  const { truss, nodeIndex, axisLength } = topology;
  const mean = axisLength.reduce((sum, l) => sum + l, 0) / Math.max(axisLength.length, 1);
  const cell = mean > 0 ? mean : 1;
  const cells = new Map<string, number[]>();
  const keyOf = (p: readonly number[]): string => p.map((v) => Math.floor(v / cell)).join();
  truss.members.forEach((m, strut) => {
    const [a, b] = m.ends.map((mark) => truss.nodes[nodeIndex.get(mark)!]!.at) as [Vec3, Vec3];
    const steps = Math.max(1, Math.ceil((2 * distance(a, b)) / cell));
    for (let k = 0; k <= steps; k++) {
      const key = keyOf([0, 1, 2].map((c) => a[c]! + ((b[c]! - a[c]!) * k) / steps));
      const list = cells.get(key);
      if (!list) cells.set(key, [strut]);
      else if (list.at(-1) !== strut) list.push(strut);
    }
  });
  return (at, within) => {
    // A point of a strut lies within a quarter of a cell of one of its samples.
    const reach = within + cell / 4;
    const [low, high] = [-1, 1].map((s) => at.map((v) => Math.floor((v + s * reach) / cell)));
    const found = new Set<number>();
    for (let x = low![0]!; x <= high![0]!; x++)
      for (let y = low![1]!; y <= high![1]!; y++)
        for (let z = low![2]!; z <= high![2]!; z++) for (const s of cells.get([x, y, z].join()) ?? []) found.add(s);
    return [...found].sort((a, b) => a - b);
  };
}
