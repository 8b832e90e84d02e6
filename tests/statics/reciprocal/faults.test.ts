import { expect, it } from 'vitest';
import { defaultJob } from '../../../src/model/job/index.js';
import { topologyOf } from '../../../src/model/topology.js';
import type { Truss } from '../../../src/model/truss.js';
import { complexOf, givenCells } from '../../../src/statics/reciprocal/complex.js';
import { reciprocalOf } from '../../../src/statics/reciprocal/reciprocal.js';
import { traceCells } from '../../../src/statics/reciprocal/trace-cells.js';
import { trussOf } from '../../helpers/truss.js';
import { K5, NESTED_CUBES, NESTED_TETRAHEDRA, SIXTEEN_CELL } from '../../published/rankine-cases.js';

const bounded = (c: typeof K5): Truss => {
  const truss = trussOf(c);
  return { ...truss, cells: truss.cells.filter((_, i) => i !== c.outside) };
};
const codes = (truss: Truss): unknown[] => {
  const topology = topologyOf(truss);
  return complexOf(topology, givenCells(topology)).findings.map((f) => [f.code, f.subject]);
};
const change = (truss: Truss, mark: string, faces: (list: readonly string[]) => string[]): Truss => ({
  ...truss,
  cells: truss.cells.map((c) => (c.mark === mark ? { ...c, faces: faces(c.faces) } : c)),
});

it('the published complexes obey V - E + F - C = 0', () => {
  // Euler's relation for 4-polytopes: 5,10,10,5; 8,16,14,6; 16,32,24,8; 8,24,32,16 (L. Schläfli's figures).
  for (const [c, ...counts] of [
    [K5, 5, 10, 10, 5],
    [NESTED_TETRAHEDRA, 8, 16, 14, 6],
    [NESTED_CUBES, 16, 32, 24, 8],
    [SIXTEEN_CELL, 8, 24, 32, 16],
  ] as const) {
    const topology = topologyOf(bounded(c));
    const { V, E, F, C } = complexOf(topology, givenCells(topology)).complex!.euler;
    expect([V, E, F, C]).toEqual(counts);
  }
});

it('a cell with a face left out is open, along the edges of that face', () => {
  // F4, the trapezium between C2 and C4.
  const truss = change(bounded(NESTED_CUBES), 'C2', (list) => list.filter((f) => f !== 'F4'));
  const topology = topologyOf(truss);
  const { complex, findings } = complexOf(topology, givenCells(topology));
  expect(complex).toBeNull();
  expect(findings).toMatchObject([{ code: 'cell-open', subject: 'C2' }]);
  const missing = topology.truss.faces[4]!;
  for (const mark of String(findings[0]!.about!['along']).split(', ')) {
    const ends = truss.members.find((m) => m.mark === mark)!.ends;
    expect(ends.every((n) => missing.nodes.includes(n))).toBe(true);
  }
});

it('a hull face left out of its cell is in no cell, and the cell is open', () => {
  const truss = change(bounded(NESTED_CUBES), 'C2', (list) => list.filter((f) => f !== 'F0'));
  expect(codes(truss)).toEqual([
    ['face-in-no-cell', 'F0'],
    ['cell-open', 'C2'],
  ]);
});

it('a face in three cells, a face named twice and a face in no cell are told apart', () => {
  const three = change(bounded(K5), 'C1', (list) => [...list, 'F9']);
  expect(codes(three)).toContainEqual(['face-in-three-cells', 'F9']);
  const twice = change(bounded(K5), 'C1', (list) => [...list, list[0]!]);
  expect(codes(twice).map((c) => (c as string[])[0])).toContain('face-in-three-cells');
  const none = {
    ...bounded(K5),
    faces: [...bounded(K5).faces, { mark: 'P', nodes: ['N0', 'N1', 'N2'].reverse(), panel: true, group: null }],
  };
  expect(codes(none)).toEqual([['face-in-no-cell', 'P']]);
});

it('two bodies that touch in one strut only are named', () => {
  // Two tetrahedra with the common edge N0-N1 and no common face.
  const truss = trussOf({
    nodes: [
      [0, 0, 0],
      [0, 0, 2],
      [2, 0, 1],
      [1, 2, 1],
      [-2, 0, 1],
      [-1, -2, 1],
    ],
    edges: [[0, 1]],
    faces: [
      [0, 1, 2],
      [0, 1, 3],
      [0, 2, 3],
      [1, 2, 3],
      [0, 1, 4],
      [0, 1, 5],
      [0, 4, 5],
      [1, 4, 5],
    ],
    cells: [
      [0, 1, 2, 3],
      [4, 5, 6, 7],
    ],
  });
  expect(codes(truss)).toEqual([['cell-pinched', 'outside']]);
});

it('cells that lie apart break Euler or fall in pieces', () => {
  const tetra = (dx: number) =>
    [
      [0, 0, 0],
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ].map(([x, y, z]) => [x! + dx, y!, z!]);
  const faces = [
    [0, 1, 2],
    [0, 1, 3],
    [0, 2, 3],
    [1, 2, 3],
  ];
  const truss = trussOf({
    nodes: [...tetra(0), ...tetra(9)],
    edges: [],
    faces: [...faces, ...faces.map((f) => f.map((i) => i + 4))],
    cells: [
      [0, 1, 2, 3],
      [4, 5, 6, 7],
    ],
  });
  expect(codes(truss)).toEqual([['cell-in-pieces', 'outside']]);
});

it.each([K5, NESTED_TETRAHEDRA, NESTED_CUBES, SIXTEEN_CELL])('cells of $name are found from its faces alone', (c) => {
  const truss = bounded(c);
  const topology = topologyOf({ ...truss, cells: [] });
  const { list, findings } = traceCells(topology);
  expect(findings).toEqual([]);
  const key = (faces: readonly (string | number)[]): string =>
    faces
      .map(Number)
      .sort((a, b) => a - b)
      .join(' ');
  const found = list!.cells.filter((cell) => cell.mark !== 'outside').map((cell) => key(cell.faces));
  const wanted = c.cells.filter((_, i) => i !== c.outside).map(key);
  expect(found.sort()).toEqual(wanted.sort());
});

it('a fin bounds nothing and is left out', () => {
  const truss = bounded(K5);
  const topology = topologyOf({
    ...truss,
    nodes: [...truss.nodes, { mark: 'N5', at: [3, 1, 0] }],
    faces: [...truss.faces, { mark: 'FIN', nodes: ['N0', 'N1', 'N5'], panel: true, group: null }],
    cells: [],
  });
  const { list, findings } = traceCells(topology);
  expect(findings).toMatchObject([{ code: 'face-in-no-cell', subject: 'FIN' }]);
  expect(list!.cells.length).toBe(5);
});

const JOB = defaultJob();
const withDiagram = (marks: readonly string[]): Truss => ({
  ...bounded(K5),
  members: bounded(K5).members.map((m) => ({ ...m, force: null })),
  reciprocal: { newtonPerArea: 1, vertices: marks.map((cell, i) => ({ cell, at: K5.vertices[i % 5]! })) },
});

it('a vertex missing, one too many and one of no cell are each named', () => {
  const of = (marks: readonly string[]) =>
    reciprocalOf(topologyOf(withDiagram(marks)), JOB).findings.map((f) => [f.code, f.subject]);
  expect(of(['outside', 'C1', 'C2', 'C3'])).toEqual([['vertex-missing', 'C4']]);
  expect(of(['outside', 'C1', 'C2', 'C3', 'C4', 'C9'])).toEqual([['vertex-of-no-cell', 'C9']]);
  expect(of(['outside', 'C1', 'C2', 'C3', 'C4', 'C4'])).toEqual([['vertex-twice', 'C4']]);
});

const MARKS = ['outside', 'C1', 'C2', 'C3', 'C4'];

it('without given forces or a sign in the job the diagram is not signed, and says so', () => {
  const result = reciprocalOf(topologyOf(withDiagram(MARKS)), JOB);
  expect(result.forces).toBeNull();
  expect(result.findings).toMatchObject([{ code: 'reciprocal-unsigned', level: 'stop' }]);
});

it('given forces sign the diagram; the job overrules them', () => {
  const given = (s: number): Truss => ({
    ...withDiagram(MARKS),
    members: withDiagram(MARKS).members.map((m, i) => ({ ...m, force: s * K5.forces[i]! })),
  });
  const force = (truss: Truss, sign?: 1 | -1) =>
    reciprocalOf(topologyOf(truss), { ...JOB, forces: { ...JOB.forces, sign } }).forces![0]!;
  expect(force(given(1))).toBeCloseTo(-Math.SQRT2, 9);
  expect(force(given(-1))).toBeCloseTo(Math.SQRT2, 9);
  expect(force(given(-1), 1)).toBeCloseTo(-Math.SQRT2, 9);
});

it('a diagram of another form is named once, not strut by strut', () => {
  // The vertices of K5's diagram in another order: still five points, but of another arrangement.
  const truss = withDiagram(['C1', 'outside', 'C2', 'C4', 'C3']);
  const squeezed = {
    ...truss,
    nodes: truss.nodes.map((n) => ({ ...n, at: [n.at[0] * 3, n.at[1], n.at[2] + n.at[0]] as const })),
  };
  const { findings } = reciprocalOf(topologyOf(squeezed), { ...JOB, forces: { ...JOB.forces, sign: 1 } });
  expect(findings.map((f) => f.code)).toEqual(['diagram-of-another-form']);
});

it('a fixed force of a strut that is not there is named', () => {
  const job = { ...JOB, forces: { ...JOB.forces, source: 'reciprocal' as const, fix: [{ strut: 'S99', force_N: 1 }] } };
  const { findings } = reciprocalOf(topologyOf({ ...withDiagram(MARKS), reciprocal: null }), job);
  expect(findings[0]).toMatchObject({ code: 'fixed-force-unknown', subject: 'S99', level: 'stop' });
});

it('faces that enclose nothing, or none at all, are no cells', () => {
  const job = { ...JOB, forces: { ...JOB.forces, source: 'reciprocal' as const } };
  for (const faces of [[], bounded(K5).faces.slice(0, 2)]) {
    const { findings, forces } = reciprocalOf(topologyOf({ ...bounded(K5), faces, cells: [] }), job);
    expect(forces).toBeNull();
    expect(findings).toMatchObject([{ code: 'cells-not-found', level: 'stop', value: 0 }]);
  }
});
