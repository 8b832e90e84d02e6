import { expect, it } from 'vitest';
import { drillingCsv, jigSetting } from '../../../src/documents/nodes/drilling.js';
import { defaultJob } from '../../../src/model/job/index.js';
import type { Socket } from '../../../src/model/parts.js';
import { packRecords } from '../pack-records.js';

const along = (direction: readonly [number, number, number]): Socket => ({ direction }) as unknown as Socket;

it('sets a jig from the first bore upright and the second at the zero of the turn', () => {
  // A cube's corner and its space diagonal, by hand: 54.7356 degrees from each edge.
  const sockets = [along([0, 0, 1]), along([1, 0, 0]), along([0, 1, 0]), along([1, 1, 1]), along([0, 0, -1])];
  const settings = sockets.map((s) => jigSetting({ sockets }, s));
  expect(settings[0]).toEqual({ tilt: 0, turn: 0 });
  expect(settings[1]!.tilt).toBeCloseTo(90, 9);
  expect(settings[1]!.turn).toBeCloseTo(0, 9);
  expect(settings[2]!.turn).toBeCloseTo(90, 9);
  expect(settings[3]!.tilt).toBeCloseTo(54.7356, 4);
  expect(settings[3]!.turn).toBeCloseTo(45, 9);
  expect(settings[4]!.tilt).toBeCloseTo(180, 9);
});

it('sets a cube out so that face, tilt and turn give every direction back, and its middle lies on the axis', () => {
  const job = { ...defaultJob(), nodes: { ...defaultJob().nodes, system: 'drilled-cube' as const } };
  const records = packRecords({ nodes: job.nodes });
  const [head, ...lines] = new TextDecoder().decode(drillingCsv(records)!).trim().split('\n');
  const names = head!.split(',');
  expect(names.slice(0, 8)).toEqual(
    'node,strut,diameter_mm,depth_mm,azimuth_deg,elevation_deg,jig_tilt_deg,jig_turn_deg'.split(','),
  );
  const made = records.parts.hubs.filter((h) => h.makeable);
  expect(made.length).toBeGreaterThan(5);
  expect(lines).toHaveLength(made.reduce((sum, h) => sum + h.sockets.length, 0));
  for (const line of lines) {
    const cells = line.split(',');
    const text = (name: string): string => cells[names.indexOf(name)]!;
    const value = (name: string): number => Number(text(name));
    const socket = made.find((h) => h.mark === text('node'))!.sockets.find((s) => s.strut === text('strut'))!;
    expect(text('jig_tilt_deg')).toBe('');
    // Sides are looked at from outside with z up, top and bottom with x to the right; by hand.
    const [out, right, up] = VIEWS[text('face')]!;
    const [tilt, turn] = [value('face_tilt_deg'), value('face_turn_deg')].map((d) => (d * Math.PI) / 180);
    const drill = out.map(
      (c, k) => c * Math.cos(tilt!) + Math.sin(tilt!) * (right[k]! * Math.cos(turn!) + up[k]! * Math.sin(turn!)),
    );
    expect(Math.hypot(...drill.map((c, k) => c - socket.direction[k]!))).toBeLessThan(1e-6);
    const mouth = out.map(
      (c, k) => (c * value('edge_mm')) / 2 + right[k]! * value('entry_right_mm') + up[k]! * value('entry_up_mm'),
    );
    // The stop stands at the setback: back from the mouth by the depth, along the drill.
    const stop = mouth.map((c, k) => c - drill[k]! * value('depth_mm'));
    expect(Math.hypot(...stop.map((c, k) => c - socket.direction[k]! * socket.setback!))).toBeLessThan(3e-3);
  }
});

const VIEWS: Record<string, readonly [readonly number[], readonly number[], readonly number[]]> = {
  'x+': [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  'x-': [
    [-1, 0, 0],
    [0, -1, 0],
    [0, 0, 1],
  ],
  'y+': [
    [0, 1, 0],
    [-1, 0, 0],
    [0, 0, 1],
  ],
  'y-': [
    [0, -1, 0],
    [1, 0, 0],
    [0, 0, 1],
  ],
  'z+': [
    [0, 0, 1],
    [1, 0, 0],
    [0, 1, 0],
  ],
  'z-': [
    [0, 0, -1],
    [1, 0, 0],
    [0, -1, 0],
  ],
};
