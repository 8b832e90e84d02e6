import { expect, it } from 'vitest';
import { hubShape } from '../../dist/detailing/systems/hub-shape.js';
import { writeStl } from '../../dist/documents/formats/stl.js';
import { defaultJob } from '../../dist/model/job/index.js';
import { assess } from '../../dist/pipeline/assess.js';
import { channelsOf } from '../../dist/shaping/hub-channels.js';
import { HubSpace } from '../../dist/shaping/hub-space.js';
import { shapeHub } from '../../dist/shaping/shape-hub.js';
import { readStl } from '../tools/mesh-check.mjs';
import { randomHub } from './random-hub.mjs';

type Hub = ReturnType<typeof randomHub>['hub'];

/** Least distance from the middle line of a hole to another strut's bore, on from its stop; negative inside it. By points 0.1 mm apart. */
function clearance(hub: Hub, c: ReturnType<typeof channelsOf>[number]): number {
  let least = Number.POSITIVE_INFINITY;
  for (let t = 0; t <= c.length; t += 0.1) {
    const p = c.from.map((v, k) => v + t * c.direction[k]!);
    hub.sockets.forEach((s, i) => {
      if (i === c.sleeve) return;
      const on = (axis: readonly number[]): number => p.reduce((sum, v, k) => sum + v * axis[k]!, 0);
      const behind = Math.max(0, s.setback! - on(s.direction));
      const [a, b] = [Math.abs(on(s.y)), Math.abs(on(s.z))];
      const beside =
        typeof s.bore === 'number'
          ? Math.max(0, Math.hypot(a, b) - s.bore / 2)
          : Math.hypot(Math.max(0, a - s.bore[0] / 2), Math.max(0, b - s.bore[1] / 2));
      least = Math.min(least, Math.hypot(behind, beside));
    });
  }
  return least;
}

it('bores a pin or a vent where it misses every other bore by the least wall, and says where there is no such way', () => {
  const said = { 'pin-meets-bore': 0, 'vent-left-out': 0 };
  let bored = 0;
  for (let seed = 1; seed <= 10; seed++) {
    const { hub, job } = randomHub(seed, {
      system: 'socket',
      count: 14,
      least: 12.5,
      nodes: { process: 'filament', joint: 'pinned', pin_mm: 8, vent_mm: 8 },
    });
    if (!hub.makeable) continue;
    const findings: { code: string; about?: { strut?: string } }[] = [];
    const channels = channelsOf(hub, job, new HubSpace(hubShape(hub, job)), findings as never);
    for (const c of channels) {
      bored++;
      expect(clearance(hub, c)).toBeGreaterThan(c.radius + 0.8 - 0.02);
    }
    // Each socket has its pin and its vent, or is named.
    for (const [i, s] of hub.sockets.entries())
      expect(
        channels.filter((c) => c.sleeve === i).length + findings.filter((f) => f.about?.strut === s.strut).length,
      ).toBe(2);
    for (const f of findings) if (f.code in said) said[f.code as keyof typeof said]++;
  }
  expect(bored).toBeGreaterThan(50);
  expect(said['pin-meets-bore']).toBeGreaterThan(0);
  expect(said['vent-left-out']).toBeGreaterThan(0);
});

it('says what share of the surface overhangs, as the triangles of the STL add up', async () => {
  let [noted, silent] = [0, 0];
  for (const [seed, system] of [
    [11, 'socket'],
    // Flat plates that lie on each other's edges.
    [32, 'spigot'],
  ] as const) {
    const { hub, job } = randomHub(seed, {
      system,
      count: 3,
      least: 60,
      nodes: { marks: false, orientation: { overhang: 0, height: 1, tension: 0 } },
    });
    const { pieces, findings } = await shapeHub(hub, job);
    const { count, corners } = readStl(writeStl(pieces[0]!.positions, pieces[0]!.triangles, 'N'));
    let [over, total] = [0, 0];
    for (let t = 0; t < count; t++) {
      const p = corners.subarray(9 * t, 9 * t + 9);
      const [e, f] = [
        [p[3]! - p[0]!, p[4]! - p[1]!, p[5]! - p[2]!],
        [p[6]! - p[0]!, p[7]! - p[1]!, p[8]! - p[2]!],
      ];
      const n = [e[1]! * f[2]! - e[2]! * f[1]!, e[2]! * f[0]! - e[0]! * f[2]!, e[0]! * f[1]! - e[1]! * f[0]!];
      const area = Math.hypot(...n) / 2;
      total += area;
      if (n[2]! / 2 <= -Math.SQRT1_2 * area && Math.max(p[2]!, p[5]!, p[8]!) > 0) over += area;
    }
    const found = findings.find((f) => f.code === 'much-overhang');
    if (found) {
      noted++;
      expect(found).toMatchObject({ level: 'note', limit: 0.3 });
      expect(found.value).toBeCloseTo(over / total, 6);
      expect(found.value).toBeGreaterThan(0.3);
    } else {
      silent++;
      expect(over / total).toBeLessThanOrEqual(0.3);
    }
    expect(pieces[0]!.overhang).toBeCloseTo(over / total, 6);
  }
  expect([noted, silent]).toEqual([1, 1]);
});

it('says which strut is too short for the setbacks that its angle asks for', () => {
  // Two invented struts at 13 degrees, 80 mm long: sockets part 40 mm from the node, and as far again at the other end.
  const angle = (13 * Math.PI) / 180;
  const at = (t: number): [number, number, number] => [80 * Math.cos(t), 80 * Math.sin(t), 0];
  const node = (mark: string, place: readonly number[]) => ({ mark, at: place });
  const member = (mark: string, ends: readonly string[]) => ({
    mark,
    ends,
    force: null,
    section: null,
    area: null,
    modulus: null,
    roll: null,
    group: null,
  });
  const truss = {
    nodes: [node('N1', [0, 0, 0]), node('N2', at(0)), node('N3', at(angle))],
    members: [member('S1', ['N1', 'N2']), member('S2', ['N1', 'N3']), member('S3', ['N2', 'N3'])],
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
  const { findings } = assess(truss as never, defaultJob('Short'));
  const found = findings.filter((f) => f.code === 'strut-too-short');
  expect(found.map((f) => f.subject)).toContain('S3');
  for (const f of found) expect(f.level).toBe('stop');
});
