import { fitPlane } from '../../maths/plane-fit.js';
import { cross, dot, perpendicular, subtract, type Vec3 } from '../../maths/vec3.js';
import type { RowList } from './row-list.js';

/**
 * Equations that keep a loop of k nodes plane, k - 3 of them: distances r_l = n . (x_l - c) from the least-squares plane must be an affine
 * function of the place in it, q . r = 0 for every q square to 1, xi and eta. Turning and moving the plane are thereby free.
 * `columnOf(node)` is the first of three unknowns of a node, -1 for a node that is kept; all divided by `unit`.
 */
export function flatnessRows(
  loop: readonly number[],
  at: (node: number) => Vec3,
  columnOf: (node: number) => number,
  unit: number,
  into: RowList,
): void {
  if (loop.length < 4) return;
  const fit = fitPlane(loop.map(at));
  if (!fit) return;
  const x = perpendicular(fit.normal);
  const y = cross(fit.normal, x);
  const offsets = loop.map((node) => subtract(at(node), fit.origin));
  const taken = [loop.map(() => 1), offsets.map((d) => dot(d, x)), offsets.map((d) => dot(d, y))];
  const basis: number[][] = [];
  for (const v of taken) orthonormal(v, basis);
  const flat = basis.length;
  for (let l = 0; l < loop.length && basis.length < loop.length; l++) {
    const before = basis.length;
    orthonormal(
      loop.map((_, i) => (i === l ? 1 : 0)),
      basis,
    );
    if (basis.length === before) continue;
    const q = basis[before];
    const row = into.values.length;
    let value = 0;
    loop.forEach((node, i) => {
      value += (q[i] * dot(fit.normal, offsets[i])) / unit;
      const column = columnOf(node);
      if (column < 0) return;
      for (let k = 0; k < 3; k++) {
        into.rows.push(row);
        into.columns.push(column + k);
        into.entries.push(q[i] * fit.normal[k]);
      }
    });
    into.values.push(value);
    if (basis.length - flat === loop.length - 3) break;
  }
}

/** A remainder below this share of a unit vector lies in the span already. */
const IN_SPAN = 1e-6;

/** Adds what of v is square to the basis, if anything is. */
function orthonormal(v: readonly number[], basis: number[][]): void {
  const w = [...v];
  const before = Math.hypot(...v);
  for (let twice = 0; twice < 2; twice++) {
    for (const b of basis) {
      let c = 0;
      for (let i = 0; i < w.length; i++) c += b[i] * w[i];
      for (let i = 0; i < w.length; i++) w[i] -= c * b[i];
    }
  }
  const l = Math.hypot(...w);
  if (l > IN_SPAN * before) basis.push(w.map((value) => value / l));
}
