import { describe, expect, it } from 'vitest';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { sayFinding } from '../../../src/model/findings/index.js';
import type { Job } from '../../../src/model/job/index.js';
import { analyseTruss } from '../../../src/statics/analyse/analyse-truss.js';
import { trussOf } from '../../helpers/truss.js';
import { inputOf, jobWith } from './input.js';

const G = 9.80665;
/** Feet on a circle of 300 mm, apex at 400: struts of 500 mm. */
const tripod = (load: Vec3 = [0, 0, -90], supports = 'xyz') =>
  trussOf({
    nodes: [
      [0, 0, 400],
      ...[0, 1, 2].map((k) => [300 * Math.cos((2 * Math.PI * k) / 3), 300 * Math.sin((2 * Math.PI * k) / 3), 0]),
    ],
    edges: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
    supports: [
      [1, supports],
      [2, supports],
      [3, supports],
    ],
    loads: [[0, load]],
  });

const pinned = { analysis: { joints: 'pinned', selfWeight: false } } as unknown as Partial<Job>;
const run = (
  truss: ReturnType<typeof trussOf>,
  change: Parameters<typeof jobWith>[0],
  given: Float64Array | null = null,
) => analyseTruss(inputOf(truss, jobWith(change), given));
const codes = (r: ReturnType<typeof run>) => r.findings.map((f) => f.code);

describe('a pinned tripod', () => {
  it('carries W L / 3h in each leg, and a third of the load on each foot', () => {
    const { solution, findings } = run(tripod(), pinned);
    expect(findings).toEqual([]);
    const [given] = solution.cases;
    expect(given.name).toBe('given');
    for (const t of given.forces!) expect(t).toBeCloseTo(-37.5, 9);
    for (const r of given.reactions) expect(r.force[2]).toBeCloseTo(30, 9);
    expect(solution.combinations.map((c) => c.name)).toEqual(['1.35 given']);
    expect(solution.actions[0][0].axial).toBeCloseTo(-1.35 * 37.5, 9);
    expect(solution.actions[0][0].duration).toBe('permanent');
    expect(solution.counts).toMatchObject({
      rank: 3,
      selfStressStates: 0,
      mechanisms: 0,
      rigidBody: 0,
      loadCompatible: true,
    });
    expect(solution.solveResidual!).toBeLessThan(1e-14);
    expect(solution.checked).toContain('stability');
  });

  it('weighs as much as its struts and hubs: supports carry the sum of the masses', () => {
    const input = inputOf(tripod([0, 0, 0]), jobWith({ analysis: { joints: 'pinned' } }));
    const kg = [...input.parts.struts, ...input.parts.hubs].reduce((sum, p) => sum + (p.mass ?? 0), 0);
    expect(kg).toBeGreaterThan(0.01);
    const weight = analyseTruss(input).solution.cases.find((c) => c.kind === 'self-weight')!;
    expect(weight.reactions.reduce((sum, r) => sum + r.force[2], 0)).toBeCloseTo(kg * G, 6);
  });

  it('bends its legs under their own weight: w cos(slope) L² / 8 of a simple beam', () => {
    const input = inputOf(tripod([0, 0, 0]), jobWith({ analysis: { joints: 'pinned' } }));
    const w = (input.parts.struts[0].mass! * G) / 500;
    const { solution } = analyseTruss(input);
    const a = solution.actions[0][0];
    expect(Math.hypot(a.momentY, a.momentZ)).toBeCloseTo((1.35 * w * 0.6 * 500 ** 2) / 8, 6);
  });

  it('is pulled by its own weight along the slope: half a leg above and below the middle (w L sin / 2)', () => {
    const { solution } = run(tripod(), { analysis: { joints: 'pinned' } } as never);
    const own = solution.cases.find((c) => c.name === 'self-weight')!;
    const strut = inputOf(tripod(), jobWith({})).parts.struts[0];
    const fall = (strut.mass! * G * 400) / 500 / 2;
    const dead = solution.actions[0].find((a) => a.combination === '1.35 G')!;
    // The foot carries the larger pressure: the middle's and half of the leg's own weight along it.
    expect(dead.axial).toBeCloseTo(1.35 * (solution.cases[0].forces![0] + solution.cases[1].forces![0] - fall), 6);
    expect(own.forces![0]).toBeLessThan(0);
  });

  it('is stable: no lower load factor than its legs allow in a plane sway', () => {
    const { solution } = run(tripod(), pinned);
    expect(solution.buckling[0].factors[0]).toBeGreaterThan(10);
  });
});

describe('rigid joints', () => {
  it('carry nearly the same axial forces, with bending, and balance the load', () => {
    const { solution, findings } = run(tripod(), { analysis: { selfWeight: false } });
    const [given] = solution.cases;
    for (const t of given.forces!) expect(Math.abs(t / -37.5 - 1)).toBeLessThan(0.02);
    expect(given.reactions.reduce((sum, r) => sum + r.force[2], 0)).toBeCloseTo(90, 6);
    expect(solution.buckling[0].factors[0]).toBeGreaterThan(1);
    expect(findings.filter((f) => f.code === 'buckling-unsettled')).toEqual([]);
  });

  it('hold a square that pins would not, and the note says by how much', () => {
    const square = trussOf({
      nodes: [
        [0, 0, 0],
        [400, 0, 0],
        [400, 0, 400],
        [0, 0, 400],
        [200, 400, 0],
        [200, 400, 400],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
        [4, 2],
        [4, 3],
      ],
      supports: [
        [0, 'xyz'],
        [1, 'xyz'],
        [4, 'xyz'],
        [5, 'xyz'],
      ],
      loads: [[2, [1, 0, -5]]],
    });
    const withPins = run(square, pinned);
    const rigid = run(square, { analysis: { selfWeight: false } });
    expect(withPins.solution.counts!.mechanisms).toBe(1);
    expect(codes(withPins)).toContain('truss-mechanism');
    expect(withPins.solution.combinations).toEqual([]);
    const note = rigid.findings.find((f) => f.code === 'mechanism-held')!;
    expect(note.level).toBe('note');
    expect(note.value).toBeGreaterThan(0);
    expect(rigid.solution.cases.length).toBe(1);
  });

  it('become soft with a stiffness given for the sockets', () => {
    const stiff = run(tripod([5, 0, -20]), { analysis: { selfWeight: false } });
    const soft = run(tripod([5, 0, -20]), { analysis: { selfWeight: false, socketStiffness_Nmm_per_rad: 10 } });
    expect(soft.solution.buckling[0].factors[0]).toBeLessThan(stiff.solution.buckling[0].factors[0]);
  });
});

it.each(['pinned', 'rigid'] as const)('the balance of a case counts bending and line loads (%s)', (joints) => {
  const r = run(tripod([5, 3, -20]), { analysis: { joints } } as never);
  const e = r.equilibrium!;
  expect(e.case).toBe('given');
  expect(e.maxRelative).toBeLessThan(1e-9);
  expect(e.whole.relative).toBeLessThan(1e-9);
  expect(e.reactions.reduce((sum, s) => sum + s.force[2], 0)).toBeCloseTo(20, 8);
});

describe('second-order effects', () => {
  // 1.5 kN on three slender legs: the factor falls under 10.
  const loaded = (n: number, secondOrder: boolean) =>
    run(tripod([0, 0, -n]), { analysis: { selfWeight: false, secondOrder } } as never);
  const factor = loaded(100, false).solution.buckling[0].factors[0] * (0.67 / 1.3 / 1.6) * 100;

  it('are flagged below 10 and a stop below 3, and pass once they are analysed with imperfections', () => {
    const flagged = loaded(factor / 6, false).findings.find((f) => f.code === 'second-order')!;
    expect(flagged.level).toBe('warn');
    expect(flagged.value).toBeGreaterThan(3);
    expect(flagged.value).toBeLessThan(10);
    const stopped = loaded(factor / 2, false);
    expect(stopped.findings.find((f) => f.code === 'buckling-low')!.level).toBe('stop');
    const analysed = loaded(factor / 2, true);
    expect(analysed.findings.some((f) => f.code === 'buckling-low')).toBe(false);
    expect(analysed.findings.find((f) => f.code === 'second-order')!.level).toBe('note');
    const first = analysed.solution.actions[0].find((a) => a.combination === '1.35 given')!;
    const second = analysed.solution.actions[0].find((a) => a.combination === '1.35 given, second order')!;
    expect(Math.hypot(second.momentY, second.momentZ)).toBeGreaterThan(Math.hypot(first.momentY, first.momentZ));
    expect(second.axial / first.axial).toBeCloseTo(1, 1);
    // The imperfection lies either way.
    const both = analysed.solution.actions[0].filter((a) => a.combination === '1.35 given, second order');
    expect(both.length).toBe(2);
  });

  it('begin at 10 and stop at 3, no sooner and no later (EN 1993-1-1 5.2.1 (3), 5.2.2 (5))', () => {
    const tenth = loaded(factor / 10, false).solution.buckling[0].design!;
    const r = (alpha: number) => {
      const load = (factor / 10) * (tenth / alpha);
      return loaded(load, false).findings.find((f) => f.code === 'second-order' || f.code === 'buckling-low')?.code;
    };
    expect([10.1, 9.9, 3.03, 2.97].map(r)).toEqual([undefined, 'second-order', 'second-order', 'buckling-low']);
  });

  it('are judged with E0.05 / gammaM and 1 / (1 + kdef) of the permanent share (EN 1995-1-1 2.2.2, tables 2.3, 3.2, EN 338)', () => {
    const c24 = { struts: { section: 'C24-22x45' }, analysis: { selfWeight: false } };
    const share = (more: object): number => {
      const { design, factors } = run(tripod([0, 0, -900]), { ...c24, ...more } as never).solution.buckling[0];
      return design! / factors[0];
    };
    const e05 = 7400 / 11000 / 1.3;
    expect(share({})).toBeCloseTo(e05 / 1.6, 9);
    expect(share({ strength: { serviceClass: 2 } })).toBeCloseTo(e05 / 1.8, 9);
    // Outdoors without a service class the weather's, 3: kdef 2. Nobody climbs, so that the given load alone is permanent.
    const nobody = { selfWeight: false, climber_N: 0 };
    expect(share({ use: 'outdoor', loads: { indoors: true }, analysis: nobody })).toBeCloseTo(e05 / 3, 9);
    const people = { name: 'given', kind: 'imposed', nodes: [], misfit: [], direction: 'vertical' };
    expect(share({ loads: { cases: [people] } })).toBeCloseTo(e05, 9);
    // Half of the combination's load permanent: 1.35 x 900 beside 1.5 x 810.
    const half = {
      name: 'snow',
      kind: 'snow',
      nodes: [{ node: 'N0', force_N: [0, 0, -810] }],
      misfit: [],
      direction: 'vertical',
    };
    const both = run(tripod([0, 0, -900]), { ...c24, loads: { cases: [half] } } as never).solution.buckling;
    const sum = both.find((b) => b.combination === '1.35 given + 1.5 snow')!;
    expect(sum.design! / sum.factors[0]).toBeCloseTo(e05 / 1.3, 9);
  });

  it('stand beside Euler by strut, node to node with pinned ends', () => {
    const r = run(tripod([0, 0, -900]), { struts: { section: 'C24-22x45' }, ...pinned } as never);
    const { euler } = r.solution.buckling[0];
    // N = 1.35 x 900 x 500 / (3 x 400) = 506.25 N in each leg of 500 mm; I = 45 x 22³ / 12 = 39,930 mm⁴; E = 7400 / 1.3 / 1.6.
    const load = (Math.PI ** 2 * (7400 / 1.3 / 1.6) * ((45 * 22 ** 3) / 12)) / 500 ** 2;
    expect(euler!.factor).toBeCloseTo(load / 506.25, 6);
  });

  it('remain a stop where the loads exceed what buckles it', () => {
    const r = loaded(2 * factor, true);
    expect(r.findings.find((f) => f.code === 'buckling-low')!.level).toBe('stop');
  });
});

describe('what cannot stand', () => {
  it('a strut on one foot can swing: a stop, not a number', () => {
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [0, 0, 300],
      ],
      edges: [[0, 1]],
      supports: [[0, 'xyz']],
      loads: [[1, [0, 0, -1]]],
    });
    const r = run(truss, {});
    expect(codes(r)).toContain('truss-unsupported');
    expect(r.solution.combinations).toEqual([]);
    expect(r.solution.notChecked).toContain('stability');
  });

  it('a node that pins cannot hold is named in words', () => {
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [300, 0, 0],
        [150, 0, 200],
        [0, 500, 0],
        [300, 500, 100],
        [150, 700, 300],
      ],
      edges: [
        [0, 2],
        [1, 2],
        [3, 4],
        [4, 5],
        [3, 5],
        [0, 3],
        [1, 4],
      ],
      supports: [
        [0, 'xyz'],
        [1, 'xyz'],
        [3, 'xyz'],
        [4, 'xyz'],
        [5, 'xyz'],
      ],
      loads: [[2, [0, 1, 0]]],
    });
    const r = run(truss, pinned);
    const stop = r.findings.find((f) => f.code === 'truss-mechanism')!;
    expect(sayFinding(stop)).toContain('N2 can swing about N0-N1');
    expect(r.solution.counts!.loadCompatible).toBe(false);
    expect(r.solution.counts!.mechanismNotes[0].nodes).toEqual(['N2']);
  });

  it('without supports it is counted and not loaded', () => {
    const free = { ...tripod(), supports: [] };
    const r = run(free, {});
    expect(codes(r)).toEqual(['supports-missing']);
    expect(r.solution.counts!.rigidBody).toBe(6);
    expect(r.solution.notChecked).toEqual(['loads', 'stability']);
  });

  it('a strut without stiffness is named', () => {
    const truss = tripod();
    const bad = { ...truss, members: truss.members.map((m, i) => (i === 1 ? { ...m, section: 'no-such' } : m)) };
    const r = run(bad, {});
    expect(r.findings.map((f) => [f.code, f.subject])).toContainEqual(['stiffness-missing', 'S1']);
  });

  it('a load on a node without struts and a case on an unknown node are named', () => {
    const truss = tripod();
    const loose = {
      ...truss,
      nodes: [...truss.nodes, { mark: 'N9', at: [0, 0, 900] as Vec3 }],
      loads: [...truss.loads, { case: 'given', node: 'N9', force: [0, 0, -3] as Vec3 }],
    };
    const r = run(loose, {
      ...pinned,
      loads: {
        cases: [
          {
            name: 'guest',
            kind: 'imposed',
            direction: 'vertical',
            nodes: [{ node: 'N7', force_N: [0, 0, -1] }],
            misfit: [],
          },
        ],
      },
    });
    expect(r.findings.map((f) => [f.code, f.subject])).toContainEqual(['load-on-free-node', 'N9']);
    expect(codes(r)).toContain('load-on-unknown');
  });
});

describe('the twisted prism of three sides (Tibert and Pellegrino 2003), joints as pins', () => {
  const corner = (i: number, top: number): number[] => {
    const a = (2 * Math.PI * i) / 3 + top * (Math.PI / 6);
    return [200 * Math.cos(a), 200 * Math.sin(a), 300 * top];
  };
  const prism = trussOf({
    nodes: [0, 1].flatMap((top) => [0, 1, 2].map((i) => corner(i, top))),
    // Horizontals, verticals, then the three that are pressed.
    edges: [
      [0, 1],
      [1, 2],
      [2, 0],
      [3, 4],
      [4, 5],
      [5, 3],
      [0, 3],
      [1, 4],
      [2, 5],
      [0, 4],
      [1, 5],
      [2, 3],
    ],
    supports: [
      [0, 'xyz'],
      [1, 'yz'],
      [2, 'z'],
    ],
    loads: [[3, [0, 0, -2]]],
  });
  const change = (by_mm: number | null) =>
    ({
      nodes: { leastAngle_deg: 1 },
      analysis: {
        joints: 'pinned',
        selfWeight: false,
        ...(by_mm === null ? {} : { selfStress: { device: 'turnbuckle', strut: 'S6', by_mm } }),
      },
    }) as never;

  it('is a stop without self-stress', () => {
    const r = run(prism, change(null));
    expect(r.solution.counts).toMatchObject({ selfStressStates: 1, mechanisms: 1, rigidBody: 0 });
    expect(codes(r)).toContain('truss-mechanism');
  });

  it('is held by a turnbuckle that shortens a vertical, with the stiffness that says so', () => {
    const r = run(prism, change(0.5));
    expect(codes(r)).not.toContain('truss-mechanism');
    const note = r.findings.find((f) => f.code === 'mechanism-held')!;
    expect(note.value).toBeGreaterThan(0);
    const stress = r.solution.cases.find((c) => c.name === 'self-stress')!.forces!;
    for (const e of [0, 1, 2, 3, 4, 5, 6, 7, 8]) expect(stress[e]).toBeGreaterThan(0);
    for (const e of [9, 10, 11]) expect(stress[e]).toBeLessThan(0);
    const given = r.solution.cases.find((c) => c.name === 'given')!;
    expect(given.reactions.reduce((sum, s) => sum + s.force[2], 0)).toBeCloseTo(2, 6);
  });

  it('is not held by one that lengthens it', () => {
    expect(codes(run(prism, change(-0.5)))).toContain('truss-mechanism');
  });
});

describe('supports', () => {
  it('that are lifted say how much anchor and ballast they need', () => {
    const push = tripod([60, 0, -10]);
    const r = run(push, pinned);
    const lifted = r.findings.filter((f) => f.code === 'support-anchor');
    expect(lifted.length).toBeGreaterThan(0);
    const worst = lifted[0];
    // Moments about the line of the two far feet, by hand: the foot at x = 300 takes 1.35 (10/3 + 60 x 400 / 450) = -... down, the others lift.
    expect(worst.level).toBe('note');
    const over = run(push, { ...pinned, use: 'overhead' } as never);
    expect(over.findings.find((f) => f.code === 'support-anchor')!.level).toBe('warn');
    expect(worst.value! / G / 0.9).toBeCloseTo(worst.about!['ballast_kg'] as number, 6);
    const total = r.solution.combinations[0].reactions.reduce((sum, s) => sum + s.force[2], 0);
    expect(total).toBeCloseTo(13.5, 6);
    expect(codes(r)).toContain('truss-overturns');
  });

  it('each has its pressure, uplift, shear and ballast under every combination', () => {
    const r = run(tripod([60, 0, -10]), pinned);
    const demands = r.solution.supports!;
    expect(demands.length).toBe(3 * r.solution.combinations.length);
    for (const [c, combination] of r.solution.combinations.entries())
      for (const [k, { node, force }] of combination.reactions.entries()) {
        const d = demands[3 * c + k];
        expect([d.node, d.combination]).toEqual([node, combination.name]);
        expect(d.pressure - d.uplift).toBeCloseTo(force[2], 9);
        expect(d.shear).toBeCloseTo(Math.hypot(force[0], force[1]), 9);
        expect(d.ballast).toBeCloseTo(d.uplift / (0.9 * G), 9);
      }
    // One load that pushes it over and nothing else: nothing holds it.
    expect(r.solution.overturning).toMatchObject({ ratio: null });
  });

  it('tip over by 1.5 x 60 N x 400 mm against 0.9 x 10 N x 150 mm: 26.7 (by hand, feet on a circle of 300 mm)', () => {
    const wind = { name: 'wind', kind: 'wind', nodes: [{ node: 'N0', force_N: [-60, 0, 0] }], misfit: [] };
    const { overturning } = run(tripod([0, 0, -10]), { ...pinned, loads: { cases: [wind] } } as never).solution;
    expect(overturning!.ratio).toBeCloseTo((1.5 * 60 * 400) / (0.9 * 10 * 150), 9);
    expect(overturning!.combination).toBe('0.9 given + 1.5 wind');
  });

  it('a climber 200 mm beyond the feet tips it and lifts each far foot by 333 N (1.5 kN x 200 / 450 by two, by hand)', () => {
    const far = tripod([0, 0, 0]);
    const nodes = far.nodes.map((n, i) => (i === 0 ? { ...n, at: [500, 0, 400] as const } : n));
    const r = run({ ...far, nodes }, { ...pinned, use: 'outdoor', loads: { indoors: true } } as never);
    expect(r.solution.overturning!.combination).toContain('climber at N0');
    expect(r.findings.some((f) => f.code === 'truss-overturns' && f.level === 'stop')).toBe(true);
    const lifted = r.solution.supports!.filter((d) => d.uplift > 0);
    expect(lifted.map((d) => d.node)).toEqual(['N2', 'N3']);
    for (const d of lifted) {
      expect(d.uplift).toBeCloseTo((1500 * 200) / 450 / 2, 6);
      expect(d.combination).toBe('0.9 G + 1.5 climber at N0');
    }
  });

  it('on plain ground cannot be lifted outdoors', () => {
    const r = run(tripod([60, 0, -10]), {
      ...pinned,
      use: 'outdoor',
      loads: { anchorage: { kind: 'ground-contact' } },
    } as never);
    expect(r.findings.some((f) => f.code === 'support-uplift' && f.level === 'stop')).toBe(true);
    expect(r.findings.some((f) => f.code === 'truss-overturns' && f.level === 'stop')).toBe(true);
    expect(codes(r).filter((c) => c === 'load-missing').length).toBe(2);
  });

  it('outdoors without a word on anchorage is a stop, and a climber stands on each node in turn', () => {
    const r = run(tripod(), { ...pinned, use: 'outdoor', loads: { indoors: true } } as never);
    expect(codes(r)).toContain('anchorage-missing');
    expect(codes(r)).not.toContain('load-missing');
    const least = Math.min(...r.solution.actions[0].map((a) => a.axial));
    // 1.35 of the load's 37.5 N and 1.5 kN on the apex (by hand).
    expect(least).toBeCloseTo(-1.35 * 37.5 - (1500 * 500) / (3 * 400), 6);
    expect(r.solution.actions[0].some((a) => a.combination.includes('climber at N0'))).toBe(true);
  });
});

describe('panels and pressures', () => {
  const roof = (holdBy: 'ties' | 'stand-offs') => {
    const truss = trussOf({
      nodes: [
        [0, 0, 0],
        [600, 0, 0],
        [600, 600, 0],
        [0, 600, 0],
        [300, 300, 300],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 3],
        [3, 0],
        [0, 4],
        [1, 4],
        [2, 4],
        [3, 4],
        [0, 2],
      ],
      faces: [
        [0, 1, 4],
        [1, 2, 4],
        [2, 3, 4],
        [3, 0, 4],
      ],
      panels: true,
      supports: [
        [0, 'xyz'],
        [1, 'xyz'],
        [2, 'xyz'],
        [3, 'xyz'],
      ],
    });
    return run(truss, {
      ...pinned,
      panels: { holdBy },
      loads: {
        cases: [{ name: 'snow', kind: 'snow', pressure_kN_per_m2: 0.8, direction: 'vertical', nodes: [], misfit: [] }],
      },
    } as never);
  };

  it.each(['ties', 'stand-offs'] as const)(
    'a vertical pressure reaches the ground whole: pressure x plan area (%s)',
    (holdBy) => {
      const { solution, findings } = roof(holdBy);
      expect(findings.filter((f) => f.level !== 'note')).toEqual([]);
      const snow = solution.cases.find((c) => c.name === 'snow')!;
      expect(snow.reactions.reduce((sum, r) => sum + r.force[2], 0)).toBeCloseTo(0.8e-3 * 600 * 600, 6);
    },
  );

  it('held along the edges it bends the struts, held at the corners it does not', () => {
    const moment = (r: ReturnType<typeof roof>) =>
      Math.max(...r.solution.actions.flat().map((a) => Math.hypot(a.momentY, a.momentZ)));
    expect(moment(roof('ties'))).toBeGreaterThan(1000);
    expect(moment(roof('stand-offs'))).toBe(0);
  });

  it.each([0, Math.PI / 2])(
    'a level square gives each edge a triangle, bent by W L / 6, whichever way its section is rolled (%f rad)',
    (roll) => {
      // By hand: p a²/4 on each strut, simple beams between pins; 1.5 of it in the combination.
      const [a, p] = [600, 0.8e-3];
      const square = trussOf({
        nodes: [
          [0, 0, 0],
          [a, 0, 0],
          [a, a, 0],
          [0, a, 0],
        ],
        edges: [
          [0, 1],
          [1, 2],
          [2, 3],
          [3, 0],
        ],
        faces: [[0, 1, 2, 3]],
        panels: true,
        supports: [0, 1, 2, 3].map((n) => [n, 'xyz'] as const),
      });
      const rolled = { ...square, members: square.members.map((m) => ({ ...m, roll })) };
      const snow = {
        name: 'snow',
        kind: 'snow',
        pressure_kN_per_m2: 0.8,
        direction: 'vertical',
        nodes: [],
        misfit: [],
      };
      const r = run(rolled, { ...pinned, struts: { section: 'C24-22x45' }, loads: { cases: [snow] } } as never);
      for (const own of r.solution.actions) {
        const most = own.map((x) => Math.hypot(x.momentY, x.momentZ)).reduce((m, x) => Math.max(m, x), 0);
        // The spread is summed in 64 strips: their number to the power -2 off at most.
        expect(Math.abs(most / ((1.5 * ((p * a * a) / 4) * a) / 6) - 1)).toBeLessThan(3e-4);
        // The other direction stays straight.
        expect(Math.min(...own.map((x) => Math.min(x.momentY, x.momentZ)))).toBeCloseTo(0, 6);
      }
    },
  );
});

describe('temperature, lack of fit, self-stress', () => {
  /** One strut between two walls. */
  const bar = trussOf({
    nodes: [
      [0, 0, 0],
      [500, 0, 0],
      [250, 300, 0],
    ],
    edges: [
      [0, 1],
      [0, 2],
      [1, 2],
    ],
    supports: [
      [0, 'xyz'],
      [1, 'xyz'],
      [2, 'xyz'],
    ],
  });
  const { material } = inputOf(bar, jobWith({})).parts.struts[0];
  const EA = material!.modulus * Math.PI * 16;

  it('warming a held strut presses it by E A alpha dT', () => {
    const r = run(bar, {
      ...pinned,
      loads: {
        cases: [
          { name: 'summer', kind: 'temperature', direction: 'vertical', nodes: [], misfit: [], temperature_K: 30 },
        ],
      },
    } as never);
    const t = r.solution.cases.find((c) => c.name === 'summer')!.forces!;
    expect(t[0]).toBeCloseTo(-EA * material!.expansion! * 30, 6);
  });

  it('a strut cut 0.5 mm too long presses itself by E A / L x 0.5', () => {
    const r = run(bar, {
      ...pinned,
      loads: {
        cases: [
          { name: 'saw', kind: 'misfit', direction: 'vertical', nodes: [], misfit: [{ strut: 'S0', longer_mm: 0.5 }] },
        ],
      },
    } as never);
    const t = r.solution.cases.find((c) => c.name === 'saw')!.forces!;
    expect(t[0]).toBeCloseTo((-EA / 500) * 0.5, 6);
    expect(t[1]).toBeCloseTo(0, 6);
  });

  it('self-stress in the given forces joins every combination as a second set of actions', () => {
    const given = Float64Array.of(80, 0, 0);
    const loaded = { ...bar, loads: [{ case: 'given', node: 'N2', force: [0, 0, 0] as Vec3 }] };
    const r = run(loaded, pinned, given);
    const names = r.solution.actions[0].map((a) => a.combination);
    expect(names).toEqual(['1.35 given', '1.35 given + self-stress']);
    expect(r.solution.actions[0][1].axial).toBeCloseTo(80, 6);
    expect(r.solution.actions[1].length).toBe(1);
    expect(r.solution.cases[0]).toMatchObject({ name: 'given', kind: 'given' });
  });
});
