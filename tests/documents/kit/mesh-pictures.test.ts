import { expect, it } from 'vitest';
import { depthImage, EYE_LIGHT } from '../../../src/documents/kit/mesh/depth-image.js';
import { meshLines } from '../../../src/documents/kit/mesh/mesh-lines.js';
import { ISOMETRIC, PLAN } from '../../../src/documents/kit/view/camera.js';

/** A box of 4 x 6 x 2 mm from the origin. */
function box(x0 = 0, y0 = 0, z0 = 0, w = 4, d = 6, h = 2) {
  const positions: number[] = [];
  for (const z of [z0, z0 + h])
    for (const [x, y] of [
      [0, 0],
      [w, 0],
      [w, d],
      [0, d],
    ])
      positions.push(x0 + x!, y0 + y!, z);
  const quads = [
    [0, 3, 2, 1],
    [4, 5, 6, 7],
    [0, 1, 5, 4],
    [1, 2, 6, 5],
    [2, 3, 7, 6],
    [3, 0, 4, 7],
  ];
  return { positions, triangles: quads.flatMap(([a, b, c, d4]) => [a!, b!, c!, a!, c!, d4!]) };
}
const mesh = (...parts: ReturnType<typeof box>[]) => ({
  positions: Float32Array.from(parts.flatMap((p) => p.positions)),
  triangles: Uint32Array.from(parts.flatMap((p, i) => p.triangles.map((t) => t + 8 * i))),
});

it('shows what is nearest in each pixel: heights of a box from above, nothing beside it', () => {
  const { positions, triangles } = mesh(box(), box(10, 0, 0, 2, 2, 5));
  const image = depthImage(positions, triangles, PLAN, 10, EYE_LIGHT);
  const at = (x: number, y: number): number =>
    image.depth[(Math.floor(10 * y) - image.low) * image.width + Math.floor(10 * x) - image.left]!;
  expect(at(2, 3)).toBeCloseTo(2, 5);
  expect(at(11, 1)).toBeCloseTo(5, 5);
  expect(at(7, 3)).toBe(Number.NEGATIVE_INFINITY);
  // 4 x 6 and 2 x 2 mm at 100 pixels a mm².
  expect(image.shade.filter((s) => s > 0).length).toBe(100 * (24 + 4));
  expect(Math.max(...image.shade)).toBe(255);
});

it('draws the nine edges of a box that are seen from a corner, whole, and leaves out what another box hides', () => {
  const lone = mesh(box());
  const lengths = (lines: ReturnType<typeof meshLines>) =>
    lines.reduce((sum, [p, q]) => sum + Math.hypot(q[0] - p[0], q[1] - p[1]), 0);
  const seen = meshLines(lone.positions, lone.triangles, ISOMETRIC);
  // Three edges each way; an isometric view shortens each by sqrt(2/3) (ISO 5456-3).
  expect(lengths(seen)).toBeCloseTo(3 * (4 + 6 + 2) * Math.sqrt(2 / 3), 1);
  const covered = mesh(box(), box(-1, -1, 3, 6, 8, 1));
  const fromAbove = meshLines(covered.positions, covered.triangles, PLAN);
  expect(lengths(fromAbove)).toBeCloseTo(2 * (6 + 8), 1);
});
