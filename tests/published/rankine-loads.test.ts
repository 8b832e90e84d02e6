import { expect, it } from 'vitest';
import { add, cross, dot, length, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob } from '../../src/model/job/index.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { reciprocalOf } from '../../src/statics/reciprocal/reciprocal.js';
import { mapped, trussOf } from '../helpers/truss.js';

// Tripod of foot radius 1 and height 3 under P = 3: each leg -P L / 3 h = -1.05409 (closed form); a ring at the feet, which stand
// on rollers, takes the thrust P r / 3 h = 1/3 of each foot: 2 T cos 30 = 1/3.
const tripod = trussOf({
  nodes: [
    [0, 0, 3],
    [1, 0, 0],
    [-0.5, Math.sqrt(3) / 2, 0],
    [-0.5, -Math.sqrt(3) / 2, 0],
  ],
  edges: [
    [0, 1],
    [0, 2],
    [0, 3],
    [1, 2],
    [2, 3],
    [3, 1],
  ],
  faces: [
    [0, 1, 2],
    [0, 2, 3],
    [0, 3, 1],
    [1, 2, 3],
  ],
  cells: [[0, 1, 2, 3]],
  supports: [
    [1, 'z'],
    [2, 'z'],
    [3, 'z'],
  ],
  loads: [[0, [0, 0, -3]]],
});
const LEG = -Math.sqrt(10) / 3;
const TIE = 1 / (3 * Math.sqrt(3));
const read = (truss: Truss) => reciprocalOf(topologyOf(truss), defaultJob());

it('a tripod with a tie ring: legs, ties and reactions from one bounded cell and four open ones', () => {
  const { forces, findings, counts, diagram, decidedBy } = read(tripod);
  expect(findings).toEqual([]);
  [LEG, LEG, LEG, TIE, TIE, TIE].forEach((t, m) => {
    expect(forces![m]).toBeCloseTo(t, 9);
  });
  expect(counts!.cells).toBe(5);
  expect(decidedBy).toBe('loads');
  for (const node of diagram!.nodes) expect(length(node.residual)).toBeLessThan(1e-9);
});

it('the force tetrahedron at its apex: faces 1.05409 square to the legs, 3 square to the load, of the published shape', () => {
  const { diagram } = read(tripod);
  const apex = diagram!.nodes[0]!;
  expect(apex.faces.length).toBe(4);
  const legs = apex.faces.filter((f) => f.strut !== null);
  for (const f of legs) expect(length(f.area)).toBeCloseTo(1.0540925533894598, 9);
  const load = apex.faces.find((f) => f.strut === null)!;
  expect(length(load.area)).toBeCloseTo(3, 9);
  expect(Math.abs(load.area[2])).toBeCloseTo(3, 9);
  // Vertices computed independently (numpy) from areas and directions by Minkowski's theorem; four faces, so congruent up to a move and a
  // mirror: compare all six distances. The apex of the tetrahedron is the bounded cell.
  const published: Vec3[] = [
    [1.519671371303185, 0, -0.12330435717997665],
    [-0.7598356856515925, 1.3160740129524924, -0.12330435717997665],
    [-0.7598356856515925, -1.3160740129524924, -0.12330435717997665],
    [0, 0, 0.12997420470388757],
  ];
  const used = [...new Set(apex.faces.flatMap((f) => f.loop))].map((v) => diagram!.vertices[v]!.at);
  const distances = (points: readonly Vec3[]): number[] =>
    points.flatMap((p, i) => points.slice(i + 1).map((q) => length(subtract(p, q)))).sort((a, b) => a - b);
  distances(published).forEach((d, i) => {
    expect(distances(used)[i]).toBeCloseTo(d, 8);
  });
});

it('the same wherever the tripod stands and however it is listed', () => {
  const k: Vec3 = [0, 0, 1];
  const spun = mapped(tripod, (p) =>
    add(add(scale(p, Math.cos(0.4)), scale(cross(k, p), Math.sin(0.4))), scale(k, dot(k, p) * (1 - Math.cos(0.4)))),
  );
  const listed: Truss = {
    ...spun,
    nodes: [...spun.nodes].reverse(),
    members: [...spun.members].reverse(),
    faces: spun.faces.map((f) => ({ ...f, nodes: [...f.nodes].reverse() })),
  };
  const { forces, findings } = read(listed);
  expect(findings).toEqual([]);
  listed.members.forEach((m, i) => {
    expect(forces![i]).toBeCloseTo(Number(m.mark.slice(1)) < 3 ? LEG : TIE, 8);
  });
});

it('held in every direction at its feet it has many diagrams; the one with the least forces rests its ring', () => {
  // The thrust goes to the ground: any tie force T is possible, and the least sum of squares has T = 0, for the legs are fixed by the apex.
  const held: Truss = {
    ...tripod,
    supports: tripod.supports.map((s) => ({ ...s, fixed: { x: true, y: true, z: true } })),
  };
  const { forces, findings } = read(held);
  expect(findings).toEqual([]);
  [LEG, LEG, LEG, 0, 0, 0].forEach((t, m) => {
    expect(forces![m]).toBeCloseTo(t, 6);
  });
});

it('a diagram of the file with open cells of its own is read, and gives the same forces', () => {
  // One open cell behind each face of the tripod, with the vertex that the diagram above has there.
  const { diagram } = read(tripod);
  const open: Truss = {
    ...tripod,
    cells: [...tripod.cells, ...tripod.faces.map((f) => ({ mark: `O${f.mark.slice(1)}`, faces: [f.mark] }))],
    reciprocal: {
      newtonPerArea: 1,
      vertices: diagram!.vertices.map((v) => ({ cell: v.cell.replace(/^outside F/, 'O'), at: v.at })),
    },
  };
  const result = reciprocalOf(topologyOf(open), {
    ...defaultJob(),
    forces: { ...defaultJob().forces, sign: diagram!.sign },
  });
  expect(result.findings).toEqual([]);
  [LEG, LEG, LEG, TIE, TIE, TIE].forEach((t, m) => {
    expect(result.forces![m]).toBeCloseTo(t, 9);
  });
  expect(result.diagram!.source).toBe('file');
  const load = result.diagram!.nodes[0]!.faces.find((f) => f.strut === null)!;
  expect(length(load.area)).toBeCloseTo(3, 9);
  // Without loads nothing may be open.
  const unloaded = reciprocalOf(topologyOf({ ...open, loads: [] }), defaultJob());
  expect(unloaded.findings.map((f) => f.code)).toContain('cell-open');
});
