import { analyse } from '../maths/sparse/analyse.js';
import { factorise } from '../maths/sparse/factorise.js';
import type { Buckling } from './frame/frame-buckling.js';
import { blockPoints, numberFreedoms, spread } from './freedoms.js';
import { hasFactorBelow, lowestLoadFactors } from './load-factors.js';
import { barDirections } from './pin-figure.js';
import { type PinTruss, pinStiffness } from './pin-truss.js';

/**
 * Lowest load factors of a pinned truss whose struts stay straight: (K + lambda Kg) x = 0 with Kg of each bar t/L square to it.
 * Struts that buckle between their nodes are checked one by one elsewhere. Three displacements a node in the shapes.
 */
export function pinBuckling(truss: PinTruss, axial: ArrayLike<number>, wanted = 4): Buckling {
  const { freedoms, k, kg, analysis } = matrices(truss, axial);
  const { pairs, sturm } = lowestLoadFactors(k, kg, analysis, factorise(analysis, k), wanted);
  return {
    factors: pairs.map((p) => p.lambda),
    shapes: pairs.map((p) => {
      const v = spread(freedoms, p.vector);
      const most = v.reduce((a, b) => (Math.abs(b) > Math.abs(a) ? b : a), 0);
      return most === 0 ? v : v.map((x) => x / most + 0);
    }),
    sturm,
  };
}

/** Whether the pinned truss buckles below lambda times these axial forces. */
export function pinBucklesBelow(truss: PinTruss, axial: ArrayLike<number>, lambda: number): boolean {
  const { k, kg, analysis } = matrices(truss, axial);
  return hasFactorBelow(k, kg, analysis, lambda);
}

function matrices(truss: PinTruss, axial: ArrayLike<number>) {
  const freedoms = numberFreedoms(truss.fixed, 3);
  const { lengths, units } = barDirections(truss);
  const perLength = (t: ArrayLike<number>): Float64Array => Float64Array.from(lengths, (l, e) => t[e] / l);
  const before = truss.prestress ? perLength(truss.prestress) : undefined;
  const k = pinStiffness(truss, freedoms, perLength(truss.axialStiffness), units, before);
  const kg = pinStiffness(truss, freedoms, new Float64Array(lengths.length), units, perLength(axial));
  const analysis = analyse(k, { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, truss.nodes) });
  return { freedoms, k, kg, analysis };
}
