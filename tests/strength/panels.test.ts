import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../src/maths/vec3.js';
import { type Job, jobSchema } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { assess } from '../../src/pipeline/assess.js';
import { panelCombinations } from '../../src/strength/panel/combinations.js';
import type { PanelCombination } from '../../src/strength/panel/load.js';
import { judgePanels } from '../../src/strength/panels.js';
import { rulesOf } from '../../src/strength/rules.js';
import { levelPanel, mapped } from '../helpers/truss.js';

const jobWith = (more: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });
const SIDE = 500;
/** Invented: one square panel of 500 mm, level, over four struts. */
const truss = levelPanel(SIDE, SIDE);
const combination = (name: string, factors: Record<string, number>): PanelCombination => ({
  name,
  duration: 'short',
  factors: new Map(Object.entries(factors)),
});
const WIND = { name: 'wind', kind: 'wind', pressure_kN_per_m2: 1, direction: 'normal' };
const run = (job: Job, combos: readonly PanelCombination[], t: Truss = truss) =>
  judgePanels(t, assess(t, job).parts, combos, job, rulesOf(job));

describe('a square of acrylic over the struts', () => {
  const panels = { seating: 'over', fixingCapacity_N: 100 };
  const job = jobWith({ panels, loads: { cases: [WIND] }, analysis: { selfWeight: false } });

  it('rests on its edges under pressure: 0.0479 q a² as the handbook has it', () => {
    const { utilisations, findings } = run(job, [combination('1.5 wind', { wind: 1.5 })]);
    // Timoshenko and Woinowsky-Krieger, table 8 (from memory), Poisson 0.3 against 0.37 here: M = (1 + nu)/2 (Mx + My), 5 % more.
    const wanted = (6 * 0.0479 * (1.37 / 1.3) * 0.0015 * SIDE ** 2) / 9 / (97 / 3);
    expect(utilisations[0]!.rule).toBe('panel stress, factor 3');
    expect(Math.abs(utilisations[0]!.utilisation / wanted - 1)).toBeLessThan(0.06);
    expect(findings).toEqual([]);
  });

  it('hangs on its ties in suction, whose forces sum to the load', () => {
    const { utilisations } = run(job, [combination('-1.5 wind', { wind: -1.5 })]);
    expect(utilisations[0]!.force).toBeGreaterThan(0);
    const plenty = jobWith({ panels: { ...panels, fixingCapacity_N: 0.001 }, loads: { cases: [WIND] } });
    const weak = run(plenty, [combination('-1.5 wind', { wind: -1.5 })]);
    const holes = assess(truss, plenty).parts.panels[0]!.holes.length;
    const share = (0.0015 * SIDE ** 2) / holes;
    const finding = weak.findings.find((f) => f.code === 'fixing-over-loaded')!;
    expect(finding.value).toBeGreaterThan(0.8 * share);
    expect(finding.value).toBeLessThan(4 * share);
  });

  it('is over-stressed by ten times the wind, and the finding withholds it', () => {
    const { findings } = run(job, [combination('20 wind', { wind: 20 })]);
    expect(findings).toMatchObject([{ code: 'panel-over-stressed', subject: 'F0', kind: 'panel', level: 'stop' }]);
  });
});

describe('its own weight', () => {
  const job = (panels: object, use = 'table'): Job => jobWith({ use, panels: { fixingCapacity_N: 50, ...panels } });
  const own = [combination('1.35 G', { 'self-weight': 1.35 })];
  const tilted = (angle: number): Truss =>
    mapped(
      truss,
      ([x, y, z]): Vec3 => [x, y * Math.cos(angle) - z * Math.sin(angle), y * Math.sin(angle) + z * Math.cos(angle)],
    );

  it('presses a level panel by rho g t, an upright one not at all', () => {
    const level = run(job({ seating: 'over' }), own).utilisations[0]!;
    const part = assess(truss, job({ seating: 'over' })).parts.panels[0]!;
    const inward = part.frame.z[2] > 0 ? -1 : 1;
    expect(level.force / inward).toBeCloseTo(1.35 * 1190e-9 * 9.80665 * 3 * part.area, 6);
    expect(run(job({ seating: 'over' }), own, tilted(Math.PI / 2)).utilisations).toEqual([]);
  });

  it('the standing stress of acrylic is held against 5 MPa', () => {
    const thin = run(job({ seating: 'between', thickness_mm: 1, holdBy: 'channel', bite_mm: 20 }), own);
    // Of a 1 mm sheet of 500 mm: 6 x 0.05 x 1.17e-5 x 250000 = 0.88 MPa.
    const { utilisation, rule } = thin.utilisations[0]!;
    expect(utilisation).toBeGreaterThan(0.1);
    expect(['panel deflection, at most half the bite', 'panel stress that stands, at most 5 MPa']).toContain(rule);
  });

  it('a thin sheet bows out of a shallow channel', () => {
    const { findings } = run(job({ thickness_mm: 1, holdBy: 'channel', bite_mm: 4, gap_mm: 1 }), own);
    expect(findings.map((f) => f.code)).toEqual(['panel-sags']);
    expect(findings[0]!.value).toBeGreaterThan(findings[0]!.limit!);
  });

  it('held by nothing it is a stop overhead', () => {
    for (const [use, level] of [
      ['table', null],
      ['overhead', 'stop'],
    ] as const) {
      const { findings, utilisations } = run(job({ seating: 'between', holdBy: 'none' }, use), own);
      // On a table the detailing has said already that nothing holds it.
      expect(findings.map((f) => f.level)).toEqual(level ? [level] : []);
      expect(utilisations).toEqual([]);
    }
  });

  it('overhead, ties that nobody has tested are named with the force they must hold', () => {
    const overhead = jobWith({ use: 'overhead', panels: { seating: 'under' } });
    const { findings } = run(overhead, [combination('1.35 G', { 'self-weight': 1.35 })]);
    expect(findings.map((f) => f.code)).toEqual(['fixing-untested']);
    expect(findings[0]!.value).toBeGreaterThan(0);
  });
});

describe('combinations by EN 1990', () => {
  it('a canopy under snow and wind: 1.35 G + 1.5 snow + 0.9 wind governs inward, 0.9 G + 1.5 uplift outward', () => {
    const cases = [
      { name: 'snow', kind: 'snow', pressure_kN_per_m2: 0.56 },
      { name: 'wind down', kind: 'wind', pressure_kN_per_m2: 0.24, direction: 'normal' },
      { name: 'wind up', kind: 'wind', pressure_kN_per_m2: -0.43, direction: 'normal' },
    ];
    const job = jobWith({
      use: 'outdoor',
      loads: { cases },
      panels: { seating: 'over', fixingCapacity_N: 0.1, thickness_mm: 4 },
    });
    const { parts } = assess(truss, job);
    const { findings } = judgePanels(truss, parts, panelCombinations(truss, job), job, rulesOf(job));
    const up = parts.panels[0]!.frame.z[2] > 0;
    expect(up).toBe(true);
    const weak = findings.find((f) => f.code === 'fixing-over-loaded')!;
    expect(weak.about!['combination']).toBe('0.9 G + 1.5 wind up');
    // EN 1990 (6.10) by hand: 0.9 x 1.19 x 9.807e-3 x 4 - 1.5 x 0.43 = -0.603 kN/m².
    const total = 0.603e-3 * parts.panels[0]!.area;
    expect(weak.value).toBeGreaterThan((0.8 * total) / parts.panels[0]!.holes.length);
    expect(weak.value).toBeLessThan(total / 4);
  });
});

describe('pressures and deflection in figures', () => {
  const at = (angle: number): Truss =>
    mapped(
      truss,
      ([x, y, z]): Vec3 => [x, y * Math.cos(angle) - z * Math.sin(angle), y * Math.sin(angle) + z * Math.cos(angle)],
    );
  const one = [combination('c', { snow: 1 })];

  it('snow per plan area on a slope of 60° presses by p cos² of it (EN 1991-1-3 5.2 speaks of plan area)', () => {
    const job = jobWith({
      panels: { seating: 'over' },
      analysis: { selfWeight: false },
      loads: { cases: [{ name: 'snow', kind: 'snow', pressure_kN_per_m2: 1 }] },
    });
    const [level, steep] = [0, Math.PI / 3].map((angle) => Math.abs(run(job, one, at(angle)).utilisations[0]!.force));
    const { area } = assess(truss, job).parts.panels[0]!;
    expect(level).toBeCloseTo(1e-3 * area, 6);
    expect(steep! / level!).toBeCloseTo(0.25, 9);
  });

  it('its own weight on a slope of 60° presses by half', () => {
    const job = jobWith({ panels: { seating: 'over' } });
    const own = [combination('G', { 'self-weight': 1 })];
    const [level, steep] = [0, Math.PI / 3].map((angle) => Math.abs(run(job, own, at(angle)).utilisations[0]!.force));
    expect(steep! / level!).toBeCloseTo(0.5, 9);
  });

  it('a sheet in channels bows by 0.00406 q a⁴/D, twice that where the load stands, against half the bite', () => {
    // Timoshenko and Woinowsky-Krieger, table 8 (from memory); the coefficient holds for any Poisson's ratio. Creep doubles standing load (from memory).
    const panels = { holdBy: 'channel', bite_mm: 30, gap_mm: 2, seating: 'between', thickness_mm: 3 };
    const sagOf = (kind: string) => {
      const job = jobWith({
        panels,
        analysis: { selfWeight: false },
        loads: { cases: [{ name: 'snow', kind, pressure_kN_per_m2: 0.2, direction: 'normal' }] },
      });
      const { material, outline, hold } = assess(truss, job).parts.panels[0]!;
      const side = Math.max(...outline.map((p) => p[0])) - Math.min(...outline.map((p) => p[0]));
      const stiff = (material!.modulus * 27) / (12 * (1 - material!.poisson! ** 2));
      const wanted = (0.00406 * 2e-4 * side ** 4) / stiff / (0.5 * (hold?.bite ?? 30));
      const u = run(job, one).utilisations[0]!;
      expect(u.rule).toBe('panel deflection, at most half the bite');
      return u.utilisation / wanted;
    };
    expect(Math.abs(sagOf('snow') - 1)).toBeLessThan(0.01);
    expect(Math.abs(sagOf('permanent') - 2)).toBeLessThan(0.02);
  });
});
