import { describe, expect, it } from 'vitest';
import { type Area, lengthInside, overlap, type Point } from '../../../src/documents/kit/geometry2.js';
import { CellGrid } from '../../../src/documents/kit/view/cell-grid.js';
import { type Label, placeLabels } from '../../../src/documents/kit/view/place-labels.js';
import { seededRandom } from '../../../src/maths/random.js';

const area: Area = { x: 0, y: 0, width: 120, height: 90 };

function scattered(
  count: number,
  seed: number,
): { labels: Label[]; lines: { owner: string; from: Point; to: Point }[] } {
  const random = seededRandom(seed);
  const point = (): Point => [random() * area.width, random() * area.height];
  const lines = Array.from({ length: count }, (_, i) => ({ owner: `S${i}`, from: point(), to: point() }));
  const labels = lines.map(({ owner, from, to }): Label => {
    const middle: Point = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2];
    const angle = Math.atan((to[1] - from[1]) / (to[0] - from[0]));
    const box = { x: middle[0], y: middle[1], width: 9, height: 3, angle };
    return {
      key: owner,
      owner,
      width: 9,
      height: 3,
      anchors: [0.5, 0.3, 0.7, 0.1, 0.9].map((t) => [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1])]),
      places: [{ box, leader: null, cost: 0 }],
    };
  });
  return { labels, lines };
}

/** Overlap by sampling one box's points in the other: slow, and another way than separating axes. */
function sampledOverlap(a: Parameters<typeof overlap>[0], b: Parameters<typeof overlap>[0]): boolean {
  const [c, s] = [Math.cos(a.angle), Math.sin(a.angle)];
  for (let i = 0; i <= 60; i++)
    for (let j = 0; j <= 60; j++) {
      const [u, v] = [(i / 60 - 0.5) * a.width, (j / 60 - 0.5) * a.height];
      const [x, y] = [a.x + u * c - v * s - b.x, a.y + u * s + v * c - b.y];
      const [p, q] = [x * Math.cos(b.angle) + y * Math.sin(b.angle), y * Math.cos(b.angle) - x * Math.sin(b.angle)];
      if (Math.abs(p) < b.width / 2 && Math.abs(q) < b.height / 2) return true;
    }
  return false;
}

describe('placing labels', () => {
  it.each([1, 2, 3])('no label touches another, crosses a leader or leaves the area (seed %d)', (seed) => {
    const { labels, lines } = scattered(45, seed);
    const placed = [...placeLabels(labels, area, lines).values()];
    expect(placed.length).toBe(labels.length);
    placed.forEach((p, i) => {
      expect(p.box.x > 0 && p.box.x < area.width && p.box.y > 0 && p.box.y < area.height).toBe(true);
      for (const q of placed.slice(i + 1)) expect(sampledOverlap(p.box, q.box)).toBe(false);
      for (const q of placed)
        if (q !== p && q.leader) expect(lengthInside(p.box, [q.box.x, q.box.y], q.leader)).toBeLessThan(1e-9);
    });
  });
  it('says which labels find no room instead of laying one on another', () => {
    const { labels, lines } = scattered(220, 5);
    const placed = [...placeLabels(labels, area, lines).values()];
    expect(placed.length).toBeLessThan(220);
    expect(placed.length).toBeGreaterThan(60);
  });
  it('gives the same answer each time', () => {
    const { labels, lines } = scattered(60, 9);
    expect([...placeLabels(labels, area, lines)]).toEqual([...placeLabels(labels, area, lines)]);
  });
});

describe('boxes on a sheet', () => {
  it('overlap as sampling says', () => {
    const random = seededRandom(7);
    const box = () => ({
      x: random() * 20,
      y: random() * 20,
      width: 2 + random() * 10,
      height: 1 + random() * 4,
      angle: random() * Math.PI,
    });
    for (let i = 0; i < 300; i++) {
      const [a, b] = [box(), box()];
      if (overlap(a, b, 0.3)) expect(sampledOverlap(a, b)).toBe(true);
      if (!overlap(a, b, -0.3)) expect(sampledOverlap(a, b)).toBe(false);
    }
  });
  it('the part of a segment inside a box is what sampling says', () => {
    const random = seededRandom(8);
    for (let i = 0; i < 200; i++) {
      const box = { x: 10, y: 10, width: 8, height: 3, angle: random() * 3 };
      const [p, q]: [Point, Point] = [
        [random() * 20, random() * 20],
        [random() * 20, random() * 20],
      ];
      const length = Math.hypot(q[0] - p[0], q[1] - p[1]);
      let inside = 0;
      for (let k = 0; k < 2000; k++) {
        const t = (k + 0.5) / 2000;
        const dot = { x: p[0] + t * (q[0] - p[0]), y: p[1] + t * (q[1] - p[1]), width: 1e-9, height: 1e-9, angle: 0 };
        if (overlap(dot, box)) inside += length / 2000;
      }
      expect(lengthInside(box, p, q)).toBeCloseTo(inside, 1);
    }
  });
  it('are found again by where they are', () => {
    const random = seededRandom(3);
    const grid = new CellGrid<number>();
    const boxes = Array.from({ length: 200 }, () => ({
      x: random() * 200,
      y: random() * 200,
      width: 9,
      height: 3,
      angle: random() * 3,
    }));
    boxes.forEach((box, i) => {
      grid.addBox(box, i);
    });
    for (const probe of boxes.slice(0, 40)) {
      const near = new Set<number>();
      grid.some(probe.x - 8, probe.y - 8, probe.x + 8, probe.y + 8, (i) => {
        expect(near.has(i)).toBe(false);
        near.add(i);
        return false;
      });
      boxes.forEach((box, i) => {
        if (overlap(box, { ...probe, width: 16, height: 16, angle: 0 })) expect(near.has(i)).toBe(true);
      });
    }
  });
});
