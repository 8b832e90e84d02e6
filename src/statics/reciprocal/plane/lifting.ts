import { fromTriplets, type SparseMatrix } from '../../../maths/sparse/csc.js';
import { rightNullSpace } from '../../../maths/sparse/null-space.js';
import type { PlaneFigure } from './plane-figure.js';
import type { Regions } from './regions.js';

/** Singular values of the lifting equations up to this are nought: coordinates exported with five or six digits; sound figures lie above 1e-2. */
export const LIFTING_CUT = 1e-5;

/** Plane-faced surfaces over the regions: z = u x + v y + w in each, continuous across every strut. */
export interface Liftings {
  /** u, v and w / size of every region, three numbers each; nought in the first outer one. */
  readonly basis: readonly Float64Array[];
  readonly leastSingular: number | null;
  readonly equations: SparseMatrix;
  /** Column of region r's first number; -1 for the region that is held at nought. */
  readonly column: Int32Array;
}

/** One condition on the jump between two outer regions: (u, v)_left - (u, v)_right square to nothing but `direction`. */
export interface RayEquation {
  readonly left: number;
  readonly right: number;
  readonly direction: readonly [number, number];
  /** Wanted value of the jump along the direction, N. */
  readonly value: number;
}

/**
 * The liftings of a plane figure, modulo tilting the whole: regions on both sides of a strut agree at both of its ends
 * (J. C. Maxwell, On reciprocal figures and diagrams of forces, Phil. Mag. 1864, 250-261). Coordinates are taken over the
 * size of the figure, so that all entries are of the order of 1. `rays` are the conditions between open outer regions.
 */
export function liftings(
  figure: PlaneFigure,
  regions: Regions,
  count: number,
  held: number,
  rays: readonly RayEquation[],
): Liftings {
  const column = new Int32Array(count).fill(-1);
  let columns = 0;
  for (let r = 0; r < count; r++) {
    if (r === held) continue;
    column[r] = columns;
    columns += 3;
  }
  const rows: number[] = [];
  const cols: number[] = [];
  const values: number[] = [];
  let row = 0;
  const put = (r: number, entries: readonly number[], sign: number): void => {
    if (column[r] < 0) return;
    entries.forEach((v, k) => {
      rows.push(row);
      cols.push(column[r] + k);
      values.push(sign * v);
    });
  };
  const { edges, left } = regions;
  for (let h = 0; h < edges.count; h += 2) {
    if (left[h] === left[h + 1]) continue;
    for (const i of [edges.start[h], edges.end[h]]) {
      const at = [figure.at[2 * i] / figure.size, figure.at[2 * i + 1] / figure.size, 1];
      put(left[h], at, 1);
      put(left[h + 1], at, -1);
      row++;
    }
  }
  for (const ray of rays) {
    put(ray.left, ray.direction, 1);
    put(ray.right, ray.direction, -1);
    row++;
  }
  const equations = fromTriplets(row, columns, rows, cols, values);
  const nulls = columns === 0 ? { vectors: [], next: [] } : rightNullSpace(equations);
  const near = nulls.next.filter((n) => n.value <= LIFTING_CUT);
  return {
    basis: [...nulls.vectors, ...near.map((n) => n.vector)].map((v) => spread(v, column)),
    leastSingular: nulls.next.find((n) => n.value > LIFTING_CUT)?.value ?? null,
    equations,
    column,
  };
}

/** Three numbers a region from the unknowns of the equations. */
export function spread(unknowns: Float64Array, column: Int32Array): Float64Array {
  const all = new Float64Array(3 * column.length);
  column.forEach((c, r) => {
    if (c >= 0) all.set(unknowns.subarray(c, c + 3), 3 * r);
  });
  return all;
}

/** t = (a_left - a_right) . n by strut, n square to it on its left: the fold of the surface across each strut, N. */
export function foldForces(figure: PlaneFigure, regions: Regions, surface: Float64Array): Float64Array {
  const { edges, left } = regions;
  const forces = new Float64Array(edges.count / 2);
  for (let m = 0; m < forces.length; m++) {
    const [i, j] = [edges.start[2 * m], edges.end[2 * m]];
    const [dx, dy] = [figure.at[2 * j] - figure.at[2 * i], figure.at[2 * j + 1] - figure.at[2 * i + 1]];
    const l = Math.hypot(dx, dy);
    const [a, b] = [3 * left[2 * m], 3 * left[2 * m + 1]];
    forces[m] = (-(surface[a] - surface[b]) * dy + (surface[a + 1] - surface[b + 1]) * dx) / l;
  }
  return forces;
}
