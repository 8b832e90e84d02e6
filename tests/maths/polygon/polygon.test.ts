import { describe, expect, it } from 'vitest';
import { areaOf, differenceOf, intersectionOf, offsetRings, unionOf } from '../../../src/maths/polygon/boolean.js';
import { convexHull, isConvex } from '../../../src/maths/polygon/convex.js';
import { convexParts } from '../../../src/maths/polygon/convex-parts.js';
import { depthIn, regionOf } from '../../../src/maths/polygon/depth.js';
import { convexNoFit } from '../../../src/maths/polygon/minkowski.js';
import {
  boundsOf,
  movedRing,
  perimeter,
  type Ring,
  reversed,
  signedArea,
  toPoints,
  toRing,
} from '../../../src/maths/polygon/ring.js';
import { selfCrossing } from '../../../src/maths/polygon/simple.js';
import { tidyRing } from '../../../src/maths/polygon/tidy.js';
import { seededRandom } from '../../../src/maths/random.js';

const square = toRing([
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
]);
const comb = toRing([
  [0, 0],
  [70, 0],
  [70, 30],
  [60, 30],
  [60, 10],
  [40, 10],
  [40, 30],
  [30, 30],
  [30, 10],
  [10, 10],
  [10, 30],
  [0, 30],
]);

/** A simple star-shaped ring: corners in order of angle at random distances. */
function star(n: number, seed: number): Ring {
  const random = seededRandom(seed);
  return toRing(
    Array.from({ length: n }, (_, i) => {
      const a = (2 * Math.PI * (i + 0.8 * random())) / n;
      const r = 10 + 40 * random();
      return [r * Math.cos(a), r * Math.sin(a)] as const;
    }),
  );
}

describe('rings', () => {
  it('have the area and perimeter of the textbook square, wherever they stand', () => {
    for (const [angle, dx, dy] of [
      [0, 0, 0],
      [1, 1e6, -1e6],
    ] as const) {
      const r = movedRing(square, angle, dx, dy);
      expect(signedArea(r)).toBeCloseTo(100, 6);
      expect(signedArea(reversed(r))).toBeCloseTo(-100, 6);
      expect(perimeter(r)).toBeCloseTo(40, 6);
    }
    expect(boundsOf(comb)).toEqual([0, 0, 70, 30]);
  });

  it('lose doubled and straight corners and turn anticlockwise', () => {
    const r = tidyRing(
      toRing([
        [0, 0],
        [0, 10],
        [0, 10],
        [5, 10],
        [10, 10],
        [10, 5],
        [10, 0],
      ]),
      1e-9,
    );
    expect(toPoints(r).length).toBe(4);
    expect(signedArea(r)).toBe(100);
    expect(
      tidyRing(
        toRing([
          [0, 0],
          [1, 1],
          [2, 2],
        ]),
        1e-9,
      ).length,
    ).toBe(0);
  });

  it('that cross or touch themselves are told apart from simple ones', () => {
    expect(selfCrossing(comb)).toBeNull();
    expect(
      selfCrossing(
        toRing([
          [0, 0],
          [10, 10],
          [10, 0],
          [0, 10],
        ]),
      ),
    ).not.toBeNull();
    expect(
      selfCrossing(
        toRing([
          [0, 0],
          [10, 0],
          [5, 0],
          [5, 10],
        ]),
      ),
    ).not.toBeNull();
    expect(
      selfCrossing(
        toRing([
          [0, 0],
          [10, 0],
          [10, 10],
          [5, 0],
          [0, 10],
        ]),
      ),
    ).not.toBeNull();
  });
});

describe('convex parts', () => {
  it('cover the ring without overlap', () => {
    const rings = [square, comb, ...Array.from({ length: 60 }, (_, s) => star(4 + (s % 17), s))];
    for (const ring of rings) {
      const parts = convexParts(ring);
      const area = signedArea(ring);
      for (const p of parts) expect(isConvex(p, 1e-9 * area)).toBe(true);
      expect(parts.reduce((sum, p) => sum + signedArea(p), 0)).toBeCloseTo(area, 8);
      expect(areaOf(unionOf(parts))).toBeCloseTo(area, 2);
    }
  });
});

describe('no-fit polygon of convex rings', () => {
  it('is the hull of all differences of corners', () => {
    for (let s = 0; s < 200; s++) {
      const a = convexHull(star(3 + (s % 9), 2 * s));
      const b = s % 5 === 0 ? movedRing(a, Math.PI * (s % 2), 3, 1) : convexHull(star(3 + (s % 7), 2 * s + 1));
      const all: number[] = [];
      for (const [ax, ay] of toPoints(a)) for (const [bx, by] of toPoints(b)) all.push(ax - bx, ay - by);
      const hull = convexHull(new Float64Array(all));
      const sum = convexNoFit(a, b);
      expect(signedArea(sum)).toBeCloseTo(signedArea(hull), 8);
      boundsOf(sum).forEach((v, i) => {
        expect(v).toBeCloseTo(boundsOf(hull)[i]!, 9);
      });
    }
  });
});

describe('depth', () => {
  it('of a point in a region is its distance to the boundary, in both kernels alike', () => {
    const convex = regionOf([square], true);
    const general = regionOf([square], false);
    const random = seededRandom(4);
    for (let k = 0; k < 500; k++) {
      const [x, y] = [20 * random() - 5, 20 * random() - 5];
      const dx = Math.max(-x, x - 10);
      const dy = Math.max(-y, y - 10);
      const signed = Math.max(dx, dy) < 0 ? -Math.max(dx, dy) : -Math.hypot(Math.max(dx, 0), Math.max(dy, 0));
      for (const clear of [0, 1.5])
        for (const region of [convex, general])
          expect(depthIn(region, x, y, clear)).toBeCloseTo(Math.max(0, clear + signed), 9);
    }
  });
});

describe('booleans and offsets', () => {
  it('have the areas that geometry gives', () => {
    const moved = movedRing(square, 0, 5, 5);
    expect(areaOf(unionOf([square, moved]))).toBeCloseTo(175, 6);
    expect(areaOf(intersectionOf([square], [moved]))).toBeCloseTo(25, 6);
    expect(areaOf(differenceOf([square], [moved]))).toBeCloseTo(75, 6);
    const hole = differenceOf(
      [square],
      [
        movedRing(
          toRing([
            [0, 0],
            [2, 0],
            [2, 2],
            [0, 2],
          ]),
          0,
          4,
          4,
        ),
      ],
    );
    expect(hole.length).toBe(2);
    expect(areaOf(hole)).toBeCloseTo(96, 6);
  });

  it('grow a convex ring by A + P d + π d² (Steiner) within the chords of its arcs', () => {
    const d = 3;
    const grown = areaOf(offsetRings([square], d, 'round'));
    const exact = 100 + 40 * d + Math.PI * d * d;
    expect(grown).toBeLessThanOrEqual(exact);
    expect(grown).toBeGreaterThan(exact - 2 * Math.PI * d * 0.001);
    expect(areaOf(offsetRings([square], d, 'mitre'))).toBeCloseTo(256, 6);
    expect(areaOf(offsetRings([square], -2, 'mitre'))).toBeCloseTo(36, 6);
  });
});
