import { expect, it } from 'vitest';
import { jigSetting } from '../../../src/documents/nodes/drilling.js';
import type { Socket } from '../../../src/model/parts.js';

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
