import { type ColumnElimination, eliminateColumns } from '../../maths/sparse/column-elimination.js';
import type { SparseMatrix } from '../../maths/sparse/csc.js';
import { rightNullSpace } from '../../maths/sparse/null-space.js';
import { orthonormalise } from '../../maths/sparse/orthonormalise.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { closureEquations } from './closure-equations.js';
import type { CellComplex } from './complex.js';
import { type FaceNormals, faceNormals } from './face-normals.js';
import { gradientsOf } from './gradients.js';

/** Singular values up to this many times the largest twist of a face count as nought: the twist is what exporting rounded. */
const TWIST_FACTOR = 4;
const ROUND_OFF_CUT = 1e-9;
/** An elimination is trusted when its least pivot, as a share of its column, and the gap below it to the largest remainder dropped lie beyond these. */
const SOUND_PIVOT = 1e-6;
const SOUND_GAP = 1e-6;
/** Up to this many null vectors inverse iteration is quick enough to be asked for the next singular value too. */
const FEW = 24;
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
  const { jumps, leastSingular, largestNull } = nullJumps(matrix, points, cut);
  return {
    dimension: jumps.length,
    basis: jumps.map((jump) => gradientsOf(complex, normals.normals, jump)),
    leastSingular,
    largestNull,
    twisted,
    normals,
  };
}

interface NullJumps {
  readonly jumps: readonly Float64Array[];
  readonly leastSingular: number | null;
  readonly largestNull: number;
}

/**
 * Null vectors of the closure equations. Many of them come cheapest from a sparse elimination, whose pivots say whether it can be
 * trusted; few, doubtful or spoilt ones from inverse iteration, which also gives the singular value next to nought.
 */
function nullJumps(matrix: SparseMatrix, points: Float64Array, cut: number): NullJumps {
  if (cut <= ROUND_OFF_CUT) {
    const found = sweptElimination(matrix, points);
    const sound = found.leastPivot > SOUND_PIVOT && found.largestDropped < SOUND_GAP * found.leastPivot;
    if (sound && found.dependent.length > FEW) {
      const vectors = Array.from(found.dependent, (_, k) => {
        const { indices, values } = found.columnNull(k);
        const dense = new Float64Array(matrix.columns);
        indices.forEach((c, i) => {
          dense[c] = values[i];
        });
        return dense;
      });
      return { jumps: orthonormalise(vectors, undefined).vectors, leastSingular: null, largestNull: 0 };
    }
  }
  const nulls = rightNullSpace(matrix, { points });
  const near = nulls.next.filter((n) => n.value <= cut);
  return {
    jumps: [...nulls.vectors, ...near.map((n) => n.vector)],
    leastSingular: nulls.next.find((n) => n.value > cut)?.value ?? null,
    largestNull: near.reduce((most, n) => Math.max(most, n.value), nulls.largestNull),
  };
}

/** Columns in order along the longest axis, each row at the first column that holds it: a front that sweeps the figure. */
function sweptElimination(matrix: SparseMatrix, points: Float64Array): ColumnElimination {
  const extent = [0, 1, 2].map((axis) => {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (let i = axis; i < points.length; i += 3) [low, high] = [Math.min(low, points[i]), Math.max(high, points[i])];
    return high - low;
  });
  const axis = extent.indexOf(Math.max(...extent));
  const order = Array.from({ length: matrix.columns }, (_, c) => c).sort(
    (a, b) => points[3 * a + axis] - points[3 * b + axis] || a - b,
  );
  const rowRank = new Float64Array(matrix.rows);
  order.forEach((c, place) => {
    for (let p = matrix.starts[c]; p < matrix.starts[c + 1]; p++) rowRank[matrix.indices[p]] = place;
  });
  return eliminateColumns(matrix, order, rowRank);
}
