import { type FrameMember, memberLength } from './member.js';

/** What one member carries along its length, in its local axes. */
export interface MemberLoad {
  /** N/mm along local x, y, z, over the whole length from node to node. */
  readonly line: readonly [number, number, number];
  /** Elongation that the member would take if it were free, mm. */
  readonly freeElongation: number;
}

/** Flexibility at the second node with the first one held: N, T and the two planes of bending, [force force, force moment, moment moment]. */
interface Flexibility {
  readonly axial: number;
  readonly torsion: number;
  readonly planeY: readonly [number, number, number];
  readonly planeZ: readonly [number, number, number];
}

/**
 * Stiffness of a member, 12 x 12 by rows in local axes (ux uy uz rx ry rz at each node). Built from the flexibility of
 * the chain as a cantilever, so that zones and springs of any stiffness are exact; shear strain is left out
 * (McGuire, Gallagher and Ziemian, Matrix Structural Analysis, 2nd ed. 2000, sections 4.4 and 13.2).
 */
export function chainStiffness(m: FrameMember): Float64Array {
  const k22 = inverse(flexibility(m));
  const l = memberLength(m);
  const k = new Float64Array(144);
  // End forces at 1 balance those at 2: F1 = -F2, M1 = -(M2 + L x cross F2).
  for (let c = 0; c < 6; c++) {
    const q2 = [0, 1, 2, 3, 4, 5].map((r) => k22[6 * r + c]);
    const q1 = balance(q2, l);
    for (let r = 0; r < 6; r++) {
      k[12 * (6 + r) + 6 + c] = q2[r];
      k[12 * r + 6 + c] = q1[r];
      k[12 * (6 + c) + r] = q1[r];
    }
  }
  for (let c = 0; c < 6; c++) {
    const q2 = [0, 1, 2, 3, 4, 5].map((r) => k[12 * (6 + r) + c]);
    const q1 = balance(q2, l);
    for (let r = 0; r < 6; r++) k[12 * r + c] = q1[r];
  }
  return k;
}

/** Forces of the nodes on a member whose nodes are both held, under its own load: 12 numbers in local axes. */
export function fixedEndForces(m: FrameMember, load: MemberLoad): Float64Array {
  const [wx, wy, wz] = load.line;
  const l = memberLength(m);
  const free = [load.freeElongation, 0, 0, 0, 0, 0];
  walk(m, (a1, a2, s) => {
    const [d2, d3, d4] = [2, 3, 4].map((p) => a1 ** p - a2 ** p);
    free[0] += (wx * d2) / (2 * s.axial);
    free[1] += (wy * d4) / (8 * s.bendingZ);
    free[5] += (wy * d3) / (6 * s.bendingZ);
    free[2] += (wz * d4) / (8 * s.bendingY);
    free[4] -= (wz * d3) / (6 * s.bendingY);
  });
  for (const spring of m.springs) {
    const a = l - spring.at;
    free[1] += (wy * a ** 3) / (2 * spring.stiffness);
    free[5] += (wy * a ** 2) / (2 * spring.stiffness);
    free[2] += (wz * a ** 3) / (2 * spring.stiffness);
    free[4] -= (wz * a ** 2) / (2 * spring.stiffness);
  }
  const k22 = inverse(flexibility(m));
  const q2 = [0, 1, 2, 3, 4, 5].map((r) => -free.reduce((sum, d, c) => sum + k22[6 * r + c] * d, 0));
  const q1 = balance(q2, l);
  q1[0] -= wx * l;
  q1[1] -= wy * l;
  q1[2] -= wz * l;
  q1[4] += (wz * l * l) / 2;
  q1[5] -= (wy * l * l) / 2;
  return Float64Array.from([...q1, ...q2]);
}

/** Forces at node 1 that balance forces q at node 2, a length l along x away. */
function balance(q: readonly number[], l: number): number[] {
  return [-q[0], -q[1], -q[2], -q[3], -(q[4] - l * q[2]), -(q[5] + l * q[1])];
}

/** Each segment with the distances of its near and far ends from the second node. */
function walk(m: FrameMember, visit: (a1: number, a2: number, s: FrameMember['segments'][number]) => void): void {
  let a = memberLength(m);
  for (const s of m.segments) {
    visit(a, Math.max(0, a - s.length), s);
    a -= s.length;
  }
}

function flexibility(m: FrameMember): Flexibility {
  let [axial, torsion] = [0, 0];
  const planeY = [0, 0, 0];
  const planeZ = [0, 0, 0];
  const l = memberLength(m);
  walk(m, (a1, a2, s) => {
    axial += s.length / s.axial;
    torsion += s.length / s.torsion;
    const [d2, d3] = [(a1 ** 2 - a2 ** 2) / 2, (a1 ** 3 - a2 ** 3) / 3];
    planeY[0] += d3 / s.bendingZ;
    planeY[1] += d2 / s.bendingZ;
    planeY[2] += s.length / s.bendingZ;
    planeZ[0] += d3 / s.bendingY;
    planeZ[1] -= d2 / s.bendingY;
    planeZ[2] += s.length / s.bendingY;
  });
  for (const spring of m.springs) {
    const a = l - spring.at;
    for (const [plane, sign] of [
      [planeY, 1],
      [planeZ, -1],
    ] as const) {
      plane[0] += a ** 2 / spring.stiffness;
      plane[1] += (sign * a) / spring.stiffness;
      plane[2] += 1 / spring.stiffness;
    }
  }
  return { axial, torsion, planeY: [planeY[0], planeY[1], planeY[2]], planeZ: [planeZ[0], planeZ[1], planeZ[2]] };
}

/** 6 x 6 stiffness at the second node: ux; (uy, rz); (uz, ry); rx. */
function inverse(f: Flexibility): Float64Array {
  const k = new Float64Array(36);
  k[0] = 1 / f.axial;
  k[6 * 3 + 3] = 1 / f.torsion;
  for (const [plane, u, r] of [
    [f.planeY, 1, 5],
    [f.planeZ, 2, 4],
  ] as const) {
    const det = plane[0] * plane[2] - plane[1] ** 2;
    k[6 * u + u] = plane[2] / det;
    k[6 * r + r] = plane[0] / det;
    k[6 * u + r] = -plane[1] / det;
    k[6 * r + u] = -plane[1] / det;
  }
  return k;
}
