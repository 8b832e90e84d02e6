import type { SparseMatrix } from '../../maths/sparse/csc.js';
import { spread } from '../freedoms.js';
import { hasFactorBelow, type LoadFactors, lowestLoadFactors } from '../load-factors.js';
import { frameSum } from './assemble.js';
import { geometricStiffness } from './geometric-stiffness.js';
import { toGlobal } from './rotate.js';
import type { PreparedFrame } from './solve-frame.js';

type StiffFrame = Extract<PreparedFrame, { state: 'stiff' }>;

/** Lowest load factors of a structure under one set of axial forces. */
export interface Buckling {
  /** Ascending; every factor times the loads makes it buckle in its shape. Empty where nothing is compressed enough. */
  readonly factors: readonly number[];
  /** Displacements over all nodes by factor (six a node of a frame, three of a pinned truss); largest displacement 1. */
  readonly shapes: readonly Float64Array[];
  readonly sturm: LoadFactors['sturm'];
}

/**
 * Linear buckling of a frame. `axial` is the force of each member of the frame, N, tension positive; members should be
 * subdivided, four elements a strut: one overestimates a pin-ended strut by 21.6 %.
 */
export function bucklingFactors(prepared: StiffFrame, axial: ArrayLike<number>, wanted = 4): Buckling {
  const { freedoms, stiffness, factor, analysis } = prepared;
  const geometric = frameGeometric(prepared, axial);
  const { pairs, sturm } = lowestLoadFactors(stiffness, geometric, analysis, factor, wanted);
  return {
    factors: pairs.map((p) => p.lambda),
    shapes: pairs.map((p) => scaled(spread(freedoms, p.vector))),
    sturm,
  };
}

/** Whether the frame buckles below lambda times these axial forces. */
export const bucklesBelow = (prepared: StiffFrame, axial: ArrayLike<number>, lambda: number): boolean =>
  hasFactorBelow(prepared.stiffness, frameGeometric(prepared, axial), prepared.analysis, lambda);

/** Geometric stiffness of each prepared frame as a sum over its members: made once, summed for each set of forces. */
const sums = new WeakMap<StiffFrame, (axial: ArrayLike<number>) => SparseMatrix>();

/** Kg of a prepared frame under these axial forces, on the pattern of its stiffness. */
export function frameGeometric(prepared: StiffFrame, axial: ArrayLike<number>): SparseMatrix {
  let sum = sums.get(prepared);
  if (!sum) {
    const { frame, freedoms, stiffness } = prepared;
    sum = frameSum(frame, freedoms, stiffness, (e) =>
      toGlobal(frame.members[e], geometricStiffness(frame.members[e], 1)),
    );
    sums.set(prepared, sum);
  }
  return sum(axial);
}

/** Largest displacement (not rotation) at 1. */
function scaled(v: Float64Array): Float64Array {
  let most = 0;
  for (let i = 0; i < v.length; i++) if (i % 6 < 3 && Math.abs(v[i]) > Math.abs(most)) most = v[i];
  return most === 0 ? v : v.map((x) => x / most + 0);
}
