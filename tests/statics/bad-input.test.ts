import { describe, expect, it } from 'vitest';
import { check, readJob, readTruss } from '../../src/index.js';

/** An invented pyramid on four feet with a lamp of 20 N. */
const PYRAMID = {
  format: 'strutwright-truss/1',
  units: 'mm',
  nodes: [
    { id: 'A', at: [0, 0, 0] },
    { id: 'B', at: [400, 0, 0] },
    { id: 'C', at: [400, 400, 0] },
    { id: 'D', at: [0, 400, 0] },
    { id: 'T', at: [200, 200, 300] },
  ],
  members: ['AB', 'BC', 'CD', 'DA', 'AT', 'BT', 'CT', 'DT'].map((e) => ({ id: `S${e}`, ends: [...e] })),
  supports: [...'ABCD'].map((node) => ({ node, fixed: 'xyz' })),
  loads: [{ case: 'lamp', node: 'T', force: [0, 0, -20] }],
};
const JOB = { format: 'strutwright-job/1', title: 'Pyramid', truss: 'truss.json' };
const read = (truss: object, job: object) => ({
  truss: readTruss(JSON.stringify({ ...PYRAMID, ...truss }), 'truss.json'),
  job: readJob(JSON.stringify({ ...JOB, ...job }), 'job.json'),
});

/** What the whole program says of it: every number finite, every sentence whole. */
async function said(truss: object, job: object) {
  const input = read(truss, job);
  expect([...input.truss.faults, ...input.job.faults]).toEqual([]);
  const report = await check(input.truss.truss!, input.job.job!);
  const text = JSON.stringify(report);
  expect(text).not.toMatch(/NaN|Infinity|undefined|\[object/);
  return report.findings;
}
const stops = (found: Awaited<ReturnType<typeof said>>) =>
  found.filter((f) => f.level === 'stop').map((f) => `${f.code} ${f.subject}: ${f.message}`);

describe('what is wrong with a structure is a finding that names it', () => {
  it('a figure that can move on pins', async () => {
    const square = PYRAMID.members.slice(0, 4);
    const nodes = PYRAMID.nodes.slice(0, 4).map((n) => ({ ...n, at: [n.at[0], 0, n.at[1]] }));
    const found = await said(
      {
        nodes,
        members: square,
        supports: [
          { node: 'A', fixed: 'xyz' },
          { node: 'B', fixed: 'xyz' },
          { node: 'C', fixed: 'y' },
          { node: 'D', fixed: 'y' },
        ],
        loads: [],
      },
      { analysis: { joints: 'pinned' } },
    );
    const moves = stops(found).filter((s) => s.startsWith('truss-mechanism'));
    expect(moves.length).toBe(1);
    expect(moves[0]).toMatch(/C and D|D and C/);
  });
  it('a load that rests on feet which can roll', async () => {
    const supports = PYRAMID.supports.map((s) => ({ ...s, fixed: 'z' }));
    const found = stops(await said({ supports }, {}));
    expect(found.filter((s) => s.startsWith('truss-unsupported')).length).toBe(3);
    expect(found.join()).toContain('slide together along x');
  });
  it('a piece that hangs on nothing', async () => {
    const nodes = [...PYRAMID.nodes, { id: 'P', at: [900, 0, 0] }, { id: 'Q', at: [900, 300, 0] }];
    const members = [...PYRAMID.members, { id: 'SPQ', ends: ['P', 'Q'] }];
    expect(stops(await said({ nodes, members }, {})).some((s) => /^piece-unsupported [PQ]:/.test(s))).toBe(true);
  });
  it('no supports at all: counted, not loaded', async () => {
    const found = await said({ supports: [] }, {});
    expect(found.some((f) => f.code === 'supports-missing')).toBe(true);
  });
});

describe('loads and combinations on what is not there', () => {
  it('a load of the truss file on an unknown node is a fault with its place', () => {
    const { truss } = read({ loads: [{ case: 'lamp', node: 'Q', force: [0, 0, -1] }] }, {});
    expect(truss.faults.length).toBe(1);
    expect(truss.faults[0]).toMatchObject({ file: 'truss.json', line: 1 });
    expect(truss.faults[0].what).toContain('"Q"');
  });
  it.each([
    [
      'a node load of the job',
      { loads: { cases: [{ name: 'x', kind: 'imposed', nodes: [{ node: 'Q', force_N: [0, 0, -1] }] }] } },
    ],
    [
      'a misfit of a strut',
      { loads: { cases: [{ name: 'x', kind: 'misfit', misfit: [{ strut: 'Q', longer_mm: 1 }] }] } },
    ],
    ['a turnbuckle in a strut', { analysis: { selfStress: { device: 'turnbuckle', strut: 'Q', by_mm: 1 } } }],
  ])('%s', async (_, job) => {
    const found = stops(await said({}, job)).filter((s) => s.startsWith('load-on-unknown'));
    expect(found.length).toBe(1);
    expect(found[0]).toContain('"Q"');
  });
  it('a combination of an unknown case', async () => {
    const found = stops(await said({}, { loads: { combinations: [{ name: 'winter', factors: { hail: 1.5 } }] } }));
    expect(found.find((s) => s.startsWith('combination-unknown-case'))).toMatch(/"winter".*"hail"/);
  });
  it('a load where no strut ends', async () => {
    const nodes = [...PYRAMID.nodes, { id: 'F', at: [0, 0, 900] }];
    const loads = [{ case: 'lamp', node: 'F', force: [0, 0, -5] }];
    expect(stops(await said({ nodes, loads }, {})).some((s) => s.startsWith('load-on-free-node F'))).toBe(true);
  });
});

describe('sections and materials that cannot be reckoned with', () => {
  const own = (shape: object) => ({
    struts: { section: 'own' },
    sections: { own: { shape, material: 'beech-dowel' } },
  });
  it.each([
    ['a rod of no diameter', own({ kind: 'round', diameter_mm: 0 })],
    ['a tube whose wall meets its middle', own({ kind: 'tube', diameter_mm: 10, wall_mm: 6 })],
    ['a bar of no width', own({ kind: 'rectangle', width_mm: 0, height_mm: 20 })],
  ])('%s is a fault that names the section', (_, job) => {
    const { faults } = read({}, job).job;
    expect(faults.length).toBeGreaterThan(0);
    expect(faults.map((f) => f.what).join()).toContain('own');
  });
  it('a strut of no area is a fault that names the member', () => {
    const members = PYRAMID.members.map((m, i) => (i === 0 ? { ...m, area_mm2: 0, modulus_MPa: 1000 } : m));
    const { faults } = read({ members }, {}).truss;
    expect(faults[0].what).toContain('members[0].area_mm2');
  });
  it('a section that nobody knows', async () => {
    const found = await said({}, { struts: { section: 'none-such' } });
    expect(stops(found).filter((s) => s.startsWith('section-unknown')).length).toBe(8);
    expect(found.filter((f) => f.code === 'stiffness-missing').length).toBe(8);
  });
  it.each([
    ['table', 'warn'],
    ['overhead', 'stop'],
  ])('a material without the values of the standard: on a %s a %s', async (use, level) => {
    const found = await said({}, { use, strength: { standard: 'EN 1995-1-1' } });
    const lacks = found.find((f) => f.code === 'material-value-missing')!;
    expect(lacks.level).toBe(level);
    expect(lacks.message).toMatch(/beech-dowel.*fmk, ft0k, fc0k, fvk, E0\.05/);
  });
  it('a strut that the standard does not reach: over people a stop', async () => {
    const slender = { struts: { section: 'DFL-2x2' }, use: 'overhead' };
    const nodes = PYRAMID.nodes.map((n) => ({ ...n, at: n.at.map((v) => 10 * v) }));
    const found = stops(await said({ nodes }, slender));
    expect(found.some((s) => s.startsWith('strength-out-of-scope') && s.includes('NDS 3.7.1.4'))).toBe(true);
  });
});
