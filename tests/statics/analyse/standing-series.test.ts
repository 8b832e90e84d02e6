import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import type { Truss } from '../../../src/model/truss.js';
import { standingDeflection } from '../../../src/statics/analyse/standing.js';
import { standingSeries } from '../../../src/statics/analyse/standing-series.js';
import { assembled } from '../../helpers/assembled.js';
import { mapped, trussOf } from '../../helpers/truss.js';

/** A tower of three storeys on a triangle, each braced (invented). */
const tower = ((): Truss => {
  const nodes = [0, 1, 2, 3].flatMap((storey) =>
    [0, 1, 2].map((k) => [
      (300 - 30 * storey) * Math.cos((2 * Math.PI * k) / 3 + 0.2 * storey),
      (300 - 30 * storey) * Math.sin((2 * Math.PI * k) / 3 + 0.2 * storey),
      350 * storey,
    ]),
  );
  const edges = [1, 2, 3].flatMap((s) =>
    [0, 1, 2].flatMap((k) => [
      [3 * s + k, 3 * s + ((k + 1) % 3)],
      [3 * s + k - 3, 3 * s + k],
      [3 * s + k - 3, 3 * s + ((k + 1) % 3)],
    ]),
  );
  return trussOf({ nodes, edges, supports: [0, 1, 2].map((i) => [i, 'xyz'] as const) });
})();

describe.each(['pinned', 'rigid'] as const)('what stands of a tower with %s joints', (joints) => {
  const { topology, job, parts } = assembled(tower, { analysis: { joints } });
  const series = standingSeries(topology, job, parts);

  it('moves as the structure of those parts alone does, worked out by itself, or is as unstable', () => {
    const random = seededRandom(joints === 'rigid' ? 2 : 1);
    let stable = 0;
    for (let trial = 0; trial < 60; trial++) {
      const kept = 0.55 + 0.45 * random();
      const struts = topology.truss.members.map((_, e) => e).filter(() => random() < kept);
      const nodes = [
        ...new Set(struts.flatMap((e) => topology.truss.members[e]!.ends.map((m) => topology.nodeIndex.get(m)!))),
      ].sort((a, b) => a - b);
      const held = nodes.filter(() => random() < 0.2);
      const standing = { nodes, struts, held };
      const alone = standingDeflection(topology, job, parts, standing);
      const found = series(standing);
      if (alone === null || alone === 'unstable') expect(found).toBe(alone);
      else {
        stable += 1;
        expect((found as { most: number }).most / alone.most).toBeCloseTo(1, 6);
      }
    }
    expect(stable).toBeGreaterThan(10);
  });

  it('does not depend on what was asked before', () => {
    const all = {
      nodes: topology.truss.nodes.map((_, n) => n),
      struts: topology.truss.members.map((_, e) => e),
      held: [],
    };
    const first = standingSeries(topology, job, parts)(all);
    series({ nodes: [0, 1, 3], struts: [0], held: [] });
    expect(series(all)).toEqual(first);
  });

  it('moves the same when the tower stands elsewhere, turned about the upright', () => {
    const moved = assembled(
      mapped(tower, ([x, y, z]) => [0.8 * x - 0.6 * y + 5000, 0.6 * x + 0.8 * y - 70, z + 12]),
      {
        analysis: { joints },
      },
    );
    const all = {
      nodes: topology.truss.nodes.map((_, n) => n),
      struts: topology.truss.members.map((_, e) => e),
      held: [],
    };
    const there = standingSeries(moved.topology, moved.job, moved.parts)(all) as { most: number };
    expect(there.most / (series(all) as { most: number }).most).toBeCloseTo(1, 5);
  });
});

it('the top of a pinned mast between three legs sinks by the springs of the legs (statics by hand)', () => {
  // Three equal legs at 120 degrees from (R, 0, 0) to (0, 0, H): vertical stiffness 3 (EA/L) (H/L)², load: the hub and half of each leg.
  const [R, H] = [400, 300];
  const legs = trussOf({
    nodes: [0, 1, 2]
      .map((k) => [R * Math.cos((2 * Math.PI * k) / 3), R * Math.sin((2 * Math.PI * k) / 3), 0])
      .concat([[0, 0, H]]),
    edges: [
      [0, 3],
      [1, 3],
      [2, 3],
    ],
    supports: [0, 1, 2].map((i) => [i, 'xyz'] as const),
  });
  const { topology, job, parts } = assembled(legs, { analysis: { joints: 'pinned' } });
  const found = standingSeries(topology, job, parts)({ nodes: [0, 1, 2, 3], struts: [0, 1, 2], held: [] });
  const [L, d] = [500, parts.struts[0]!.section!.shape as { diameter: number }];
  const ea = parts.struts[0]!.material!.modulus * (Math.PI / 4) * d.diameter ** 2;
  const kg = parts.hubs[3]!.mass! + parts.struts.reduce((sum, s) => sum + s.mass! / 2, 0);
  const sinks = (kg * 9.80665) / (3 * (ea / L) * (H / L) ** 2);
  expect((found as { most: number; node: number }).node).toBe(3);
  expect((found as { most: number }).most / sinks).toBeCloseTo(1, 6);
});
