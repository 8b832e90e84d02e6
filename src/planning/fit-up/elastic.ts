import { analyse } from '../../maths/sparse/analyse.js';
import { factorise } from '../../maths/sparse/factorise.js';
import { backSolve } from '../../maths/sparse/solve.js';
import { dot, type Vec3 } from '../../maths/vec3.js';
import { blockPoints, gather, numberFreedoms, spread } from '../../statics/freedoms.js';
import { barDirections, type PinFigure } from '../../statics/pin-figure.js';
import { pinStiffness } from '../../statics/pin-truss.js';
import { rigidMotions } from '../../statics/rigid-body.js';

/** Stiffness square to each strut as a share of its own, so that what only the hubs hold does not float: far too little to carry. */
const ACROSS = 1e-6;

/** Where errors of length go: displacements, three a node, and the forces that are locked in, N. */
export interface Settled {
  readonly displacements: Float64Array;
  readonly forces: Float64Array;
}

/**
 * The least-energy shape of a figure whose bars are too long by e: K d = A k e, t = k (A' d - e), for many e at once.
 * `k`: EA / L, N/mm. A figure that nothing holds is held at as many freedoms as it has rigid motions, which locks nothing in.
 */
export function settleErrors(figure: PinFigure, k: Float64Array, errors: readonly Float64Array[]): readonly Settled[] {
  const held: PinFigure = { ...figure, fixed: holdRigid(figure) };
  const freedoms = numberFreedoms(held.fixed, 3);
  const { units } = barDirections(held);
  const stiffness = pinStiffness(
    held,
    freedoms,
    k,
    units,
    k.map((v) => v * ACROSS),
  );
  const factor = factorise(
    analyse(stiffness, { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, held.nodes) }),
    stiffness,
  );
  if (factor.state !== 'factorised') return [];
  const right = errors.map((e) => {
    const f = new Float64Array(held.nodes.length);
    for (let b = 0; b < k.length; b++)
      for (let c = 0; c < 3; c++) {
        const push = k[b]! * e[b]! * units[3 * b + c]!;
        f[3 * held.ends[2 * b]! + c]! -= push;
        f[3 * held.ends[2 * b + 1]! + c]! += push;
      }
    return gather(freedoms, f);
  });
  return backSolve(factor, right).map((x, i): Settled => {
    const displacements = spread(freedoms, x);
    const forces = Float64Array.from(k, (stiff, b) => {
      const [p, q] = [3 * held.ends[2 * b]!, 3 * held.ends[2 * b + 1]!];
      const d: Vec3 = [0, 1, 2].map((c) => displacements[q + c]! - displacements[p + c]!) as unknown as Vec3;
      const along = dot(d, [units[3 * b]!, units[3 * b + 1]!, units[3 * b + 2]!]);
      return stiff * (along - errors[i]![b]!);
    });
    return { displacements, forces };
  });
}

/** The figure's holds and one more freedom for each rigid motion left, chosen by elimination with pivoting. */
function holdRigid(figure: PinFigure): Uint8Array {
  const fixed = figure.fixed.slice();
  const motions = rigidMotions(figure).map((v) => v.slice());
  motions.forEach((motion, m) => {
    let row = 0;
    for (let f = 0; f < motion.length; f++) if (Math.abs(motion[f]!) > Math.abs(motion[row]!)) row = f;
    fixed[row] = 1;
    for (const other of motions.slice(m + 1)) {
      const share = other[row]! / motion[row]!;
      for (let f = 0; f < other.length; f++) other[f]! -= share * motion[f]!;
    }
  });
  return fixed;
}
