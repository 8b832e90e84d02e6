import { expect, it } from 'vitest';
import { convertGeometry } from '../../src/readers/convert/convert.js';
import { readCsv, readPairForces } from '../../src/readers/geometry/csv.js';
import { readTruss } from '../../src/readers/truss.js';

// NIST SP 811 (2008), appendix B.8 and B.9: 1 in = 25.4 mm, 1 ft = 304.8 mm, exactly; 1 lbf = 4.448 221 615 260 5 N,
// 1 kip = 4448.221 615 260 5 N. ISO 80000-3 and -4 for the decimal multiples.
const LENGTHS = [
  ['mm', 1],
  ['cm', 10],
  ['m', 1000],
  ['in', 25.4],
  ['ft', 304.8],
] as const;
const FORCES = [
  ['N', 1],
  ['kN', 1000],
  ['lbf', 4.4482216152605],
  ['kip', 4448.2216152605],
] as const;

it.each(LENGTHS)('1 %s is %d mm in a truss file and in a table', (unit, mm) => {
  const text = `{ "format": "strutwright-truss/1", "units": "${unit}", "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [2, 0, 1] } ], "members": [ { "id": "S", "ends": ["A", "B"] } ] }`;
  expect(readTruss(text, 't.json').truss!.nodes[1]!.at).toEqual([2 * mm, 0, mm]);
  const table = `${['x1', 'y1', 'z1', 'x2', 'y2', 'z2'].map((c) => `${c} [${unit}]`).join(',')}\n0,0,0,2,0,1\n`;
  const { geometry, faults } = readCsv(table, 't.csv', null);
  expect(faults).toEqual([]);
  expect(geometry!.unit).toBe(unit);
  const { truss } = convertGeometry(geometry!, {
    unit,
    up: 'z',
    merge: null,
    split: false,
    findFaces: false,
    panels: false,
    forces: [],
    memory: null,
  });
  expect(truss.nodes.at(-1)!.at).toEqual([2 * mm, 0, mm]);
});

it.each(FORCES)('1 %s is %d N in a table of forces', (unit, newton) => {
  const { forces, faults } = readPairForces(`from,to,force [${unit}]\nA,B,-2\n`, 'f.csv');
  expect(faults).toEqual([]);
  expect(forces[0]!.force).toBeCloseTo(-2 * newton, 9);
});
