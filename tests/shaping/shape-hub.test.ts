import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { checkHub, randomHub } from './random-hub.mjs';

it('is closed, in one piece and free of crossings in the eyes of admesh and of the edge count', async () => {
  const folder = mkdtempSync(join(tmpdir(), 'hub-'));
  try {
    for (const [seed, count] of [
      [1, 3],
      [2, 6],
      [3, 12],
    ] as const) {
      const result = await checkHub(randomHub(seed, { count, least: 25 }), { cross: true });
      expect(result.faults).toEqual([]);
      const path = join(folder, `${seed}.stl`);
      writeFileSync(path, result.bytes!);
      const said = execFileSync('timeout', ['60', 'admesh', path], { encoding: 'utf8' });
      expect(said).toMatch(/Total disconnected facets\s*:\s*0\s+0/);
      expect(said).toMatch(/Number of parts\s*:\s*1\s/);
      expect(said).toMatch(/Degenerate facets\s*:\s*0/);
    }
  } finally {
    rmSync(folder, { recursive: true });
  }
});

it('makes a hub of one strut, of two in line, and of two square to each other', async () => {
  const { job, hub } = randomHub(5, { count: 3 });
  const base = hub.sockets[0]!;
  const along = (direction: readonly number[], y: readonly number[], z: readonly number[]) => ({
    ...base,
    strut: `S${direction.join('')}`.replaceAll('-', 'm'),
    direction,
    y,
    z,
    section: { name: 'r8', shape: { kind: 'round' as const, diameter: 8 }, material: 'beech-dowel', measured: null },
    bore: 8.4,
    wall: 2,
    depth: 14,
  });
  const { nodeSystem } = await import('../../dist/detailing/systems/index.js');
  const system = nodeSystem('socket')!;
  const cases = [
    [along([1, 0, 0], [0, 1, 0], [0, 0, 1])],
    [along([1, 0, 0], [0, 1, 0], [0, 0, 1]), along([-1, 0, 0], [0, -1, 0], [0, 0, 1])],
    [along([1, 0, 0], [0, 1, 0], [0, 0, 1]), along([0, 1, 0], [-1, 0, 0], [0, 0, 1])],
  ];
  for (const sockets of cases) {
    const { setbacks } = system.setbacks(sockets as never, job);
    const placed = {
      ...hub,
      sockets: sockets.map((s, i) => ({ ...s, setback: setbacks[i]! })),
    } as unknown as typeof hub;
    const result = await checkHub({ job, hub: { ...placed, mass: system.mass(placed, job) } }, { cross: true });
    expect(result.faults).toEqual([]);
  }
});

it('gives the same bytes each time, and makes nothing of a hub that cannot be made', async () => {
  const made = randomHub(8, { count: 5 });
  const [first, second] = [await checkHub(made), await checkHub(made)];
  expect(Buffer.from(first.bytes!).equals(Buffer.from(second.bytes!))).toBe(true);
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const none = await shapeHub({ ...made.hub, makeable: false }, made.job);
  expect(none.pieces).toEqual([]);
});

it('lies flat on the bed by a face of its own, and says so when no printer can hold it', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const made = randomHub(11, { count: 6, least: 30 });
  const { pieces } = await shapeHub(made.hub, made.job);
  expect(pieces[0]!.contact).toBeGreaterThan(10);
  const tiny = { ...made.job, printers: made.job.printers.map((p) => ({ ...p, width_mm: 30, depth_mm: 30 })) };
  const { findings } = await shapeHub(made.hub, tiny);
  const found = findings.find((f) => f.code === 'node-too-large')!;
  expect(found.level).toBe('stop');
  expect(found.value).toBeGreaterThan(26);
});

it('keeps the strut in tension nearer the layers than when another is in tension, when that is all that is asked for', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  let gained = 0;
  for (const seed of [21, 22, 23]) {
    const made = randomHub(seed, { count: 5, least: 40 });
    const job = { ...made.job, nodes: { ...made.job.nodes, orientation: { overhang: 0, height: 0, tension: 1 } } };
    const lean = async (tension: number[]): Promise<number> => {
      const { placement } = (await shapeHub(made.hub, job, tension)).pieces[0]!;
      // Third column of the placement: the print's up in the truss's axes.
      const up = [placement[2]!, placement[6]!, placement[10]!];
      const d = made.hub.sockets[0]!.direction;
      return Math.abs(up[0]! * d[0] + up[1]! * d[1] + up[2]! * d[2]);
    };
    const pulled = await lean([100, 0, 0, 0, 0]);
    for (let other = 1; other < 5; other++) {
      const tension = [0, 0, 0, 0, 0];
      tension[other] = 100;
      const left = await lean(tension);
      expect(pulled).toBeLessThan(left + 1e-6);
      gained += left - pulled;
    }
  }
  expect(gained).toBeGreaterThan(0.5);
});

it('finds a wall that is too thin to print where it is, by measuring the mesh', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const thin = randomHub(71, { system: 'socket', count: 4, least: 50, nodes: { process: 'filament', wall_mm: 0.6 } });
  const { findings } = await shapeHub(thin.hub, thin.job);
  const found = findings.find((f) => f.code === 'wall-thin')!;
  expect(found.level).toBe('stop');
  expect(found.value).toBeCloseTo(0.6, 1);
  expect(found.limit).toBe(0.8);
  // Two bores that leave half a millimetre between them, in walls that are thick enough.
  const close = randomHub(72, {
    system: 'socket',
    count: 4,
    least: 30,
    nodes: { process: 'filament', wall_mm: 2, gap_mm: 0.4 },
  });
  const web = (await shapeHub(close.hub, close.job)).findings.find((f) => f.code === 'wall-thin');
  expect(web?.value ?? 2).toBeGreaterThan(0.3);
});

it('measures the wall it was given on sound hubs of every section', async () => {
  const { shapeHub } = await import('../../dist/shaping/shape-hub.js');
  const { measureWalls } = await import('../../dist/shaping/measure-walls.js');
  const { sleevesOf } = await import('../../dist/detailing/systems/sleeve.js');
  for (const seed of [81, 82, 83, 84]) {
    const made = randomHub(seed, {
      system: 'socket',
      count: 5,
      least: 30,
      nodes: { marks: false, vent_mm: 0, joint: 'glued', allowance: { upright_mm: 0 } },
    });
    const { pieces, findings } = await shapeHub(made.hub, made.job);
    expect(findings.filter((f) => f.code === 'wall-thin')).toEqual([]);
    const walls = measureWalls(pieces[0]!, sleevesOf(made.hub.sockets), [], made.hub.at);
    expect(walls.length).toBe(made.hub.sockets.length);
    walls.forEach((w, i) => {
      expect(w.thickness).toBeGreaterThan(made.hub.sockets[i]!.wall * 0.95);
      expect(w.thickness).toBeLessThan(made.hub.sockets[i]!.wall * 1.1 + 0.1);
    });
  }
});
