import { describe, expect, it } from 'vitest';
import type { Point2 } from '../../src/model/parts.js';
import { type PlateSupports, plateOf } from '../../src/strength/panel/plate.js';

const bendPlate = (outline: readonly Point2[], poisson: number, supports: PlateSupports) =>
  plateOf(outline, poisson)?.bend(supports) ?? null;

const rectangle = (a: number, b: number): readonly Point2[] => [
  [0, 0],
  [a, 0],
  [a, b],
  [0, b],
];
const round = (outline: readonly Point2[]): PlateSupports => ({ edges: outline.map((_, i) => i), points: [] });
/** Within 1 %. */
const near = (value: number, wanted: number, share = 0.01): void => {
  expect(Math.abs(value / wanted - 1), `${value} against ${wanted}`).toBeLessThan(share);
};

describe('simply supported rectangle under uniform pressure, Poisson 0.3', () => {
  // Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, table 8 (from memory): sides' ratio, w D / q a⁴, M / q a²; a the short side.
  const table = [
    [1, 0.00406, 0.0479],
    [1.2, 0.00564, 0.0627],
    [1.5, 0.00772, 0.0812],
    [2, 0.01013, 0.1017],
    [3, 0.01223, 0.1189],
    [5, 0.01297, 0.1246],
  ] as const;
  for (const [ratio, deflection, moment] of table)
    for (const unit of [1, 25.4])
      it(`ratio ${ratio}, ${unit === 1 ? 'mm' : 'inches'}`, () => {
        const short = 500 / unit;
        const outline = rectangle(short * ratio, short);
        const plate = bendPlate(outline, 0.3, round(outline))!;
        near(plate.deflection / short ** 4, deflection);
        near(plate.moment / short ** 2, moment);
        // The edges carry the whole load.
        near(plate.edgeForce / (short * short * ratio), 1, 1e-6);
      });
});

it('simply supported equilateral triangle of height h: w = q h⁴ / (972 D)', () => {
  // Timoshenko and Woinowsky-Krieger, section on triangular plates (from memory).
  const h = 400;
  const side = (2 * h) / Math.sqrt(3);
  const outline: readonly Point2[] = [
    [0, 0],
    [side, 0],
    [side / 2, h],
  ];
  near(bendPlate(outline, 0.3, round(outline))!.deflection, h ** 4 / 972, 0.005);
});

it('square on its four corners: w = 0.0255 q a⁴ / D, a quarter of the load on each', () => {
  // Timoshenko and Woinowsky-Krieger, plates supported at the corners, Poisson 0.3 (from memory).
  const outline = rectangle(600, 600);
  const plate = bendPlate(outline, 0.3, { edges: [], points: outline })!;
  near(plate.deflection / 600 ** 4, 0.0255);
  for (const f of plate.forces) near(f / (600 * 600), 0.25, 1e-6);
});

it('on two opposite edges with Poisson 0 it is a beam: 5 q a⁴ / 384 D, q a² / 8', () => {
  const plate = bendPlate(rectangle(300, 700), 0, { edges: [1, 3], points: [] })!;
  near(plate.deflection, (5 * 300 ** 4) / 384, 1e-4);
  near(plate.moment, 300 ** 2 / 8, 1e-4);
});

describe('any polygon', () => {
  const outline: readonly Point2[] = [
    [0, 0],
    [420, -30],
    [510, 260],
    [240, 430],
    [-60, 250],
  ];
  const points: readonly Point2[] = [
    [20, 20],
    [400, 0],
    [480, 250],
    [240, 400],
  ];
  const wanted = bendPlate(outline, 0.37, { edges: [], points })!;
  it('is the same turned, moved and renumbered, in either sense', () => {
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
    const move = ([x, y]: Point2): Point2 => [c * x - s * y + 900, s * x + c * y - 4000];
    const moved = outline.map(move);
    for (const turned of [[...moved.slice(2), ...moved.slice(0, 2)], [...moved].reverse()]) {
      const plate = bendPlate(turned, 0.37, { edges: [], points: points.map(move) })!;
      // A polynomial of total degree 8 is one in any axes; what differs is the points looked at.
      near(plate.deflection, wanted.deflection, 1e-4);
      near(plate.moment, wanted.moment, 2e-2);
      plate.forces.forEach((f, i) => {
        near(f, wanted.forces[i]!, 1e-4);
      });
    }
  });
  it('twice the size: 16 times the deflection, 4 times the moment and forces', () => {
    const twice = (list: readonly Point2[]): Point2[] => list.map(([x, y]) => [2 * x, 2 * y]);
    const plate = bendPlate(twice(outline), 0.37, { edges: [], points: twice(points) })!;
    near(plate.deflection, 16 * wanted.deflection, 1e-6);
    near(plate.moment, 4 * wanted.moment, 1e-6);
    near(plate.forces[0]!, 4 * wanted.forces[0]!, 1e-6);
  });
});

it('held by two points, by points in a line, by one edge or by nothing it is loose', () => {
  const outline = rectangle(300, 300);
  for (const supports of [
    { edges: [], points: [] },
    { edges: [], points: outline.slice(0, 2) },
    { edges: [], points: [[0, 0] as const, [150, 150] as const, [300, 300] as const] },
    { edges: [0], points: [] },
  ])
    expect(bendPlate(outline, 0.3, supports)).toBeNull();
  expect(bendPlate([outline[0]!, outline[1]!, outline[1]!], 0.3, { edges: [0], points: [] })).toBeNull();
});
