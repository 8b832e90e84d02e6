import { distance, subtract, type Vec3 } from '../../maths/vec3.js';
import type { RowList } from './row-list.js';

/** A truss as the equations of balance see it, by index. */
export interface BalanceFigure {
  readonly ends: readonly (readonly [number, number])[];
  readonly loads: readonly Vec3[];
  /** 3 node + axis: whether a support takes what is left there. */
  readonly held: Uint8Array;
}

/**
 * Equations of balance, sum of t u + p = 0 at every node in every direction that is not held, over `largest` N. Unknowns: moves of
 * nodes over `unit` mm, at `columnOf(node)`, and changes of forces over `largest` N, at `forceColumn(member)` (-1: kept).
 * d(t u) = t / L (I - u u') (dx_far - dx_near) + u dt.
 */
export function balanceRows(
  figure: BalanceFigure,
  forces: Float64Array,
  at: (node: number) => Vec3,
  columnOf: (node: number) => number,
  forceColumn: (member: number) => number,
  unit: number,
  largest: number,
  into: RowList,
): void {
  const first = into.values.length;
  const rowOf = new Int32Array(figure.held.length).fill(-1);
  let count = 0;
  for (let f = 0; f < rowOf.length; f++) if (!figure.held[f]) rowOf[f] = first + count++;
  for (let f = 0; f < rowOf.length; f++) {
    if (rowOf[f] >= 0) into.values.push(figure.loads[Math.floor(f / 3)][f % 3] / largest);
  }
  // Noughts are kept: the pattern must not change from step to step.
  const put = (row: number, column: number, entry: number): void => {
    into.rows.push(row);
    into.columns.push(column);
    into.entries.push(entry);
  };
  figure.ends.forEach(([i, j], m) => {
    const l = distance(at(i), at(j));
    const d = subtract(at(j), at(i));
    const u = [d[0] / l, d[1] / l, d[2] / l];
    const t = forces[m] / largest;
    const stiff = (t * unit) / l;
    for (const [near, far, sign] of [
      [i, j, 1],
      [j, i, -1],
    ] as const) {
      for (let a = 0; a < 3; a++) {
        const row = rowOf[3 * near + a];
        if (row < 0) continue;
        into.values[row] += sign * t * u[a];
        if (forceColumn(m) >= 0) put(row, forceColumn(m), sign * u[a]);
        for (let b = 0; b < 3; b++) {
          const k = stiff * ((a === b ? 1 : 0) - u[a] * u[b]);
          if (columnOf(far) >= 0) put(row, columnOf(far) + b, k);
          if (columnOf(near) >= 0) put(row, columnOf(near) + b, -k);
        }
      }
    }
  });
}
