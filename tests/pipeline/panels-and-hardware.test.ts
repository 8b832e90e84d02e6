import { describe, expect, it } from 'vitest';
import { clampParts } from '../../src/detailing/systems/clamp-parts.js';
import { sleevesOf } from '../../src/detailing/systems/sleeve.js';
import { clearanceAt } from '../../src/maths/polygon/clearance.js';
import { toRing } from '../../src/maths/polygon/ring.js';
import { add, addScaled, cross, dot, perpendicular, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';
import type { Job } from '../../src/model/job/index.js';
import type { HubPart, Parts, Socket } from '../../src/model/parts.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { fix, layOut, shallowHubs, withPanels } from '../../src/pipeline/detail.js';
import { readJob } from '../../src/readers/job.js';
import { mapped, trussOf } from '../helpers/truss.js';

/** Invented: four square bays round the node N4, level at 50 mm. */
const bays = (side: number): Truss =>
  trussOf({
    nodes: [0, 1, 2].flatMap((j) => [0, 1, 2].map((i) => [i * side, j * side, 50])),
    edges: [
      [0, 1],
      [1, 2],
      [3, 4],
      [4, 5],
      [6, 7],
      [7, 8],
      [0, 3],
      [3, 6],
      [1, 4],
      [4, 7],
      [2, 5],
      [5, 8],
    ],
    faces: [
      [0, 1, 4, 3],
      [1, 2, 5, 4],
      [3, 4, 7, 6],
      [4, 5, 8, 7],
    ],
    panels: true,
  });
/** About x, y and z by angles that have nothing to do with the bays, and away. */
const turned = (truss: Truss): Truss =>
  mapped(truss, ([x, y, z]) => {
    const [c, s, d, t] = [Math.cos(0.6), Math.sin(0.6), Math.cos(1.1), Math.sin(1.1)];
    const [u, v] = [x * c - y * s, x * s + y * c];
    return [u * d + z * t + 900, v - 300, -u * t + z * d];
  });

function partsOf(truss: Truss, wish: object): { parts: Parts; job: Job } {
  const { job, faults } = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 't', truss: 't.json', ...wish }),
    'job.json',
  );
  if (!job) throw new Error(JSON.stringify(faults));
  const layout = layOut(topologyOf(truss), job);
  return { parts: withPanels(layout, fix(layout, shallowHubs(layout, job), new Map(), job)).parts, job };
}

/** Points on a circle about `at`, square to the unit vector `along`. */
function ringAbout(at: Vec3, along: Vec3, radius: number): Vec3[] {
  const u = perpendicular(along);
  const v = cross(along, u);
  return Array.from({ length: 720 }, (_, k) => {
    const a = (k * Math.PI) / 360;
    return add(at, add(scale(u, radius * Math.cos(a)), scale(v, radius * Math.sin(a))));
  });
}

/** How near the points, where they lie between a panel's faces, come to the panels: least distance, mm (negative: inside), and how many lay so. */
function nearestOf(parts: Parts, points: readonly Vec3[]): { nearest: number; looked: number } {
  let [nearest, looked] = [Number.POSITIVE_INFINITY, 0];
  for (const panel of parts.panels) {
    expect(panel.outline.length).toBeGreaterThan(3);
    const ring = toRing(panel.outline);
    const t = panel.thickness;
    const [low, high] = panel.seating === 'between' ? [-t / 2, t / 2] : panel.seating === 'over' ? [0, t] : [-t, 0];
    for (const p of points) {
      const d = subtract(p, panel.frame.origin);
      const h = dot(d, panel.frame.z);
      if (h < low || h > high) continue;
      looked++;
      nearest = Math.min(nearest, -clearanceAt([ring], dot(d, panel.frame.x), dot(d, panel.frame.y)));
    }
  }
  return { nearest, looked };
}

/** The sockets of a hub with the points that `of` puts on them, in the truss's axes. */
const around = (hub: HubPart, of: (socket: Socket) => readonly Vec3[]): Vec3[] =>
  hub.sockets.flatMap((s) => of(s).map((p) => add(hub.at, p)));
const middle = (parts: Parts): HubPart => parts.hubs.find((h) => h.mark === 'N4')!;
const radiusOf = (s: Socket): number => (s.bore as number) / 2 + s.wall;

const GAP = 1;
/** Outlines lie on an integer grid of 1e-5 mm, rings have their points within 1e-5 of a circle. */
const ROUND_OFF = 1e-3;
const CORNERS = ['straight', 'round', 'follow'] as const;

for (const [where, place] of [
  ['level', (t: Truss) => t],
  ['turned and moved', turned],
] as const)
  describe(`panels keep the gap, ${where}, from`, () => {
    it('sleeves to their mouths', () => {
      for (const corner of CORNERS) {
        const { parts } = partsOf(place(bays(200)), { panels: { corner, gap_mm: GAP } });
        const points = around(middle(parts), (s) =>
          [0.5, 0.75, 1].flatMap((share) =>
            ringAbout(scale(s.direction, s.setback! + share * s.depth), s.direction, radiusOf(s)),
          ),
        );
        const { nearest, looked } = nearestOf(parts, points);
        expect(looked).toBeGreaterThan(100);
        expect(nearest).toBeGreaterThan(GAP - ROUND_OFF);
      }
    });

    it('cable ties round caps, 4 mm wide and 0.6 mm proud at the mouth', () => {
      for (const corner of CORNERS) {
        const ends = Object.fromEntries(['S2', 'S3', 'S8', 'S9'].map((s) => [`${s}@N4`, 'drop-in']));
        const { parts } = partsOf(place(bays(200)), { struts: { ends }, panels: { corner, gap_mm: GAP } });
        expect(middle(parts).sockets.map((s) => s.detail)).toEqual(['drop-in', 'drop-in', 'drop-in', 'drop-in']);
        const points = around(middle(parts), (s) =>
          [4, 2, 0].flatMap((back) =>
            ringAbout(scale(s.direction, s.setback! + s.depth - back), s.direction, radiusOf(s) + 0.6),
          ),
        );
        const { nearest, looked } = nearestOf(parts, points);
        expect(looked).toBeGreaterThan(100);
        expect(nearest).toBeGreaterThan(GAP - ROUND_OFF);
      }
    });

    it('heads of clamp screws, M3 by ISO 4762: 5.5 mm across, 3 mm high', () => {
      for (const seating of ['over', 'under'])
        for (const corner of CORNERS) {
          const { parts, job } = partsOf(place(bays(300)), {
            struts: { section: 'beech-20' },
            nodes: { systems: { N4: 'clamp' }, wall_mm: 1.6 },
            panels: { corner, gap_mm: GAP, seating },
          });
          const hub = middle(parts);
          // Where the solid is drilled; the heads stand on the bosses, on one side of the clamp.
          const { screws, normal, half } = clampParts(sleevesOf(hub.sockets), job);
          expect(screws.length).toBeGreaterThanOrEqual(2);
          const points = screws.flatMap((at) =>
            [0.1, 1.5, 2.9].flatMap((h) => ringAbout(add(hub.at, addScaled(at, normal, half + h)), normal, 5.5 / 2)),
          );
          const { nearest, looked } = nearestOf(parts, points);
          // On one of the two sides of the clamp there are no heads.
          if (looked > 0) expect(nearest).toBeGreaterThan(GAP - ROUND_OFF);
          const side = Math.sign(dot(normal, parts.panels[0]!.frame.z)) * (seating === 'over' ? 1 : -1);
          expect(looked > 0).toBe(side > 0);
        }
    });

    it('washers and ends of bolts through slotted timber', () => {
      for (const corner of CORNERS) {
        const { parts } = partsOf(place(bays(2000)), {
          struts: { section: 'C24-45x95' },
          nodes: { system: 'spigot' },
          panels: { corner, gap_mm: GAP, thickness_mm: 10, material: 'birch-plywood' },
        });
        // A washer three diameters across (EN 1995-1-1 10.4.3 (2)); washer, nut and thread 1.6 diameters proud.
        const points = around(middle(parts), (s) => {
          const { bolted, section } = s;
          if (!bolted || section.shape.kind !== 'rectangle') throw new Error('no bolts');
          const [along, size] = bolted.along === 'y' ? [s.y, section.shape.width] : [s.z, section.shape.height];
          return Array.from({ length: bolted.bolts }, (_, k) =>
            scale(s.direction, s.setback! + bolted.endDistance + k * bolted.spacing),
          ).flatMap((centre) =>
            [-1, 1].flatMap((side) =>
              ringAbout(
                addScaled(centre, along, side * (size / 2 + 1.6 * bolted.diameter)),
                along,
                1.5 * bolted.diameter,
              ),
            ),
          );
        });
        const { nearest, looked } = nearestOf(parts, points);
        expect(looked).toBeGreaterThan(100);
        expect(nearest).toBeGreaterThan(GAP - ROUND_OFF);
      }
    });
  });
