import { describe, expect, it } from 'vitest';
import { cross, normalise, perpendicular, type Vec3 } from '../../src/maths/vec3.js';
import { bucklingFactors } from '../../src/statics/frame/frame-buckling.js';
import type { Frame, FrameMember } from '../../src/statics/frame/member.js';
import { solveSecondOrder } from '../../src/statics/frame/second-order.js';
import { prepareFrame, solveFrame } from '../../src/statics/frame/solve-frame.js';
import { subdivide } from '../../src/statics/frame/subdivide.js';
import { anyRotation, turned } from './motions.js';

const ID = [1, 0, 0, 0, 1, 0, 0, 0, 1];
const ROTATIONS = [ID, anyRotation(1), anyRotation(2), anyRotation(3)].map((r, i) => [i, r] as const);
// mm and N, or in and lb: the same numbers must follow from either.
const EI = 2.1e9;
const EA = 4.2e6;
const GJ = 1.6e9;

function member(
  points: readonly Vec3[],
  a: number,
  b: number,
  r: readonly number[],
  more: Partial<FrameMember> = {},
): FrameMember {
  const d = [0, 1, 2].map((k) => points[b][k] - points[a][k]);
  const raw: Vec3 = [d[0], d[1], d[2]];
  const length = Math.hypot(...d);
  const x0 = normalise(raw);
  const y0 = perpendicular(x0);
  const [x, y] = [x0, y0].map((v) => turned(r, v)) as unknown as [Vec3, Vec3];
  return {
    ends: [a, b],
    axes: {
      x: [...x] as unknown as Vec3,
      y: [...y] as unknown as Vec3,
      z: cross([...x] as unknown as Vec3, [...y] as unknown as Vec3),
    },
    segments: [{ length, axial: EA, bendingY: EI, bendingZ: EI, torsion: GJ }],
    springs: [],
    ...more,
  };
}

function frameOf(
  points: readonly Vec3[],
  bars: readonly (readonly [number, number])[],
  held: (node: number) => readonly number[],
  r: readonly number[],
): Frame {
  const fixed = new Uint8Array(6 * points.length);
  points.forEach((_, i) => {
    for (const k of held(i)) fixed[6 * i + k] = 1;
  });
  return { nodes: turned(r, points.flat()), members: bars.map(([a, b]) => member(points, a, b, r)), fixed };
}

function stiff(f: Frame) {
  const p = prepareFrame(f);
  if (p.state !== 'stiff') throw new Error(`mechanism at ${p.node}`);
  return p;
}

const ALL = [0, 1, 2, 3, 4, 5];

describe('first-order frames of the handbooks', () => {
  it.each(ROTATIONS)('an inclined cantilever sinks P L³ / 3EI square to its axis (rotation %i)', (_, r) => {
    const l = 1000;
    const points: Vec3[] = [
      [0, 0, 0],
      [600, 0, 800],
    ];
    const f = frameOf(points, [[0, 1]], (i) => (i === 0 ? ALL : []), r);
    const square: Vec3 = [-0.8, 0, 0.6];
    const nodal = new Float64Array(12);
    nodal.set(
      turned(
        r,
        square.map((v) => -50 * v),
      ),
      6,
    );
    const [s] = solveFrame(stiff(f), [{ nodal }]);
    const tip = turned(r, square).reduce((sum, v, k) => sum + v * s.displacements[6 + k], 0);
    expect(tip / (-(50 * l ** 3) / (3 * EI))).toBeCloseTo(1, 10);
    expect(Math.hypot(...s.reactions.subarray(3, 6))).toBeCloseTo(50 * l, 5);
    expect(s.residual).toBeLessThan(1e-14);
  });

  it.each(ROTATIONS)(
    'a fixed-end beam under a line load: wL²/12 at the ends, wL²/24 and wL⁴/384EI at the middle (rotation %i)',
    (_, r) => {
      const l = 2000;
      const w = 0.3;
      const points: Vec3[] = [
        [0, 0, 0],
        [l / 2, 0, 0],
        [l, 0, 0],
      ];
      const f = frameOf(
        points,
        [
          [0, 1],
          [1, 2],
        ],
        (i) => (i === 1 ? [] : ALL),
        r,
      );
      const axes = f.members[0].axes;
      const down = turned(r, [0, 0, -1]);
      const local = (a: Vec3): number => a.reduce((sum, v, k) => sum + v * down[k], 0) * w;
      const line: [number, number, number] = [local(axes.x), local(axes.y), local(axes.z)];
      const loads = new Map([0, 1].map((e) => [e, { line, freeElongation: 0 }]));
      const [s] = solveFrame(stiff(f), [{ nodal: new Float64Array(18), members: loads }]);
      const sag = down.reduce((sum, v, k) => sum + v * s.displacements[6 + k], 0);
      expect(sag / ((w * l ** 4) / (384 * EI))).toBeCloseTo(1, 9);
      expect(Math.hypot(s.endForces[4], s.endForces[5]) / ((w * l * l) / 12)).toBeCloseTo(1, 9);
      expect(Math.hypot(s.endForces[10], s.endForces[11]) / ((w * l * l) / 24)).toBeCloseTo(1, 9);
    },
  );

  it.each(ROTATIONS)('a portal with fixed feet under a sway force (rotation %i)', (_, r) => {
    // Kleinlogel, Rigid Frame Formulas, frame with fixed feet, horizontal force at the beam, k = (I2/I1)(h/l), axial strain left out
    // (from memory): foot moment P h (3k + 1) / (2 (6k + 1)), corner moment P h 3k / (2 (6k + 1)).
    const [h, l, p] = [3000, 4000, 100];
    const points: Vec3[] = [
      [0, 0, 0],
      [0, 0, h],
      [l, 0, h],
      [l, 0, 0],
    ];
    const f = frameOf(
      points,
      [
        [0, 1],
        [1, 2],
        [3, 2],
      ],
      (i) => (i === 0 || i === 3 ? ALL : []),
      r,
    );
    const rigidAxially = {
      ...f,
      members: f.members.map((m) => ({ ...m, segments: m.segments.map((s) => ({ ...s, axial: 1e6 * EA })) })),
    };
    const nodal = new Float64Array(24);
    nodal.set(turned(r, [p / 2, 0, 0]), 6);
    nodal.set(turned(r, [p / 2, 0, 0]), 12);
    const [s] = solveFrame(stiff(rigidAxially), [{ nodal }]);
    const k = h / l;
    const moment = (e: number, at: number): number =>
      Math.hypot(s.endForces[12 * e + at + 4], s.endForces[12 * e + at + 5]);
    expect(moment(0, 0) / ((p * h * (3 * k + 1)) / (2 * (6 * k + 1)))).toBeCloseTo(1, 5);
    expect(moment(0, 6) / ((p * h * 3 * k) / (2 * (6 * k + 1)))).toBeCloseTo(1, 5);
  });

  it('a cantilever with a stiff zone and a spring: tip = P (l³/3EI + zone + l²/k) (by hand)', () => {
    const [zone, l, k, p] = [100, 900, 5e6, 20];
    const points: Vec3[] = [
      [0, 0, 0],
      [zone + l, 0, 0],
    ];
    const f = frameOf(points, [[0, 1]], (i) => (i === 0 ? ALL : []), ID);
    const m: FrameMember = {
      ...f.members[0],
      segments: [
        { length: zone, axial: EA, bendingY: 4 * EI, bendingZ: 4 * EI, torsion: GJ },
        { length: l, axial: EA, bendingY: EI, bendingZ: EI, torsion: GJ },
      ],
      springs: [{ at: zone, stiffness: k }],
    };
    const nodal = new Float64Array(12);
    nodal[8] = -p;
    const bend = (from: number, to: number, ei: number): number => (to ** 3 - from ** 3) / (3 * ei);
    const wanted = p * (bend(0, l, EI) + bend(l, l + zone, 4 * EI) + l ** 2 / k);
    for (const parts of [1, 4]) {
      const s = subdivide({ ...f, members: [m] }, parts);
      const padded = new Float64Array(s.frame.fixed.length);
      padded.set(nodal);
      const [result] = solveFrame(stiff(s.frame), [{ nodal: padded }]);
      expect(result.displacements[8] / -wanted).toBeCloseTo(1, 9);
    }
  });

  it('names a node of a frame that nothing holds', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [300, 200, 100],
      [500, -100, 300],
    ];
    const f = frameOf(
      points,
      [
        [0, 1],
        [1, 2],
      ],
      () => [],
      ID,
    );
    expect(prepareFrame(f).state).toBe('mechanism');
    const pinnedAtOneEnd = frameOf(
      points,
      [
        [0, 1],
        [1, 2],
      ],
      (i) => (i === 0 ? [0, 1, 2] : []),
      anyRotation(5),
    );
    expect(prepareFrame(pinnedAtOneEnd).state).toBe('mechanism');
  });
});

describe('second-order analysis', () => {
  it('an imperfect pin-ended strut bows by e0 / (Pcr / P - 1) more, with P (e0 + bow) at its middle (Timoshenko and Gere 1961, section 1.10)', () => {
    const [l, parts, e0] = [1000, 8, 2.5];
    const points: Vec3[] = [
      [0, 0, 0],
      [0, 0, l],
    ];
    const one = frameOf(points, [[0, 1]], (i) => (i === 0 ? [0, 1, 2, 5] : [0, 1]), ID);
    const cut = subdivide(one, parts);
    const prepared = stiff(cut.frame);
    const critical = (Math.PI ** 2 * EI) / l ** 2;
    const p = 0.6 * critical;
    const nodal = new Float64Array(cut.frame.fixed.length);
    nodal[8] = -p;
    const bow = new Float64Array(nodal.length);
    const heights = Array.from({ length: parts + 1 }, (_, i) => cut.frame.nodes[3 * i + 2]);
    heights.forEach((z, i) => {
      bow[6 * i] = e0 * Math.sin((Math.PI * z) / l);
      bow[6 * i + 4] = ((e0 * Math.PI) / l) * Math.cos((Math.PI * z) / l);
    });
    const s = solveSecondOrder(prepared, { nodal }, new Float64Array(parts).fill(-p), bow);
    if (s.state !== 'stands') throw new Error(s.state);
    const middle = heights.findIndex((z) => Math.abs(z - l / 2) < 1e-9);
    const more = e0 / (critical / p - 1);
    expect(s.displacements[6 * middle] / more).toBeCloseTo(1, 3);
    const moments = cut.frame.members.map((_, e) => Math.hypot(s.endForces[12 * e + 10], s.endForces[12 * e + 11]));
    expect(Math.max(...moments) / (p * (e0 + more))).toBeCloseTo(1, 2);
    expect(s.residual).toBeLessThan(1e-14);
  });

  it('says that a strut above its critical load buckles', () => {
    const points: Vec3[] = [
      [0, 0, 0],
      [0, 0, 1000],
    ];
    const cut = subdivide(
      frameOf(points, [[0, 1]], (i) => (i === 0 ? ALL : []), ID),
      4,
    );
    const p = (1.02 * Math.PI ** 2 * EI) / 4e6;
    const nodal = new Float64Array(cut.frame.fixed.length);
    nodal[8] = -p;
    const s = solveSecondOrder(
      stiff(cut.frame),
      { nodal },
      new Float64Array(4).fill(-p),
      new Float64Array(nodal.length),
    );
    expect(s.state).toBe('buckles');
  });
});

describe('buckling loads x L² / EI of a strut in elements', () => {
  // Timoshenko and Gere, Theory of Elastic Stability, 2nd ed. 1961, section 2.1 for the exact loads; the figures of coarse meshes follow
  // from the consistent matrices and can be checked by hand for one element.
  const strut = (
    parts: number,
    bottom: readonly number[],
    top: readonly number[],
    r: readonly number[],
    scale: number,
  ) => {
    const l = 1000 * scale;
    const points: Vec3[] = [
      [0, 0, 0],
      [0, 0, l],
    ];
    const one = frameOf(points, [[0, 1]], (i) => (i === 0 ? bottom : top), ID);
    // Supports lie along the strut's own axes, so the frame is turned by quarter turns of its coordinates alone.
    const cut = subdivide(one, parts).frame;
    const back = {
      ...cut,
      nodes: turned(r, cut.nodes),
      members: cut.members.map((m) => ({ ...m, axes: turnAxes(m.axes, r) })),
    };
    return { frame: back, l };
  };
  const turnAxes = (a: FrameMember['axes'], r: readonly number[]): FrameMember['axes'] => {
    const t = (v: Vec3): Vec3 => [...turned(r, v)] as unknown as Vec3;
    return { x: t(a.x), y: t(a.y), z: t(a.z) };
  };
  const pinBottom = [0, 1, 2, 5];
  const roller = [0, 1];
  const cases: readonly (readonly [string, readonly number[], readonly number[], number, number, number])[] = [
    ['pin-pin, 1', pinBottom, roller, 1, 12, 6],
    ['pin-pin, 2', pinBottom, roller, 2, 9.94385, 5],
    ['pin-pin, 4', pinBottom, roller, 4, 9.87466, 5],
    ['cantilever, 1', ALL, [], 1, 2.48596, 5],
    ['fixed-pinned, 1', ALL, roller, 1, 30, 6],
    ['fixed-pinned, 2', ALL, roller, 2, 20.7088, 4],
    ['fixed-fixed, 2', ALL, [0, 1, 3, 4, 5], 2, 40, 6],
  ];
  it.each(cases)('%s', (_, bottom, top, parts, wanted, digits) => {
    for (const scale of [1, 1 / 25.4]) {
      const { frame, l } = strut(parts, bottom, top, ID, scale);
      const b = bucklingFactors(stiff(frame), new Float64Array(parts).fill(-1), 2);
      expect((b.factors[0] * l * l) / EI).toBeCloseTo(wanted, digits);
      // Both planes bend alike: the root is double.
      expect(b.factors[1] / b.factors[0]).toBeCloseTo(1, 8);
      expect(b.sturm).toBe('agrees');
    }
  });

  it('an Euler column in 8 elements comes within 0.1 % of π² EI / L², in any axes', () => {
    const quarter = [0, 0, 1, 1, 0, 0, 0, 1, 0];
    for (const [r, bottom, top] of [
      [ID, [0, 1, 2, 5], [0, 1]],
      [quarter, [0, 1, 2, 3], [1, 2]],
    ] as const) {
      const { frame, l } = strut(8, bottom, top, r, 1);
      const b = bucklingFactors(stiff(frame), new Float64Array(8).fill(-1), 2);
      expect((b.factors[0] * l * l) / EI / Math.PI ** 2).toBeCloseTo(1, 3);
      expect(b.factors[0]).toBeGreaterThan((Math.PI ** 2 * EI) / (l * l));
    }
  });

  it('a column in tension has no factor', () => {
    const { frame } = strut(4, ALL, [], ID, 1);
    expect(bucklingFactors(stiff(frame), new Float64Array(4).fill(1)).factors).toEqual([]);
  });
});
