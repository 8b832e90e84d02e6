import { describe, expect, it } from 'vitest';
import { circle } from '../../../src/detailing/panels/corner-cut.js';
import { type DrawingLine, straightLine } from '../../../src/documents/kit/drawing.js';
import { sayBevel } from '../../../src/documents/panels/bevel-notes.js';
import { cutterPath, kerfOffset, sayKerf } from '../../../src/documents/panels/kerf.js';
import { kerfComb } from '../../../src/documents/panels/kerf-comb.js';
import { withLeadIn } from '../../../src/documents/panels/lead-in.js';
import { sharedCuts } from '../../../src/documents/panels/shared-cuts.js';
import { sheetDrawing } from '../../../src/documents/panels/sheet-drawing.js';
import { tabSpans } from '../../../src/documents/panels/tabs.js';
import { withoutSpans } from '../../../src/documents/panels/without-spans.js';
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

  it('leave four tabs of the width asked for, the cutter’s width added to each gap', () => {
    const cuts = withoutSpans(outline, tabSpans(outline, 3, 2));
    expect(cuts.length).toBe(4);
    expect(cuts.every((c) => !c.closed)).toBe(true);
    expect(lengthOf(cuts)).toBeCloseTo(400 - 4 * 5, 9);
    const small = straightLine(square(0, 0, 10), true);
    expect(withoutSpans(small, tabSpans(small, 3, 0))).toEqual([small]);
  });

  it('begin in the waste: outside an outline, inside a hole, shorter or elsewhere where a neighbour is near', () => {
    const free = (): boolean => true;
    const first = withLeadIn(outline, 5, 'outside', free).corners[0]!;
    expect(first.x < 0 || first.y < 0 || first.x > 100 || first.y > 100).toBe(true);
    const hole = withLeadIn(outline, 5, 'inside', free).corners[0]!;
    expect(hole.x > 0 && hole.y > 0 && hole.x < 100 && hole.y < 100).toBe(true);
    expect(lengthOf([withLeadIn(outline, 5, 'outside', free)])).toBeCloseTo(405, 9);
    // Only below the outline there is room, and only 3 mm of it.
    const below = withLeadIn(outline, 5, 'outside', (a, b) => Math.max(a[1], b[1]) <= 1e-9 && a[1] >= -3);
    expect(below.corners[0]!.y).toBeCloseTo(-2.5 * Math.SQRT1_2, 9);
    expect(withLeadIn(outline, 5, 'outside', () => false)).toEqual(outline);
    // Beside a tab the run comes square to the end of the cut.
    const [open] = withoutSpans(outline, [{ a: [40, 0], b: [60, 0] }]);
    const [from, start] = withLeadIn(open!, 5, 'outside', free).corners;
    expect([from!.x, from!.y, start!.x, start!.y]).toEqual([60, -5, 60, 0]);
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

  it('shared, with tabs and lead-ins: nothing twice, nothing through a tab, no run into a neighbour', () => {
    const cutter = cutterSchema.parse({
      kind: 'router',
      kerf_mm: 4,
      tool_mm: 4,
      spacing_mm: 4,
      sharedCuts: true,
      tabs_mm: 5,
      leadIn_mm: 8,
    });
    const panel = (mark: string): PanelPart =>
      ({
        mark,
        outline: square(0, 0, 96),
        holes: [],
        engraving: [],
        edges: [],
        makeable: true,
      }) as unknown as PanelPart;
    const at = (mark: string, x: number, y: number) => ({ mark, x, y, rotation_deg: 0 });
    // Four panels one tool apart, two by two, and one well apart.
    const placements = [at('A', 20, 20), at('B', 120, 20), at('C', 20, 120), at('D', 120, 120), at('E', 260, 40)];
    const drawing = sheetDrawing(
      { mark: 's', sheet: 'S', width: 400, height: 240, material: 'm', thickness: 3, yield: 0, placements },
      { width: 400, height: 240 },
      new Map(placements.map((p) => [p.mark, panel(p.mark)])),
      cutter,
      't',
    );
    const cuts = drawing.layers[3]!.lines;
    const segments = cuts.flatMap(({ corners, closed }) =>
      corners.flatMap((c, i) => {
        const d = corners[(i + 1) % corners.length]!;
        return i + 1 < corners.length || closed ? [[c.x, c.y, d.x, d.y] as const] : [];
      }),
    );
    // Upright lines at x = 18, 118, 218, 258, 358 and level ones: 12 sides of the block, 4 of the single panel, a gap of 9 each.
    const among = (v: number, ...list: number[]): boolean => list.some((w) => Math.abs(v - w) < 1e-6);
    const within = (v: number, low: number, high: number): boolean => v > low - 1e-6 && v < high + 1e-6;
    const onPath = segments.filter(([a, b, c, d]) => {
      const [x, y] = [(a + c) / 2, (b + d) / 2];
      if (Math.abs(a - c) < 1e-6)
        return (among(x, 18, 118, 218) && within(y, 18, 218)) || (among(x, 258, 358) && within(y, 38, 138));
      return (among(y, 18, 118, 218) && within(x, 18, 218)) || (among(y, 38, 138) && within(x, 258, 358));
    });
    const cut = onPath.reduce((s, [a, b, c, d]) => s + Math.hypot(c - a, d - b), 0);
    expect(cut).toBeCloseTo(16 * (100 - 9), 3);
    // What is not on the path are the runs in: none comes nearer to a panel than half the tool.
    const runs = segments.filter((s) => !onPath.includes(s));
    expect(runs.length).toBeGreaterThan(0);
    for (const [a, b, c, d] of runs)
      for (const t of [0, 0.5, 0.9]) {
        const [x, y] = [a + t * (c - a), b + t * (d - b)];
        for (const p of placements) {
          const out = Math.hypot(Math.max(p.x - x, 0, x - p.x - 96), Math.max(p.y - y, 0, y - p.y - 96));
          expect(out).toBeGreaterThanOrEqual(2 - 1e-6);
        }
      }
  });
});

describe('bevels', () => {
  it('stand beside their edges on the layer that is not cut, and nowhere else', () => {
    const bevelled = {
      mark: 'P1',
      outline: square(0, 0, 100),
      holes: [],
      engraving: [],
      makeable: true,
      edges: [
        {
          bevel: Math.PI / 8,
          side: [
            [0, 0],
            [100, 0],
          ],
        },
        {
          bevel: 0,
          side: [
            [100, 0],
            [100, 100],
          ],
        },
      ],
    } as unknown as PanelPart;
    expect(sayBevel(Math.PI / 8)).toBe('BEVEL 22.5 UNDER');
    expect(sayBevel(-Math.PI / 8)).toBe('BEVEL 22.5 TOP');
    const draw = (panel: PanelPart) =>
      sheetDrawing(
        {
          mark: 's',
          sheet: 'S',
          width: 200,
          height: 200,
          material: 'm',
          thickness: 3,
          yield: 0,
          placements: [{ mark: 'P1', x: 20, y: 20, rotation_deg: 0 }],
        },
        { width: 200, height: 200 },
        new Map([['P1', panel]]),
        cutterSchema.parse({ kerf_mm: 0 }),
        't',
      ).layers.map((l) => l.lines);
    const [keep, engraved, , outside] = draw(bevelled);
    const [plain] = draw({ ...bevelled, edges: [] });
    expect(engraved).toEqual([]);
    expect(outside!.length).toBe(1);
    const notes = keep!.slice(plain!.length);
    expect(notes.length).toBeGreaterThan(10);
    for (const { corners } of notes)
      for (const c of corners) {
        expect(c.x).toBeGreaterThan(20);
        expect(c.x).toBeLessThan(120);
        expect(c.y).toBeGreaterThan(20);
        expect(c.y).toBeLessThan(30);
      }
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
    edges: [],
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
