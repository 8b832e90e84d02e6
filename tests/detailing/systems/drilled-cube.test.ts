import { describe, expect, it } from 'vitest';
import { axesOfStruts } from '../../../src/detailing/axes.js';
import { deepenSockets } from '../../../src/detailing/deepen.js';
import { faceForms } from '../../../src/detailing/faces.js';
import { detailHubs, weighHubs } from '../../../src/detailing/hubs.js';
import { sectionsOf } from '../../../src/detailing/sections.js';
import { nodeSystem } from '../../../src/detailing/systems/index.js';
import { seededRandom } from '../../../src/maths/random.js';
import { normalise, type Vec3 } from '../../../src/maths/vec3.js';
import { type Job, jobSchema } from '../../../src/model/job/index.js';
import type { HubPart, Socket } from '../../../src/model/parts.js';
import { topologyOf } from '../../../src/model/topology.js';
import { trussOf } from '../../helpers/truss.js';

const jobOf = (nodes: object = {}): Job =>
  jobSchema.parse({
    format: 'strutwright-job/1',
    title: 'T',
    truss: 't.json',
    nodes: { system: 'drilled-cube', ...nodes },
  });

/** The hub of a star of struts of 900 mm, and what is said of it. */
function hubOf(directions: readonly Vec3[], job = jobOf()) {
  const truss = trussOf({
    nodes: [[10, 20, 30], ...directions.map((d) => normalise(d).map((c, k) => 10 * (k + 1) + 900 * c))],
    edges: directions.map((_, i) => [0, i + 1]),
  });
  const topology = topologyOf(truss);
  const { forms } = faceForms(topology, { flatnessWarn: 1, flatnessStop: null });
  const found = detailHubs(topology, job, sectionsOf(truss, job).sections, axesOfStruts(topology, job, forms));
  const hub = weighHubs(topology, job, found.hubs).find((h) => h.mark === 'N0')!;
  return { hub, findings: found.findings.filter((f) => f.subject === 'N0') };
}

/** Half the edge, found from a socket without the program: where its axis first leaves the box. */
const halfOf = (hub: HubPart): number => {
  const s = hub.sockets[0]!;
  return Math.max(...s.direction.map((c) => Math.abs(c * (s.setback! + s.depth))));
};

/** Points of the rim: lines along the bore's wall followed to the plane that the axis meets. */
function rimOf(s: Socket, half: number): Vec3[] {
  const axis = [0, 1, 2].reduce((a, b) => (Math.abs(s.direction[b]!) > Math.abs(s.direction[a]!) ? b : a));
  const side = Math.sign(s.direction[axis]!);
  return Array.from({ length: 72 }, (_, k) => {
    const [a, b] = [Math.cos((k * Math.PI) / 36), Math.sin((k * Math.PI) / 36)].map(
      (c) => (c * (s.bore as number)) / 2,
    );
    const p = s.y.map((c, i) => c * a! + s.z[i]! * b!);
    const t = (side * half - p[axis]!) / s.direction[axis]!;
    return p.map((c, i) => c + s.direction[i]! * t) as unknown as Vec3;
  });
}

/** Directions of which none leaves near an edge of the cube and no two are near each other. */
function randomDirections(random: () => number, count: number): Vec3[] {
  const list: Vec3[] = [];
  while (list.length < count) {
    const d = normalise([random() - 0.5, random() - 0.5, random() - 0.5]);
    const [most, next] = d.map(Math.abs).sort((a, b) => b - a);
    if (next! / most! < 0.75 && list.every((o) => o[0] * d[0] + o[1] * d[1] + o[2] * d[2] < 0.6)) list.push(d);
  }
  return list;
}

describe('a drilled cube', () => {
  const random = seededRandom(20);
  const cases = Array.from({ length: 40 }, (_, i) => randomDirections(random, 2 + (i % 4)));

  it('has every rim on one face, the web left to its edges, at an edge of whole fives', () => {
    for (const directions of cases) {
      const { hub, findings } = hubOf(directions);
      expect(findings).toEqual([]);
      expect(hub.makeable).toBe(true);
      const half = halfOf(hub);
      expect((2 * half) / 5).toBeCloseTo(Math.round((2 * half) / 5), 9);
      for (const s of hub.sockets)
        for (const p of rimOf(s, half)) {
          const [out, ...across] = p.map(Math.abs).sort((a, b) => b - a);
          expect(out).toBeCloseTo(half, 9);
          // 2 mm, or a quarter of the dowel's 8 mm: as every drilled body.
          expect(across[0]!).toBeLessThanOrEqual(half - 2 + 1e-9);
        }
    }
  });

  it('is the least: five less leaves a rim over an edge, or a stop nearer than bores may be', () => {
    for (const directions of cases) {
      const { hub } = hubOf(directions);
      const edge = 2 * halfOf(hub);
      const less = hubOf(directions, jobOf({ cube: { edge_mm: edge - 5 } }));
      expect(less.findings.map((f) => f.code)).toEqual(['cube-too-small']);
      expect(less.hub.makeable).toBe(false);
      expect(less.findings[0]!.limit!).toBeGreaterThan(edge - 5);
      expect(less.findings[0]!.limit!).toBeLessThanOrEqual(edge + 1e-9);
      expect(hubOf(directions, jobOf({ cube: { edge_mm: edge } })).hub.makeable).toBe(true);
    }
  });

  it('keeps bores apart by the web, by points sampled in each', () => {
    for (const directions of cases.slice(0, 12)) {
      const { hub } = hubOf(directions);
      for (const a of hub.sockets)
        for (const b of hub.sockets) {
          if (a === b) continue;
          let least = Number.POSITIVE_INFINITY;
          for (let i = 0; i < 4000; i++) {
            const [t, w] = [a.setback! + a.depth * (i / 4000) ** 2, (i * 2.39996) % (2 * Math.PI)];
            const r = (a.bore as number) / 2;
            const p = a.direction.map((c, k) => c * t + r * (a.y[k]! * Math.cos(w) + a.z[k]! * Math.sin(w)));
            const along = p.reduce((sum, c, k) => sum + c * b.direction[k]!, 0);
            const off = Math.hypot(...p.map((c, k) => c - along * b.direction[k]!)) - (b.bore as number) / 2;
            const gap = Math.hypot(Math.max(0, off), Math.max(0, b.setback! - along));
            least = Math.min(least, gap);
          }
          expect(least).toBeGreaterThan(2 - 1e-3);
        }
    }
  });

  it('weighs what a count of points in it finds', () => {
    for (const directions of cases.slice(0, 8)) {
      const { hub } = hubOf(directions);
      const half = halfOf(hub);
      const n = 90;
      let inside = 0;
      for (let i = 0; i < n ** 3; i++) {
        const p = [i % n, Math.floor(i / n) % n, Math.floor(i / n ** 2)].map((c) => half * ((2 * c + 1) / n - 1));
        const drilled = hub.sockets.some((s) => {
          const t = p.reduce((sum, c, k) => sum + c * s.direction[k]!, 0);
          return t > s.setback! && Math.hypot(...p.map((c, k) => c - t * s.direction[k]!)) < (s.bore as number) / 2;
        });
        if (!drilled) inside++;
      }
      const counted = (inside / n ** 3) * (2 * half) ** 3;
      expect((hub.mass! * 1e9) / hub.material.density / counted).toBeCloseTo(1, 2);
    }
  });

  it('is a box for panels, exactly', () => {
    const { hub } = hubOf(cases[0]!);
    const half = halfOf(hub);
    const [piece] = nodeSystem('drilled-cube')!.cover(hub, jobOf());
    expect(piece!.points).toHaveLength(8);
    expect(piece!.edges).toHaveLength(12);
    for (const p of piece!.points) for (const c of p) expect(Math.abs(c)).toBeCloseTo(half, 9);
    for (const [a, b] of piece!.edges)
      expect(Math.hypot(...piece!.points[a]!.map((c, k) => c - piece!.points[b]![k]!))).toBeCloseTo(2 * half, 9);
  });

  it('drills a tilted bore deeper by what the shallow side loses, and counts only the rest', () => {
    // tan 30° of 4.1 mm: bore 8.2 = the dowel's 8 and 0.2 for the drill.
    const { hub } = hubOf([
      [1, 0, 0],
      [-Math.cos(Math.PI / 6), 0.5, 0],
    ]);
    const [square, tilted] = hub.sockets;
    const lost = ((tilted!.bore as number) / 2) * Math.tan(Math.PI / 6);
    expect(square!.shallow).toBeCloseTo(0, 9);
    expect(tilted!.depth - square!.depth).toBeCloseTo(lost, 9);
    const strength = nodeSystem('drilled-cube')!.strength(hub, jobOf());
    expect(strength[1]!.bondArea).toBeCloseTo(strength[0]!.bondArea, 6);
    const edge = 2 * halfOf(hub);
    expect(strength[0]!.wallArea).toBeCloseTo(edge ** 2 - (tilted!.bore as number) * tilted!.depth, 6);
  });

  it('grows where bores must be deeper, no stop further in and every axis still ending on a face', () => {
    const { hub } = hubOf(cases[3]!);
    const depths = new Map([[`${hub.sockets[1]!.strut}@N0`, hub.sockets[1]!.depth + 7]]);
    const [deeper] = deepenSockets([hub], depths, jobOf());
    const half = halfOf(deeper!);
    expect(half).toBeGreaterThanOrEqual(halfOf(hub));
    expect(deeper!.sockets[1]!.depth).toBeCloseTo(hub.sockets[1]!.depth + 7, 9);
    deeper!.sockets.forEach((s, i) => {
      expect(s.setback!).toBeGreaterThanOrEqual(hub.sockets[i]!.setback! - 1e-9);
      expect(Math.max(...s.direction.map((c) => Math.abs(c * (s.setback! + s.depth))))).toBeCloseTo(half, 9);
      for (const p of rimOf(s, half))
        expect([...p].map(Math.abs).sort((a, b) => b - a)[1]!).toBeLessThanOrEqual(half - 2);
    });
    const fixed = jobOf({ cube: { edge_mm: 2 * halfOf(hub) } });
    expect(deepenSockets([hub], depths, fixed)[0]).toBe(hub);
  });

  it('refuses a bore towards an edge or a corner, by its strut, and says what would take it', () => {
    const { hub, findings } = hubOf([
      [1, 0, 0],
      [-1, 1, 0],
      [0, -1, -1.05],
    ]);
    expect(hub.makeable).toBe(false);
    expect(findings.map((f) => [f.code, f.about?.['strut']])).toEqual([
      ['rim-over-edge', 'S1'],
      ['rim-over-edge', 'S2'],
    ]);
    expect(findings[0]!.value).toBeNull();
    expect(findings[1]!.value!).toBeGreaterThan(findings[1]!.limit!);
    // As large as it asks for, it is drilled all the same.
    const large = hubOf(
      [
        [1, 0, 0],
        [0, -1, -1.05],
      ],
      jobOf({ cube: { edge_mm: Math.ceil(findings[1]!.value!) } }),
    );
    expect(large.findings).toEqual([]);
    for (const s of large.hub.sockets)
      for (const p of rimOf(s, halfOf(large.hub)))
        expect([...p].map(Math.abs).sort((a, b) => b - a)[1]!).toBeLessThanOrEqual(halfOf(large.hub) - 2 + 1e-9);
  });

  it('says the same of a rectangle as a ball does', () => {
    const job = jobSchema.parse({
      format: 'strutwright-job/1',
      title: 'T',
      truss: 't.json',
      struts: { section: 'C24-45x95' },
      nodes: { system: 'drilled-cube' },
    });
    const { hub, findings } = hubOf([[1, 0, 0]], job);
    expect(hub.makeable).toBe(false);
    expect(findings.map((f) => f.code)).toEqual(['bore-not-round']);
  });
});
