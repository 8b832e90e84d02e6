import { describe, expect, it } from 'vitest';
import { axesOfStruts } from '../../src/detailing/axes.js';
import { faceForms } from '../../src/detailing/faces.js';
import { detailHubs } from '../../src/detailing/hubs.js';
import { sectionsOf } from '../../src/detailing/sections.js';
import { angleBetween, cross, dot, normalise, type Vec3 } from '../../src/maths/vec3.js';
import { type Job, jobSchema } from '../../src/model/job/index.js';
import type { HubPart } from '../../src/model/parts.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { trussOf } from '../helpers/truss.js';

const jobOf = (change: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...change });

function hubsOf(truss: Truss, job: Job): readonly HubPart[] {
  const topology = topologyOf(truss);
  const forms = faceForms(topology, { flatnessWarn: 1, flatnessStop: null }).forms;
  return detailHubs(topology, job, sectionsOf(truss, job).sections, axesOfStruts(topology, job, forms)).hubs;
}

/** A star of struts from node N0, in the directions given, each 500 mm. */
const star = (directions: readonly Vec3[]): Truss =>
  trussOf({
    nodes: [[0, 0, 0], ...directions.map((d) => normalise(d).map((c) => 500 * c))],
    edges: directions.map((_, i) => [0, i + 1]),
  });
const degrees = (a: number): Vec3 => [Math.cos((a * Math.PI) / 180), Math.sin((a * Math.PI) / 180), 0];
const setbacksOf = (hub: HubPart): number[] => hub.sockets.map((s) => s.setback!);

describe('setbacks', () => {
  // At N0 three struts at 0, 40 and 150 degrees; a node with a narrower pair elsewhere.
  const two = trussOf({
    nodes: [
      [0, 0, 0],
      ...[0, 40, 150].map((a) => degrees(a).map((c) => 500 * c)),
      [5000, 0, 0],
      [5500, 0, 0],
      [5433, 250, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
      [4, 5],
      [4, 6],
    ],
  });

  it('are the least a node can do with, equal at a node, or equal everywhere', () => {
    const by = (setbacks: string) => hubsOf(two, jobOf({ nodes: { setbacks } }));
    const least = by('least').map(setbacksOf);
    const atNode = by('equal-at-node').map(setbacksOf);
    const equal = by('equal').map(setbacksOf);
    expect(new Set(least[0]!).size).toBeGreaterThan(1);
    const largest = Math.max(...least.flat());
    least.forEach((list, i) => {
      for (const s of atNode[i]!) expect(s).toBeCloseTo(Math.max(...list), 9);
      for (const s of equal[i]!) expect(s).toBeCloseTo(largest, 9);
    });
    expect(Math.max(...least[0]!)).toBeLessThan(largest);
  });

  it('of a ball follow from its size whatever is asked: every rim lies on it', () => {
    for (const setbacks of ['least', 'equal-at-node', 'equal']) {
      const [ball] = hubsOf(two, jobOf({ nodes: { system: 'drilled-ball', setbacks } }));
      const radii = ball!.sockets.map((s) => Math.hypot(s.setback! + s.depth, (s.bore as number) / 2));
      for (const r of radii) expect(r).toBeCloseTo(radii[0]!, 9);
    }
  });

  it('of sleeves nearer than the angle for merging keep only the least wall between the bores, and refuse below the least angle', () => {
    // Filament's least wall 0.8 mm and 0.1 mm for chords; r = 4.2, equal bores at angle a: s = (r (1 + cos a) + g) / sin a is never short.
    const gapAt = (a: number, nodes: object = {}): number => {
      const [hub] = hubsOf(star([degrees(0), degrees(a)]), jobOf({ nodes: { setbacks: 'equal-at-node', ...nodes } }));
      const [s] = setbacksOf(hub!);
      const half = (a * Math.PI) / 360;
      // Distance of the two bores' nearest rims at equal setbacks, in the plane of both.
      return 2 * (s! * Math.sin(half) - 4.2 * Math.cos(half));
    };
    expect(gapAt(16)).toBeGreaterThan(0.89);
    expect(gapAt(16)).toBeLessThan(1.1);
    // Above it the web is the sleeve's wall, a quarter of 8 mm.
    expect(gapAt(24)).toBeGreaterThan(1.9);
    expect(gapAt(24, { mergeBelow_deg: 30 })).toBeLessThan(1.1);
    const [refused] = hubsOf(star([degrees(0), degrees(11)]), jobOf({}));
    expect(refused!.sockets.map((s) => s.setback)).toEqual([null, null]);
    expect(refused!.makeable).toBe(false);
  });

  it('of two struts in line leave a floor of 1.5 mm each, so that a web stands between their stops', () => {
    const [hub] = hubsOf(star([degrees(0), degrees(180)]), jobOf({}));
    expect(setbacksOf(hub!)).toEqual([1.5, 1.5]);
    const [wide] = hubsOf(star([degrees(0), degrees(180)]), jobOf({ nodes: { gap_mm: 6 } }));
    const [a, b] = setbacksOf(wide!);
    expect(a! + b!).toBeGreaterThanOrEqual(6 - 1e-6);
  });
});

describe('the roll of a rectangular strut', () => {
  const lath = { lath: { shape: { kind: 'rectangle', width_mm: 8, height_mm: 14 }, material: 'beech-dowel' } };
  const roof = (roll: number | null): Truss => {
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [400, 0, 0],
        [200, 300, 200],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 0],
      ],
      faces: [[0, 1, 2]],
    });
    return { ...truss, members: truss.members.map((m) => ({ ...m, roll })) };
  };
  const axes = (rollFrom: unknown, roll: number | null = null) => {
    const truss = roof(roll);
    const topology = topologyOf(truss);
    const job = jobOf({ sections: lath, struts: { section: 'lath', rollFrom } });
    const forms = faceForms(topology, { flatnessWarn: 1, flatnessStop: null }).forms;
    return { axes: axesOfStruts(topology, job, forms), normal: forms[0]!.normal!, truss, job };
  };

  it('comes from the face beside it, from a reference direction, or from both and a turn by hand', () => {
    const fromFace = axes('faces');
    for (const a of fromFace.axes) expect(dot(a.z, fromFace.normal)).toBeCloseTo(1, 9);
    for (const a of axes('up').axes) expect(dot(a.y, [0, 0, 1])).toBeCloseTo(0, 9);
    const wind: Vec3 = [1, 2, 0.5];
    for (const a of axes(wind).axes) {
      // Height towards the direction: the width is square to it.
      expect(dot(a.y, wind)).toBeCloseTo(0, 9);
      expect(dot(a.z, wind)).toBeGreaterThan(0);
    }
    const turned = axes('faces', Math.PI / 6);
    turned.axes.forEach((a, i) => {
      const plain = fromFace.axes[i]!;
      expect(angleBetween(a.z, plain.z)).toBeCloseTo(Math.PI / 6, 9);
      // About the strut's own axis, right-handed.
      expect(dot(cross(plain.z, a.z), a.x)).toBeCloseTo(Math.sin(Math.PI / 6), 9);
    });
    // A direction along a strut says nothing of it: some roll is taken, never none.
    for (const a of axes([0, 0, 0]).axes) expect(Math.hypot(...a.z)).toBeCloseTo(1, 9);
  });

  it('is the same at both ends: the two sockets of a strut see one bar', () => {
    const { truss, job } = axes('faces', 0.3);
    const hubs = hubsOf(truss, job);
    for (const m of truss.members) {
      const [a, b] = hubs.flatMap((h) => h.sockets.filter((s) => s.strut === m.mark));
      expect(Math.abs(dot(a!.z, b!.z))).toBeCloseTo(1, 9);
      expect(Math.abs(dot(a!.y, b!.y))).toBeCloseTo(1, 9);
    }
  });
});
