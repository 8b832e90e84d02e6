import { type FrameMember, memberLength } from './member.js';

/** Gauss's points and weights on 0 to 1, three: products of slopes have degree 4, which they integrate exactly. */
const GAUSS = [
  [0.5 - Math.sqrt(0.15), 5 / 18],
  [0.5, 4 / 9],
  [0.5 + Math.sqrt(0.15), 5 / 18],
] as const;

/**
 * Integral of v'i v'j over a chain of segments and springs, v'i the slope of its axis under a unit of the i-th of (deflection,
 * rotation) at its first and (deflection, rotation) at its second node, nothing else loading it: 4 x 4, mm⁻¹, 1 and mm.
 *
 * From node 2 back, at a distance a: moment M + F a, curvature of that over E I, a kink of that over a spring's stiffness (virtual
 * work on a cantilever, as in the chain's stiffness). Published checks: the consistent matrix of an even bar, and that of a bar with a pin.
 *
 * @param sense 1 where a positive rotation tilts the axis towards positive deflection (uy, rz), -1 where it runs the other way (uz, ry)
 */
export function slopeProducts(m: FrameMember, bending: 'bendingY' | 'bendingZ', sense: 1 | -1): number[][] {
  const l = memberLength(m);
  // From node 2: stretches with their flexibility, and kinks between them.
  let a = l;
  const stretches = m.segments.map((s) => {
    const far = a;
    a -= s.length;
    return { near: Math.max(0, a), far, give: 1 / s[bending] };
  });
  const kinks = m.springs.map((s) => ({ at: Math.max(0, l - s.at), give: 1 / s.stiffness }));
  // Turn of node 2 against the first, and its deflection, by F and M.
  let [ff, fm, mm] = [0, 0, 0];
  for (const { near, far, give } of stretches) {
    ff += (give * (far ** 3 - near ** 3)) / 3;
    fm += (give * (far ** 2 - near ** 2)) / 2;
    mm += give * (far - near);
  }
  for (const { at, give } of kinks) {
    ff += give * at ** 2;
    fm += give * at;
    mm += give;
  }
  const det = ff * mm - fm ** 2;
  // What node 2 deflects and turns against the first node held in its own axes, and how far it is turned in all.
  const cases = [
    [-1, 0, 0],
    [-l, -1, 0],
    [1, 0, 0],
    [0, 1, 1],
  ].map(([v, turn, end]) => ({
    force: (mm * v - fm * turn) / det,
    moment: (ff * turn - fm * v) / det,
    end,
  }));
  /** Turn between node 2 and a point at a distance x from it. */
  const turned = (x: number, force: number, moment: number): number => {
    let sum = 0;
    for (const { near, far, give } of stretches) {
      const to = Math.min(x, far);
      if (to > near) sum += give * (moment * (to - near) + (force * (to ** 2 - near ** 2)) / 2);
    }
    for (const { at, give } of kinks) if (at < x) sum += give * (moment + force * at);
    return sum;
  };
  const out = cases.map(() => cases.map(() => 0));
  const cuts = [...new Set([0, l, ...stretches.map((s) => s.near), ...kinks.map((k) => Math.min(l, k.at))])].sort(
    (p, q) => p - q,
  );
  for (let c = 0; c + 1 < cuts.length; c++) {
    const width = cuts[c + 1] - cuts[c];
    for (const [share, weight] of GAUSS) {
      const slopes = cases.map(({ force, moment, end }) => end - turned(cuts[c] + share * width, force, moment));
      for (let i = 0; i < 4; i++) for (let j = 0; j < 4; j++) out[i][j] += weight * width * slopes[i] * slopes[j];
    }
  }
  // A rotation of the other sense counts negative.
  return out.map((row, i) => row.map((v, j) => ((i + j) % 2 === 1 ? sense * v : v)));
}
