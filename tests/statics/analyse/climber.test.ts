import { expect, it } from 'vitest';
import type { Job } from '../../../src/model/job/index.js';
import { analyseTruss } from '../../../src/statics/analyse/analyse-truss.js';
import { trussOf } from '../../helpers/truss.js';
import { inputOf, jobWith } from './input.js';

/** Legs of 500 mm from feet on a circle of 300 mm to an apex 400 mm above or below them; `order` says where the apex stands in the list. */
function legs(apexZ: number, apexLast: boolean) {
  const feet = [0, 1, 2].map((k) => [300 * Math.cos((2 * Math.PI * k) / 3), 300 * Math.sin((2 * Math.PI * k) / 3), 0]);
  const apex = apexLast ? 3 : 0;
  const nodes = apexLast ? [...feet, [0, 0, apexZ]] : [[0, 0, apexZ], ...feet];
  const others = [0, 1, 2, 3].filter((n) => n !== apex);
  return trussOf({
    nodes,
    edges: others.map((n) => [apex, n] as const),
    supports: others.map((n) => [n, 'xyz'] as const),
  });
}
const climbed = (truss: ReturnType<typeof trussOf>, change: object = {}) => {
  const analysis = { joints: 'pinned', selfWeight: false };
  const job = jobWith({ use: 'outdoor', analysis, loads: { indoors: true }, ...change } as unknown as Partial<Job>);
  return analyseTruss(inputOf(truss, job)).solution.actions;
};
/** 1.5 x 1 kN over three legs, by hand: W L / 3 h. */
const LEG = (1500 * 500) / (3 * 400);

it.each([true, false])(
  'a climber on an apex presses each leg by W L / 3h, wherever the apex is listed (last: %s)',
  (last) => {
    for (const own of climbed(legs(400, last))) {
      expect(Math.min(...own.map((a) => a.axial))).toBeCloseTo(-LEG, 6);
      expect(Math.max(...own.map((a) => a.axial))).toBeCloseTo(0, 6);
    }
  },
);

it.each([true, false])('and pulls as much where the apex hangs (last: %s)', (last) => {
  for (const own of climbed(legs(-400, last))) {
    expect(Math.max(...own.map((a) => a.axial))).toBeCloseTo(LEG, 6);
    expect(Math.min(...own.map((a) => a.axial))).toBeCloseTo(0, 6);
  }
});

it('each strut of a bracket is kept with the nodes that pull it most and press it most (moments about the far chord, by hand)', () => {
  // A bay of 600 mm and half a bay on a wall, held out of their plane; the climber stands on each node in turn.
  const a = 600;
  const bracket = trussOf({
    nodes: [
      [0, 0, a],
      [0, 0, 0],
      [a, 0, a],
      [a, 0, 0],
      [2 * a, 0, a],
    ],
    edges: [
      [0, 2],
      [2, 4],
      [1, 3],
      [1, 2],
      [2, 3],
      [3, 4],
    ],
    supports: [
      [0, 'xyz'],
      [1, 'xyz'],
      [2, 'y'],
      [3, 'y'],
      [4, 'y'],
    ],
  });
  const actions = climbed(bracket);
  const most = (e: number) => Math.max(...actions[e].map((x) => x.axial));
  const least = (e: number) => Math.min(...actions[e].map((x) => x.axial));
  const W = 1500;
  // Tip: upper chord beyond N2 W, next to the wall W 2a/a less the diagonal's part; N3-N4 carries W sqrt 2 to N3.
  expect(most(1)).toBeCloseTo(W, 6);
  expect(least(5)).toBeCloseTo(-W * Math.SQRT2, 6);
  expect(most(4)).toBeCloseTo(W, 6);
  // A climber at N3 hangs on the upright; at N2 on the diagonal, which the tip presses no more than that.
  expect(least(3)).toBeCloseTo(-W * Math.SQRT2, 6);
  expect(least(2)).toBeCloseTo(-W, 6);
  // Moments about N1: W 2a = T a for the tip.
  expect(most(0)).toBeCloseTo(2 * W, 6);
});

it('the whole is searched for buckling under the climber: on a tripod between the loads of legs with hinged and with fixed ends', () => {
  const truss = legs(400, true);
  const under = (climber_N: number) => {
    const job = jobWith({
      use: 'outdoor',
      analysis: { joints: 'rigid', selfWeight: false, buckling: true, climber_N },
      loads: { indoors: true },
    } as unknown as Partial<Job>);
    const input = inputOf(truss, job);
    return { found: analyseTruss(input).solution.buckling, strut: input.parts.struts[0]! };
  };
  const { found, strut } = under(1000);
  const lowest = found.find((b) => b.combination.includes('climber at'))!;
  expect(lowest).toBeDefined();
  // Euler's load of a leg from node to node, pi² E I / L² (Timoshenko and Gere 1961, 2.1); four times that with fixed ends.
  const shape = strut.section!.shape as { diameter: number };
  const euler = (Math.PI ** 2 * strut.material!.modulus * ((Math.PI * shape.diameter ** 4) / 64)) / 500 ** 2;
  expect(lowest.factors[0]!).toBeGreaterThan(0.9 * (euler / LEG));
  // Printed ends are shorter than the axis: a little above four is possible.
  expect(lowest.factors[0]!).toBeLessThan(5 * (euler / LEG));
  expect(under(2000).found[0]!.factors[0]!).toBeCloseTo(lowest.factors[0]! / 2, 6);
});
