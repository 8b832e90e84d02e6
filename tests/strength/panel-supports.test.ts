import { describe, expect, it } from 'vitest';
import type { Job } from '../../src/model/job/index.js';
import type { PanelEdge, PanelPart, Point2 } from '../../src/model/parts.js';
import { panelSupports } from '../../src/strength/panel/supports.js';
import { jobWith } from '../statics/analyse/input.js';

/** A face of 600 x 400 mm with a strut on three sides, its panel 5 mm inside them, a hole near two corners. */
const CORNERS: readonly Point2[] = [
  [0, 0],
  [600, 0],
  [600, 400],
  [0, 400],
];
const INSET = 5;
const edge = (k: number, strut: string | null): PanelEdge =>
  ({ length: k % 2 ? 400 : 600, from: `N${k}`, to: `N${(k + 1) % 4}`, strut, inset: INSET }) as unknown as PanelEdge;
const square = (x: number, y: number): readonly Point2[] => [
  [x - 2, y - 2],
  [x + 2, y - 2],
  [x + 2, y + 2],
  [x - 2, y + 2],
];
const part = (seating: PanelPart['seating'], outline?: readonly Point2[]): PanelPart =>
  ({
    mark: 'P1',
    seating,
    outline: outline ?? [
      [INSET, INSET],
      [600 - INSET, INSET],
      [600 - INSET, 400 - INSET],
      [INSET, 400 - INSET],
    ],
    holes: [square(20, 30), square(580, 370)],
    edges: [edge(0, 'S0'), edge(1, 'S1'), edge(2, null), edge(3, 'S3')],
  }) as unknown as PanelPart;
const held = (holdBy: Job['panels']['holdBy'], pitch = 150): Job => {
  const base = jobWith({}).panels;
  return jobWith({ panels: { holdBy, holes: { ...base.holes, pitch_mm: pitch } } } as never);
};

describe('what carries a panel against a pressure', () => {
  const edges = { edges: [0, 1, 3], points: [] };
  const holes = {
    edges: [],
    points: [
      [20, 30],
      [580, 370],
    ],
  };
  it.each([
    ['over', 'pressure', edges],
    ['over', 'suction', holes],
    ['under', 'pressure', holes],
    ['under', 'suction', edges],
    ['between', 'pressure', holes],
    ['between', 'suction', holes],
  ] as const)('%s the struts under %s: struts where it leans on them, else its holes', (seating, sense, wanted) => {
    expect(panelSupports(part(seating), CORNERS, held('ties'), sense)).toEqual(wanted);
    expect(panelSupports(part(seating), CORNERS, held('stand-offs'), sense)).toEqual(wanted);
  });

  it('a channel holds every edge that has a strut, both ways', () => {
    for (const sense of ['pressure', 'suction'] as const)
      expect(panelSupports(part('between'), CORNERS, held('channel'), sense)).toEqual(edges);
  });

  it('nothing holds what has no fixing, unless it leans', () => {
    expect(panelSupports(part('between'), CORNERS, held('none'), 'pressure')).toBeNull();
    expect(panelSupports(part('over'), CORNERS, held('none'), 'suction')).toBeNull();
    expect(panelSupports(part('over'), CORNERS, held('none'), 'pressure')).toEqual(edges);
    expect(panelSupports({ ...part('between'), holes: [] }, CORNERS, held('ties'), 'pressure')).toBeNull();
  });

  it('clips stand at the middles of equal shares of each edge with a strut, on the inset line, one at least', () => {
    const at150 = panelSupports(part('between'), CORNERS, held('clips'), 'pressure')!.points;
    // Four on 600 mm, two on 400: 75, 225, 375, 525 and 100, 300, by hand.
    const wanted = [
      ...[75, 225, 375, 525].map((x) => [x, INSET]),
      ...[100, 300].map((y) => [600 - INSET, y]),
      ...[300, 100].map((y) => [INSET, y]),
    ];
    expect(at150.length).toBe(wanted.length);
    at150.forEach((p, i) => {
      expect(p[0]).toBeCloseTo(wanted[i][0], 9);
      expect(p[1]).toBeCloseTo(wanted[i][1], 9);
    });
    expect(panelSupports(part('between'), CORNERS, held('clips', 5000), 'pressure')!.points.length).toBe(3);
  });

  it('a side that is turned off its strut or lies far inside it rests on nothing', () => {
    // The lower side ends 30, 10 and 4 mm off its inset line of 600 mm, the right side stands 10 mm off its own of 400: 1 % is allowed.
    const climbs = (rise: number): readonly Point2[] => [
      [INSET, INSET],
      [600 - INSET, INSET + rise],
      [600 - INSET, 400 - INSET],
      [INSET, 400 - INSET],
    ];
    const job = held('channel');
    expect(panelSupports(part('between', climbs(30)), CORNERS, job, 'pressure')!.edges).toEqual([1, 3]);
    expect(panelSupports(part('between', climbs(10)), CORNERS, job, 'pressure')!.edges).toEqual([1, 3]);
    expect(panelSupports(part('between', climbs(4)), CORNERS, job, 'pressure')!.edges).toEqual([0, 1, 3]);
    const narrow: readonly Point2[] = [
      [INSET, INSET],
      [590 - INSET, INSET],
      [590 - INSET, 400 - INSET],
      [INSET, 400 - INSET],
    ];
    expect(panelSupports(part('between', narrow), CORNERS, job, 'pressure')!.edges).toEqual([0, 3]);
  });

  it('a corner that is cut off rests on nothing, however short the cut', () => {
    const cut: readonly Point2[] = [
      [INSET, INSET],
      [592, INSET],
      [600 - INSET, INSET + 3],
      [600 - INSET, 400 - INSET],
      [INSET, 400 - INSET],
    ];
    expect(panelSupports(part('between', cut), CORNERS, held('channel'), 'pressure')!.edges).toEqual([0, 2, 4]);
  });
});
