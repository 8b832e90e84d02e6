import { describe, expect, it } from 'vitest';
import { caseNameProblem, markProblem } from '../../src/model/marks.js';

describe('markProblem', () => {
  it.each(['A', 'A1', 'S1-a_b', 'x'.repeat(24), 'N012', 'Con1', 'Mary1', 'e5', 'March', 'DECK12'])(
    '%s is a mark',
    (mark) => {
      expect(markProblem(mark)).toBeNull();
    },
  );
  it.each(['', '1A', '_a', 'A b', 'A/b', '..', 'é1', 'A.', 'x'.repeat(25), '=A1', '-A1', 'A\n', 'A1\u202e'])(
    '%j is outside the grammar',
    (mark) => {
      expect(markProblem(mark)?.what).toBe('is not a mark');
    },
  );
  // Reserved device names: Microsoft, Naming Files, Paths, and Namespaces (from memory).
  it.each(['con', 'PRN', 'Aux', 'NUL', 'com1', 'LPT9'])('%s is reserved', (mark) => {
    expect(markProblem(mark)?.what).toMatch(/reserves/);
  });
  // Spreadsheets turned these into dates in published gene lists: Ziemann, Eren, El-Osta, Genome Biology 17, 2016 (from memory).
  it.each(['MAR1', 'SEPT2', 'Dec1', 'oct-4', 'March1'])('%s reads as a date', (mark) => {
    expect(markProblem(mark)?.what).toMatch(/date/);
  });
});

it('a case name is any printable text of 1 to 40 characters', () => {
  for (const name of ['snow', 'given', 'Wind from the north, 60°', '雪', '😀'.repeat(40), '=1+1', '<b>'])
    expect(caseNameProblem(name)).toBeNull();
  for (const name of ['', ' ', '__proto__', 'x'.repeat(41), 'a\nb', '\u0007'])
    expect(caseNameProblem(name)).not.toBeNull();
});
