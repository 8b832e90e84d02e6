import { describe, expect, it } from 'vitest';
import { jobSchema } from '../../../src/model/job/index.js';
import type { Point2 } from '../../../src/model/parts.js';
import { assess } from '../../../src/pipeline/assess.js';
import { plainPanels } from '../../helpers/plain-panels.js';
import { levelPanel, trussOf } from '../../helpers/truss.js';

const STRUTS = { section: 'beech-10' };
const STILL = { movement_K: 0, humidity: 0, mark: false, gap_mm: 1 };

describe('a neck', () => {
  // Invented: two bays of 300 mm with a hub of 100 mm radius at the middle of either long side; what is left between them is the neck.
  const disc = (radius: number): Point2[] =>
    Array.from({ length: 360 }, (_, k) => [
      radius * Math.cos((k * Math.PI) / 180),
      radius * Math.sin((k * Math.PI) / 180),
    ]);
  const waisted = (neck: number, thickness_mm: number, corner: string, turn = 0) => {
    // Centres stand apart by both radii with 1 mm of gap each, and the neck.
    const height = 2 * (100 + 1) + neck;
    const nodes = [
      [0, 0],
      [300, 0],
      [600, 0],
      [600, height],
      [300, height],
      [0, height],
    ].map(([x, y]) => [x! * Math.cos(turn) - y! * Math.sin(turn), x! * Math.sin(turn) + y! * Math.cos(turn), 70]);
    return plainPanels(
      trussOf({
        nodes,
        edges: [0, 1, 2, 3, 4, 5].map((i) => [i, (i + 1) % 6]),
        faces: [[0, 1, 2, 3, 4, 5]],
        panels: true,
      }),
      { struts: STRUTS, panels: { ...STILL, corner, thickness_mm, holdBy: 'channel' } },
      (node) => (node === 'N1' || node === 'N4' ? disc(100) : []),
    ).findings;
  };

  for (const corner of ['round', 'follow'])
    for (const turn of [0, 0.7])
      it(`thinner than the sheet is found, one thicker is not: corners ${corner}, turned by ${turn}`, () => {
        for (const thickness of [3, 6]) {
          // Discs of 360 sides are 0.004 mm smaller than their circles, arcs 0.002 mm; a twentieth of the thickness is far above both.
          expect(waisted(0.95 * thickness, thickness, corner, turn)).toMatchObject([
            { code: 'panel-neck', level: 'warn', subject: 'F0', limit: thickness },
          ]);
          expect(waisted(1.05 * thickness, thickness, corner, turn)).toEqual([]);
        }
      });

  it('that is cut through leaves pieces, and no outline', () => {
    const found = waisted(-1, 3, 'follow');
    expect(found).toMatchObject([{ code: 'panel-in-pieces', level: 'stop', value: 2 }]);
  });
});

describe('holes near an edge', () => {
  const made = (holes: object) =>
    plainPanels(levelPanel(500, 300), { struts: STRUTS, panels: { ...STILL, holdBy: 'ties', holes } });
  /** From a point to the nearest of the outline's sides. */
  const nearest = (outline: readonly Point2[], [x, y]: Point2): number =>
    Math.min(
      ...outline.map(([ax, ay], i) => {
        const [bx, by] = outline[(i + 1) % outline.length]!;
        const l2 = (bx - ax) ** 2 + (by - ay) ** 2;
        const s = Math.min(1, Math.max(0, ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / l2));
        return Math.hypot(x - ax - s * (bx - ax), y - ay - s * (by - ay));
      }),
    );
  const middle = (hole: readonly Point2[]): Point2 => [
    hole.reduce((s, p) => s + p[0], 0) / hole.length,
    hole.reduce((s, p) => s + p[1], 0) / hole.length,
  ];

  it('less than one and a half diameters are named with their distance (common practice, no source)', () => {
    const { panels, findings } = made({ diameter_mm: 8, edge_mm: 10 });
    const near = Math.min(...panels[0]!.holes.map((h) => nearest(panels[0]!.outline, middle(h))));
    expect(near).toBeCloseTo(10, 3);
    expect(findings).toMatchObject([{ code: 'panel-hole-near-edge', level: 'warn', subject: 'F0', limit: 12 }]);
    expect(findings[0]!.value).toBeCloseTo(near, 3);
  });

  it('at one and a half diameters and more are not; nor is a panel without holes', () => {
    for (const edge_mm of [12, 15]) {
      const { panels, findings } = made({ diameter_mm: 8, edge_mm });
      expect(panels[0]!.holes.length).toBeGreaterThan(4);
      for (const h of panels[0]!.holes) expect(nearest(panels[0]!.outline, middle(h))).toBeCloseTo(edge_mm, 3);
      expect(findings).toEqual([]);
    }
    expect(made({ diameter_mm: 0, edge_mm: 1 }).findings.map((f) => f.code)).toEqual(['panel-not-held']);
  });

  it('holes outdoors are larger by what the farthest corner moves, and stand farther in for it', () => {
    const { panels, findings } = plainPanels(levelPanel(500, 300), {
      use: 'outdoor',
      struts: STRUTS,
      panels: { gap_mm: 1, mark: false, holdBy: 'ties', holes: { diameter_mm: 8, edge_mm: 12 } },
    });
    expect(findings).toEqual([]);
    // 7.5e-5 x 40 K + 0.004, twice over half the diagonal of the axes.
    const wanted = 8 + 2 * (7.5e-5 * 40 + 0.004) * Math.hypot(250, 150);
    for (const hole of panels[0]!.holes) {
      const [cx, cy] = middle(hole);
      for (const [x, y] of hole) expect(2 * Math.hypot(x - cx, y - cy)).toBeCloseTo(wanted, 1);
      expect(nearest(panels[0]!.outline, [cx, cy])).toBeGreaterThan(1.5 * wanted - 0.01);
    }
  });
});

describe('a panel over 20 kg', () => {
  it('is for two people, with its mass by hand', () => {
    const made = (width: number) =>
      plainPanels(levelPanel(width, 1012), {
        struts: STRUTS,
        panels: { ...STILL, holdBy: 'channel', thickness_mm: 10 },
      });
    // Between struts of 10 mm with 1 mm of gap 12 mm are lost each way: 1 m high, 1190 kg/m³ x 10 mm is 11.9 kg a metre of width.
    const heavy = made(1712);
    expect(heavy.panels[0]!.mass).toBeCloseTo(1.7 * 11.9, 4);
    expect(heavy.findings).toMatchObject([{ code: 'panel-heavy', level: 'warn', subject: 'F0', limit: 20 }]);
    expect(heavy.findings[0]!.value).toBeCloseTo(20.23, 4);
    const light = made(1692);
    expect(light.panels[0]!.mass).toBeCloseTo(19.992, 4);
    expect(light.findings).toEqual([]);
  });
});

describe('hazards under a laser', () => {
  const settled = (material: string, kind: string, more: object = {}) =>
    assess(
      levelPanel(400, 300),
      jobSchema.parse({
        format: 'strutwright-job/1',
        title: 'T',
        truss: 't.json',
        struts: STRUTS,
        cutter: { kind },
        panels: { material, holdBy: 'channel' },
        waivers: [
          { code: 'panel-hazard', subject: 'F0', upTo: 1, reason: 'We have done so before', by: 'A. N. Other' },
        ],
        ...more,
      }),
    );

  for (const [material, word] of [
    ['PVC-sheet', 'chlorine'],
    ['polycarbonate', 'burns'],
  ] as const) {
    it(`${material} is a stop that holds the pack whatever is waived`, () => {
      const { findings, waived, hold, status } = settled(material, 'laser');
      expect(findings.filter((f) => f.code === 'panel-hazard')).toMatchObject([
        { level: 'stop', subject: 'F0', kind: 'panel' },
      ]);
      expect(waived).toEqual([]);
      expect(status).toBe('flagged');
      expect(hold.filter((words) => words.includes(word)).length).toBe(1);
      // The waiver is named as void, so that nobody believes in it.
      expect(findings.filter((f) => f.code.startsWith('waiver')).length).toBe(1);
    });

    it(`${material} is none under a saw or a router`, () => {
      for (const kind of ['saw', 'router']) {
        const { findings, hold } = settled(material, kind, { waivers: [] });
        expect(findings.filter((f) => f.code === 'panel-hazard')).toEqual([]);
        expect(hold.filter((words) => words.includes(word))).toEqual([]);
      }
    });
  }

  it('acrylic and plywood have none', () => {
    for (const material of ['acrylic-cast', 'birch-plywood'])
      expect(settled(material, 'laser').findings.filter((f) => f.code === 'panel-hazard')).toEqual([]);
  });

  it('PVC of a single face is named where the job says acrylic', () => {
    const { findings } = settled('acrylic-cast', 'laser', {
      panels: { material: 'acrylic-cast', holdBy: 'channel', faces: { F0: { material: 'PVC-sheet' } } },
      waivers: [],
    });
    expect(findings.filter((f) => f.code === 'panel-hazard').map((f) => f.subject)).toEqual(['F0']);
  });
});
