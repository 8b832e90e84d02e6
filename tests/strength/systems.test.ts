import { describe, expect, it } from 'vitest';
import { jobSchema } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
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
