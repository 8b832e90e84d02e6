import { leastSquares } from '../../maths/least-squares.js';
import type { Vec3 } from '../../maths/vec3.js';
import { topologyOf } from '../../model/topology.js';
import type { Reciprocal, Truss } from '../../model/truss.js';
import { complexOf, givenCells } from '../reciprocal/complex.js';
import { fileVertices } from '../reciprocal/file-diagram.js';
import { functionSpace } from '../reciprocal/function-space.js';

/**
 * The file's force diagram moved as little as possible (least squares) onto the diagrams of a mended form, so that its polygons are square to
 * the struts again: the projection of its vertices on the functions over the cells and a move of the whole. As it was
 * where the form has no diagram of its cells.
 */
export function mendDiagram(truss: Truss): Reciprocal | null {
  const { reciprocal } = truss;
  if (!reciprocal || truss.cells.length === 0) return reciprocal;
  const topology = topologyOf(truss);
  const { complex } = complexOf(topology, givenCells(topology));
  const vertices = complex && fileVertices(complex, reciprocal).vertices;
  if (!complex || !vertices) return reciprocal;
  const { basis } = functionSpace(topology, complex);
  if (basis.length === 0) return reciprocal;
  const n = vertices.length;
  const moves = [0, 1, 2].map((k) => Float64Array.from({ length: 3 * n }, (_, i) => (i % 3 === k ? 1 : 0)));
  const columns = [...basis, ...moves];
  const forward = (x: Float64Array): Float64Array => {
    const a = new Float64Array(3 * n);
    columns.forEach((column, m) => {
      for (let i = 0; i < a.length; i++) a[i] += x[m] * column[i];
    });
    return a;
  };
  const back = (r: Float64Array): Float64Array =>
    Float64Array.from(columns, (column) => column.reduce((sum, v, i) => sum + v * r[i], 0));
  const target = Float64Array.from(vertices.flatMap((v) => [...v]));
  const { x } = leastSquares({ rows: 3 * n, columns: columns.length, forward, back }, target);
  const a = forward(x);
  const index = new Map(complex.cells.map((cell, c) => [cell.mark, c]));
  return {
    ...reciprocal,
    vertices: reciprocal.vertices.map((v) => {
      const c = 3 * index.get(v.cell)!;
      return { ...v, at: [a[c], a[c + 1], a[c + 2]] as Vec3 };
    }),
  };
}
