import { describe, expect, it } from 'vitest';
import type { Joint } from '../../../src/model/parts.js';
import { analyseTruss } from '../../../src/statics/analyse/analyse-truss.js';
import { trussOf } from '../../helpers/truss.js';
import { inputOf, jobWith } from './input.js';

/** A tripod of 500 mm legs, 400 mm high, under its own weight. */
const tripod = trussOf({
  nodes: [
    [0, 0, 400],
    ...[0, 1, 2].map((k) => [300 * Math.cos((2 * Math.PI * k) / 3), 300 * Math.sin((2 * Math.PI * k) / 3), 0]),
  ],
  edges: [
    [0, 1],
    [0, 2],
    [0, 3],
  ],
  supports: [1, 2, 3].map((n) => [n, 'xyz'] as const),
  loads: [[0, [1, 0, -6]]],
});
/** Two legs in sockets of a kind; the first stays glued, so that the whole is a frame and not a truss of pins. */
const analysed = (joint: Joint, analysis: object = {}) => {
  const made = inputOf(tripod, jobWith({ analysis } as never));
  const hubs = made.parts.hubs.map((h) => ({
    ...h,
    sockets: h.sockets.map((s) => (s.strut === 'S0' ? s : { ...s, joint })),
  }));
  const input = { ...made, parts: { ...made.parts, hubs } };
  return { input, solution: analyseTruss(input).solution };
};
const bending = (s: ReturnType<typeof analysed>['solution']) =>
  s.actions.map((own) => Math.max(...own.map((a) => Math.hypot(a.momentY, a.momentZ))));

describe('rigid joints whose sockets hold no moment', () => {
  it.each(['seated', 'loose'] as const)(
    '%s: each such leg is a simple beam under its own weight, w cos(slope) L² / 8, and its joints pass none of it on',
    (joint) => {
      const { input, solution } = analysed(joint, { joints: 'rigid' });
      const w = (input.parts.struts[0].mass! * 9.80665) / 500;
      const simple = (1.35 * w * 0.6 * 500 ** 2) / 8;
      // The joint keeps 1e-5 of the strut's stiffness: what it passes on shall not show beside the strut's own bending.
      for (const m of bending(solution)) expect(Math.abs(m / simple - 1)).toBeLessThan(1e-4);
      // A leg held at its top would bend by w L² / 8 too, there; but its larger shear would be 5/8 w L, not half, less the setback's part.
      for (const own of solution.actions) {
        const shear = Math.max(...own.map((a) => Math.hypot(a.shearY, a.shearZ)));
        expect(Math.abs(shear / (1.35 * w * 0.6 * 250) - 1)).toBeLessThan(0.02);
      }
      // A hub that only such joints hold is no link that buckles by itself: Euler's load of the most pressed leg is the lowest, of which
      // the design stiffness leaves 0.67 / 1.3 / 1.6 (four elements a strut find it 0.05 % high).
      const { factors, euler } = solution.buckling[0];
      expect(Math.abs(factors[0] / (euler!.factor / (0.67 / 1.3 / 1.6)) - 1)).toBeLessThan(1e-3);
    },
  );

  it.each(['seated', 'loose'] as const)(
    '%s: the figures are those of pins, forces and displacements alike',
    (joint) => {
      const rigid = analysed(joint, { joints: 'rigid', selfWeight: false }).solution.cases[0];
      const pins = analysed(joint, { joints: 'pinned', selfWeight: false }).solution.cases[0];
      rigid.forces!.forEach((n, e) => {
        expect(n / pins.forces![e]).toBeCloseTo(1, 4);
      });
    },
  );

  it('a stiffness given for sockets is that of those which hold a moment alone', () => {
    const given = { joints: 'rigid', socketStiffness_Nmm_per_rad: 1e4 };
    const shears = (r: ReturnType<typeof analysed>) =>
      r.solution.actions.map((own) => Math.max(...own.map((a) => Math.hypot(a.shearY, a.shearZ))));
    const loose = shears(analysed('loose', given));
    const without = shears(analysed('loose', { joints: 'rigid' }));
    for (const e of [1, 2]) expect(Math.abs(loose[e] / without[e] - 1)).toBeLessThan(1e-3);
    const glued = shears(analysed('glued', given));
    const firm = shears(analysed('glued', { joints: 'rigid' }));
    expect(glued[1]).toBeLessThan(0.99 * firm[1]);
  });
});
