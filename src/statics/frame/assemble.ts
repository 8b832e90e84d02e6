import { fromTriplets, type SparseMatrix } from '../../maths/sparse/csc.js';
import { elementSum } from '../../maths/sparse/element-sum.js';
import type { Freedoms } from '../freedoms.js';
import type { Frame } from './member.js';

/** Lower triangle of the sum of the members' 12 x 12 global matrices on the free freedoms; every diagonal entry is present. */
export function assembleFrame(frame: Frame, freedoms: Freedoms, elementOf: (e: number) => Float64Array): SparseMatrix {
  const size = 78 * frame.members.length + freedoms.count;
  const rows = new Int32Array(size);
  const columns = new Int32Array(size);
  const values = new Float64Array(size);
  let at = 0;
  for (; at < freedoms.count; at++) rows[at] = columns[at] = at;
  const f = new Int32Array(12);
  frame.members.forEach((m, e) => {
    const k = elementOf(e);
    for (let i = 0; i < 12; i++) f[i] = freedoms.of[6 * m.ends[i < 6 ? 0 : 1] + (i % 6)];
    for (let i = 0; i < 12; i++)
      for (let j = 0; j <= i; j++) {
        if (f[i] < 0 || f[j] < 0) continue;
        rows[at] = Math.max(f[i], f[j]);
        columns[at] = Math.min(f[i], f[j]);
        values[at++] = k[12 * i + j];
      }
  });
  return fromTriplets(
    freedoms.count,
    freedoms.count,
    rows.subarray(0, at),
    columns.subarray(0, at),
    values.subarray(0, at),
  );
}

/**
 * The same sum with a factor for each member, on the pattern of a matrix that assembleFrame made: the members' matrices are
 * made and placed once, the returned function only adds them up.
 */
export function frameSum(
  frame: Frame,
  freedoms: Freedoms,
  pattern: SparseMatrix,
  elementOf: (e: number) => Float64Array,
): (factors: ArrayLike<number>) => SparseMatrix {
  return elementSum(
    pattern,
    frame.members.map((m, e) => ({ unknowns: memberFreedoms(m.ends, freedoms), matrix: elementOf(e) })),
  );
}

/** The twelve freedoms of a member's ends. */
export const memberFreedoms = (ends: readonly [number, number], freedoms: Freedoms): Int32Array =>
  Int32Array.from({ length: 12 }, (_, i) => freedoms.of[6 * ends[i < 6 ? 0 : 1] + (i % 6)]);
