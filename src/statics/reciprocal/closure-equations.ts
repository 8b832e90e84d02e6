import { fromTriplets, type SparseMatrix } from '../../maths/sparse/csc.js';
import { cross, dot, normalise, perpendicular, subtract, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';

/**
 * The face-closure equations: a function that is linear in every cell and continuous has a gradient that jumps by
 * λ_f n_f across face f, and the jumps round every edge add up to nought: sum of ± λ_f n_f = 0, two equations an edge,
 * square to it. A column a used face (in the order of `complex.used`). λ alone settles the function but for one linear function over the whole.
 *
 * Where two open cells meet along an edge without a face between them the jump between them is free, but for what
 * `lines` says: the lines of action at the edge's ends, which lie in the face that is not there.
 */
export function closureEquations(
  topology: Topology,
  complex: CellComplex,
  normals: readonly Vec3[],
  lines: ReadonlyMap<number, readonly Vec3[]> = new Map(),
): SparseMatrix {
  const { nodes } = topology.truss;
  const column = new Int32Array(complex.faces.length).fill(-1);
  complex.used.forEach((f, c) => {
    column[f] = c;
  });
  const open = new Set(complex.openEdges);
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  let row = 0;
  complex.loops.forEach((loop, e) => {
    if (loop.cells.length === 0) return;
    const axis = normalise(subtract(nodes[complex.to[e]].at, nodes[complex.from[e]].at));
    const p = perpendicular(axis);
    const directions = open.has(e) ? (lines.get(e) ?? []) : [p, cross(axis, p)];
    for (const d of directions) {
      loop.faces.forEach((f, k) => {
        if (f < 0) return;
        const sense = complex.plus[f] === loop.cells[(k + 1) % loop.cells.length] ? 1 : -1;
        rows.push(row);
        columns.push(column[f]);
        values.push(sense * dot(normals[f], d));
      });
      row++;
    }
  });
  return fromTriplets(row, complex.used.length, rows, columns, values);
}
