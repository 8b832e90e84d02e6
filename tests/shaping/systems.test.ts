import { expect, it } from 'vitest';
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
