import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readDxf } from '../../../src/readers/geometry/dxf.js';

// Written by ezdxf, a general-purpose DXF library: fixtures/make-dxf.py.
const TOWER = readFileSync(new URL('fixtures/tower.dxf', import.meta.url), 'utf8');

describe('a drawing written by another library', () => {
  const { geometry, faults } = readDxf(TOWER, 'tower.dxf');
  it('has its unit, its up, its layers', () => {
    expect(faults).toEqual([]);
    expect(geometry).toMatchObject({ unit: 'cm', up: 'z' });
    expect(new Set(geometry!.lines.map((l) => l.layer))).toEqual(new Set(['LEGS', '0']));
  });
  it('has lines of LINE, 3D POLYLINE and a LWPOLYLINE at its elevation', () =>
    expect(geometry!.lines.map((l) => l.ends)).toEqual([
      [
        [0, 0, 0],
        [0, 0, 30],
      ],
      [
        [10, 0, 0],
        [10, 0, 30],
      ],
      [
        [0, 0, 30],
        [10, 0, 30],
      ],
      [
        [10, 0, 30],
        [5, 8, 40],
      ],
      [
        [0, 0, 60],
        [2, 0, 60],
      ],
      [
        [2, 0, 60],
        [2, 2, 60],
      ],
    ]));
  it('has loops of a closed polyline in a plane of its own, 3DFACE, MESH, polyface and polygon mesh', () => {
    const loops = geometry!.loops.map((l) => l.points);
    expect(loops).toHaveLength(9);
    expect(loops[0]).toEqual([
      [0, 0, 0],
      [10, 0, 0],
      [10, 0, 30],
      [0, 0, 30],
    ]);
    expect(loops[1]).toEqual([
      [0, 0, 30],
      [10, 0, 30],
      [5, 8, 40],
    ]);
    expect(loops[5]).toEqual([
      [5, 8, 0],
      [0, 0, 0],
      [5, 3, -9],
    ]);
    expect(loops[6]).toEqual([
      [0, 0, 50],
      [4, 0, 50],
      [4, 4, 50],
      [0, 4, 50],
    ]);
  });
  it('says what it left out', () =>
    expect(Object.fromEntries(geometry!.leftOut)).toEqual({
      CIRCLE: 1,
      'LINE in paper space': 1,
      'curved part of a polyline, taken straight': 1,
    }));
});

describe('a file that is not right', () => {
  it.each([
    ['', /1:1: is not a DXF file/],
    ['hello\nworld\n', /"hello" is not a group code/],
    ['AutoCAD Binary DXF\r\n', /binary/],
    [TOWER.slice(0, 9000), /before its EOF|group code/],
    [
      '0\nSECTION\n2\nENTITIES\n0\nLINE\n8\n0\n10\nx\n20\n0\n11\n1\n21\n0\n0\nENDSEC\n0\nEOF\n',
      /:6:1: LINE has a coordinate/,
    ],
    [
      '0\nSECTION\n2\nENTITIES\n0\nLINE\n8\n0\n10\n1e999\n20\n0\n11\n1\n21\n0\n0\nENDSEC\n0\nEOF\n',
      /LINE has a coordinate/,
    ],
    [
      '0\nSECTION\n2\nENTITIES\n0\nMESH\n93\n2\n90\n3\n90\n99999999\n0\nENDSEC\n0\nEOF\n',
      /MESH has a coordinate or an index/,
    ],
  ])('%.20j', (text, words) => {
    const { geometry, faults } = readDxf(text, 'd.dxf');
    expect(geometry).toBeNull();
    expect(faults).toHaveLength(1);
    expect(`${faults[0]!.line}:${faults[0]!.column}: ${faults[0]!.what}`.replace(/^/, 'd.dxf:')).toMatch(words);
  });
});
