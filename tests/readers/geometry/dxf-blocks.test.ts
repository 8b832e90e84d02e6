import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readDxf } from '../../../src/readers/geometry/dxf.js';
import { readDxfOutlines } from '../../../src/readers/outlines/outlines-dxf.js';
import { shoelace } from '../../planning/nesting/verify.js';

// Written by ezdxf, which also says where the lines and faces of its blocks stand: fixtures/make-blocks-dxf.py.
const file = (name: string): string => readFileSync(new URL(`fixtures/${name}`, import.meta.url), 'utf8');
const BLOCKS = file('blocks.dxf');
type Placed = [layer: string, ...points: number[][]];
const PLACED = JSON.parse(file('blocks.json')) as { lines: Placed[]; loops: Placed[] };

/** Sorted by their numbers, to nine digits behind the point as ezdxf's are noted. */
const sorted = (shapes: readonly (readonly (readonly number[])[])[]): string[] =>
  shapes.map((s) => s.map((p) => p.map((v) => (Math.round(v * 1e6) / 1e6 + 0).toFixed(6)).join(' ')).join(', ')).sort();

describe('blocks, as ezdxf places them', () => {
  const { geometry, faults } = readDxf(BLOCKS, 'blocks.dxf');
  it('nested, turned, scaled unevenly, mirrored, arrayed and tilted', () => {
    expect(faults).toEqual([]);
    expect(PLACED.lines).toHaveLength(20);
    expect(sorted(geometry!.lines.map((l) => l.ends))).toEqual(sorted(PLACED.lines.map(([, ...points]) => points)));
    expect(sorted(geometry!.loops.map((l) => l.points))).toEqual(sorted(PLACED.loops.map(([, ...points]) => points)));
  });
  // AutoCAD DXF reference: entities of layer 0 in a block lie on the layer of its insert.
  it('on the layer of the insert where they are on layer 0, on their own else', () => {
    expect(geometry!.lines.map((l) => l.layer).slice(0, 4)).toEqual(['ROOF', 'LEGS', 'LEGS', 'LEGS']);
    expect(geometry!.loops.map((l) => l.layer)).toEqual(['LEGS', 'ROOF', 'LEGS', 'ROOF', 'ROOF', 'ROOF']);
  });
  it('with what else stands in them named, as often as it stands', () =>
    expect(Object.fromEntries(geometry!.leftOut)).toEqual({ CIRCLE: 10, ATTRIB: 1 }));
});

/** A file of the given blocks and entities, a group a line as `code value`. */
const dxf = (blocks: string, entities: string): string => {
  const groups = (text: string): string =>
    text
      .trim()
      .split(/\s*\n\s*/)
      .filter(Boolean)
      .map((g) => g.replace(/\s+/, '\n'))
      .join('\n');
  return `0\nSECTION\n2\nBLOCKS\n${groups(blocks)}\n0\nENDSEC\n0\nSECTION\n2\nENTITIES\n${groups(entities)}\n0\nENDSEC\n0\nEOF\n`;
};
const block = (name: string, body: string, flags = 0): string =>
  `0 BLOCK\n2 ${name}\n70 ${flags}\n10 0\n20 0\n30 0\n${body}\n0 ENDBLK`;
const insert = (name: string, more = ''): string => `0 INSERT\n8 0\n2 ${name}\n10 0\n20 0\n30 0\n${more}`;
const LINE = '0 LINE\n8 0\n10 0\n20 0\n11 1\n21 0';

describe('blocks that are not right', () => {
  it.each([
    ['itself', dxf(block('A', insert('A')), insert('a')), /the block "a" stands within itself/],
    [
      'itself by another',
      dxf(`${block('A', insert('B'))}\n${block('B', insert('A'))}`, insert('B')),
      /stands within itself/,
    ],
    [
      'a scale of nought',
      dxf(block('A', LINE), insert('A', '41 0')),
      /INSERT has a number that is not finite, or a scale/,
    ],
    ['no number', dxf(block('A', LINE), insert('A', '50 x')), /INSERT has a number that is not finite/],
    [
      'scales beyond reckoning',
      dxf(`${block('A', LINE)}\n${block('B', insert('A', '41 1e12'))}`, insert('B', '41 1e12')),
      /LINE has a coordinate/,
    ],
    [
      'an array without end',
      dxf(block('A', LINE), insert('A', '70 32767\n71 32767')),
      /more than \d+ entities with its blocks opened/,
    ],
  ])('%s is a fault', (_, text, words) => {
    const { geometry, faults } = readDxf(text, 'd.dxf');
    expect(geometry).toBeNull();
    expect(faults).toHaveLength(1);
    expect(faults[0]!.what).toMatch(words);
  });

  it('ten inserts of ten inserts, twelve times over, are refused before the memory is full', () => {
    const ten = (name: string): string => Array.from({ length: 10 }, () => insert(name)).join('\n');
    const levels = Array.from({ length: 12 }, (_, i) => block(`L${i + 1}`, ten(`L${i}`)));
    const { faults } = readDxf(dxf([block('L0', LINE), ...levels].join('\n'), ten('L12')), 'd.dxf');
    expect(faults.map((f) => f.what)).toEqual([expect.stringMatching(/with its blocks opened/)]);
  });

  it('one that is missing or in another file is left out by name', () => {
    const text = dxf(block('X', '', 4), `${insert('X')}\n${insert('Y')}\n${LINE}`);
    expect(Object.fromEntries(readDxf(text, 'd.dxf').geometry!.leftOut)).toEqual({
      'INSERT of a block in another file': 1,
      'INSERT of a block that the file does not have': 1,
    });
  });
});

it('outlines are read through blocks too, with their scale and curves', () => {
  const square = '0 LWPOLYLINE\n8 0\n90 4\n70 1\n10 0\n20 0\n10 10\n20 0\n10 10\n20 5\n10 0\n20 5';
  const text = dxf(
    block('A', `${square}\n0 CIRCLE\n8 0\n10 5\n20 2.5\n40 1`),
    insert('A', '41 2\n42 -3\n50 90\n70 2\n44 100'),
  );
  const { outlines, faults } = readDxfOutlines(text, 'a.dxf');
  expect(faults).toEqual([]);
  expect(outlines).toHaveLength(2);
  for (const { outline, holes } of outlines) {
    // 10 x 5 and a circle of radius 1, six times as large.
    expect(Math.abs(shoelace(outline))).toBeCloseTo(300, 9);
    // Chords lie within 0.01 mm of the curve; Ramanujan's circumference of the ellipse of 2 and 3 is 15.9 mm.
    expect(6 * Math.PI - Math.abs(shoelace(holes[0]!))).toBeLessThan(0.01 * 15.9);
    expect(6 * Math.PI - Math.abs(shoelace(holes[0]!))).toBeGreaterThan(0);
  }
});
