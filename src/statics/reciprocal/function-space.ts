import { rightNullSpace } from '../../maths/sparse/null-space.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { closureEquations } from './closure-equations.js';
import type { CellComplex } from './complex.js';
import { type FaceNormals, faceNormals } from './face-normals.js';
import { gradientsOf } from './gradients.js';

/** Singular values up to this many times the largest twist of a face count as nought: the twist is what exporting rounded. */
const TWIST_FACTOR = 4;
const ROUND_OFF_CUT = 1e-9;
/** A face twisted by more than this slope has no normal worth the name: the residual limit at which a truss is stopped. */
export const TWIST_LIMIT = 1e-2;

/** The piecewise-linear functions over the cells, modulo linear ones over the whole. */
export interface FunctionSpace {
  readonly dimension: number;
  /** By basis function: 3 numbers a cell, its gradient there; nought in the first outer cell. */
  readonly basis: readonly Float64Array[];
  /** Smallest singular value that was not taken as nought, of the closure equations with unit normals; null where not known. */
  readonly leastSingular: number | null;
  /** Largest that was. */
  readonly largestNull: number;
  /** Faces twisted beyond the limit, by index: their warp is not put down to rounding. */
  readonly twisted: readonly number[];
  readonly normals: FaceNormals;
}

/**
 * Null space of the face-closure equations. Faces that exporting has twisted a little spoil exact nulls, so singular
 * values up to a few times the twist count as nought too; with a face twisted beyond the limit only exact ones do.
 */
export function functionSpace(
  topology: Topology,
  complex: CellComplex,
  lines: ReadonlyMap<number, readonly Vec3[]> = new Map(),
): FunctionSpace {
  const normals = faceNormals(topology, complex);
  const twisted = complex.used.filter((f) => normals.twist[f] > TWIST_LIMIT);
  const twist = normals.twist.reduce((most, t) => Math.max(most, t), 0);
  const cut = twisted.length > 0 ? ROUND_OFF_CUT : Math.max(ROUND_OFF_CUT, TWIST_FACTOR * twist);
  const matrix = closureEquations(topology, complex, normals.normals, lines);
  const points = Float64Array.from(complex.used.flatMap((f) => [...normals.middles[f]]));
  const nulls = rightNullSpace(matrix, { points });
  const near = nulls.next.filter((n) => n.value <= cut);
  const jumps = [...nulls.vectors, ...near.map((n) => n.vector)];
  return {
    dimension: jumps.length,
    basis: jumps.map((jump) => gradientsOf(complex, normals.normals, jump)),
    leastSingular: nulls.next.find((n) => n.value > cut)?.value ?? null,
    largestNull: near.reduce((most, n) => Math.max(most, n.value), nulls.largestNull),
    twisted,
    normals,
  };
}
