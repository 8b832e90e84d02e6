import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { topologyOf } from '../../../src/model/topology.js';
import { secondOrderActions } from '../../../src/statics/analyse/second-order-actions.js';
import type { Frame, FrameMember, Spring } from '../../../src/statics/frame/member.js';
import { subdivide } from '../../../src/statics/frame/subdivide.js';
import { CaseBuilder } from '../../../src/statics/loads/load-case.js';
import { trussOf } from '../../helpers/truss.js';
import { jobWith } from './input.js';

/** An invented bar of 1 m along x: N mm², N; no two planes alike. */
const L = 1000;
const [EA, EIY, EIZ, GJ] = [4e6, 2e9, 3e9, 1.6e9];
const ALL = [0, 1, 2, 3, 4, 5];
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [L, 0, 0],
  ],
  edges: [[0, 1]],
});
const topology = topologyOf(truss);
const job = jobWith({ analysis: { imperfection: 1 / 400 } });
const member = (x: Vec3, y: Vec3, z: Vec3, ends: [number, number], springs: Spring[] = []): FrameMember => ({
  ends,
  axes: { x, y, z },
  segments: [{ length: L, axial: EA, bendingY: EIY, bendingZ: EIZ, torsion: GJ }],
  springs,
});

function bar(parts: number, held: readonly (readonly number[])[], springs: Spring[] = []) {
  const fixed = new Uint8Array(12);
  held.forEach((list, i) => {
    for (const k of list) fixed[6 * i + k] = 1;
  });
  const one = member([1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 1], springs);
  return subdivide({ nodes: Float64Array.of(0, 0, 0, L, 0, 0), members: [one], fixed }, parts);
}
const PINS = [
  [0, 1, 2, 3],
  [1, 2],
] as const;

/** Half a sine wave in the plane of z, 1 in the middle. */
function halfWave(sub: ReturnType<typeof bar>): Float64Array {
  const shape = new Float64Array(sub.frame.fixed.length);
  for (let i = 0; i < shape.length / 6; i++) {
    const x = (Math.PI * sub.frame.nodes[3 * i]) / L;
    shape[6 * i + 2] = Math.sin(x);
    shape[6 * i + 4] = (-Math.PI / L) * Math.cos(x);
  }
  return shape;
}

interface Loaded {
  readonly press?: number;
  readonly line?: Vec3;
  readonly longer?: number;
}
/** The actions of the first sense of the imperfection, in a combination of 1.5 times the load. */
function act(sub: ReturnType<typeof bar>, load: Loaded, softer: number, shape = halfWave(sub)) {
  const { press = 0, line, longer } = load;
  const builder = new CaseBuilder(2, 1);
  builder.addNode(1, [-press / 1.5, 0, 0]);
  if (line) builder.addLine(0, line.map((v) => v / 1.5) as unknown as Vec3);
  if (longer) builder.addElongation(0, longer / 1.5);
  const combination = { name: 'c', factors: [[0, 1.5]], duration: 'short', favourable: false } as const;
  const axial = new Float64Array(sub.memberOf.length).fill(-press);
  const cases = [builder.done('c', 'imposed')];
  return secondOrderActions(topology, job, sub, shape, cases, [[combination, axial, softer]]);
}

describe('a bar of 1 m between pins', () => {
  const critical = (Math.PI ** 2 * EIY) / L ** 2;

  it.each([1, 0.5])(
    'bowed by L / 400 and pressed by P: P e0 / (1 - P / Pcr) with the design stiffness, %f of the mean (Timoshenko and Gere 1961, 1.10)',
    (softer) => {
      const p = 0.3 * critical;
      const { actions, buckling } = act(bar(8, PINS), { press: p }, softer);
      expect(buckling).toEqual([]);
      const wanted = (p * L) / 400 / (1 - p / (softer * critical));
      for (const a of actions[0]) {
        expect(Math.abs(a.momentY / wanted - 1)).toBeLessThan(5e-3);
        expect(a.momentZ / wanted).toBeLessThan(1e-9);
        expect(a.axial / -p).toBeCloseTo(1, 6);
        expect(a).toMatchObject({ combination: 'c, second order', duration: 'short' });
      }
      expect(actions[0].length).toBe(2);
    },
  );

  it('buckles where the load passes the critical one of the softened bar, not of the mean', () => {
    expect(act(bar(8, PINS), { press: 0.6 * critical }, 0.5).buckling).toEqual(['c']);
    expect(act(bar(8, PINS), { press: 0.6 * critical }, 1).buckling).toEqual([]);
    expect(act(bar(8, PINS), { press: 1.01 * critical }, 1).buckling).toEqual(['c']);
  });

  it.each([1, 3])(
    'under a line load bends by w L² / 8 although no node stands in the middle: %i elements (first order, by hand)',
    (parts) => {
      const { actions } = act(bar(parts, PINS), { line: [0, 0.2, -0.3] }, 1);
      expect(actions[0][0].momentY).toBeCloseTo((0.3 * L ** 2) / 8, 6);
      expect(actions[0][0].momentZ).toBeCloseTo((0.2 * L ** 2) / 8, 6);
      expect(actions[0][0].shearZ).toBeCloseTo((0.3 * L) / 2, 6);
      expect(actions[0][0].shearY).toBeCloseTo((0.2 * L) / 2, 6);
    },
  );

  it('pressed as well, by 2 (sec u - 1) / u² of that, u = pi/2 sqrt(P / Pcr) (Timoshenko and Gere 1961, 1.3)', () => {
    const [softer, p] = [0.5, 0.2 * critical];
    const sub = bar(8, PINS);
    const { actions } = act(sub, { press: p, line: [0, 0, -0.3] }, softer, new Float64Array(sub.frame.fixed.length));
    const u = (Math.PI / 2) * Math.sqrt(p / (softer * critical));
    const wanted = (((0.3 * L ** 2) / 8) * 2 * (1 / Math.cos(u) - 1)) / u ** 2;
    // The element's own part, 1/64 of the straight bar's, is added to the node in the middle: on the safe side.
    expect(actions[0][0].momentY / wanted).toBeGreaterThan(1 - 1e-3);
    expect(actions[0][0].momentY / wanted).toBeLessThan(1 + 1 / 64);
  });
});

it.each([1, 0.4])(
  'a bar between walls that would be d longer presses itself by E A d / L of the design stiffness, %f of the mean',
  (softer) => {
    const sub = bar(4, [ALL, ALL]);
    const straight = new Float64Array(sub.frame.fixed.length);
    const { actions } = act(sub, { longer: 0.2 }, softer, straight);
    expect(actions[0][0].axial).toBeCloseTo((-softer * EA * 0.2) / L, 6);
  },
);

it.each([1, 0.4])(
  'springs at its ends soften with it: w L² / 12 / (1 + 2 E I / k L) at %f of the mean (slope deflection, by hand)',
  (softer) => {
    const k = 5e7;
    const springs = [0, L].map((at) => ({ at, stiffness: k }));
    const sub = bar(4, [ALL, ALL], springs);
    const straight = new Float64Array(sub.frame.fixed.length);
    const { actions } = act(sub, { line: [0, 0.2, -0.3] }, softer, straight);
    // Larger than the middle's moment, which is what is left of w L² / 8, with this spring.
    const wanted = (0.3 * L ** 2) / 12 / (1 + (2 * EIY) / (k * L));
    expect(wanted).toBeGreaterThan((0.3 * L ** 2) / 16);
    const across = (0.2 * L ** 2) / 12 / (1 + (2 * EIZ) / (k * L));
    expect(across).toBeGreaterThan((0.2 * L ** 2) / 16);
    // Each element's own part of w l² / 8 is added to its larger end.
    expect(actions[0][0].momentY).toBeCloseTo(wanted + (0.3 * (L / 4) ** 2) / 8, 4);
    expect(actions[0][0].momentZ).toBeCloseTo(across + (0.2 * (L / 4) ** 2) / 8, 4);
  },
);

it.each([1, 0.4])(
  'two bars at a right angle, built in, loaded at the corner: T = P L / 4 / (1 + E I / G J), at %f of the mean (by hand)',
  (softer) => {
    // By symmetry each bar is a cantilever under P / 2 whose end is held back by the twist of the other: P L²/4EI - T L/EI = T L/GJ.
    const corner = trussOf({
      nodes: [
        [0, 0, 0],
        [L, 0, 0],
        [L, L, 0],
      ],
      edges: [
        [0, 1],
        [1, 2],
      ],
    });
    const fixed = new Uint8Array(18).fill(1);
    fixed.fill(0, 6, 12);
    const frame: Frame = {
      nodes: Float64Array.of(0, 0, 0, L, 0, 0, L, L, 0),
      members: [member([1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 1]), member([0, 1, 0], [-1, 0, 0], [0, 0, 1], [1, 2])],
      fixed,
    };
    const builder = new CaseBuilder(3, 2);
    builder.addNode(1, [0, 0, -40]);
    const sub = subdivide(frame, 2);
    const { actions } = secondOrderActions(
      topologyOf(corner),
      job,
      sub,
      new Float64Array(sub.frame.fixed.length),
      [builder.done('c', 'imposed')],
      [
        [
          { name: 'c', factors: [[0, 1]], duration: 'short', favourable: false },
          new Float64Array(sub.memberOf.length),
          softer,
        ],
      ],
    );
    for (const own of actions) expect(own[0].torsion).toBeCloseTo((40 * L) / 4 / (1 + EIY / GJ), 4);
  },
);
