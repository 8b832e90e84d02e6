import type { Vec3 } from '../../maths/vec3.js';
import type { CellComplex } from './complex.js';

/**
 * a_c, 3 numbers a cell, from the jumps a_plus - a_minus = λ_f n_f (λ in the order of `complex.used`): summed from the first
 * outer cell, where a = 0, over a breadth-first tree of cells. Scaled so that the largest |a| is 1; all nought stays.
 */
export function gradientsOf(complex: CellComplex, normals: readonly Vec3[], jumps: Float64Array): Float64Array {
  const a = new Float64Array(3 * complex.cells.length);
  for (const { face, from, to } of cellTree(complex)) {
    const step = (complex.plus[face.index] === to ? 1 : -1) * jumps[face.column];
    for (let k = 0; k < 3; k++) a[3 * to + k] = a[3 * from + k] + step * normals[face.index][k];
  }
  let largest = 0;
  for (let c = 0; c < a.length; c += 3) largest = Math.max(largest, Math.hypot(a[c], a[c + 1], a[c + 2]));
  return largest > 0 ? a.map((v) => v / largest) : a;
}

interface TreeStep {
  readonly face: { readonly index: number; readonly column: number };
  readonly from: number;
  readonly to: number;
}

/** Steps that reach every cell from the first outer one, breadth first: the shortest chains of faces add the least error. */
function cellTree(complex: CellComplex): TreeStep[] {
  const facesOf: { index: number; column: number }[][] = complex.cells.map(() => []);
  complex.used.forEach((f, column) => {
    facesOf[complex.plus[f]].push({ index: f, column });
    facesOf[complex.minus[f]].push({ index: f, column });
  });
  const first = Math.max(
    0,
    complex.cells.findIndex((c) => c.outer),
  );
  const seen = new Uint8Array(complex.cells.length);
  seen[first] = 1;
  const queue = [first];
  const steps: TreeStep[] = [];
  for (let head = 0; head < queue.length; head++) {
    const from = queue[head];
    for (const face of facesOf[from]) {
      const to = complex.plus[face.index] === from ? complex.minus[face.index] : complex.plus[face.index];
      if (seen[to]) continue;
      seen[to] = 1;
      queue.push(to);
      steps.push({ face, from, to });
    }
  }
  return steps;
}
