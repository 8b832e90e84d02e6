import { describe, expect, it } from 'vitest';
import { circle } from '../../../src/detailing/panels/corner-cut.js';
import { type DrawingLine, straightLine } from '../../../src/documents/kit/drawing.js';
import { sharedCuts, withLeadIn, withTabs } from '../../../src/documents/panels/cut-lines.js';
import { cutterPath, kerfOffset, sayKerf } from '../../../src/documents/panels/kerf.js';
import { kerfComb } from '../../../src/documents/panels/kerf-comb.js';
import { sheetDrawing } from '../../../src/documents/panels/sheet-drawing.js';
import { withArcs } from '../../../src/maths/polygon/arcs.js';
import { perimeter, signedArea, toRing } from '../../../src/maths/polygon/ring.js';
import { cutterSchema } from '../../../src/model/job/panels.js';
import type { PanelPart } from '../../../src/model/parts.js';

const square = (x: number, y: number, a: number): [number, number][] => [
  [x, y],
  [x + a, y],
  [x + a, y + a],
  [x, y + a],
];
const lengthOf = (lines: readonly DrawingLine[]): number =>
  lines.reduce(
    (sum, { corners, closed }) =>
      sum +
      corners.reduce(
        (s, c, i) =>
          i + 1 < corners.length || closed
            ? s + Math.hypot(corners[(i + 1) % corners.length]!.x - c.x, corners[(i + 1) % corners.length]!.y - c.y)
            : s,
        0,
      ),
    0,
  );

describe('kerf', () => {
  it('moves outlines out and holes in by half, as the area of the offset polygon says', () => {
    const k = 0.25;
    // A mitred offset of a convex outline: A + P d + d² Σ tan(turn/2); for a square A + P d + 4 d².
    expect(signedArea(cutterPath(toRing(square(0, 0, 100)), k / 2, 'outside')!)).toBeCloseTo(100.25 ** 2, 3);
    expect(signedArea(cutterPath(toRing(square(0, 0, 10)), k / 2, 'inside')!)).toBeCloseTo(9.75 ** 2, 3);
    expect(cutterPath(toRing(square(0, 0, 0.2)), k / 2, 'inside')).toBeNull();
  });

  it('is taken up by exactly one of program and shop, and the sheet says by which', () => {
    const cutter = cutterSchema.parse({ kerf_mm: 0.2 });
    expect(kerfOffset(cutter)).toBe(0.1);
    expect(sayKerf(cutter)).toMatch(/is compensated/);
    const shop = cutterSchema.parse({ kerf_mm: 0.2, compensate: 'shop' });
    expect(kerfOffset(shop)).toBe(0);
    expect(sayKerf(shop)).toMatch(/NOT compensated/);
  });

  it('comb has nine inner cuts, nothing compensated: strips are drawn 10 mm wide', () => {
    const comb = kerfComb(cutterSchema.parse({ kerf_mm: 0.3 }));
    const cuts = comb.layers.find((l) => l.purpose === 'inside')!.lines.map((l) => l.corners[0]!.x);
    expect(cuts.length).toBe(9);
    for (let i = 1; i < 9; i++) expect(cuts[i]! - cuts[i - 1]!).toBeCloseTo(10, 12);
  });
});

describe('arcs', () => {
  it('a polygon of a circle becomes two half circles, whose area is the circle’s', () => {
    const arcs = withArcs(circle([5, 7], 20), 0.004);
    expect(arcs.length).toBe(2);
    for (const a of arcs) expect(a.bulge).toBeCloseTo(1, 6);
  });

  it('a slot keeps its straight sides and gets two arcs', () => {
    const end = (cx: number, from: number): [number, number][] =>
      Array.from({ length: 17 }, (_, k) => [
        cx + 10 * Math.cos(from + (Math.PI * k) / 16),
        10 * Math.sin(from + (Math.PI * k) / 16),
      ]);
    const arcs = withArcs(toRing([...end(50, -Math.PI / 2), ...end(0, Math.PI / 2)]), 0.004);
    expect(arcs.map((a) => Number(a.bulge.toFixed(3))).sort()).toEqual([0, 0, 1, 1]);
    expect(withArcs(toRing(square(0, 0, 10)), 0.004).every((c) => c.bulge === 0)).toBe(true);
  });
});

describe('cuts', () => {
  const outline = straightLine(square(0, 0, 100), true);

  it('leave four tabs of the width asked for', () => {
    const cuts = withTabs(outline, 3);
    expect(cuts.length).toBe(4);
    expect(lengthOf(cuts)).toBeCloseTo(400 - 12, 9);
    expect(withTabs(straightLine(square(0, 0, 10), true), 3)).toHaveLength(1);
  });

  it('begin in the waste: outside an outline, inside a hole', () => {
    const first = withLeadIn(outline, 5, 'outside').corners[0]!;
    expect(first.x < 0 || first.y < 0 || first.x > 100 || first.y > 100).toBe(true);
    const hole = withLeadIn(outline, 5, 'inside').corners[0]!;
    expect(hole.x > 0 && hole.y > 0 && hole.x < 100 && hole.y < 100).toBe(true);
    expect(lengthOf([withLeadIn(outline, 5, 'outside')])).toBeCloseTo(405, 9);
  });

  it('that two panels share are made once', () => {
    const shared = sharedCuts([
      outline,
      straightLine(square(100, 20, 50), true),
      straightLine(square(300, 0, 10), true),
    ]);
    expect(lengthOf(shared)).toBeCloseTo(400 + 150 + 40, 6);
    expect(shared.at(-1)!.closed).toBe(true);
  });
});

describe('sheet drawing', () => {
  const panel = {
    mark: 'P1',
    outline: [
      [0, 0],
      [100, 0],
      [100, 60],
      [0, 90],
    ],
    holes: [square(20, 20, 10)],
    engraving: [
      [
        [30, 40],
        [40, 40],
      ],
    ],
    makeable: true,
  } as unknown as PanelPart;
  const sheet = {
    mark: 'sheet-01',
    sheet: 'S',
    width: 400,
    height: 300,
    material: 'm',
    thickness: 3,
    yield: 0,
    placements: [{ mark: 'P1', x: 200, y: 50, rotation_deg: 90 }],
  };

  it('turns anticlockwise about the outline’s origin, then moves; keeps handedness; every layer has its purpose', () => {
    const cutter = cutterSchema.parse({ compensate: 'shop' });
    const drawing = sheetDrawing(sheet, sheet, new Map([['P1', panel]]), cutter, 't');
    expect(drawing.layers.map((l) => l.purpose)).toEqual(['keep', 'engrave', 'inside', 'outside']);
    const out = drawing.layers[3]!.lines[0]!.corners.map((c) => [Number(c.x.toFixed(6)), Number(c.y.toFixed(6))]);
    const expected = [
      [200, 50],
      [200, 150],
      [140, 150],
      [110, 50],
    ];
    for (const e of expected) expect(out).toContainEqual(e);
    expect(signedArea(toRing(out as [number, number][]))).toBeCloseTo(7500, 6);
    expect(drawing.layers[0]!.lines.length).toBe(2);
  });

  it('compensates once: outline grown by half the kerf all round, hole shrunk', () => {
    const cutter = cutterSchema.parse({ kerf_mm: 0.4 });
    const drawing = sheetDrawing(sheet, sheet, new Map([['P1', panel]]), cutter, 't');
    const ring = (k: number) => toRing(drawing.layers[k]!.lines[0]!.corners.map((c) => [c.x, c.y] as const));
    const round = perimeter(toRing(panel.outline));
    expect(signedArea(ring(3))).toBeGreaterThan(7500 + 0.2 * round);
    expect(signedArea(ring(3))).toBeLessThan(7500 + 0.2 * round + 1);
    expect(signedArea(ring(2))).toBeCloseTo(9.6 ** 2, 3);
  });
});
