import { expect, it } from 'vitest';
import { editDistance, nearest } from '../../src/maths/nearest.js';

// Textbook pairs: kitten/sitting 3 (Levenshtein), ca/abc 3 under the restriction that no substring is edited twice (from memory).
it.each([
  ['kitten', 'sitting', 3],
  ['ca', 'abc', 3],
  ['ab', 'ba', 1],
  ['', 'abc', 3],
  ['saturday', 'sunday', 3],
])('%s to %s takes %i edits', (a, b, d) => {
  expect(editDistance(a, b)).toBe(d);
  expect(editDistance(b, a)).toBe(d);
});

it('names the nearest known word and stays silent where none is near', () => {
  const known = ['nodes', 'members', 'faces', 'units'];
  expect(nearest('node', known)).toBe('nodes');
  expect(nearest('Memebrs', known)).toBe('members');
  expect(nearest('colour', known)).toBeNull();
  expect(nearest('x', [])).toBeNull();
  expect(nearest('x', ['y'])).toBeNull();
});
