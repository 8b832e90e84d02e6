import { expect, it } from 'vitest';
import type { Vec3 } from '../../src/maths/vec3.js';
import { mechanismInWords } from '../../src/statics/mechanism-words.js';
import { countStates } from '../../src/statics/state-counts.js';

const marksOf = (n: number) => Array.from({ length: n }, (_, i) => `N${i + 1}`);

function words(points: readonly Vec3[], bars: readonly (readonly [number, number])[], heldNodes: readonly number[]) {
  const fixed = new Uint8Array(3 * points.length);
  for (const n of heldNodes) fixed.fill(1, 3 * n, 3 * n + 3);
  const c = countStates({ nodes: Float64Array.from(points.flat()), ends: Int32Array.from(bars.flat()), fixed });
  return c.mechanismShapes.map((m) => mechanismInWords(marksOf(points.length), points, bars.flat(), m.shape).words);
}

it('says that a node held by two struts swings about the line between their feet', () => {
  const points: Vec3[] = [
    [0, 0, 0],
    [3, 1, 0],
    [1, 2, 2],
    [9, 9, 0],
  ];
  // N4 is held too, so that swinging is no motion of the whole.
  const bars = [
    [0, 2],
    [1, 2],
  ] as const;
  expect(words(points, bars, [0, 1, 3])).toEqual(['N3 can swing about N1-N2']);
});

it('says that two joined nodes swing about the line between their feet', () => {
  const points: Vec3[] = [
    [0, 0, 0],
    [4, 0, 0],
    [1, 0, 3],
    [3, 0, 3],
    [9, 9, 0],
  ];
  // A braced plane frame stands on N1 and N2 and falls sideways.
  const bars = [
    [0, 2],
    [1, 3],
    [2, 3],
    [0, 3],
  ] as const;
  const said = words(points, bars, [0, 1, 4]);
  expect(said.length).toBe(2);
  expect(said).toContain('N4 can swing about N1-N2');
  // Together, as a shape of its own.
  const shape = new Float64Array(15);
  shape[7] = shape[10] = 1;
  expect(mechanismInWords(marksOf(5), points, bars.flat(), shape)).toEqual({
    words: 'N3 and N4 can swing about N1-N2',
    nodes: ['N3', 'N4'],
  });
});

it('tells a body that turns about one held node', () => {
  const points: Vec3[] = [
    [0, 0, 0],
    [1, 0, 1],
    [0, 1, 1],
    [-1, -1, 1],
  ];
  const shape = new Float64Array(12);
  points.forEach(([x, y], i) => {
    shape.set([-y, x, 0], 3 * i);
  });
  const { words: said, nodes } = mechanismInWords(marksOf(4), points, [0, 1, 0, 2, 0, 3, 1, 2, 2, 3, 1, 3], shape);
  expect(said).toBe('N4, N2 and N3 can turn about N1, axis along z');
  expect(nodes.length).toBe(3);
});

it('tells a slide, and a motion that is none of one body', () => {
  const points: Vec3[] = [
    [0, 0, 0],
    [1, 0, 0],
    [0, 1, 0.5],
  ];
  expect(mechanismInWords(marksOf(3), points, [0, 1, 1, 2], [0, 0, 1, 0, 0, 1, 0, 0, 1]).words).toBe(
    'N1, N2 and N3 can slide together along z',
  );
  expect(mechanismInWords(marksOf(3), points, [], [1, 0, 0, 0, 1, 0, 0, 0, -0.3]).words).toBe(
    'N1, N2 and N3 can move against the rest, N1 the most',
  );
});
