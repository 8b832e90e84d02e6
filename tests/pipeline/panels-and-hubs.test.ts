import { expect, it } from 'vitest';
import { clearanceAt } from '../../src/maths/polygon/clearance.js';
import { toRing } from '../../src/maths/polygon/ring.js';
import { addScaled, cross, dot, subtract } from '../../src/maths/vec3.js';
import { topologyOf } from '../../src/model/topology.js';
import { fix, layOut, shallowHubs, withPanels } from '../../src/pipeline/detail.js';
import { readJob } from '../../src/readers/job.js';
import { trussOf } from '../helpers/truss.js';

const OCTAHEDRON = trussOf({
  nodes: [
    [300, 0, 0],
    [-300, 0, 0],
    [0, 300, 0],
    [0, -300, 0],
    [0, 0, 300],
    [0, 0, -300],
  ],
  edges: [
    [0, 2],
    [2, 1],
    [1, 3],
    [3, 0],
    ...[0, 1, 2, 3].flatMap((i): [number, number][] => [
      [i, 4],
      [i, 5],
    ]),
  ],
  faces: [0, 1].flatMap((a) => [2, 3].flatMap((b) => [4, 5].map((c) => [a, b, c]))),
  panels: true,
});

function partsOf(wish: object) {
  const { job } = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 't', truss: 't.json', ...wish }),
    'job.json',
  );
  const layout = layOut(topologyOf(OCTAHEDRON), job!);
  return withPanels(layout, fix(layout, shallowHubs(layout, job!), new Map(), job!));
}

it('gives every panel in one piece in every seat and at every kind of corner', () => {
  for (const seating of ['between', 'over', 'under'])
    for (const corner of ['straight', 'round', 'follow']) {
      const { parts, findings } = partsOf({ panels: { seating, corner, holdBy: 'channel' } });
      expect(findings.filter((f) => f.code.startsWith('panel'))).toEqual([]);
      // Half the face at the least: what is cut off lies at the corners.
      for (const p of parts.panels) expect(p.area).toBeGreaterThan(0.5 * ((Math.sqrt(3) / 4) * 2 * 300 ** 2));
    }
});

it('keeps panels clear of pins that stand out of the sleeves', () => {
  for (const joint of ['glued', 'pinned']) {
    const pin_mm = 3;
    const { parts } = partsOf({ nodes: { joint, pin_mm }, panels: { corner: 'follow' } });
    for (const panel of parts.panels)
      for (const hub of parts.hubs)
        for (const socket of hub.sockets) {
          const inPlane = Math.abs(dot(socket.direction, panel.frame.z)) < 1e-9;
          const edge = panel.edges.find((e) => e.strut === socket.strut);
          if (!inPlane || !edge) continue;
          // The end of a pin that lies in the panel's plane: half-way down the socket, its own diameter outside the sleeve.
          const side = cross(panel.frame.z, socket.direction);
          const out = (socket.bore as number) / 2 + socket.wall + (joint === 'pinned' ? pin_mm : 0);
          for (const sense of [-1, 1]) {
            const at = addScaled(
              addScaled(hub.at, socket.direction, socket.setback! + socket.depth / 2),
              side,
              sense * (out - 0.01),
            );
            const d = subtract(at, panel.frame.origin);
            const clear = clearanceAt([toRing(panel.outline)], dot(d, panel.frame.x), dot(d, panel.frame.y));
            expect(clear).toBeLessThan(-0.9);
          }
        }
  }
});

it('finds room for fixings outdoors however large movement makes their holes', () => {
  const { parts, findings } = partsOf({
    use: 'outdoor',
    panels: { holes: { diameter_mm: 6, edge_mm: 6, oversize_mm: 8 } },
  });
  expect(findings.filter((f) => f.code === 'panel-not-held' || f.code === 'panel-hole-near-edge')).toEqual([]);
  for (const p of parts.panels) expect(p.hold!.fixings).toBeGreaterThanOrEqual(3);
});
