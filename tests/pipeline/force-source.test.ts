import { expect, it } from 'vitest';
import { checkReport } from '../../src/documents/check-json.js';
import { scale } from '../../src/maths/vec3.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { assess } from '../../src/pipeline/assess.js';
import { mapped, trussOf } from '../helpers/truss.js';
import { NESTED_CUBES, TWISTED_CUBE } from '../published/rankine-cases.js';

// Forces in closed form: -2, +2 and 2 sqrt 3 times the scale, by symmetry at a corner.
const job = (forces: Partial<Job['forces']>): Job => ({
  ...defaultJob(),
  forces: { ...defaultJob().forces, ...forces },
});
const sized = (truss: Truss): Truss => mapped(truss, (p) => scale(p, 200));
const cells = (truss: Truss): Truss => ({ ...truss, cells: truss.cells.slice(1) });
const bare = (c: Pick<typeof NESTED_CUBES, 'nodes' | 'edges' | 'faces' | 'cells'>): Truss =>
  cells(sized(trussOf({ nodes: c.nodes, edges: c.edges, faces: c.faces, cells: c.cells })));

it('takes the forces of a found diagram where the truss has cells and no forces', () => {
  const a = assess(bare(NESTED_CUBES), job({ sign: 1, largest_N: 2 * Math.sqrt(3) }));
  expect(a.forces!.source).toBe('reciprocal');
  NESTED_CUBES.forces.forEach((t, m) => {
    expect(a.forces!.values[m]).toBeCloseTo(t, 9);
  });
  const report = checkReport(a);
  expect(report.checked).toContain('reciprocal');
  expect(report.members[0]!.force_N).toEqual({ given: expect.closeTo(-2, 9) });
  expect(report.equilibrium!.maxRelative).toBeLessThan(1e-9);
});

it('keeps given forces unless the job says otherwise, and reports how far the two are apart', () => {
  const given = {
    ...bare(NESTED_CUBES),
    members: trussOf(NESTED_CUBES).members.map((m) => ({ ...m, force: 3 * m.force! })),
  };
  expect(assess(given, defaultJob()).forces).toMatchObject({ source: 'given' });
  const a = assess(given, job({ source: 'reciprocal', largest_N: 2 * Math.sqrt(3) }));
  expect(a.forces).toMatchObject({ source: 'reciprocal' });
  expect(a.forces!.values[0]).toBeCloseTo(-2, 9);
  const [difference] = checkReport(a).reciprocal!.differences;
  expect(difference).toMatchObject({
    first: 'given',
    second: 'reciprocal',
    largest_N: expect.closeTo(4 * Math.sqrt(3), 8),
  });
  expect(difference!.struts[0]!.remainder_N).toBeCloseTo(0, 8);
  expect(a.findings.map((f) => f.code)).toContain('forces-differ');
});

it.each([
  ['no diagram exists', 'no-reciprocal', TWISTED_CUBE, []],
  ['no diagram carries the loads', 'reciprocal-misses-loads', NESTED_CUBES, [[15, [0, 0, -5]]]],
] as const)('lets the analysis take over where %s', (_, code, c, loads) => {
  const truss: Truss = {
    ...bare(c),
    supports: [0, 2, 4, 6].map((i) => ({ node: `N${i}`, fixed: { x: true, y: true, z: true } })),
    loads: loads.map(([node, force]) => ({ case: 'given', node: `N${node}`, force })),
  };
  const a = assess(truss, defaultJob());
  expect(a.findings.find((f) => f.code === code)).toMatchObject({ level: 'warn' });
  expect(a.forces).toMatchObject({ source: 'analysis' });
  expect(Math.max(...a.forces!.values.map(Math.abs))).toBeGreaterThan(0);
});

it('says nothing of diagrams to a truss in space without cells', () => {
  const truss = { ...bare(NESTED_CUBES), cells: [], members: trussOf(NESTED_CUBES).members };
  const a = assess(truss, defaultJob());
  expect(a.reciprocal).toBeNull();
  expect(checkReport(a).reciprocal).toBeNull();
});
