import { expect, it } from 'vitest';
import { withSections } from '../../../src/documents/truss/with-sections.js';
import { readTruss } from '../../../src/readers/truss.js';

/** Invented; with comments, odd spacing and a section that is there already. */
const TEXT = `{ // a bar
  "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0,0,0] }, { "id": "B", "at": [100,0,0] }, { "id": "C", "at": [0,100,0] } ],
  "members": [
    { "id": "S1", "ends": ["A","B"] },  // the long one
    { "id": "S2", "section": "beech-8", "ends": ["B","C"], "force": -3 }
  ]
}`;

it('puts a section on every member and leaves the rest as it was', () => {
  const text = withSections(TEXT, ['beech-6', 'alu-25x2']);
  expect(text).toBe(
    TEXT.replace('"ends": ["A","B"]', '"ends": ["A","B"], "section": "beech-6"').replace('"beech-8"', '"alu-25x2"'),
  );
  const { truss, faults } = readTruss(text, 'truss.json');
  expect(faults).toEqual([]);
  expect(truss!.members.map((m) => m.section)).toEqual(['beech-6', 'alu-25x2']);
});

it('a trailing comment in the last member does not swallow the key', () => {
  const text = withSections(TEXT.replace('"ends": ["A","B"] }', '"ends": ["A","B"] // so\n }'), ['a', 'b']);
  expect(readTruss(text, 'truss.json').truss!.members[0]!.section).toBe('a');
});
