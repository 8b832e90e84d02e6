import { describe, expect, it } from 'vitest';
import { readMeasured } from '../../src/readers/measured.js';

const marks = { struts: new Set(['S01', 'S02', 'S03']), nodes: new Set(['N1', 'N2']) };
const read = (text: string) => readMeasured(text, 'm.csv', marks);

describe('a table of measurements', () => {
  it('reads lengths with comma, and with semicolon, decimal comma and byte-order mark', () => {
    expect([...read('mark,length_mm\nS01,400.5\n').measured!.lengths]).toEqual([['S01', 400.5]]);
    expect([...read('\ufeffmark;length_mm\r\nS01;400,5\r\n').measured!.lengths]).toEqual([['S01', 400.5]]);
  });

  it('reads nodes, in any order of columns', () => {
    expect([...read('z_mm,node,x_mm,y_mm\n3,N1,-1,2\n').measured!.nodes]).toEqual([['N1', [-1, 2, 3]]]);
  });

  it('names an unknown mark, a mark twice, a text and an empty field, each once with its line', () => {
    const { measured, faults } = read('mark,length_mm\nS01,400\nS99,400\nS01,401\n\nS02,long\nS03,\n');
    expect(measured).toBeNull();
    expect(faults.map((f) => f.line)).toEqual([3, 4, 6, 7]);
    expect(faults[0]!.what).toContain('"S99" is no strut');
    expect(faults[1]!.what).toContain('S01 is measured twice');
    expect(faults[2]!.what).toContain('"long"');
    expect(faults[3]!.what).toContain('is no measurement');
  });

  it.each(['0', '-3', 'Infinity', 'NaN', '1e999', '0x10', '0b11', '0o17', '1_000', '1 2', ''])(
    '%s is no length',
    (value) => {
      expect(read(`mark,length_mm\nS01,${value}\n`).faults.map((f) => f.line)).toEqual([2]);
    },
  );

  it('takes a sign, a power of ten and a bare point', () => {
    expect([...read('mark,length_mm\nS01,+4.005e2\nS02,.5\nS03,12.\n').measured!.lengths.values()]).toEqual([
      400.5, 0.5, 12,
    ]);
  });

  it('refuses a table without those columns, and one that measures nothing', () => {
    expect(read('a,b\n1,2\n').faults).toHaveLength(1);
    expect(read('').faults).toHaveLength(1);
    expect(read('mark,length_mm\n').faults).toHaveLength(1);
  });

  it('a quotation mark in the wrong place is told without what stands beside it', () => {
    const { faults } = read('=\u2028("x")mark,length_mm\nS01,450.2\n');
    expect(faults.map((f) => f.what)).toEqual(['a cell has a quotation mark in the wrong place']);
  });
});
