import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { seededRandom } from '../random.js';
import { type AnalyseOptions, analyse } from './analyse.js';
import { fromTriplets, type SparseMatrix, transpose } from './csc.js';
import { diagonalOf, type Factor, factorise } from './factorise.js';
import { multiplyTransposed } from './multiply.js';
import { orthonormalise } from './orthonormalise.js';
import { backSolve } from './solve.js';

/** Shift of A Aᵀ, as a share of its largest diagonal entry: keeps the factor regular, separates nulls from the rest. */
const SHIFT = 1e-11;
/** Pivots below this share of their own diagonal entry count as null at first. */
const NULL_PIVOT = 1e-9;
/** Vectors beyond that count, so that a null that hid behind a sound pivot still shows. */
const GUARD = 4;
const ITERATIONS = 3;
/** Singular values below this share of the largest are zero: true nulls stay under 2e-15, the next are above 1e-2 on sound structures. */
export const SINGULAR_CUT = 1e-9;

/** The left null space of A with the singular values next to it. */
export interface NullSpace {
  /** Orthonormal z with Aᵀ z = 0. */
  readonly vectors: readonly Float64Array[];
  /**
   * The smallest singular values of A that are not zero, ascending, in A's own unit, with their left vectors: near-nulls.
   * They come from above: sharp where they are small beside the rest, within some per cent where values crowd.
   */
  readonly next: readonly { readonly value: number; readonly vector: Float64Array }[];
  /** Largest singular value that was taken as zero. */
  readonly largestNull: number;
}

/**
 * z with Aᵀ z = 0 by block inverse iteration on A Aᵀ + shift, judged by the singular values of Aᵀ Z, never by their squares
 * (Golub and Van Loan, Matrix Computations, 4th ed. 2013, sections 5.5 and 8.2). Columns of A should have norms of the order of 1.
 */
export function leftNullSpace(a: SparseMatrix, options: AnalyseOptions = {}): NullSpace {
  if (a.rows === 0) return { vectors: [], next: [], largestNull: 0 };
  const gram = gramLower(a);
  const d = diagonalOf(gram);
  const scale = d.reduce((x, y) => Math.max(x, y), 0);
  if (scale === 0) return { vectors: unitVectors(a.rows), next: [], largestNull: 0 };
  const shifted = addToDiagonal(gram, SHIFT * scale);
  const factor = factorise(analyse(shifted, options), shifted);
  let wanted = Math.min(a.rows, nullPivots(factor, shifted) + GUARD);
  for (;;) {
    const found = iterate(a, factor, wanted);
    const cut = SINGULAR_CUT * Math.sqrt(scale);
    const nulls = found.filter((f) => f.value <= cut);
    // A block that is null to the last vector may hide more.
    if (nulls.length === wanted && wanted < a.rows) {
      wanted = Math.min(a.rows, 2 * wanted);
      continue;
    }
    return {
      vectors: nulls.map((f) => f.vector),
      next: found.filter((f) => f.value > cut),
      largestNull: nulls.reduce((most, f) => Math.max(most, f.value), 0),
    };
  }
}

function iterate(a: SparseMatrix, factor: Factor, wanted: number): { value: number; vector: Float64Array }[] {
  const random = seededRandom(1);
  let z: Float64Array[] = Array.from({ length: wanted }, () =>
    Float64Array.from({ length: a.rows }, () => random() - 0.5),
  );
  for (let step = 0; step < ITERATIONS; step++) {
    z = orthonormalise(backSolve(factor, z), random).vectors;
  }
  // Ritz vectors: Aᵀ Z = Q R, singular values of the small R.
  const { triangle } = orthonormalise(
    z.map((v) => multiplyTransposed(a, v)),
    undefined,
  );
  const svd = new SingularValueDecomposition(new Matrix(triangle), { autoTranspose: true });
  const right = svd.rightSingularVectors;
  const values = svd.diagonal;
  return values
    .map((value, k) => {
      const vector = new Float64Array(a.rows);
      for (let c = 0; c < z.length; c++) {
        const w = right.get(c, k);
        for (let i = 0; i < a.rows; i++) vector[i] += w * z[c][i];
      }
      return { value, vector };
    })
    .reverse();
}

function nullPivots(factor: Factor, lower: SparseMatrix): number {
  const { analysis, values } = factor;
  const d = diagonalOf(lower);
  let count = 0;
  for (let s = 0; s < analysis.parent.length; s++) {
    const width = analysis.starts[s + 1] - analysis.starts[s];
    for (let k = 0; k < width; k++) {
      const pivot = values[analysis.factorStarts[s] + k * width + k];
      if (Math.abs(pivot) < NULL_PIVOT * d[analysis.order[analysis.starts[s] + k]]) count++;
    }
  }
  return count;
}

/** Lower triangle of A Aᵀ, with a full diagonal. */
export function gramLower(a: SparseMatrix): SparseMatrix {
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  for (let i = 0; i < a.rows; i++) {
    rows.push(i);
    columns.push(i);
    values.push(0);
  }
  for (let j = 0; j < a.columns; j++)
    for (let p = a.starts[j]; p < a.starts[j + 1]; p++)
      for (let q = p; q < a.starts[j + 1]; q++) {
        rows.push(a.indices[q]);
        columns.push(a.indices[p]);
        values.push(a.values[p] * a.values[q]);
      }
  return fromTriplets(a.rows, a.rows, rows, columns, values);
}

/** A + s I for a lower triangle with a full diagonal. */
export function addToDiagonal(lower: SparseMatrix, s: number): SparseMatrix {
  const values = lower.values.slice();
  for (let j = 0; j < lower.columns; j++)
    for (let p = lower.starts[j]; p < lower.starts[j + 1]; p++) if (lower.indices[p] === j) values[p] += s;
  return { ...lower, values };
}

const unitVectors = (n: number): Float64Array[] =>
  Array.from({ length: n }, (_, i) => {
    const v = new Float64Array(n);
    v[i] = 1;
    return v;
  });

/** The right null space of A (A x = 0): the left one of Aᵀ. */
export const rightNullSpace = (a: SparseMatrix, options: AnalyseOptions = {}): NullSpace =>
  leftNullSpace(transpose(a), options);
