import { expect, it } from 'vitest';
import { type Mat4, transformPoint } from '../../src/maths/mat4.js';
import { distance, type Vec3 } from '../../src/maths/vec3.js';
import { defaultJob } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { canonicalHub, placeHub } from '../../src/pipeline/stages/canonical-hub.js';
import { shapeHubTask } from '../../src/pipeline/stages/shape-hub-task.js';
import { readTruss } from '../../src/readers/truss.js';

const { truss } = readTruss(
  `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [300, 0, 0] }, { "id": "C", "at": [150, 260, 0] }, { "id": "D", "at": [150, 90, 240] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"] }, { "id": "S2", "ends": ["B", "C"] }, { "id": "S3", "ends": ["C", "A"] },
    { "id": "S4", "ends": ["A", "D"] }, { "id": "S5", "ends": ["B", "D"] }, { "id": "S6", "ends": ["C", "D"] } ] }`,
  't.json',
);

it('the solid made in its own frame and moved is the solid made in place', async () => {
  // Without letters, whose places follow the outward side in steps, and without what follows the way it lies on the bed: of equal
  // ways to lie, round-off takes another.
  const job = defaultJob('Tetrahedron');
  const allowance = { upright_mm: 0, lying_mm: 0 };
  const { parts, job: made } = assess(truss!, { ...job, nodes: { ...job.nodes, marks: false, allowance } });
  for (const hub of parts.hubs) {
    const tension = hub.sockets.map(() => 1);
    const direct = (await shapeHubTask({ hub, job: made, tension, object: 1 })).shaped.pieces[0]!;
    const { input, toTruss } = canonicalHub(hub, made, tension);
    const own = placeHub((await shapeHubTask({ ...input, object: 1 })).shaped, toTruss).pieces[0]!;
    expect(own.volume).toBeCloseTo(direct.volume, 0);
    const cloud = (p: { positions: Float32Array; placement: Mat4 }): Vec3[] =>
      Array.from({ length: p.positions.length / 3 }, (_, i) =>
        transformPoint(p.placement, [p.positions[3 * i]!, p.positions[3 * i + 1]!, p.positions[3 * i + 2]!]),
      );
    const there = cloud(direct);
    // Every tenth vertex of the one has a vertex of the other near it; round faces are cut into facets elsewhere.
    for (const [i, p] of cloud(own).entries())
      if (i % 10 === 0) expect(Math.min(...there.map((q) => distance(p, q)))).toBeLessThan(0.5);
  }
});

it('does not change with what only says how its sockets were sized, nor with other nodes', () => {
  const job = defaultJob('Tetrahedron');
  const of = (nodes: object) => {
    const changed = { ...job, nodes: { ...job.nodes, ...nodes } };
    const { parts, job: made } = assess(truss!, changed);
    return parts.hubs.map((hub) => JSON.stringify(canonicalHub(hub, made, []).input));
  };
  const before = of({});
  expect(of({ clearanceMeasured: true })).toEqual(before);
  // The process's own starting value, now measured, for the section that is there and for one that is not.
  expect(of({ clearances: { 'beech-8': 0.4, 'beech-25': 0.9 } })).toEqual(before);
  const mixed = of({ systems: { A: 'clamp' } });
  expect(mixed.filter((m, i) => m === before[i])).toHaveLength(3);
  expect(of({ clearances: { 'beech-8': 0.5 } }).filter((m, i) => m === before[i])).toHaveLength(0);
  expect(of({ chamfer_mm: 0.3 }).filter((m, i) => m === before[i])).toHaveLength(0);
});
