import { expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import type { BoltedEnd, Socket } from '../../src/model/parts.js';
import { axialOnly } from '../../src/strength/actions.js';
import { bolted } from '../../src/strength/socket/bolted.js';
import type { SocketCase } from '../../src/strength/socket/case.js';
import { judgeSocket } from '../../src/strength/socket/index.js';

const end: BoltedEnd = {
  plate: 10,
  slot: 10,
  bolts: 1,
  diameter: 8,
  spacing: 0,
  endDistance: 100,
  plateEnd: 30,
  along: 'y',
};
const socket: Socket = {
  strut: 'S1',
  farNode: 'B',
  direction: [1, 0, 0],
  y: [0, 1, 0],
  z: [0, 0, 1],
  section: { name: 's', shape: { kind: 'rectangle', width: 70, height: 95 }, material: 'C24', measured: null },
  setback: 20,
  depth: 120,
  bore: [70, 95],
  wall: 5,
  joint: 'pinned',
  detail: 'plain',
  pin: 0,
  bolted: end,
};
const socketCase = (axial: number, more: Partial<BoltedEnd> = {}, shearZ = 0): SocketCase => ({
  socket: { ...socket, bolted: { ...end, ...more } },
  strut: MATERIALS.get('C24')!,
  hub: MATERIALS.get('PA12-powder')!,
  float: 0,
  passes: null,
  actions: { ...axialOnly('given', axial, 'medium'), shearZ },
  rules: { serviceClass: 1, factor: 3 },
  bond: 3,
});
const check = (c: SocketCase, words: string): number => bolted(c)!.find((v) => v.rule.includes(words))!.utilisation;

it('a bolt of 8 mm with 30 mm of C24 each side: 4.55 kN in design', () => {
  // Computed independently with numpy: EN 1995-1-1 (8.11), fu 360, rho_k 350, kmod 0.8, gammaM 1.3.
  expect(check(socketCase(4548.333898), '(8.11)')).toBeCloseTo(1, 8);
});

it('net section in tension alone: (70 - 10) x (95 - 9) mm² x 14.5 x 0.8 / 1.3', () => {
  expect(check(socketCase(1000), '5.2')).toBeCloseTo(1000 / (60 * 86 * ((14.5 * 0.8) / 1.3)), 9);
  expect(bolted(socketCase(-1000))!.some((v) => v.rule.includes('5.2'))).toBe(false);
});

it('a loaded end nearer than 80 mm fails by the table, a compressed one asks for 4 d', () => {
  expect(judgeSocket(socketCase(10, { endDistance: 40 }))).toEqual({
    utilisation: 2,
    rule: 'EN 1995-1-1 table 8.4, loaded end',
  });
  expect(judgeSocket(socketCase(-10, { endDistance: 40 }))!.utilisation).toBeLessThan(1);
});

it('shear across the grain splits: 14 b sqrt(h) with the bolt at half the depth', () => {
  // By hand: 14 x 60 x sqrt(47.5 / 0.5) = 8187 N, x 0.8 / 1.3 = 5038 N.
  expect(check(socketCase(1000, {}, 5038.3), '8.1.4')).toBeCloseTo(1, 3);
});

it('two bolts at 5 d carry 1.47 times one', () => {
  // By hand: 2^0.9 (5/13)^0.25 = 1.8661 x 0.7875 = 1.4695.
  const one = check(socketCase(1000), '(8.11)');
  expect(one / check(socketCase(1000, { bolts: 2, spacing: 40 }), '(8.11)')).toBeCloseTo(1.4695, 3);
});

it('no bolt, or a slot as wide as the strut, carries nothing', () => {
  expect(judgeSocket(socketCase(10, { bolts: 0 }))).toBeNull();
  expect(judgeSocket(socketCase(10, { slot: 70 }))).toBeNull();
});

it('a moment about the bolts turns the row across the grain, one about the other axis bends the plate', () => {
  const two = { bolts: 2, spacing: 40 };
  const moment = (momentY: number, momentZ: number): SocketCase => {
    const c = socketCase(0, two);
    return { ...c, actions: { ...c.actions, momentY, momentZ } };
  };
  // By hand: 40 000 N mm over 40 mm is 1000 N on each bolt, 14 x 60 x sqrt(95) = 8187 N split, x 0.8 / 1.3 = 5038 N.
  expect(check(moment(40_000, 0), '8.1.4')).toBeCloseTo(1000 / 5038.3, 3);
  // By hand: 6 M / ((95 - 9) x 10²) over a quarter of ftZ = 36 MPa.
  expect(check(moment(0, 10_000), 'net section of the plate')).toBeCloseTo((6 * 10_000) / (86 * 100) / 9, 6);
});
