import { describe, expect, it } from 'vitest';
import { nestPanels } from '../../../src/index.js';
import { seededRandom } from '../../../src/maths/random.js';
import type { Run } from '../../../src/model/run.js';
import { type Lane, nestLane } from '../../../src/planning/nesting/lane.js';
import type { NestingRequest } from '../../../src/planning/nesting/request.js';
import { planErrors } from './verify.js';

type P = readonly [number, number];
const rectangle = (w: number, h: number): P[] => [
  [0, 0],
  [w, 0],
  [w, h],
  [0, h],
];
const sheet = { name: 'S', width: 600, height: 400 };

/** Convex panels of 3 to 6 corners, 60 to 160 mm across; invented. */
function inventedPanels(count: number, seed: number): NestingRequest['panels'] {
  const random = seededRandom(seed);
  return Array.from({ length: count }, (_, k) => {
    const n = 3 + Math.floor(random() * 4);
    const r = 30 + random() * 50;
    const outline = Array.from({ length: n }, (_, i): P => {
      const a = ((i + 0.6 * random()) / n) * 2 * Math.PI;
      return [r * Math.cos(a) + 200, r * Math.sin(a) - 70];
    });
    return { mark: `P${k + 1}`, outline, quantity: 1 };
  });
}

async function checked(request: NestingRequest) {
  const answer = await nestPanels(request);
  expect(planErrors(request, answer)).toEqual([]);
  return answer;
}

describe('panels on sheets', () => {
  it('fills a sheet exactly with rectangles', async () => {
    const answer = await checked({
      panels: [{ mark: 'A', outline: rectangle(150, 100), quantity: 16 }],
      sheets: [sheet],
      spacing: 0,
      margin: 0,
    });
    expect(answer.sheets.length).toBe(1);
    expect(answer.lowerBound).toBe(1);
    expect(answer.sheets[0]!.yield).toBeCloseTo(1, 9);
  });

  it('keeps spacing and margin, turns freely, in either sense of the outline', async () => {
    const panels = inventedPanels(24, 3).map((p, i) => (i % 2 ? { ...p, outline: [...p.outline].reverse() } : p));
    const answer = await checked({ panels, sheets: [sheet], spacing: 2, margin: 5, effort: 0.2 });
    expect(answer.unplaced).toEqual([]);
    expect(answer.sheets.length).toBeGreaterThanOrEqual(answer.lowerBound);
  });

  it('turns only as allowed and keeps to half turns for grain', async () => {
    const panels = inventedPanels(12, 5).map((p) => ({ ...p, rotations: [0, 180] }));
    await checked({ panels, sheets: [sheet], spacing: 3, margin: 10, effort: 0.1 });
  });

  it('gives the same plan for the same seed, and a plan for every seed', async () => {
    const request = { panels: inventedPanels(20, 8), sheets: [sheet], spacing: 2, margin: 5, effort: 0.1 };
    expect(await nestPanels(request)).toEqual(await nestPanels(request));
    for (const seed of [2, 3]) await checked({ ...request, seed });
  });

  it('comes to an end with panels that no neighbour holds up: each alone on a sheet, shortened to its own width', async () => {
    for (let k = 1; k <= 8; k++) {
      const outline = [
        [0, 0],
        [200.1 + k * 1.37, 3.3],
        [150.7, 170.3 + k * 0.77],
        [11.1 * (k / 40), 140.9],
      ] as const;
      const answer = await checked({
        panels: [
          { mark: 'A', outline, quantity: 1 },
          { mark: 'B', outline: outline.map(([x, y]) => [0.9 * x, 1.01 * y] as const), quantity: 1 },
        ],
        sheets: [{ name: 'S', width: 300 + k, height: 200 + k }],
        spacing: 2.3,
        margin: 4.7,
        seed: k,
      });
      expect(answer.sheets.length).toBe(2);
    }
  }, 60_000);

  it('gives the same plan whoever searches: this thread, or workers that only get and give plain records', async () => {
    const request = { panels: inventedPanels(14, 3), sheets: [sheet], spacing: 2, margin: 5, effort: 0.7 };
    let lanes = 0;
    const each: Run['each'] = async (task, inputs, take) => {
      expect(task).toBe('nest-lane');
      const outputs = structuredClone(inputs).map((lane) => nestLane(lane as Lane, null));
      lanes += outputs.length;
      for (const [i, output] of outputs.entries()) await take(structuredClone(output) as never, i);
    };
    expect(await nestPanels(request, { each })).toEqual(await nestPanels(request));
    expect(lanes).toBeGreaterThanOrEqual(2);
  });

  it('turns to any angle: five unit squares into one of 2.71, ten into one of 3.71', async () => {
    // Least sides 2 + √½ and 3 + √½ (Göbel 1979, from memory): one square at 45°; side by side only four and nine go in.
    for (const [quantity, side] of [
      [5, 271],
      [10, 371],
    ] as const) {
      const answer = await checked({
        panels: [{ mark: 'Q', outline: rectangle(100, 100), quantity }],
        sheets: [{ name: 'S', width: side, height: side }],
        spacing: 0,
        margin: 0,
      });
      expect(answer.sheets.length).toBe(1);
    }
  });

  it('uses offcuts of any outline and respects how many there are', async () => {
    const offcut = {
      name: 'L',
      width: 300,
      height: 300,
      available: 1,
      outline: [
        [0, 0],
        [300, 0],
        [300, 120],
        [120, 120],
        [120, 300],
        [0, 300],
      ] as P[],
    };
    const answer = await checked({
      panels: [{ mark: 'A', outline: rectangle(90, 90), quantity: 5 }],
      sheets: [offcut],
      spacing: 2,
      margin: 5,
      effort: 0.2,
    });
    expect(answer.unplaced).toEqual([]);
    const six = await checked({
      panels: [{ mark: 'A', outline: rectangle(90, 90), quantity: 7 }],
      sheets: [offcut],
      spacing: 2,
      margin: 5,
      effort: 0.1,
    });
    expect(six.unplaced).toEqual([{ mark: 'A', quantity: 2, reason: 'no-sheet-left' }]);
  });

  it('puts a panel inside the bay of another', async () => {
    const u: P[] = [
      [0, 0],
      [100, 0],
      [100, 100],
      [80, 100],
      [80, 20],
      [20, 20],
      [20, 100],
      [0, 100],
    ];
    const answer = await checked({
      panels: [
        { mark: 'U', outline: u, quantity: 1, rotations: [0] },
        { mark: 'A', outline: rectangle(56, 76), quantity: 1, rotations: [0] },
      ],
      sheets: [{ name: 'S', width: 104, height: 104 }],
      spacing: 2,
      margin: 2,
    });
    expect(answer.sheets.length).toBe(1);
  });

  it('lays a long panel across the diagonal when only that fits', async () => {
    const answer = await checked({
      panels: [{ mark: 'A', outline: rectangle(680, 10), quantity: 1 }],
      sheets: [sheet],
      spacing: 2,
      margin: 5,
    });
    expect(answer.unplaced).toEqual([]);
  });

  it('puts a round panel of many corners on the sheet that it just fits', async () => {
    const disc = Array.from(
      { length: 128 },
      (_, k): P => [195 * Math.cos((k * Math.PI) / 64), 195 * Math.sin((k * Math.PI) / 64)],
    );
    const answer = await checked({
      panels: [{ mark: 'D', outline: disc, quantity: 1 }],
      sheets: [{ name: 'S', width: 400, height: 400 }],
      spacing: 2,
      margin: 5,
    });
    expect(answer.unplaced).toEqual([]);
  });

  it('names a panel larger than every sheet and places the rest', async () => {
    const answer = await checked({
      panels: [
        { mark: 'BIG', outline: rectangle(900, 500), quantity: 2 },
        { mark: 'A', outline: rectangle(100, 100), quantity: 3 },
      ],
      sheets: [sheet],
      spacing: 2,
      margin: 5,
    });
    expect(answer.unplaced).toEqual([{ mark: 'BIG', quantity: 2, reason: 'too-large' }]);
    expect(answer.sheets.length).toBe(1);
  });

  it('names every fault at once and nests what is sound', async () => {
    const answer = await nestPanels({
      panels: [
        {
          mark: 'BOW',
          outline: [
            [0, 0],
            [100, 100],
            [100, 0],
            [0, 100],
          ],
          quantity: 1,
        },
        {
          mark: 'THIN',
          outline: [
            [0, 0],
            [50, 0],
            [100, 0],
          ],
          quantity: 1,
        },
        {
          mark: 'NAN',
          outline: [
            [0, 0],
            [Number.NaN, 0],
            [100, 50],
          ],
          quantity: 1,
        },
        { mark: 'HALF', outline: rectangle(10, 10), quantity: 0.5 },
        { mark: 'OK', outline: rectangle(100, 100), quantity: 1 },
      ],
      sheets: [sheet],
      spacing: 2,
      margin: 5,
    });
    expect(answer.faults.map((f) => f.place)).toEqual([
      'panels[0] BOW',
      'panels[1] THIN',
      'panels[2] NAN',
      'panels[3] HALF',
    ]);
    expect(answer.sheets[0]!.placements.map((p) => p.mark)).toEqual(['OK']);
    expect((await nestPanels({ panels: [], sheets: [], spacing: -1, margin: Number.NaN })).faults.length).toBe(3);
  });

  it('says when a time limit cut it short', async () => {
    const request = { panels: inventedPanels(60, 2), sheets: [sheet], spacing: 2, margin: 5, timeLimitMs: 1 };
    const answer = await checked(request);
    expect(answer.stopped).toBe('time');
    expect(answer.unplaced).toEqual([]);
  });

  it('needs one sheet for nothing: none', async () => {
    expect(await nestPanels({ panels: [], sheets: [sheet], spacing: 2, margin: 5 })).toEqual({
      sheets: [],
      lowerBound: 0,
      unplaced: [],
      faults: [],
    });
  });
});
