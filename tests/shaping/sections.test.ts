import { expect, it } from 'vitest';
import { hubShape } from '../../dist/detailing/systems/hub-shape.js';
import { writeStl } from '../../dist/documents/formats/stl.js';
import { ownSection, weakestSection } from '../../dist/shaping/measure-sections.js';
import { sectionsAcross } from '../../dist/shaping/section-area.js';
import { shapeHub } from '../../dist/shaping/shape-hub.js';
import { makeProbe, readStl } from '../tools/mesh-check.mjs';
import { randomHub } from './random-hub.mjs';

type V = readonly [number, number, number];

/** A box of corners low and high, or with its inside out. */
function box(low: V, high: V, insideOut = false): { positions: number[]; triangles: number[] } {
  const positions = [0, 1, 2, 3, 4, 5, 6, 7].flatMap((i) => [0, 1, 2].map((k) => ((i >> k) & 1 ? high[k]! : low[k]!)));
  const quads = [
    [0, 2, 3, 1],
    [4, 5, 7, 6],
    [0, 1, 5, 4],
    [2, 6, 7, 3],
    [0, 4, 6, 2],
    [1, 3, 7, 5],
  ];
  const triangles = quads.flatMap(([a, b, c, d]) => [a!, b!, c!, a!, c!, d!]);
  if (insideOut)
    for (let i = 0; i < triangles.length; i += 3) [triangles[i], triangles[i + 1]] = [triangles[i + 1]!, triangles[i]!];
  return { positions, triangles };
}

function joined(...parts: { positions: number[]; triangles: number[] }[]) {
  const positions: number[] = [];
  const triangles: number[] = [];
  for (const p of parts) {
    const first = positions.length / 3;
    positions.push(...p.positions);
    triangles.push(...p.triangles.map((t) => t + first));
  }
  return { positions: Float32Array.from(positions), triangles: Uint32Array.from(triangles) };
}

it('measures the part of a section that the axis meets: a box, a box with a hollow, and the nearest of two', () => {
  const outer = box([-5, -4, -10], [5, 4, 10]);
  const hollow = box([-2, -1, -6], [2, 1, 6], true);
  const apart = box([20, -3, -10], [26, 3, 10]);
  const z: V = [0, 0, 1];
  const across = (mesh: ReturnType<typeof joined>) => sectionsAcross(mesh, [0, 0, 0], z, [1, 0, 0], [0, 1, 0]);
  expect(across(joined(outer)).at(3, 100)).toBeCloseTo(80, 9);
  expect(across(joined(outer, hollow)).at(3, 100)).toBeCloseTo(80 - 8, 9);
  expect(across(joined(outer, hollow)).at(8, 100)).toBeCloseTo(80, 9);
  expect(across(joined(outer, hollow, apart)).at(3, 100)).toBeCloseTo(72, 9);
  expect(across(joined(outer, hollow, apart)).at(3, 100, [23, 0])).toBeCloseTo(36, 9);
  expect(across(joined(apart)).at(0, 100)).toBeCloseTo(36, 9);
  expect(across(joined(outer)).at(11, 100)).toBe(0);
  // Within 3 mm of the axis: a square of 6 less the hollow; within 4.5 mm the box's 8 mm by 9.
  expect(across(joined(outer, hollow)).at(3, 3)).toBeCloseTo(36 - 8, 9);
  expect(across(joined(outer)).at(3, 4.5)).toBeCloseTo(72, 9);
  expect(across(joined(outer, hollow)).at(3, 1.5)).toBeCloseTo(9 - 6, 9);
  // Across a slanting axis: a box of 10 x 8 in a plane tilted by a about x is 10 wide and 8 / cos a long.
  const [c, s] = [Math.cos(0.4), Math.sin(0.4)];
  const slanting = sectionsAcross(joined(outer), [0, 0, 0], [0, s, c], [1, 0, 0], [0, c, -s]);
  expect(slanting.at(0, 100)).toBeCloseTo(80 / c, 5);
});

it('finds the same area as a count of points in the STL', async () => {
  for (const seed of [81, 85]) {
    const { hub, job } = randomHub(seed, { system: 'socket', count: 4, least: 35 });
    const shaped = await shapeHub(hub, job);
    const w = shaped.weakest!;
    const { sleeves } = hubShape(hub, job);
    expect(w.needed).toBeCloseTo(
      w.where === 'root'
        ? ownSection(sleeves.find((s) => s.socket.strut === w.strut)!)
        : Math.max(...sleeves.map(ownSection)),
      9,
    );
    expect(w.area).toBeGreaterThan(w.needed);
    // Points of the plane 0.25 mm apart, those reached from the axis without leaving the plastic.
    const m = shaped.pieces[0]!.placement;
    const solid = makeProbe(readStl(writeStl(shaped.pieces[0]!.positions, shaped.pieces[0]!.triangles, 'N')));
    const socket = hub.sockets.find((s) => s.strut === w.strut)!;
    const at = (i: number, j: number): boolean => {
      const q = [0, 1, 2].map(
        (k) =>
          socket.direction[k]! * w.distance +
          socket.y[k]! * STEP * i +
          socket.z[k]! * STEP * j +
          hub.at[k]! -
          m[4 * k + 3]!,
      );
      return solid([0, 1, 2].map((k) => m[k]! * q[0]! + m[4 + k]! * q[1]! + m[8 + k]! * q[2]!));
    };
    const seen = new Set<string>(['0 0']);
    const queue: [number, number][] = [[0, 0]];
    expect(at(0, 0)).toBe(true);
    for (let next = queue.pop(); next; next = queue.pop())
      for (const [di, dj] of [
        [1, 0],
        [-1, 0],
        [0, 1],
        [0, -1],
      ] as const) {
        const [i, j] = [next[0] + di, next[1] + dj];
        if (seen.has(`${i} ${j}`) || !at(i, j)) continue;
        seen.add(`${i} ${j}`);
        queue.push([i, j]);
      }
    const counted = [...seen].filter((key) => key.split(' ').every((n) => Math.abs(Number(n) * STEP) <= w.within));
    expect((counted.length * STEP * STEP) / w.area).toBeGreaterThan(0.98);
    expect((counted.length * STEP * STEP) / w.area).toBeLessThan(1.02);
  }
});

const STEP = 0.25;

it('says where a section is less than the sleeve that it must carry', async () => {
  const { hub, job } = randomHub(86, { system: 'socket', count: 3, least: 60, nodes: { marks: false, vent_mm: 0 } });
  const base = hub.sockets[0]!;
  const rod = (diameter: number) => ({
    section: {
      name: `r${diameter}`,
      shape: { kind: 'round' as const, diameter },
      material: 'beech-dowel',
      measured: null,
    },
    bore: diameter + 0.4,
    wall: 2,
    depth: 2 * diameter,
  });
  // Two thick rods whose paths, as somebody set them back by hand, leave a millimetre of what the thin one stands on.
  const sockets = [
    { ...base, ...rod(8), strut: 'S1', direction: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1], setback: 6 },
    { ...base, ...rod(24), strut: 'S2', direction: [0, 1, 0], y: [-1, 0, 0], z: [0, 0, 1], setback: 0.5 },
    { ...base, ...rod(24), strut: 'S3', direction: [0, -1, 0], y: [1, 0, 0], z: [0, 0, 1], setback: 0.5 },
  ] as unknown as typeof hub.sockets;
  const shaped = await shapeHub({ ...hub, sockets }, job);
  const found = shaped.findings.find((f) => f.code === 'section-weak')!;
  expect(found.level).toBe('warn');
  expect(found.about?.['strut']).toBe('S1');
  // A ring of 8.4 in 12.4 stands on the millimetre between the paths, as wide as force spreads to.
  expect(found.limit).toBeCloseTo((Math.PI / 4) * (12.4 ** 2 - 8.4 ** 2), 9);
  expect(found.value! / (1 * 2 * shaped.weakest!.within)).toBeCloseTo(1, 2);
  expect(shaped.weakest).toMatchObject({ strut: 'S1', where: 'root', area: found.value });
  // The same rods set back as the program does it.
  const { nodeSystem } = await import('../../dist/detailing/systems/index.js');
  const { setbacks } = nodeSystem('socket')!.setbacks(sockets, job);
  const sound = await shapeHub({ ...hub, sockets: sockets.map((s, i) => ({ ...s, setback: setbacks[i]! })) }, job);
  expect(sound.findings.map((f) => f.code)).not.toContain('section-weak');
  expect(
    weakestSection(
      sound.pieces,
      hubShape({ ...hub, sockets: sockets.map((s, i) => ({ ...s, setback: setbacks[i]! })) }, job).sleeves,
      hub.at,
    ),
  ).toEqual(sound.weakest);
});
