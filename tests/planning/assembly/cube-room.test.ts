import { expect, it } from 'vitest';
import { defaultJob } from '../../../src/model/job/index.js';
import { hubRoom } from '../../../src/planning/assembly/hub-room.js';
import { packRecords } from '../../documents/pack-records.js';

it('takes a drilled cube as its box less the paths of its struts', () => {
  const base = defaultJob();
  const { parts, job } = packRecords({
    nodes: { ...base.nodes, system: 'drilled-cube', cube: { ...base.nodes.cube, edge_mm: 70 } },
  });
  const hubs = parts.hubs.filter((h) => h.makeable);
  expect(hubs.length).toBeGreaterThan(5);
  for (const hub of hubs) {
    const room = hubRoom(hub, job)!;
    expect(room.reach).toBeCloseTo(35 * Math.sqrt(3), 9);
    expect(room.solidAt([0, 0, 0], '')).toBe(true);
    expect(room.solidAt([34.9, 34.9, -34.9], '')).toBe(true);
    expect(room.solidAt([35.1, 0, 0], '')).toBe(false);
    for (const s of hub.sockets) {
      const at = (t: number): [number, number, number] => [s.direction[0] * t, s.direction[1] * t, s.direction[2] * t];
      expect(room.solidAt(at(s.setback! - 0.1), '')).toBe(true);
      expect(room.solidAt(at(s.setback! + s.depth / 2), '')).toBe(false);
    }
    const [piece] = room.piecesBut(null);
    for (const [d, far] of [
      [[1, 0, 0], 35],
      [[1, -1, 1], 105],
    ] as const) {
      const p = piece!.support(d);
      expect([...d].reduce<number>((sum, c, k) => sum + c * (p[k]! - hub.at[k]!), 0)).toBeCloseTo(far, 6);
    }
  }
});
