import { describe, expect, it } from 'vitest';
import { cross, normalise, perpendicular, type Vec3 } from '../../src/maths/vec3.js';
import { bucklingFactors } from '../../src/statics/frame/frame-buckling.js';
import type { Frame, FrameMember } from '../../src/statics/frame/member.js';
import { solveSecondOrder } from '../../src/statics/frame/second-order.js';
import { prepareFrame, solveFrame } from '../../src/statics/frame/solve-frame.js';
import { subdivide } from '../../src/statics/frame/subdivide.js';
import { anyRotation, type Rotation, turned, turnedBack, turnedHeld } from './motions.js';
import { holdEverywhere, type PublishedCheck, UNIT_SYSTEMS, type UnitSystem } from './unit-systems.js';

const ID: Rotation = [1, 0, 0, 0, 1, 0, 0, 0, 1];
/** An invented round bar, N mm², N, N mm². */
const EI = 2.1e9;
const EA = 4.2e6;
const GJ = 1.6e9;
const ALL = [0, 1, 2, 3, 4, 5];

interface Figure {
  readonly points: readonly Vec3[];
  readonly bars: readonly (readonly [number, number])[];
  readonly held: (node: number) => readonly number[];
  /** Segments and springs in mm and N; absent: one segment of the bar above. */
  readonly shape?: (length: number) => Pick<FrameMember, 'segments' | 'springs'>;
  /** The section turned about the bar, rad: loads then have parts along both its axes. */
  readonly roll?: number;
}

/** The figure, made in mm and N, in a system of units and turned. */
function frameOf({ points, bars, held, shape, roll = 0 }: Figure, s: UnitSystem, r: Rotation): Frame {
  const fixed = new Uint8Array(6 * points.length);
  points.forEach((_, i) => {
    for (const k of held(i)) fixed[6 * i + k] = 1;
  });
  const [ei, ea] = [s.newton * s.mm ** 2, s.newton];
  const vec = (v: ArrayLike<number>): Vec3 => [v[0], v[1], v[2]];
  const members = bars.map(([a, b]): FrameMember => {
    const d = vec([0, 1, 2].map((k) => points[b][k] - points[a][k]));
    const length = Math.hypot(...d);
    const made = shape?.(length) ?? {
      segments: [{ length, axial: EA, bendingY: EI, bendingZ: EI, torsion: GJ }],
      springs: [],
    };
    const x0 = normalise(d);
    const y1 = perpendicular(x0);
    const z1 = cross(x0, y1);
    const y0 = [0, 1, 2].map((k) => Math.cos(roll) * y1[k] + Math.sin(roll) * z1[k]);
    const [x, y] = [x0, y0].map((v) => vec(turned(r, v)));
    return {
      ends: [a, b],
      axes: { x, y, z: cross(x, y) },
      segments: made.segments.map((g) => ({
        length: g.length * s.mm,
        axial: g.axial * ea,
        bendingY: g.bendingY * ei,
        bendingZ: g.bendingZ * ei,
        torsion: g.torsion * ei,
      })),
      springs: made.springs.map((k) => ({ at: k.at * s.mm, stiffness: k.stiffness * s.newton * s.mm })),
    };
  });
  return { nodes: turned(r, points.flat(), s.mm), members, fixed: turnedHeld(r, fixed) };
}

function stiff(f: Frame) {
  const p = prepareFrame(f);
  if (p.state !== 'stiff') throw new Error(`mechanism at ${p.node}`);
  return p;
}

/** Six freedoms a node of forces in N on some nodes, turned and in the system's units. */
function forces(size: number, s: UnitSystem, r: Rotation, at: Readonly<Record<number, Vec3>>): Float64Array {
  const out = new Float64Array(size);
  for (const [i, v] of Object.entries(at)) out.set(turned(r, v, s.newton), 6 * Number(i));
  return out;
}
const along = (v: ArrayLike<number>, d: Vec3): number => v[0] * d[0] + v[1] * d[1] + v[2] * d[2];

/** An inclined cantilever under 50 N square to its axis. */
function cantilever(s: UnitSystem, r: Rotation) {
  const points: Vec3[] = [
    [0, 0, 0],
    [600, 0, 800],
  ];
  const f = frameOf({ points, bars: [[0, 1]], held: (i) => (i === 0 ? ALL : []) }, s, r);
  const square: Vec3 = [0.8, 0, -0.6];
  const [result] = solveFrame(stiff(f), [{ nodal: forces(12, s, r, { 1: [40, 0, -30] }) }]);
  expect(result.residual).toBeLessThan(1e-14);
  return { tip: along(turnedBack(r, result.displacements.subarray(6, 9)), square), result };
}

/** A beam of 2 m built in at both ends, in two members, under 0.3 N/mm down. */
function fixedBeam(s: UnitSystem, r: Rotation, roll = 0.6) {
  const points: Vec3[] = [
    [0, 0, 0],
    [1000, 0, 0],
    [2000, 0, 0],
  ];
  const bars = [
    [0, 1],
    [1, 2],
  ] as const;
  const f = frameOf({ points, bars, held: (i) => (i === 1 ? [] : ALL), roll }, s, r);
  const down = turned(r, [0, 0, (-0.3 * s.newton) / s.mm]);
  const { x, y, z } = f.members[0].axes;
  const line: [number, number, number] = [along(down, x), along(down, y), along(down, z)];
  const members = new Map([0, 1].map((e) => [e, { line, freeElongation: 0 }]));
  const [result] = solveFrame(stiff(f), [{ nodal: new Float64Array(18), members }]);
  return { sag: -turnedBack(r, result.displacements.subarray(6, 9))[2], q: result.endForces };
}

/** A portal 3 m high, 4 m wide, fixed feet, 100 N along the beam, axial strain as good as none. */
function portal(s: UnitSystem, r: Rotation) {
  const points: Vec3[] = [
    [0, 0, 0],
    [0, 0, 3000],
    [4000, 0, 3000],
    [4000, 0, 0],
  ];
  const shape = (length: number) => ({
    segments: [{ length, axial: 1e6 * EA, bendingY: EI, bendingZ: EI, torsion: GJ }],
    springs: [],
  });
  const bars = [
    [0, 1],
    [1, 2],
    [3, 2],
  ] as const;
  const f = frameOf({ points, bars, held: (i) => (i === 0 || i === 3 ? ALL : []), shape }, s, r);
  const nodal = forces(24, s, r, { 1: [50, 0, 0], 2: [50, 0, 0] });
  return solveFrame(stiff(f), [{ nodal }])[0].endForces;
}
const bendingAt = (q: Float64Array, at: number): number => Math.hypot(q[at + 4], q[at + 5]);

/** A cantilever of 1 m whose first 100 mm are four times as stiff and end in a spring, in one element or in four; 20 N at the tip. */
function zoned(parts: number): PublishedCheck['value'] {
  return (s, r) => {
    const points: Vec3[] = [
      [0, 0, 0],
      [1000, 0, 0],
    ];
    const shape = () => ({
      segments: [
        { length: 100, axial: EA, bendingY: 4 * EI, bendingZ: 4 * EI, torsion: GJ },
        { length: 900, axial: EA, bendingY: EI, bendingZ: EI, torsion: GJ },
      ],
      springs: [{ at: 100, stiffness: 5e6 }],
    });
    const whole = frameOf({ points, bars: [[0, 1]], held: (i) => (i === 0 ? ALL : []), shape, roll: 0.4 }, s, r);
    const { frame } = subdivide(whole, parts);
    const [result] = solveFrame(stiff(frame), [{ nodal: forces(frame.fixed.length, s, r, { 1: [0, 0, -20] }) }]);
    return -turnedBack(r, result.displacements.subarray(6, 9))[2];
  };
}
/** The same bar loaded along its whole length by `line` N/mm in the drawing's axes; what its free end does, in the drawing's axes. */
function lineLoaded(
  line: Vec3,
  spring: boolean,
  roll: number,
  s: UnitSystem,
  r: Rotation,
): { u: Float64Array; turn: Float64Array } {
  const points: Vec3[] = [
    [0, 0, 0],
    [1000, 0, 0],
  ];
  const shape = () => ({
    segments: [
      { length: 100, axial: 2 * EA, bendingY: 4 * EI, bendingZ: 4 * EI, torsion: GJ },
      { length: 900, axial: EA, bendingY: EI, bendingZ: EI, torsion: GJ },
    ],
    springs: spring ? [{ at: 100, stiffness: 5e6 }] : [],
  });
  const f = frameOf({ points, bars: [[0, 1]], held: (i) => (i === 0 ? ALL : []), shape, roll }, s, r);
  const w = turned(r, line, s.newton / s.mm);
  const { x, y, z } = f.members[0].axes;
  const local: [number, number, number] = [along(w, x), along(w, y), along(w, z)];
  const members = new Map([[0, { line: local, freeElongation: 0 }]]);
  const [result] = solveFrame(stiff(f), [{ nodal: new Float64Array(12), members }]);
  return {
    u: turnedBack(r, result.displacements.subarray(6, 9)),
    turn: turnedBack(r, result.displacements.subarray(9, 12)),
  };
}
const bend = (from: number, to: number, ei: number): number => (to ** 3 - from ** 3) / (3 * ei);

/** A shaft of 800 mm turned by 700 N mm at its free end. */
const twist: PublishedCheck['value'] = (s, r) => {
  const points: Vec3[] = [
    [0, 0, 0],
    [480, 0, 640],
  ];
  const f = frameOf({ points, bars: [[0, 1]], held: (i) => (i === 0 ? ALL : []) }, s, r);
  const nodal = new Float64Array(12);
  nodal.set(turned(r, [0.6, 0, 0.8], 700 * s.newton * s.mm), 9);
  const [result] = solveFrame(stiff(f), [{ nodal }]);
  return along(turnedBack(r, result.displacements.subarray(9, 12)), [0.6, 0, 0.8]);
};

// Any handbook of beams for cantilever, shaft and beam. Portal: Kleinlogel, Rigid Frame Formulas, frame with fixed feet, force at the
// beam, k = (I2/I1)(h/l), axial strain left out (from memory): foot P h (3k + 1) / (2 (6k + 1)), corner P h 3k / (2 (6k + 1)).
const K = 3000 / 4000;
holdEverywhere('first-order frames of the handbooks', [
  {
    name: 'an inclined cantilever sinks P L³ / 3EI square to its axis',
    wanted: (50 * 1000 ** 3) / (3 * EI),
    dimension: 'length',
    within: 1e-10,
    turns: 'any',
    value: (s, r) => cantilever(s, r).tip,
  },
  {
    name: 'its foot holds P L',
    wanted: 50 * 1000,
    dimension: 'moment',
    within: 1e-10,
    turns: 'any',
    value: (s, r) => Math.hypot(...cantilever(s, r).result.reactions.subarray(3, 6)),
  },
  {
    name: 'a shaft turns by T L / GJ',
    wanted: (700 * 800) / GJ,
    dimension: 'number',
    within: 1e-10,
    turns: 'any',
    value: twist,
  },
  {
    name: 'a beam built in at both ends sags w L⁴ / 384EI',
    wanted: (0.3 * 2000 ** 4) / (384 * EI),
    dimension: 'length',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => fixedBeam(s, r).sag,
  },
  {
    name: 'with w L² / 12 at its ends',
    wanted: (0.3 * 2000 ** 2) / 12,
    dimension: 'moment',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => bendingAt(fixedBeam(s, r).q, 0),
  },
  {
    name: 'and w L² / 24 in its middle',
    wanted: (0.3 * 2000 ** 2) / 24,
    dimension: 'moment',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => bendingAt(fixedBeam(s, r).q, 6),
  },
  {
    name: 'a portal with fixed feet under a sway force, moment at the foot',
    wanted: (100 * 3000 * (3 * K + 1)) / (2 * (6 * K + 1)),
    dimension: 'moment',
    within: 1e-5,
    turns: 'any',
    value: (s, r) => bendingAt(portal(s, r), 0),
  },
  {
    name: 'the same, moment at the corner',
    wanted: (100 * 3000 * 3 * K) / (2 * (6 * K + 1)),
    dimension: 'moment',
    within: 1e-5,
    turns: 'any',
    value: (s, r) => bendingAt(portal(s, r), 6),
  },
  {
    name: 'a hanging bar of two stiffnesses under 2 N/mm along it: ∫ w s ds / EA, by hand',
    wanted: (2 * 900 ** 2) / (2 * EA) + (2 * (1000 ** 2 - 900 ** 2)) / (2 * 2 * EA),
    dimension: 'length',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => lineLoaded([2, 0, 0], true, 0, s, r).u[0],
  },
  {
    name: 'a zoned cantilever with a spring under 0.3 N/mm, section rolled: ∫ w s³/2EI ds + w l³/2k, by hand',
    wanted: (0.3 * 900 ** 4) / (8 * EI) + (0.3 * (1000 ** 4 - 900 ** 4)) / (8 * 4 * EI) + (0.3 * 900 ** 3) / (2 * 5e6),
    dimension: 'length',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => -lineLoaded([0, 0, -0.3], true, 0.6, s, r).u[2],
  },
  {
    name: 'and its tip turns by ∫ w s²/2EI ds + w l²/2k',
    wanted: (0.3 * 900 ** 3) / (6 * EI) + (0.3 * (1000 ** 3 - 900 ** 3)) / (6 * 4 * EI) + (0.3 * 900 ** 2) / (2 * 5e6),
    dimension: 'number',
    within: 1e-9,
    turns: 'any',
    value: (s, r) => lineLoaded([0, 0, -0.3], true, 0.6, s, r).turn[1],
  },
  ...[1, 4].map(
    (parts): PublishedCheck => ({
      name: `a cantilever with a stiff zone and a spring in ${parts} elements: tip = P (l³/3EI + zone + l²/k), by hand`,
      wanted: 20 * (bend(0, 900, EI) + bend(900, 1000, 4 * EI) + 900 ** 2 / 5e6),
      dimension: 'length',
      within: 1e-9,
      turns: 'any',
      value: zoned(parts),
    }),
  ),
]);

/** A strut of 1 m along z cut into elements; supports along the axes. */
function strut(
  parts: number,
  bottom: readonly number[],
  top: readonly number[],
  s: UnitSystem,
  r: Rotation,
  shape?: Figure['shape'],
) {
  const points: Vec3[] = [
    [0, 0, 0],
    [0, 0, 1000],
  ];
  const one = { points, bars: [[0, 1]] as const, held: (i: number) => (i === 0 ? bottom : top) };
  return subdivide(frameOf(shape ? { ...one, shape } : one, s, r), parts).frame;
}
const PIN = [0, 1, 2, 5];
const ROLLER = [0, 1];

/** Lowest load factor under a force of 1 N all along. */
const lowest =
  (parts: number, bottom: readonly number[], top: readonly number[], which = 0): PublishedCheck['value'] =>
  (s, r) => {
    const f = strut(parts, bottom, top, s, r);
    const b = bucklingFactors(stiff(f), new Float64Array(parts).fill(-1), 2);
    expect(b.sturm).toBe('agrees');
    return b.factors[which];
  };

// Timoshenko and Gere, Theory of Elastic Stability, 2nd ed. 1961, section 2.1 for the exact loads; the figures of coarse meshes follow
// from the consistent matrices and can be checked by hand for one element. Both planes bend alike: every root is double.
const CRITICAL: readonly (readonly [string, readonly number[], readonly number[], number, number, number])[] = [
  ['pin-pin, 1 element', PIN, ROLLER, 1, 12, 1e-7],
  ['pin-pin, 2 elements', PIN, ROLLER, 2, 9.94385, 1e-6],
  ['pin-pin, 4 elements', PIN, ROLLER, 4, 9.87466, 1e-6],
  ['cantilever, 1 element', ALL, [], 1, 2.48596, 2e-6],
  ['cantilever, 8 elements, π²/4', ALL, [], 8, Math.PI ** 2 / 4, 1e-5],
  ['fixed-pinned, 1 element', ALL, ROLLER, 1, 30, 1e-7],
  ['fixed-pinned, 2 elements', ALL, ROLLER, 2, 20.7088, 5e-6],
  ['fixed-pinned, 8 elements, 20.1907', ALL, ROLLER, 8, 20.1907, 1e-3],
  ['fixed-fixed, 2 elements', ALL, [0, 1, 3, 4, 5], 2, 40, 1e-7],
  ['fixed-fixed, 8 elements, 4π²', ALL, [0, 1, 3, 4, 5], 8, 4 * Math.PI ** 2, 1e-3],
  ['an Euler column in 8 elements, within 0.1 % of π²', PIN, ROLLER, 8, Math.PI ** 2, 1e-3],
];
holdEverywhere(
  'buckling loads x L² / EI of a strut in elements',
  CRITICAL.flatMap(([name, bottom, top, parts, wanted, within]): PublishedCheck[] => {
    const check = { wanted: (wanted * EI) / 1000 ** 2, dimension: 'force' as const, within };
    const turns = top.length === 0 ? ('any' as const) : ('quarter' as const);
    // The factor is a number on a force of 1: in any system that force is one unit of it.
    const at = (which: number) => lowest(parts, bottom, top, which);
    return [
      { name, ...check, turns, value: at(0) },
      { name: `${name}, second plane`, ...check, turns, value: at(1) },
    ];
  }),
);

/** A strut of e0 = 2.5 mm initial bow under 0.6 of its critical force, in 8 elements; its rounds begin with a share of that force. */
function bowed(s: UnitSystem, r: Rotation, share = 1) {
  const [l, parts, e0] = [1000, 8, 2.5];
  const f = strut(parts, PIN, ROLLER, s, r);
  const critical = (Math.PI ** 2 * EI) / l ** 2;
  const p = 0.6 * critical;
  const nodal = forces(f.fixed.length, s, r, { 1: [0, 0, -p] });
  const bow = new Float64Array(nodal.length);
  const heights = Array.from({ length: parts + 1 }, (_, i) => turnedBack(r, f.nodes.subarray(3 * i, 3 * i + 3))[2]);
  heights.forEach((h, i) => {
    const z = h / s.mm;
    bow.set(turned(r, [e0 * Math.sin((Math.PI * z) / l), 0, 0], s.mm), 6 * i);
    bow.set(turned(r, [0, ((e0 * Math.PI) / l) * Math.cos((Math.PI * z) / l), 0]), 6 * i + 3);
  });
  const result = solveSecondOrder(stiff(f), { nodal }, new Float64Array(parts).fill(-share * p * s.newton), bow);
  if (result.state !== 'stands') throw new Error(result.state);
  expect(result.residual).toBeLessThan(1e-13);
  const middle = heights.findIndex((h) => Math.abs(h / s.mm - l / 2) < 1e-6);
  const more = turnedBack(r, result.displacements.subarray(6 * middle, 6 * middle + 3))[0];
  // Neighbours hand the same moment on, initial bow and all: within each element Kg acts on the whole bent line.
  const largest = Math.max(...f.members.map((_, e) => bendingAt(result.endForces, 12 * e + 6)));
  for (let e = 1; e < parts; e++)
    for (const k of [4, 5])
      expect(Math.abs(result.endForces[12 * (e - 1) + 6 + k] + result.endForces[12 * e + k]) / largest).toBeLessThan(
        1e-6,
      );
  const moment = Math.max(...f.members.map((_, e) => bendingAt(result.endForces, 12 * e + 6)));
  return { more, moment };
}
const GROWN = 2.5 / (1 / 0.6 - 1);
holdEverywhere('an imperfect pin-ended strut under 0.6 Pcr (Timoshenko and Gere 1961, section 1.10)', [
  {
    name: 'bows by e0 / (Pcr / P - 1) more',
    wanted: GROWN,
    dimension: 'length',
    within: 5e-4,
    turns: 'quarter',
    value: (s, r) => bowed(s, r).more,
  },
  {
    name: 'with P (e0 + bow) at its middle',
    wanted: ((0.6 * Math.PI ** 2 * EI) / 1000 ** 2) * (2.5 + GROWN),
    dimension: 'moment',
    within: 5e-3,
    turns: 'quarter',
    value: (s, r) => bowed(s, r).moment,
  },
  // The axial forces are those of the bent frame, not those that it was handed.
  {
    name: 'bows as far when the rounds begin without any axial force',
    wanted: GROWN,
    dimension: 'length',
    within: 5e-4,
    turns: 'quarter',
    value: (s, r) => bowed(s, r, 0).more,
  },
  {
    name: 'with the same moment when they begin with half of it',
    wanted: ((0.6 * Math.PI ** 2 * EI) / 1000 ** 2) * (2.5 + GROWN),
    dimension: 'moment',
    within: 5e-3,
    turns: 'quarter',
    value: (s, r) => bowed(s, r, 0.5).moment,
  },
]);

describe.each(UNIT_SYSTEMS)('states of a frame, in $name', (s) => {
  it('names a node of a frame that nothing holds, or one end alone', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [300, 200, 100],
      [500, -100, 300],
    ];
    const bars = [
      [0, 1],
      [1, 2],
    ] as const;
    expect(prepareFrame(frameOf({ points, bars, held: () => [] }, s, ID)).state).toBe('mechanism');
    const oneEnd = { points, bars, held: (i: number) => (i === 0 ? [0, 1, 2] : []) };
    expect(prepareFrame(frameOf(oneEnd, s, anyRotation(5))).state).toBe('mechanism');
  });

  it('a strut above its critical load buckles, in any axes', () => {
    for (const r of [ID, anyRotation(4)]) {
      const f = strut(4, ALL, [], s, r);
      const p = (1.02 * Math.PI ** 2 * EI) / 4e6;
      const nodal = forces(f.fixed.length, s, r, { 1: [0, 0, -p] });
      const axial = new Float64Array(4).fill(-p * s.newton);
      expect(solveSecondOrder(stiff(f), { nodal }, axial, new Float64Array(nodal.length)).state).toBe('buckles');
    }
  });

  it('a column in tension has no factor', () => {
    const f = strut(4, ALL, [], s, anyRotation(6));
    expect(bucklingFactors(stiff(f), new Float64Array(4).fill(1)).factors).toEqual([]);
  });
});
