import { describe, expect, it } from 'vitest';
import { jobSchema } from '../../src/model/job/index.js';
import type { PanelPart } from '../../src/model/parts.js';
import { assess } from '../../src/pipeline/assess.js';
import { levelPanel } from '../helpers/truss.js';

const SIDE = 500;
/** Invented: one square panel of 500 mm, level, between four struts. */
const SQUARE = levelPanel(SIDE, SIDE);
/** Acrylic that moves by nothing and keeps 1 mm of gap, so that the bite left is what is given less 1 mm. */
const STILL = { movement_K: 0, humidity: 0, gap_mm: 1, mark: false };
function made(panels: object, more: object = {}): { panel: PanelPart; codes: string[] } {
  const job = jobSchema.parse({
    format: 'strutwright-job/1',
    title: 'T',
    truss: 't.json',
    panels: { ...STILL, ...panels },
    ...more,
  });
  const { parts, findings } = assess(SQUARE, job);
  return { panel: parts.panels[0]!, codes: findings.filter((f) => f.kind === 'panel').map((f) => f.code) };
}
/** 500 less strut of 8 mm and a gap of 1 mm on either side. */
const A = SIDE - 2 * (4 + 1);
const [E, NU, FM] = [2760, 0.37, 97];
const ratio = (found: number | null, wanted: number): number => Math.abs(found! / wanted - 1);

describe('a panel in channels', () => {
  // Timoshenko and Woinowsky-Krieger, table 8 (from memory): w = 0.00406 q a⁴ / D, M = 0.0479 q a² at nu 0.3, so (1 + nu) / 1.3 of it here.
  it('bears, either way, the load under which a square sheet bows by half the bite that is left', () => {
    for (const [thickness_mm, bite_mm] of [
      [3, 5],
      [5, 9],
    ] as const) {
      const { panel } = made({ holdBy: 'channel', thickness_mm, bite_mm });
      const stiffness = (E * thickness_mm ** 3) / (12 * (1 - NU ** 2));
      const wanted = ((0.5 * (bite_mm - 1) * stiffness) / (0.00406 * A ** 4)) * A * A;
      expect(panel.hold!.bite).toBeCloseTo(bite_mm - 1, 9);
      expect(ratio(panel.hold!.pressure, wanted)).toBeLessThan(0.02);
      expect(panel.hold!.suction).toBe(panel.hold!.pressure);
      const newtons = Math.floor(panel.hold!.pressure!);
      expect(panel.holding).toBe(
        `edge channel, bite ${bite_mm - 1}.0 mm; pressure ${newtons} N, suction ${newtons} N; the channel's own fastening is not judged`,
      );
    }
  });

  it('no more than its sheet bears in bending, by the factor of the job', () => {
    for (const allowableFactor of [3, 5]) {
      const { panel } = made({ holdBy: 'channel', thickness_mm: 4, bite_mm: 401 }, { strength: { allowableFactor } });
      const moment = (0.0479 * (1 + NU)) / 1.3;
      const wanted = ((FM / allowableFactor) * 4 ** 2) / (6 * moment);
      expect(ratio(panel.hold!.pressure, wanted)).toBeLessThan(0.06);
    }
  });

  it('over its struts is pressed onto them; the channel holds it in suction', () => {
    const over = made({ holdBy: 'channel', seating: 'over' }).panel;
    expect(over.hold!.pressure).toBe(Number.POSITIVE_INFINITY);
    expect(over.hold!.suction).toBeGreaterThan(1);
    expect(over.hold!.suction).toBeLessThan(1000);
    expect(over.holding).toContain('pressure carried by the struts, suction ');
    const under = made({ holdBy: 'channel', seating: 'under' }).panel;
    expect(under.hold!.suction).toBe(Number.POSITIVE_INFINITY);
    expect(under.hold!.pressure).toBeLessThan(1000);
  });

  it('too shallow for gap and movement it holds nothing, as a finding says; so do clips', () => {
    for (const holdBy of ['channel', 'clips']) {
      // 7.5e-5 x 40 K x 250 mm is 0.75 mm an edge: gap 1 and twice that leave nothing of 2.4 mm.
      const more = { movement_K: 40, fixingCapacity_N: 50 };
      const { panel, codes } = made({ holdBy, bite_mm: 2.4, ...more });
      expect(panel.hold!.bite).toBeCloseTo(2.4 - 1 - 2 * 0.75, 9);
      expect(codes).toContain('panel-not-held');
      expect([panel.hold!.pressure, panel.hold!.suction]).toEqual([0, 0]);
      expect(made({ holdBy, bite_mm: 2.6, ...more }).codes).not.toContain('panel-not-held');
    }
  });
});

describe('a panel on fixings', () => {
  const EACH = 2;
  it('of a square in fours: every one bears the same, so all bear as many times one', () => {
    for (const [holdBy, pitch_mm, fixings] of [
      ['ties', 1000, 8],
      ['stand-offs', 1000, 8],
      ['clips', 600, 4],
    ] as const) {
      const panels = { holdBy, holes: { pitch_mm }, fixingCapacity_N: EACH, thickness_mm: 12, bite_mm: 11 };
      const { panel, codes } = made(panels);
      expect(codes).not.toContain('panel-not-held');
      expect(panel.hold!.fixings).toBe(fixings);
      expect(ratio(panel.hold!.pressure, fixings * EACH)).toBeLessThan(1e-3);
      expect(panel.hold!.suction).toBe(panel.hold!.pressure);
      expect(panel.hold!.bite).toBe(holdBy === 'clips' ? 10 : null);
    }
  });

  it('counts on the worst one where they bear unequal shares', () => {
    // Three to an edge: those in the middles bear more than those at the corners.
    const { panel } = made({ holdBy: 'ties', holes: { pitch_mm: 300 }, fixingCapacity_N: EACH, thickness_mm: 12 });
    expect(panel.hold!.fixings).toBe(12);
    expect(panel.hold!.pressure).toBeLessThan(0.95 * 12 * EACH);
    expect(panel.hold!.pressure).toBeGreaterThan(EACH * 4);
  });

  it('over the struts is carried by them under pressure, under them in suction', () => {
    const panels = { holdBy: 'ties', holes: { pitch_mm: 1000 }, fixingCapacity_N: EACH, thickness_mm: 12 };
    const over = made({ ...panels, seating: 'over' }).panel;
    expect(over.hold!.pressure).toBe(Number.POSITIVE_INFINITY);
    expect(ratio(over.hold!.suction, over.hold!.fixings * EACH)).toBeLessThan(1e-3);
    const under = made({ ...panels, seating: 'under' }).panel;
    expect(under.hold!.suction).toBe(Number.POSITIVE_INFINITY);
    expect(ratio(under.hold!.pressure, under.hold!.fixings * EACH)).toBeLessThan(1e-3);
  });

  it('says so where nobody has tested one, and where nothing was chosen', () => {
    const { panel } = made({ holdBy: 'ties' });
    expect([panel.hold!.pressure, panel.hold!.suction]).toEqual([null, null]);
    expect(panel.holding).toMatch(/^\d+ ties; pressure not stated, suction not stated$/);
    const none = made({ holdBy: 'none' });
    expect(none.panel.holding).toBe('nothing');
    expect(none.codes).toContain('panel-not-held');
  });
});
