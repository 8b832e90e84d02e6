import { Matrix, pseudoInverse } from 'ml-matrix';
import { expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { defaultJob } from '../../../src/model/job/index.js';
import { type Topology, topologyOf } from '../../../src/model/topology.js';
import { compareForces, comparisonFindings } from '../../../src/statics/reciprocal/compare.js';
import { besideAnalysis, reciprocalOf } from '../../../src/statics/reciprocal/reciprocal.js';
import { reciprocalReport } from '../../../src/statics/reciprocal/report.js';
import { trussOf } from '../../helpers/truss.js';
import { NESTED_CUBES, SIXTEEN_CELL } from '../../published/rankine-cases.js';

const { edges, forces } = SIXTEEN_CELL;
const free = topologyOf(trussOf(SIXTEEN_CELL));
const held = topologyOf(
  trussOf({
    ...SIXTEEN_CELL,
    supports: [
      [0, 'xyz'],
      [1, 'yz'],
      [2, 'z'],
    ],
  }),
);
const source = (name: 'given' | 'reciprocal' | 'analysis', t: ArrayLike<number>) => ({
  source: name,
  forces: Float64Array.from(t),
});

/** The textbook split by a dense pseudo-inverse (ml-matrix): y = A⁺ A d. */
function remainderOf(
  topology: Topology,
  d: readonly number[],
  rows: (node: number, axis: number) => boolean,
): number[] {
  const { nodes } = topology.truss;
  const a: number[][] = [];
  nodes.forEach((_, i) => {
    for (let axis = 0; axis < 3; axis++) {
      if (!rows(i, axis)) continue;
      const row = Array(edges.length).fill(0) as number[];
      for (const bar of topology.barsAt[i]!) row[bar.memberIndex] = bar.direction[axis]!;
      a.push(row);
    }
  });
  const m = new Matrix(a);
  return pseudoInverse(m)
    .mmul(m)
    .mmul(Matrix.columnVector([...d]))
    .to1DArray();
}

it('a difference is split as a dense pseudo-inverse splits it, free and on supports', () => {
  const random = seededRandom(5);
  const other = forces.map((t) => t + random() - 0.5);
  for (const [topology, rows] of [
    [free, () => true],
    [held, (i: number, axis: number) => !(i === 0 || (i === 1 && axis > 0) || (i === 2 && axis === 2))],
  ] as const) {
    const c = compareForces(topology, source('given', other), source('reciprocal', forces));
    const wanted = remainderOf(topology, [...c.difference], rows);
    wanted.forEach((v, m) => {
      expect(c.remainder[m]).toBeCloseTo(v, 10);
      expect(c.selfStress[m]! + c.remainder[m]!).toBeCloseTo(other[m]! - forces[m]!, 12);
    });
    // Both parts are square to each other.
    expect(c.selfStress.reduce((sum, v, m) => sum + v * c.remainder[m]!, 0)).toBeCloseTo(0, 10);
  }
});

it('two states of self-stress differ by self-stress alone', () => {
  // Any other function over the cells gives another state: heights 1 2 3 4 at the inner nodes.
  const bare = { ...trussOf({ ...SIXTEEN_CELL, forces: [] }) };
  const topology = topologyOf({ ...bare, cells: bare.cells.filter((_, i) => i !== SIXTEEN_CELL.outside) });
  const job = {
    ...defaultJob(),
    forces: {
      ...defaultJob().forces,
      fix: [0, 6, 12, 20].map((i, k) => ({ strut: `S${i}`, force_N: forces[i]! * (1 + 0.1 * k) })),
    },
  };
  const second = reciprocalOf(topology, job).forces!;
  const c = compareForces(free, source('given', second), source('reciprocal', forces));
  expect(c.largest).toBeGreaterThan(0.05);
  expect(Math.max(...c.remainder.map(Math.abs))).toBeLessThan(1e-7 * Math.max(...forces.map(Math.abs)) + 1e-7);
});

it('sources that differ are named once, with the worst strut; an analysis has its own note', () => {
  const other = forces.map((t, m) => (m === 7 ? t * 1.05 : t));
  const c = compareForces(free, source('given', other), source('reciprocal', forces));
  expect(comparisonFindings(free, c, 1e-3)).toMatchObject([
    {
      code: 'forces-differ',
      level: 'warn',
      subject: 'truss',
      about: { strut: 'S7', first: 'given', second: 'reciprocal' },
    },
  ]);
  expect(comparisonFindings(free, c, 0.1)).toEqual([]);
  const analysis = compareForces(free, source('given', other), source('analysis', forces));
  expect(comparisonFindings(free, analysis, 1e-3)).toEqual([]);
});

it('check.json has every pair of sources, strut by strut', () => {
  const mark = (i: number): string => (i === NESTED_CUBES.outside ? 'outside' : `C${i}`);
  const base = trussOf(NESTED_CUBES);
  const topology = topologyOf({
    ...base,
    cells: base.cells.map((cell, i) => ({ ...cell, mark: mark(i) })),
    reciprocal: { newtonPerArea: 1.01, vertices: NESTED_CUBES.vertices.map((at, i) => ({ cell: mark(i), at })) },
  });
  const job = defaultJob();
  const analysed = Float64Array.from(NESTED_CUBES.forces, (t) => 0.9 * t);
  const report = reciprocalReport(topology, besideAnalysis(topology, job, reciprocalOf(topology, job), analysed))!;
  expect(report.differences.map((d) => [d.first, d.second])).toEqual([
    ['given', 'reciprocal'],
    ['given', 'analysis'],
    ['reciprocal', 'analysis'],
  ]);
  const [first] = report.differences;
  NESTED_CUBES.forces.forEach((t, m) => {
    expect(first!.struts[m]).toMatchObject({
      mark: `S${m}`,
      difference_N: expect.closeTo(-0.01 * t, 9),
      selfStress_N: expect.closeTo(-0.01 * t, 9),
      remainder_N: expect.closeTo(0, 9),
    });
  });
  expect(report).toMatchObject({
    kind: 'space',
    source: 'file',
    sign: 1,
    dimension: 1,
    selfStressStates: 1,
    reached: 1,
  });
  expect(() => JSON.stringify(report)).not.toThrow();
  expect(JSON.stringify(report)).not.toContain('null,null');
});
