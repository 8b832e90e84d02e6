import { describe, expect, it } from 'vitest';
import { sayFault } from '../../src/readers/fault.js';
import { readCsv, readPairForces } from '../../src/readers/geometry/csv.js';
import { readMeasured } from '../../src/readers/measured.js';
import { readPieces } from '../../src/readers/pieces.js';

// A comma separated file with decimal commas shifts its cells, and every shifted one is a number (RFC 4180, section 2: each
// line should hold the same number of fields).
const measured = (text: string) =>
  readMeasured(text, 't.csv', { struts: new Set(['S01', 'S02']), nodes: new Set(['N1']) }).faults;
const STRUTS = 'from,to\nA,B\n';

const readers = {
  'measured lengths': () => measured('mark,length_mm\nS01,400.0\nS02,4,00.5\n'),
  'measured nodes': () => measured('node,x_mm,y_mm,z_mm\n\nN1,1,5,2,3\n'),
  nodes: () => readCsv('id,x,y,z\nA,0,0,0\nB,1,5,0,0\n', 't.csv', { text: STRUTS, name: 's.csv' }).faults,
  struts: () =>
    readCsv('id,x,y,z\nA,0,0,0\nB,1,0,0\n', 'n.csv', { text: 'from,to,force\nA,B,1\nB,A,1,5\n', name: 't.csv' }).faults,
  'struts by coordinates': () => readCsv('x1,y1,z1,x2,y2,z2\n0,0,0,1,1,1\n0,0,0,1,5,0,0\n', 't.csv', null).faults,
  'forces by node pair': () => readPairForces('from,to,force\nA,B,1\nB,C,1,5\n', 't.csv').faults,
  pieces: () => readPieces('mark,length_mm,quantity\nS1,400,1\nS2,400,5,1\n', 't.csv').faults,
};

describe('a row with more cells than its table has columns', () => {
  it.each(Object.entries(readers))('is one named fault in a table of %s', (_, read) => {
    const faults = read();
    expect(faults).toHaveLength(1);
    expect(sayFault(faults[0]!)).toMatch(/^t\.csv:3:1: has \d cells under \d columns: write decimal points, or/);
  });

  it('is named where cells are separated by semicolons too, with another way to mend it', () => {
    expect(measured('mark;length_mm\nS01;400,5;9\n').map(sayFault)).toEqual([
      't.csv:2:1: has 3 cells under 2 columns: name every column in the first line, or take out the cells too many',
    ]);
  });

  it('may end in the blank cells of a spreadsheet, and hold a quoted comma', () => {
    expect(measured('mark,length_mm\nS01,400.5,,\nS02,"400,5"\n')).toEqual([]);
    expect(measured('mark,length_mm,remark\nS01,400.5,"by hand, twice"\n')).toEqual([]);
  });
});
