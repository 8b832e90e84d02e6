import { expect, it } from 'vitest';
import { coarsePolygon } from '../../../src/maths/polygon/coarse.js';

it('a circle of 720 corners keeps few, none farther off than the tolerance', () => {
  const circle = Array.from({ length: 720 }, (_, i): [number, number] => {
    const a = (2 * Math.PI * i) / 720;
    return [100 * Math.cos(a), 100 * Math.sin(a)];
  });
  const coarse = coarsePolygon(circle, 1);
  // The sagitta of a chord over the angle a is r (1 - cos(a/2)): 1 mm at r = 100 is 16.3°, 22.1 sides at least.
  expect(coarse.length).toBeGreaterThanOrEqual(22);
  expect(coarse.length).toBeLessThanOrEqual(40);
});

it('corners on straight sides go, true corners stay in their order', () => {
  const square: [number, number][] = [
    [0, 0],
    [5, 0],
    [10, 0],
    [10, 10],
    [4, 10.001],
    [0, 10],
  ];
  expect(coarsePolygon(square, 0.01)).toEqual([
    [0, 0],
    [10, 0],
    [10, 10],
    [0, 10],
  ]);
});

it('a triangle stays whatever the tolerance', () => {
  const triangle: [number, number][] = [
    [0, 0],
    [1, 0],
    [0, 1],
  ];
  expect(coarsePolygon(triangle, 100)).toEqual(triangle);
});
