import { describe, expect, it } from 'vitest';
import { dot } from '../../../src/maths/vec3.js';
import type { Point2 } from '../../../src/model/parts.js';
import type { Truss } from '../../../src/model/truss.js';
import { plainPanels } from '../../helpers/plain-panels.js';
import { trussOf } from '../../helpers/truss.js';

/** Invented: three square bays of 400 mm in a row, level, seen from above; F0 and F1 belong to the group "roof". */
const ROW: Truss = (() => {
  const t = trussOf({
    nodes: [0, 400, 800, 1200].flatMap((x) => [
      [x, 0, 0],
      [x, 400, 0],
    ]),
    edges: [
      [0, 2],
      [2, 4],
      [4, 6],
      [1, 3],
      [3, 5],
      [5, 7],
      [0, 1],
      [2, 3],
      [4, 5],
      [6, 7],
    ],
    faces: [
      [0, 2, 3, 1],
      [2, 4, 5, 3],
      [4, 6, 7, 5],
    ],
    panels: true,
  });
  return { ...t, faces: t.faces.map((f, i) => ({ ...f, group: i < 2 ? 'roof' : null })) };
})();

/** Shoelace formula. */
const areaOf = (points: readonly Point2[]): number =>
  points.reduce((sum, [x, y], i) => {
    const [u, v] = points[(i + 1) % points.length]!;
    return sum + (x * v - u * y) / 2;
  }, 0);

/** Nothing moves, nothing is bored or engraved: what is left is the seat alone. Struts of 10 mm. */
const STILL = { movement_K: 0, humidity: 0, holdBy: 'none', mark: false, gap_mm: 1 };
const STRUTS = { struts: { section: 'beech-10' } };

describe('seating', () => {
  it('is the job’s, but for the face group’s, but for the single face’s', () => {
    const { panels } = plainPanels(ROW, {
      ...STRUTS,
      panels: {
        ...STILL,
        seating: 'between',
        groups: { roof: { seating: 'over', thickness_mm: 5 } },
        faces: { F1: { seating: 'under', material: 'polycarbonate' } },
      },
    });
    expect(panels.map((p) => [p.seating, p.thickness, p.material!.name])).toEqual([
      ['over', 5, 'acrylic-cast'],
      ['under', 5, 'polycarbonate'],
      ['between', 3, 'acrylic-cast'],
    ]);
    // A rod of 10 mm: the frame lies 5 mm outward of the axes, 5 mm inward, and in them.
    const heights = panels.map((p) => dot(p.frame.origin, p.frame.z));
    expect(heights[0]).toBeCloseTo(5, 9);
    expect(heights[1]).toBeCloseTo(-5, 9);
    expect(heights[2]).toBeCloseTo(0, 9);
    // F0 over: flush with the rods' outer sides on three edges, half the gap back on the fourth: (400 + 5 - 0.5) x (400 + 10).
    expect(areaOf(panels[0]!.outline)).toBeCloseTo(404.5 * 410, 2);
    // F1 under, a neighbour on either side: 400 - 0.5 - 0.5 by 410.
    expect(areaOf(panels[1]!.outline)).toBeCloseTo(399 * 410, 2);
    // F2 between: 400 - 2 (5 + 1), each way.
    expect(areaOf(panels[2]!.outline)).toBeCloseTo(388 * 388, 2);
  });
});

describe('an edge over the struts beside one that is not', () => {
  it('runs to its own line past an obtuse corner too', () => {
    // Invented: two regular hexagons of side 200 with one strut in common, level, over struts of 10 mm, gap 1.
    const at = (k: number): Point2 => [200 * Math.cos((k * Math.PI) / 3), 200 * Math.sin((k * Math.PI) / 3)];
    const left = [0, 1, 2, 3, 4, 5].map(at);
    // Its mirror image across the side from corner 0 to corner 1.
    const n: Point2 = [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6)];
    const right = [2, 3, 4, 5].map((k): Point2 => {
      const [x, y] = at(k);
      const off = 200 * Math.cos(Math.PI / 6) - (x * n[0] + y * n[1]);
      return [x + 2 * off * n[0], y + 2 * off * n[1]];
    });
    const { panels } = plainPanels(
      trussOf({
        nodes: [...left, ...right],
        edges: [...[0, 1, 2, 3, 4, 5].map((k) => [k, (k + 1) % 6]), [1, 6], [6, 7], [7, 8], [8, 9], [9, 0]],
        faces: [
          [0, 1, 2, 3, 4, 5],
          [1, 0, 9, 8, 7, 6],
        ],
        panels: true,
      }),
      { ...STRUTS, panels: { ...STILL, seating: 'over' } },
    );
    // Half-planes: five sides 5 mm out, one 0.5 mm in. A side of a hexagon of apothem p + 5 moved in by 5.5:
    // less (s + s') / 2 x 5.5 with s = side of the large one, s' = s + 2 x 5.5 tan 30°.
    const side = 200 + 10 / Math.sqrt(3);
    const whole = ((3 * Math.sqrt(3)) / 2) * side * side;
    const strip = (side + 5.5 * Math.tan(Math.PI / 6)) * 5.5;
    for (const p of panels) expect(areaOf(p.outline)).toBeCloseTo(whole - strip, 2);
  });
});

describe('radius at inside corners', () => {
  /** A square hub of half-width 20 stands at N0 alone; corners follow it, no gap. */
  const HALF = 20;
  const square: readonly Point2[] = [
    [-HALF, -HALF],
    [HALF, -HALF],
    [HALF, HALF],
    [-HALF, HALF],
  ];
  const areaWith = (panels: object, cutter: object): number => {
    const { panels: made } = plainPanels(
      ROW,
      { ...STRUTS, cutter, panels: { ...STILL, corner: 'follow', gap_mm: 0, ...panels } },
      (node) => (node === 'N0' ? square : []),
    );
    return areaOf(made[0]!.outline);
  };
  /**
   * By hand: a square of 400 - 2 x 5, less a notch of (20 - 5 + r)², whose inside corner of radius r about the hub's own
   * corner keeps (1 - π/4) r² of sheet.
   */
  const byHand = (r: number): number => 390 * 390 - (HALF - 5 + r) ** 2 + (1 - Math.PI / 4) * r * r;

  for (const [what, panels, cutter, radius] of [
    ['none in plywood under a laser', { material: 'birch-plywood' }, { kind: 'laser' }, 0],
    // Practice: R >= 0.5 to 1 mm in acrylic (common practice, no source).
    ['0.5 mm in acrylic', { material: 'acrylic-cast' }, { kind: 'laser' }, 0.5],
    ['0.5 mm in polycarbonate under a saw', { material: 'polycarbonate' }, { kind: 'saw' }, 0.5],
    [
      "the tool's under a router, whatever the material",
      { material: 'birch-plywood' },
      { kind: 'router', tool_mm: 6 },
      3,
    ],
    ["the job's own before all", { material: 'acrylic-cast', cornerRadius_mm: 2 }, { kind: 'router', tool_mm: 6 }, 2],
  ] as const)
    it(`is ${what}`, () => {
      // A square millimetre of the notch is 1/30 mm of radius; arcs are polygons of chord error 0.002 mm.
      expect(Math.abs(areaWith(panels, cutter) - byHand(radius))).toBeLessThan(0.02);
    });
});
