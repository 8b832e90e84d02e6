import { expect, it } from 'vitest';
import { readSvgOutlines } from '../../../src/readers/outlines/outlines-svg.js';

const svg = (body: string): string =>
  `<svg xmlns="http://www.w3.org/2000/svg" width="200mm" height="100mm" viewBox="0 0 200 100">${body}</svg>`;
const read = (text: string) => readSvgOutlines(text, 'a.svg');

it.each(['M0 0 c', 'M0 0 c 1', 'M0 0 q 1 1', 'M0 0 a 5 5 0 0', 'M0 0 c 0 0 1e999 0 1 1 z'])(
  'a path whose numbers end too soon or are not finite is a fault in words: %s',
  (d) => {
    const { outlines, faults } = read(svg(`<path d="${d}"/>`));
    expect(outlines).toEqual([]);
    expect(faults.map((f) => f.what)).toEqual(['path has numbers that cannot be read']);
  },
);

it('a curve of any size is at most ten thousand chords', () => {
  const huge = read(svg('<circle cx="0" cy="0" r="1e14"/><path d="M0 0 c 1e14 0 0 1e14 -1e13 -1e13 z"/>'));
  for (const { outline } of huge.outlines) expect(outline.length).toBeLessThanOrEqual(10_001);
});

it('comments, instructions and the document type are no drawing, and the lines stay', () => {
  const rect = '<rect x="0" y="0" width="10" height="10"/>';
  const head = `<?xml version="1.0"?>\n<!DOCTYPE svg [ <!ENTITY a "<rect/>"> ]>\n<!-- ${rect}\n -->`;
  expect(read(`${head}${svg(`<![CDATA[${rect}]]><?note ${rect}?>${rect}`)}`).outlines).toHaveLength(1);
  expect(read(`${head}${svg('<path d="M0 0 c"/>')}`).faults[0]!.line).toBe(4);
  expect(read(svg(`${rect}\n<!-- never ends`)).faults[0]).toMatchObject({
    line: 2,
    what: expect.stringMatching(/begins and does not end/),
  });
});

it('a file of nothing but openings is refused soon', () => {
  // The square of so many would be minutes.
  for (const open of ['<!--', '<![CDATA[', '<!DOCTYPE[', '<?', '<a ', '<a b="'])
    expect(read(svg(open.repeat(300_000))).faults.length, open).toBeGreaterThan(0);
});

it('a viewBox that leaves no number finite is a fault', () => {
  const text = svg('<circle cx="1" cy="1" r="1"/>').replace('0 0 200 100', '0 0 1e-320 100');
  expect(read(text).faults.length).toBeGreaterThan(0);
});
