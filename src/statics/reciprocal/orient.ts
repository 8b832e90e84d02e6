import { areaVector } from '../../maths/plane-fit.js';
import { dot } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import type { ComplexCell } from './complex.js';
import type { EdgeTable } from './edges.js';

/**
 * Which cell lies on either side of each face, from an orientation of every cell's surface (two faces of a cell run
 * along their common edge in opposite senses) that agrees across faces (a face is seen in opposite senses from its two
 * cells). Nothing but the order of loops is used, so a figure that overlaps itself does no harm. The one bit that is left,
 * all inside out, is set so that the bounded cells together have positive volume.
 *
 * `twisted` is a cell that cannot be oriented, or not together with its neighbours; null where all can.
 */
export function orientCells(
  topology: Topology,
  table: EdgeTable,
  cells: readonly ComplexCell[],
): { readonly plus: Int32Array; readonly minus: Int32Array; readonly twisted: number | null } {
  const count = table.faces.length;
  const plus = new Int32Array(count).fill(-1);
  const minus = new Int32Array(count).fill(-1);
  const cellsOf: number[][] = Array.from({ length: count }, () => []);
  cells.forEach((cell, c) => {
    for (const f of cell.faces) cellsOf[f].push(c);
  });
  const outward = cells.map((cell) => orientSurface(table, cell.faces));
  const bad = outward.indexOf(null);
  if (bad >= 0) return { plus, minus, twisted: bad };

  // turn[c] = -1 where the cell's own orientation must be reversed to agree with the others.
  const turn = new Int8Array(cells.length);
  for (let first = 0; first < cells.length; first++) {
    if (turn[first] !== 0) continue;
    turn[first] = 1;
    const queue = [first];
    for (let c = queue.pop(); c !== undefined; c = queue.pop()) {
      for (const f of cells[c].faces) {
        const other = cellsOf[f][0] === c ? cellsOf[f][1] : cellsOf[f][0];
        const wanted = -turn[c] * outward[c]!.get(f)! * outward[other]!.get(f)!;
        if (turn[other] === 0) {
          turn[other] = wanted;
          queue.push(other);
        } else if (turn[other] !== wanted) return { plus, minus, twisted: other };
      }
    }
  }

  let volume = 0;
  cells.forEach((cell, c) => {
    if (cell.outer) return;
    for (const f of cell.faces) {
      const loop = Array.from(table.faces[f], (i) => topology.truss.nodes[i].at);
      volume += turn[c] * outward[c]!.get(f)! * dot(areaVector(loop), loop[0]);
    }
  });
  const inside = volume < 0 ? -1 : 1;
  cells.forEach((cell, c) => {
    for (const f of cell.faces) {
      // A face whose loop is anticlockwise seen from outside a cell has that cell behind it.
      if (inside * turn[c] * outward[c]!.get(f)! > 0) minus[f] = c;
      else plus[f] = c;
    }
  });
  return { plus, minus, twisted: null };
}

/** +1 or -1 for each face of a closed surface so that all look outward (or all inward); null where it has one side only. */
function orientSurface(table: EdgeTable, faces: readonly number[]): Map<number, number> | null {
  const byEdge = new Map<number, { face: number; along: number }[]>();
  for (const f of faces) {
    table.faceEdges[f].forEach((e, k) => {
      const list = byEdge.get(e);
      const entry = { face: f, along: table.along[f][k] };
      if (list) list.push(entry);
      else byEdge.set(e, [entry]);
    });
  }
  const sense = new Map<number, number>([[faces[0], 1]]);
  const queue = [faces[0]];
  for (let f = queue.pop(); f !== undefined; f = queue.pop()) {
    for (let k = 0; k < table.faceEdges[f].length; k++) {
      const [a, b] = byEdge.get(table.faceEdges[f][k])!;
      // The rim of an open cell.
      if (b === undefined) continue;
      const other = a.face === f ? b : a;
      const wanted = -sense.get(f)! * table.along[f][k] * other.along;
      const known = sense.get(other.face);
      if (known === undefined) {
        sense.set(other.face, wanted);
        queue.push(other.face);
      } else if (known !== wanted) return null;
    }
  }
  return sense;
}
