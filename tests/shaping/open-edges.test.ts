import { expect, it } from 'vitest';
import { openEdges } from '../../src/shaping/open-edges.js';

const positions = Float32Array.from([0, 0, 0, 3, 0, 0, 0, 4, 0, 0, 0, 5]);
const closed = [0, 2, 1, 0, 1, 3, 1, 2, 3, 2, 0, 3];

it('finds nothing at a tetrahedron, also where its corners are written again for each triangle', () => {
  expect(openEdges(positions, Uint32Array.from(closed))).toBe(0);
  const apart = Float32Array.from(closed.flatMap((i) => [...positions.subarray(3 * i, 3 * i + 3)]));
  expect(openEdges(apart, Uint32Array.from(closed.map((_, k) => k)))).toBe(0);
  // A negative nought is the same place.
  apart[0] = -0;
  expect(openEdges(apart, Uint32Array.from(closed.map((_, k) => k)))).toBe(0);
});

it('counts a missing triangle, a flipped one, one twice, and one without area', () => {
  // Three edges without their reverse, seen from both lists.
  expect(openEdges(positions, Uint32Array.from(closed.slice(0, 9)))).toBe(6);
  expect(openEdges(positions, Uint32Array.from([0, 1, 2, ...closed.slice(3)]))).toBeGreaterThan(0);
  expect(openEdges(positions, Uint32Array.from([...closed, 0, 2, 1]))).toBeGreaterThan(0);
  expect(openEdges(positions, Uint32Array.from([...closed, 0, 1, 1]))).toBeGreaterThan(0);
  // A corner that is a hair off is another corner.
  const cracked = Float32Array.from([...positions, 0, 0, 5.000001]);
  expect(openEdges(cracked, Uint32Array.from([...closed.slice(0, 9), 2, 0, 4]))).toBeGreaterThan(0);
});
