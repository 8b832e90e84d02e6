import { describe, expect, it } from 'vitest';
import { readCsv, readPairForces } from '../../../src/readers/geometry/csv.js';

const NODES = 'Node,X [m],Y [m],Z [m]\nA,0,0,0\nB,1.5,0,0\n"C",0,2,1e-1\n';
const STRUTS = 'Name,From,To,Force (kN),Group,Section\nS1,A,B,-1.25,ring,beech-8\nS2,b,C,,,\n';

describe('tables of nodes and struts', () => {
  it('are read by plain column names, with units, whatever the case', () => {
    const { geometry, faults } = readCsv(NODES, 'n.csv', { text: STRUTS, name: 's.csv' });
    expect(faults).toEqual([]);
    expect(geometry!.unit).toBe('m');
    expect(geometry!.points.map((p) => p.mark)).toEqual(['A', 'B', 'C']);
    expect(geometry!.lines).toEqual([
      {
        ends: [
          [0, 0, 0],
          [1.5, 0, 0],
        ],
        mark: 'S1',
        layer: 'ring',
        force: -1250,
        section: 'beech-8',
      },
      {
        ends: [
          [1.5, 0, 0],
          [0, 2, 0.1],
        ],
        mark: 'S2',
        layer: null,
        force: null,
        section: null,
      },
    ]);
  });
  it('read the same with semicolons, decimal commas and a byte-order mark', () => {
    const nodes = `\ufeff${NODES.replaceAll(',', ';').replaceAll('.', ',')}`.replaceAll('\n', '\r\n');
    const struts = `\ufeff${STRUTS.replaceAll(',', ';').replaceAll('.', ',')};;;;;\r\n`;
    expect(readCsv(nodes, 'n.csv', { text: struts, name: 's.csv' })).toEqual(
      readCsv(NODES, 'n.csv', { text: STRUTS, name: 's.csv' }),
    );
  });
  it('may be one table with the coordinates of both ends', () => {
    const { geometry } = readCsv('x1;y1;z1;x2;y2;z2\n0;0;0;1,5;0;0\n', 'l.csv', null);
    expect(geometry!.lines[0]!.ends).toEqual([
      [0, 0, 0],
      [1.5, 0, 0],
    ]);
  });
  it.each([
    [NODES.replace('1.5', 'one'), STRUTS, /^n\.csv:3: "one" is not a coordinate/],
    [NODES.replace('"C"', 'a'), STRUTS, /^n\.csv:4: the node "a" stands in line 2 too/],
    [NODES.replace('X [m]', 'X [mm]'), STRUTS, /^n\.csv:1: the coordinates are in different units/],
    [NODES.replace('X [m]', 'East'), STRUTS, /^n\.csv:1: has no column for x/],
    [NODES.replace('"C"', '"C C"'), STRUTS, /^n\.csv:4: the node "C C" is not a mark/],
    [NODES, STRUTS.replace('S2,b', 'S2,BB'), /^s\.csv:3: names node "BB", which the nodes do not have/],
    [NODES, STRUTS.replace('-1.25', '=1+1'), /^s\.csv:2: the force "=1\+1" is not a number/],
    [NODES, STRUTS.replace('S1', '=cmd()'), /^s\.csv:2: the strut "=cmd\(\)" is not a mark/],
    [NODES, 'From,To\nA,"B\n', /^s\.csv:\d: a cell has a quotation mark in the wrong place/],
    ['', STRUTS, /^n\.csv:1: has no rows under a header line/],
  ])('a fault %#', (nodes, struts, words) => {
    const { geometry, faults } = readCsv(nodes, 'n.csv', { text: struts, name: 's.csv' });
    expect(geometry).toBeNull();
    expect(faults.map((f) => `${f.file}:${f.line}: ${f.what}`).find((text) => words.test(text))).toBeDefined();
  });
});

it('forces by node pair, in the unit that their column names', () => {
  // 1 lbf = 4.448 221 615 260 5 N (NIST SP 811, B.8).
  const { forces, faults } = readPairForces('from;to;axial force [lbf]\nA;B;-2,5\n', 'f.csv');
  expect(faults).toEqual([]);
  expect(forces[0]!.force).toBeCloseTo(-2.5 * 4.4482216152605, 12);
});
