import { expect, it } from 'vitest';
import { hubShape } from '../../dist/detailing/systems/hub-shape.js';
import { channelsOf } from '../../dist/shaping/hub-channels.js';
import { HubSpace } from '../../dist/shaping/hub-space.js';
import { makeProbe, readStl } from '../tools/mesh-check.mjs';
import { checkHub, randomHub } from './random-hub.mjs';

const ROUND = 48;

/** Whether a straight hole of a radius leads from the floor of a socket's bore to the open, in some direction, seen on the STL alone. */
function isDrained(
  solid: (p: readonly number[]) => boolean,
  s: ReturnType<typeof randomHub>['hub']['sockets'][number],
  radius: number,
): boolean {
  const combine = (t: number, a: number, b: number): number[] =>
    [0, 1, 2].map((k) => s.direction[k]! * t + s.y[k]! * a + s.z[k]! * b);
  for (let i = 0; i < ROUND; i++)
    for (const rise of [0, Math.PI / 6, Math.PI / 4]) {
      const angle = (2 * Math.PI * i) / ROUND;
      const [c, n] = [Math.cos(angle), Math.sin(angle)];
      let open = true;
      for (let out = (s.bore as number) / 2; open && out < 60; out += 0.5)
        for (let j = 0; open && j < 8; j++) {
          const turn = (Math.PI * j) / 4;
          const [side, up] = [radius * Math.cos(turn), radius * Math.sin(turn)];
          // A rising hole starts inside the bore: the way is followed from the bore's side on, where the hole's middle is.
          const along =
            s.setback! + 1.05 + Math.max(0, out - (s.bore as number) / 2 + 0.4) * Math.tan(rise) + up / Math.cos(rise);
          open = !solid(combine(along, out * c - side * n, out * n + side * c));
        }
      if (open) return true;
    }
  return false;
}

it('drains every blind bore of a powder print by a hole of 2 mm, and leaves other processes as they were', async () => {
  for (const seed of [4, 7]) {
    const special = {
      system: 'socket',
      count: 4,
      least: 50,
      nodes: { process: 'powder', joint: 'glued', marks: false },
    };
    const made = randomHub(seed, special);
    const { bytes, shaped, faults } = await checkHub(made);
    expect(faults).toEqual([]);
    const m = shaped.pieces[0]!.placement;
    const inPrint = makeProbe(readStl(bytes!));
    const solid = (p: readonly number[]): boolean => {
      const q = p.map((v, k) => v + made.hub.at[k]! - m[4 * k + 3]!);
      return inPrint([0, 1, 2].map((k) => m[k]! * q[0]! + m[4 + k]! * q[1]! + m[8 + k]! * q[2]!));
    };
    const wide = made.hub.sockets.filter((s) => typeof s.bore === 'number' && s.bore >= 4);
    expect(wide.length).toBeGreaterThan(0);
    for (const s of wide) expect(isDrained(solid, s, 0.9)).toBe(true);
    // By its vent alone it is not.
    const vented = await checkHub(randomHub(seed, { ...special, nodes: { ...special.nodes, drain_mm: 0 } }));
    const narrow = makeProbe(readStl(vented.bytes!));
    const n = vented.shaped.pieces[0]!.placement;
    const seen = (p: readonly number[]): boolean => {
      const q = p.map((v, k) => v + made.hub.at[k]! - n[4 * k + 3]!);
      return narrow([0, 1, 2].map((k) => n[k]! * q[0]! + n[4 + k]! * q[1]! + n[8 + k]! * q[2]!));
    };
    for (const s of wide) expect(isDrained(seen, s, 0.9)).toBe(false);
  }
  const plain = { system: 'socket', count: 4, least: 50, nodes: { process: 'filament' } };
  const one = await checkHub(randomHub(5, plain));
  const other = await checkHub(randomHub(5, { ...plain, nodes: { ...plain.nodes, drain_mm: 3 } }));
  expect(Buffer.from(one.bytes!).equals(Buffer.from(other.bytes!))).toBe(true);
});

it('takes the vent where a drain has no way out, and says so', () => {
  let narrowed = 0;
  for (let seed = 1; seed <= 12; seed++) {
    const { hub, job } = randomHub(seed, {
      system: 'socket',
      count: 14,
      least: 20,
      nodes: { process: 'powder', joint: 'glued', drain_mm: 6 },
    });
    if (!hub.makeable) continue;
    const findings: { code: string; about?: { strut?: string }; value?: number; limit?: number; level: string }[] = [];
    const channels = channelsOf(hub, job, new HubSpace(hubShape(hub, job)), findings as never);
    for (const f of findings.filter((f) => f.code === 'drain-narrowed')) {
      narrowed++;
      expect(f).toMatchObject({ level: 'note', value: 1.2 });
      const i = hub.sockets.findIndex((s) => s.strut === f.about!.strut);
      expect(channels.find((c) => c.sleeve === i)!.radius).toBe(0.6);
    }
    // Of a small bore a drain takes half at most.
    for (const c of channels) {
      const { bore } = hub.sockets[c.sleeve]!;
      expect(2 * c.radius).toBeLessThanOrEqual((typeof bore === 'number' ? bore : Math.min(...bore)) / 2 + 1e-9);
    }
  }
  expect(narrowed).toBeGreaterThan(0);
});
