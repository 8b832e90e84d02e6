import { expect, it } from 'vitest';
import { detailHubs } from '../../src/detailing/hubs.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import type { Section } from '../../src/model/section.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';

type V = [number, number, number];

const ROUND: Section = { name: 'r8', shape: { kind: 'round', diameter: 8 }, material: 'beech-dowel', measured: null };
const LATH: Section = {
  name: '8x14',
  shape: { kind: 'rectangle', width: 8, height: 14 },
  material: 'beech-dowel',
  measured: null,
};

/** An invented star of struts of 500 mm about N1, its plane turned and moved; the findings on N1. */
function star(directions: readonly V[], nodes: Partial<Job['nodes']>, section = ROUND) {
  const turn = (v: V): V => {
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
    const w: V = [c * v[0] - s * v[1], s * v[0] + c * v[1], v[2]];
    return [w[0], c * w[1] - s * w[2], s * w[1] + c * w[2]];
  };
  const turned = directions.map(turn);
  const truss = {
    nodes: [
      { mark: 'N1', at: [40, -20, 7] },
      ...turned.map((d, i) => ({ mark: `M${i + 1}`, at: d.map((v, k) => 500 * v + [40, -20, 7][k]!) })),
    ],
    members: turned.map((_, i) => ({
      mark: `S${i + 1}`,
      ends: ['N1', `M${i + 1}`],
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    })),
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  } as unknown as Truss;
  const job = defaultJob('Star');
  const axes = directions.map((x) => {
    const z = turn([0, 0, 1]);
    const d = turn(x);
    return { x: d, y: [z[1] * d[2] - z[2] * d[1], z[2] * d[0] - z[0] * d[2], z[0] * d[1] - z[1] * d[0]] as V, z };
  });
  const { hubs, findings } = detailHubs(
    topologyOf(truss),
    { ...job, nodes: { ...job.nodes, ...nodes } },
    directions.map(() => section),
    axes,
  );
  return { hub: hubs[0]!, findings: findings.filter((f) => f.subject === 'N1') };
}

const plane = (...degrees: number[]): V[] =>
  degrees.map((a) => [Math.cos((a * Math.PI) / 180), Math.sin((a * Math.PI) / 180), 0]);

/** Least distance between two level bars' strips beyond their stops, by a march over points of both rims: no formula of the program. */
function webOf(hub: ReturnType<typeof star>['hub'], half: number): number {
  const [a, b] = hub.sockets;
  const angle = Math.acos(a!.direction.reduce((sum, v, k) => sum + v * b!.direction[k]!, 0));
  let least = Number.POSITIVE_INFINITY;
  // In the plane of both axes: bar 1 along x, bar 2 at the angle; the facing rims and the ends.
  const rim = (setback: number, turn: number, side: number, t: number, end: number): [number, number] => {
    const [u, v] = t < 0 ? [setback, end * half] : [setback + t, side * half];
    return [u * Math.cos(turn) - v * Math.sin(turn), u * Math.sin(turn) + v * Math.cos(turn)];
  };
  const places = [
    ...Array.from({ length: 81 }, (_, i) => -1 + i * 0),
    ...Array.from({ length: 600 }, (_, i) => i * 0.1),
  ];
  places.forEach((s, i) => {
    const p = rim(a!.setback!, 0, 1, s, i < 81 ? i / 40 - 1 : 1);
    places.forEach((t, j) => {
      const q = rim(b!.setback!, angle, -1, t, j < 81 ? j / 40 - 1 : 1);
      least = Math.min(least, Math.hypot(p[0] - q[0], p[1] - q[1]));
    });
  });
  return least;
}

it('refuses two struts nearer to each other than sockets can part', () => {
  const { hub, findings } = star(plane(0, 10), {});
  expect(findings.map((f) => f.code)).toEqual(['bars-too-close']);
  expect(findings[0]).toMatchObject({ level: 'stop', limit: 12, about: { a: 'S1', b: 'S2' } });
  expect(findings[0]!.value).toBeCloseTo(10, 9);
  expect(hub.makeable).toBe(false);
  expect(star(plane(0, 13), {}).findings).toEqual([]);
});

it('says which bores meet, or leave less than prints, where the job asks for too little between them', () => {
  const touching = star(plane(0, 40, 200), { gap_mm: 0 });
  const met = touching.findings.filter((f) => f.code === 'bores-meet');
  expect(met.map((f) => f.about)).toContainEqual({ a: 'S1', b: 'S2' });
  expect(met[0]).toMatchObject({ level: 'stop', limit: 0.8 });
  expect(met.find((f) => f.about?.['b'] === 'S2')!.value).toBeLessThan(0.01);
  // The bores in 8.4 mm: the rims touch.
  expect(webOf(touching.hub, 4.2)).toBeLessThan(0.06);
  const thin = star(plane(0, 60), { gap_mm: 0.5 });
  const found = thin.findings.find((f) => f.code === 'bores-meet')!;
  expect(found.value).toBeCloseTo(webOf(thin.hub, 4.2), 1);
  expect(found.value).toBeGreaterThan(0.45);
  expect(star(plane(0, 60), { gap_mm: 0.8 }).findings).toEqual([]);
  expect(star(plane(0, 60), {}).findings).toEqual([]);
  const laths = star(plane(0, 60), { gap_mm: 0.3 }, LATH).findings.find((f) => f.code === 'bores-meet')!;
  expect(laths.value).toBeGreaterThan(0.25);
  expect(laths.value).toBeLessThan(0.8);
});
