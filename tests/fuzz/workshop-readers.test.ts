import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { readMeasured } from '../../src/readers/measured.js';
import type { OutlinesReading } from '../../src/readers/outlines/outline.js';
import { readDxfOutlines } from '../../src/readers/outlines/outlines-dxf.js';
import { readJsonOutlines } from '../../src/readers/outlines/outlines-json.js';
import { readSvgOutlines } from '../../src/readers/outlines/outlines-svg.js';
import { readPieces } from '../../src/readers/pieces.js';
import { holds } from './holds.js';

const DXF = readFileSync(new URL('../readers/geometry/fixtures/tower.dxf', import.meta.url), 'utf8');
const SVG = `<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" width="200mm" height="100mm" viewBox="0 0 400 200">
  <defs><path d="M0 0 1 1"/></defs><g transform="translate(10 20) rotate(5)"><rect x="1" y="2" width="30" height="20" rx="4"/>
  <path d="M0,0 h40 v30 c-5 5 -10 5 -15 0 s-9 2 -10 1 q-3-3 -5 0 t-4 1 a5 5 0 0 1 -6 -1 z m4 4 l3 0 l0 3 z"/></g>
  <circle cx="100" cy="50" r="12"/><ellipse cx="150" cy="50" rx="12" ry="5"/><polygon points="0,100 30,100 30,130"/>
  <line x1="5" y1="150" x2="60" y2="150"/><polyline points="60,150 60,190 5,190 5,150"/><text>mark</text></svg>`;
const OUTLINES = `{ "P1": { "outline": [[0, 0], [100, 0], [100, 50.5], [0, 50]], "holes": [[[10, 10], [20, 10], [20, 20]]], "quantity": 2 },
  "P2": { "outline": [[0, 0], [80, 0], [0, 60]], "rotations": [0, 180], "frame": {} } }`;
const PIECES = 'mark,length_mm,quantity,section\nS1,450,4,beech-8\nS2,320.5,3,beech-8\n"S3",120,2,\n';
const PIECES_SEMICOLON = 'Piece;Cut length [in];Qty\nS1;17,75;4\nS2;12,5;3\n';
const MEASURED = 'mark,length_mm\nS1,450.2\nS2,320.4\n';
const PLACES = 'node;x_mm;y_mm;z_mm\nA;0;0,5;-1e1\nB;10;20;30\n';
const marks = { struts: new Set(['S1', 'S2', 'S3']), nodes: new Set(['A', 'B']) };

/** What was read of outlines is finite, and each has its corners. */
function outlinesOf({ outlines, faults }: OutlinesReading) {
  for (const { outline, holes, quantity } of faults.length > 0 ? [] : outlines) {
    expect(outline.length).toBeGreaterThan(2);
    expect([outline, ...holes].flat(2).every(Number.isFinite)).toBe(true);
    expect(Number.isInteger(quantity)).toBe(true);
  }
  return { value: faults.length > 0 ? null : outlines, faults };
}

describe('a file from the workshop that was damaged anywhere is read, or refused in words', () => {
  it('outlines in DXF', () =>
    holds(DXF.slice(DXF.indexOf('ENTITIES') - 20), (text) => outlinesOf(readDxfOutlines(text, 'f'))));
  it('outlines in SVG', () => holds(SVG, (text) => outlinesOf(readSvgOutlines(text, 'f'))));
  it('outlines in JSON', () => holds(OUTLINES, (text) => outlinesOf(readJsonOutlines(text, 'f'))));
  it.each([
    ['comma', PIECES],
    ['semicolon and inches', PIECES_SEMICOLON],
  ])('pieces to cut, %s', (_, source) =>
    holds(source, (text) => {
      const { pieces, faults } = readPieces(text, 'f');
      if (faults.length === 0)
        for (const p of pieces)
          expect([p.length > 0 && Number.isFinite(p.length), p.quantity >= 0]).toEqual([true, true]);
      return { value: faults.length > 0 ? null : pieces, faults };
    }),
  );
  it.each([
    ['lengths', MEASURED],
    ['places', PLACES],
  ])('measured %s', (_, source) =>
    holds(source, (text) => {
      const { measured, faults } = readMeasured(text, 'f', marks);
      return { value: measured, faults };
    }),
  );
});
