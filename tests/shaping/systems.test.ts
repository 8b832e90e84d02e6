import { expect, it } from 'vitest';
import { writeStl } from '../../src/documents/formats/stl.js';
import { inspect, makeProbe, readStl } from '../tools/mesh-check.mjs';
import { checkHub, randomHub } from './random-hub.mjs';

it('makes hubs of spigots for tubes and of bolted plates for sawn timber, solid to their ends and clear of the struts', async () => {
  for (const seed of [31, 32, 33, 34]) {
    const made = randomHub(seed, { system: 'spigot', count: 4, least: 50 });
    expect((await checkHub(made, { cross: seed === 31 })).faults).toEqual([]);
  }
});

it('stands a foot on its plate, with the anchors open', async () => {
  const made = randomHub(41, {
    system: 'foot',
    count: 3,
    least: 40,
    nodes: { foot: { plate_mm: 80, anchors: 4, anchor_mm: 5, levelling_mm: 6 } },
  });
  const result = await checkHub(made, { cross: true });
  expect(result.faults).toEqual([]);
  const piece = result.shaped.pieces[0]!;
  // The plate's underside less its chamfer, four anchors and the levelling hole.
  const area = Math.PI * (39.5 ** 2 - 4 * 2.75 ** 2 - 3 ** 2);
  expect(piece.contact / area).toBeGreaterThan(0.98);
  expect(piece.contact / area).toBeLessThan(1.02);
  // Upright as it is used: the print's z is the truss's.
  expect(piece.placement[10]).toBeCloseTo(1, 12);
});

it('opens the socket of a strut that is laid in from the side and makes a cap for it', async () => {
  const made = randomHub(51, { system: 'socket', count: 4, least: 45, details: ['drop-in', 'plain', 'drop-in'] });
  const result = await checkHub(made, { cross: true });
  expect(result.faults).toEqual([]);
  expect(result.shaped.pieces.map((p) => p.piece)).toEqual(['', 'cap-S3', 'cap-S17']);
  expect(result.shaped.findings.map((f) => f.code)).not.toContain('drop-in-blocked');
});

it('deepens the socket of a strut that slides in by its engagement, and pins it behind its end', async () => {
  const plain = randomHub(52, { system: 'socket', count: 3, least: 60, nodes: { joint: 'glued' } });
  const made = randomHub(52, { system: 'socket', count: 3, least: 60, nodes: { joint: 'glued' }, details: ['slide'] });
  const [before, after] = [plain.hub.sockets[0]!, made.hub.sockets[0]!];
  expect(after.travel).toBeCloseTo(before.depth + 1, 12);
  expect(after.depth).toBeCloseTo(before.depth + after.travel!, 12);
  expect(after.setback).toBe(before.setback);
  expect(after.pin).toBe(2);
  expect((await checkHub(made, { cross: true })).faults).toEqual([]);
});

it('guides the drill into a ball from outside, in two closed halves, each bushing open on the ball', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const made = randomHub(61, { system: 'drilled-ball', count: 5, least: 45 });
  expect(made.hub.makeable).toBe(true);
  const { pieces, findings } = await shapeHub(made.hub, made.job);
  expect(findings.filter((f) => f.level === 'stop')).toEqual([]);
  expect(pieces.map((p) => p.piece)).toEqual(['guide-A', 'guide-B']);
  const socket = made.hub.sockets[0]!;
  const radius = Math.hypot(socket.setback! + socket.depth, (socket.bore as number) / 2);
  const probes = pieces.map((p) => {
    const stl = readStl(writeStl(p.positions, p.triangles, p.piece));
    expect(inspect(stl)).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
    const solid = makeProbe(stl);
    const m = p.placement;
    return (q: readonly number[]) => {
      const d = [0, 1, 2].map((k) => q[k]! + made.hub.at[k]! - m[4 * k + 3]!);
      return solid([0, 1, 2].map((k) => m[k]! * d[0]! + m[4 + k]! * d[1]! + m[8 + k]! * d[2]!));
    };
  });
  const inAny = (q: readonly number[]): boolean => probes.some((probe) => probe(q));
  for (const s of made.hub.sockets) {
    // Every bore's rim lies on the ball, and the drill's way is free from the ball outwards.
    expect(Math.hypot(s.setback! + s.depth, (s.bore as number) / 2)).toBeCloseTo(radius, 9);
    for (let t = radius - 1; t < radius + 20; t += 0.5) expect(inAny(s.direction.map((v) => v * t))).toBe(false);
    const r = (s.bore as number) / 2 + 1.2;
    let walled = 0;
    for (let k = 0; k < 12; k++) {
      const [a, b] = [r * Math.cos(k), r * Math.sin(k)];
      if (inAny([0, 1, 2].map((i) => s.direction[i]! * (radius + 6) + s.y[i]! * a + s.z[i]! * b))) walled++;
    }
    expect(walled).toBeGreaterThan(8);
  }
});

it('parts a clamp along the plane of most struts, in two closed halves that screws hold', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const { hubShape } = await import('../../dist/detailing/systems/hub-shape.js');
  const made = randomHub(91, { system: 'clamp', count: 4, least: 55, nodes: { process: 'filament', joint: 'glued' } });
  const { pieces, findings } = await shapeHub(made.hub, made.job);
  expect(findings.filter((f) => f.level === 'stop')).toEqual([]);
  expect(pieces.map((p) => p.piece)).toEqual(['A', 'B']);
  for (const p of pieces) {
    const stl = readStl(writeStl(p.positions, p.triangles, p.piece));
    expect(inspect(stl)).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
  }
  const volume = pieces.reduce((sum, p) => sum + p.volume, 0);
  expect((made.hub.mass! * 1e9) / made.hub.material.density / volume).toBeGreaterThan(0.9);
  expect((made.hub.mass! * 1e9) / made.hub.material.density / volume).toBeLessThan(1.1);
  const { clamp } = hubShape(made.hub, made.job);
  // At least two struts lie in the plane, and at least two screws hold the halves.
  const inPlane = made.hub.sockets.filter(
    (s) => Math.abs([0, 1, 2].reduce((sum, k) => sum + s.direction[k]! * clamp!.normal[k]!, 0)) < 0.035,
  );
  expect(inPlane.length).toBeGreaterThanOrEqual(2);
  expect(clamp!.screws.length).toBeGreaterThanOrEqual(2);
});
