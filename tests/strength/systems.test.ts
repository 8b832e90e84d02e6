import { describe, expect, it } from 'vitest';
import { nodeSystem } from '../../src/detailing/systems/index.js';
import { materialNamed } from '../../src/model/catalogue/resolve.js';
import { jobSchema } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { rulesOf } from '../../src/strength/rules.js';
import type { SocketCase } from '../../src/strength/socket/case.js';
import { screwChecks } from '../../src/strength/socket/screws.js';
import { trussOf } from '../helpers/truss.js';

/** Invented: a triangle of 1.2 m with forces of a size that its joints feel. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [1200, 0, 0],
    [600, 1039.23, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
  forces: [150, 150, 150],
});
const socketsOf = (nodes: object, section: string) => {
  const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', struts: { section }, nodes });
  return assess(truss, job).utilisations.filter((u) => u.kind === 'socket');
};

describe('sockets of every node system are judged', () => {
  it.each([
    ['a glued sleeve', { system: 'socket' }, 'beech-12'],
    ['a glued spigot in a tube', { system: 'spigot' }, 'alu-25x2'],
    ['a pinned spigot in a tube', { system: 'spigot', joint: 'pinned', pin_mm: 4 }, 'alu-25x2'],
    ['a bolted plate in a slot', { system: 'spigot' }, 'C24-45x45'],
    ['a dowel in a drilled ball', { system: 'drilled-ball' }, 'beech-12'],
    ['a dowel in a clamp', { systems: Object.fromEntries(truss.nodes.map((n) => [n.mark, 'clamp'])) }, 'beech-12'],
  ])('%s', (_, nodes, section) => {
    const sockets = socketsOf(nodes, section);
    expect(sockets.length).toBe(6);
    for (const u of sockets) {
      expect(u.utilisation).toBeGreaterThan(0);
      expect(Number.isFinite(u.utilisation)).toBe(true);
    }
  });

  it('a glued spigot carries by its own surface, which is less than the tube’s', () => {
    const [first] = socketsOf({ system: 'spigot', bondStrength_MPa: 0.1, depth_mm: 36.75 }, 'alu-25x2');
    // Inside 21 mm less 0.55 of clearance: pi 20.45 x (36.75 - 0.75) mm² at a quarter of 0.1 MPa.
    expect(first!.rule).toBe('socket bond in shear');
    // The saw's step leaves up to a quarter of a millimetre more float.
    const wanted = 150 / (Math.PI * 20.45 * 36 * 0.025);
    expect(first!.utilisation / wanted).toBeGreaterThan(1);
    expect(first!.utilisation / wanted).toBeLessThan(1.01);
  });

  it('a pinned tube is pulled through the net section of two walls, not of the whole width', () => {
    const [first] = socketsOf({ system: 'spigot', joint: 'pinned', pin_mm: 4 }, 'alu-25x2');
    expect(first!.utilisation).toBeLessThan(1);
  });
});

describe('a dowel glued into a drilled ball', () => {
  it('shears the ball’s wood across its grain before anything else: C24 by EN 1995-1-1, worked by hand', () => {
    const ball = { diameter_mm: 80, material: 'C24' };
    const [first] = socketsOf({ system: 'drilled-ball', ball, depth_mm: 20.75 }, 'beech-12');
    // Rolling shear 2 ft,90,k = 0.8 MPa (EN 338:2016), kmod of permanent load 0.6, gamma M 1.3; pi 12 x 20 mm² engaged.
    const limit = (0.6 * 0.8) / 1.3;
    const wanted = 150 / (Math.PI * 12 * 20) / limit;
    expect(first!.rule).toBe('EN 1995-1-1 6.1.7, rolling shear of the drilled body at the socket bond');
    // The saw's step leaves up to half a millimetre more float at both ends together.
    expect(first!.utilisation / wanted).toBeGreaterThan(0.999);
    expect(first!.utilisation / wanted).toBeLessThan(1.02);
  });

  it('pulls the section through its middle across the grain, other bores taken off', () => {
    const job = jobSchema.parse({
      format: 'strutwright-job/1',
      title: 'T',
      truss: 't.json',
      struts: { section: 'beech-12' },
      nodes: { system: 'drilled-ball', ball: { diameter_mm: 80 } },
    });
    const hub = assess(truss, job).parts.hubs[0]!;
    const [a] = nodeSystem('drilled-ball')!.strength(hub, job);
    const other = hub.sockets[1]!;
    expect(a!.wallArea).toBeCloseTo(Math.PI * 40 ** 2 - (other.bore as number) * other.depth, 6);
    expect(a!.bondArea).toBeCloseTo(Math.PI * (hub.sockets[0]!.bore as number) * hub.sockets[0]!.depth, 6);
  });

  it('grows to the next ball where bores must be deeper, every rim still on it and no stop nearer to another', () => {
    const job = (bondStrength_MPa: number) =>
      jobSchema.parse({
        format: 'strutwright-job/1',
        title: 'T',
        truss: 't.json',
        struts: { section: 'beech-12' },
        nodes: { system: 'drilled-ball', bondStrength_MPa },
      });
    const [strong, weak] = [assess(truss, job(10)), assess(truss, job(0.6))];
    strong.parts.hubs.forEach((hub, i) => {
      const grown = weak.parts.hubs[i]!;
      expect(grown.sockets[0]!.depth).toBeGreaterThan(hub.sockets[0]!.depth);
      const radii = grown.sockets.map((s) => Math.hypot(s.setback! + s.depth, (s.bore as number) / 2));
      for (const r of radii)
        expect((2 * r) % 5).toBeCloseTo(Math.round((2 * r) / 5) * 5 - 5 * Math.floor((2 * r) / 5), 6);
      grown.sockets.forEach((s, k) => {
        expect(s.setback!).toBeGreaterThanOrEqual(hub.sockets[k]!.setback! - 1e-9);
      });
    });
    for (const u of weak.utilisations.filter((x) => x.kind === 'socket')) expect(u.utilisation).toBeLessThanOrEqual(1);
  });
});

describe('the screws of a clamp', () => {
  const clamp = { count: 3, out: 0.5, threadArea: 40, headArea: 14 };
  const rules = rulesOf(jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json' }));
  const hub = materialNamed(
    jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json' }),
    'PETG-print',
  )!;
  const socket = (axial: number, momentZ = 0): SocketCase => ({
    socket: {
      strut: 'S1',
      farNode: 'N2',
      direction: [0.5, Math.sqrt(0.75), 0],
      y: [0, 0, 1],
      z: [Math.sqrt(0.75), -0.5, 0],
      section: { name: 'r8', shape: { kind: 'round', diameter: 8 }, material: 'beech-dowel', measured: null },
      setback: 5,
      depth: 20.75,
      bore: 8.4,
      wall: 2,
      joint: 'glued',
      detail: 'plain',
      pin: 0,
    },
    strut: materialNamed(jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json' }), 'beech-dowel')!,
    hub,
    float: 0.75,
    actions: {
      combination: 'c',
      duration: 'short',
      axial,
      momentY: 0,
      momentZ,
      shearY: 0,
      shearZ: 0,
      torsion: 0,
    } as SocketCase['actions'],
    rules,
    passes: { wallArea: 60, bondPerDepth: 26, stopArea: 50, hollow: true, screws: clamp },
    bond: 5,
  });

  it('take the part of a pull that is square to the parting and what a moment prises, none of a push', () => {
    expect(screwChecks(socket(-100))).toEqual([]);
    const [thread, head] = screwChecks(socket(120));
    // 120 N x 0.5 on three screws: 20 N each on 40 mm² of thread and 14 mm² of head.
    expect(thread!.utilisation).toBeCloseTo(20 / 40 / (hub.strength['fv']! / rules.factor), 9);
    expect(head!.utilisation).toBeCloseTo(20 / 14 / (hub.strength['fc']! / rules.factor), 9);
    // 1000 N mm over 20 mm engaged: 75 N that prise, times the cosine of 30 degrees.
    const [prised] = screwChecks(socket(0, 1000));
    expect(prised!.utilisation).toBeCloseTo((75 * Math.sqrt(0.75)) / 3 / 40 / (hub.strength['fv']! / rules.factor), 9);
  });
});
