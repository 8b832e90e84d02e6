import { describe, expect, it } from 'vitest';
import { drawingToDxf } from '../../../src/documents/formats/dxf.js';
import { drawingToSvg } from '../../../src/documents/formats/svg.js';
import { type Drawing, straightLine } from '../../../src/documents/kit/drawing.js';
import { readDxfOutlines } from '../../../src/readers/outlines/outlines-dxf.js';
import { readJsonOutlines } from '../../../src/readers/outlines/outlines-json.js';
import { readSvgOutlines } from '../../../src/readers/outlines/outlines-svg.js';
import { shoelace } from '../../planning/nesting/verify.js';

const svg = (body: string, head = 'width="200mm" height="100mm" viewBox="0 0 200 100"'): string =>
  `<?xml version="1.0"?><svg xmlns="http://www.w3.org/2000/svg" ${head}>${body}</svg>`;
const area = (text: string): number => {
  const { outlines, faults } = readSvgOutlines(text, 'a.svg');
  expect(faults).toEqual([]);
  return outlines.reduce(
    (sum, o) => sum + Math.abs(shoelace(o.outline)) - o.holes.reduce((h, q) => h + Math.abs(shoelace(q)), 0),
    0,
  );
};

describe('SVG outlines', () => {
  it('have the areas of the textbook shapes', () => {
    expect(area(svg('<rect x="1" y="2" width="30" height="20"/>'))).toBeCloseTo(600, 6);
    expect(area(svg('<circle cx="50" cy="50" r="20"/>'))).toBeCloseTo(Math.PI * 400, -1);
    expect(area(svg('<ellipse cx="50" cy="50" rx="20" ry="10"/>'))).toBeCloseTo(Math.PI * 200, -1);
    expect(area(svg('<path d="M0 0h10v10h-10z"/>'))).toBeCloseTo(100, 6);
    // A half disc by an arc, large-arc and sweep flags run together.
    expect(area(svg('<path d="M10 50A20 20 0 0150 50Z"/>'))).toBeCloseTo(Math.PI * 200, -1);
    // Under a parabola of width 10 whose control point is 10 high: 2/3 of 5 x 10.
    expect(area(svg('<path d="M0 10Q5 0 10 10Z"/>'))).toBeCloseTo((2 / 3) * 10 * 5, 0);
    expect(
      area(svg('<polygon points="0,0 10,0 10,10 0,10"/><rect x="20" width="10" height="10" rx="2"/>')),
    ).toBeCloseTo(200 - (4 - Math.PI) * 4, 0);
  });

  it('take units, transforms and holes, and leave out what is not drawn', () => {
    expect(area(svg('<rect width="96" height="96"/>', 'width="96px" height="96px"'))).toBeCloseTo(25.4 ** 2, 6);
    expect(
      area(
        svg('<g transform="translate(5 5) scale(2)"><g transform="rotate(30)"><rect width="10" height="10"/></g></g>'),
      ),
    ).toBeCloseTo(400, 6);
    expect(area(svg('<rect width="30" height="30"/><circle cx="15" cy="15" r="5"/>'))).toBeCloseTo(
      900 - 25 * Math.PI,
      0,
    );
    expect(area(svg('<defs><rect width="99" height="99"/></defs><rect width="10" height="10"/>'))).toBeCloseTo(100, 6);
  });

  it('are not mirrored: what is left of an upright stays left', () => {
    const { outlines } = readSvgOutlines(svg('<path d="M0 100L0 0L50 100Z"/>'), 'a.svg');
    expect(
      outlines[0]!.outline.some((p) => p[0] === 0 && p[1] === 0 && outlines[0]!.outline.some((q) => q[1] < p[1])),
    ).toBe(true);
  });

  it('are refused with a line where they cannot be read', () => {
    expect(readSvgOutlines('hello', 'a.svg').faults[0]!.what).toMatch(/not an SVG/);
    expect(readSvgOutlines(svg('<path d="M0 0L1 x"/>'), 'a.svg').faults.length).toBe(1);
    expect(readSvgOutlines(svg('<rect width="1" height="1"/>', 'viewBox="0 0 1 1"'), 'a.svg').faults[0]!.what).toMatch(
      /no width/,
    );
    expect(readSvgOutlines(svg(''), 'a.svg').faults[0]!.what).toMatch(/no closed contour/);
  });
});

describe('DXF outlines', () => {
  const entity = (...pairs: (string | number)[]): string => pairs.join('\n');
  const dxf = (body: string, unit = 4): string =>
    `0\nSECTION\n2\nHEADER\n9\n$INSUNITS\n70\n${unit}\n0\nENDSEC\n0\nSECTION\n2\nENTITIES\n${body}\n0\nENDSEC\n0\nEOF\n`;

  it('joins lines and arcs end to end and takes the unit', () => {
    const half = [
      entity(0, 'LINE', 8, 'A', 10, 0, 20, 0, 11, 10, 21, 0),
      entity(0, 'ARC', 8, 'A', 10, 5, 20, 0, 40, 5, 50, 0, 51, 180),
    ].join('\n');
    const { outlines, faults } = readDxfOutlines(dxf(half, 5), 'a.dxf');
    expect(faults).toEqual([]);
    expect(Math.abs(shoelace(outlines[0]!.outline))).toBeCloseTo((Math.PI * 2500) / 2, -1);
  });

  it('counts what stays open and refuses a file without contours', () => {
    const { faults, leftOut } = readDxfOutlines(dxf(entity(0, 'LINE', 8, 'A', 10, 0, 20, 0, 11, 10, 21, 0)), 'a.dxf');
    expect(faults[0]!.what).toMatch(/no closed contour/);
    expect(leftOut.get('open contour')).toBe(1);
    expect(readDxfOutlines('no', 'a.dxf').faults.length).toBe(1);
  });
});

it('what is written as SVG and as DXF reads back as the same panel with its hole, kept lines left out', () => {
  const drawing: Drawing = {
    title: 't',
    width: 200,
    height: 100,
    layers: [
      {
        name: 'DO-NOT-CUT',
        colour: '#777777',
        purpose: 'keep',
        lines: [
          straightLine(
            [
              [0, 0],
              [200, 0],
              [200, 100],
              [0, 100],
            ],
            true,
          ),
        ],
      },
      {
        name: 'CUT-INSIDE',
        colour: '#542788',
        purpose: 'inside',
        lines: [
          {
            closed: true,
            corners: [
              { x: 45, y: 30, bulge: 1 },
              { x: 55, y: 30, bulge: 1 },
            ],
          },
        ],
      },
      {
        name: 'CUT-OUTSIDE',
        colour: '#b35806',
        purpose: 'outside',
        lines: [
          straightLine(
            [
              [10, 10],
              [90, 10],
              [70, 60],
              [10, 60],
            ],
            true,
          ),
        ],
      },
    ],
  };
  for (const { outlines } of [
    readDxfOutlines(drawingToDxf(drawing), 'a.dxf'),
    readSvgOutlines(drawingToSvg(drawing), 'a.svg'),
  ]) {
    expect(outlines.length).toBe(1);
    expect(Math.abs(shoelace(outlines[0]!.outline))).toBeCloseTo(3500, 2);
    expect(outlines[0]!.holes.length).toBe(1);
    expect(Math.abs(shoelace(outlines[0]!.holes[0]!))).toBeCloseTo(25 * Math.PI, 0);
  }
});

describe('JSON outlines', () => {
  it('are those of a pack, every fault in its place', () => {
    const good = readJsonOutlines('{ "P1": { "outline": [[0,0],[10,0],[10,5]], "holes": [], "frame": {} } }', 'o.json');
    expect(good.outlines).toEqual([
      {
        mark: 'P1',
        outline: [
          [0, 0],
          [10, 0],
          [10, 5],
        ],
        holes: [],
        quantity: 1,
      },
    ]);
    const bad = readJsonOutlines(
      '{ "P1": { "outline": [[0,0],[10,0]] },\n "P2": { "outline": [[0,0],[1,0],[1,1]], "quantity": 1.5 } }',
      'o.json',
    );
    expect(bad.faults.map((f) => f.line)).toEqual([1, 2]);
    expect(readJsonOutlines('[]', 'o.json').faults.length).toBe(1);
  });
});
