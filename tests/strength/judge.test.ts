import { describe, expect, it } from 'vitest';
import { materialNamed, sectionNamed } from '../../src/model/catalogue/resolve.js';
import { defaultJob, type Job, jobSchema } from '../../src/model/job/index.js';
import type { HubPart, Joint, Parts, Socket, StrutPart } from '../../src/model/parts.js';
import type { MemberActions, Solution } from '../../src/model/solution.js';
import type { Truss } from '../../src/model/truss.js';
import { axialOnly } from '../../src/strength/actions.js';
import { judge } from '../../src/strength/judge.js';

const NO_SOLUTION: Solution = {
  counts: null,
  cases: [],
  combinations: [],
  actions: [],
  buckling: [],
  solveResidual: null,
  checked: [],
  notChecked: [],
};
const FORCES_OF_FILE = { forces: null, solution: null };

/** Two invented nodes L mm apart with one strut, and its sockets. */
function oneStrut(
  job: Job,
  force: number,
  options: { section?: string; length?: number; joint?: Joint; float?: number } = {},
) {
  const section = sectionNamed(job, options.section ?? 'beech-8')!;
  const material = materialNamed(job, section.material)!;
  const length = options.length ?? 300;
  const float = options.float ?? 0.75;
  const diameter = section.shape.kind === 'rectangle' ? section.shape.width : section.shape.diameter;
  const truss: Truss = {
    nodes: [
      { mark: 'A', at: [0, 0, 0] },
      { mark: 'B', at: [length, 0, 0] },
    ],
    members: [
      { mark: 'S1', ends: ['A', 'B'], force, section: null, area: null, modulus: null, roll: null, group: null },
    ],
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
  const strut: StrutPart = {
    mark: 'S1',
    section,
    material,
    group: null,
    ends: [
      { node: 'A', setback: 10, float, detail: 'plain' },
      { node: 'B', setback: 10, float, detail: 'plain' },
    ],
    axisLength: length,
    cutLength: length - 20 - 2 * float,
    axes: { x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
    mass: 0.01,
  };
  const socket = (farNode: string, x: number): Socket => ({
    strut: 'S1',
    farNode,
    direction: [x, 0, 0],
    y: [0, 1, 0],
    z: [0, 0, x],
    section,
    setback: 10,
    depth: 1.75 * diameter,
    bore: diameter + 0.45,
    wall: 2,
    joint: options.joint ?? 'glued',
    detail: 'plain',
    pin: 2,
  });
  const hub = (mark: string, farNode: string, x: number): HubPart => ({
    mark,
    at: [0, 0, 0],
    system: 'socket',
    outward: [0, 0, 1],
    sockets: [socket(farNode, x)],
    mass: 0.01,
    material: materialNamed(job, job.nodes.material)!,
    makeable: true,
    revision: 'A',
  });
  const parts: Parts = { struts: [strut], hubs: [hub('A', 'B', 1), hub('B', 'A', -1)], panels: [] };
  return { truss, parts };
}

const jobWith = (more: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });

describe('a strut under its given force', () => {
  it('a beech dowel of 8 x 300 mm: Rankine’s sum of crushing and Euler, over a factor of 3', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, -100);
    const { utilisations } = judge(truss, parts, FORCES_OF_FILE, job);
    // By hand: A = 50.265, fc = 27.5, E = 14000, I = 201.06: NE = pi² E I / L² = 308.7 N, A fc = 1382.3 N; 3 x 100 x (1/308.7 + 1/1382.3).
    const strut = utilisations.find((u) => u.kind === 'strut')!;
    expect(strut.utilisation).toBeCloseTo(300 * (1 / 308.69 + 1 / 1382.3), 3);
    expect(strut.rule).toContain('compression with buckling');
    expect(utilisations.filter((u) => u.kind === 'socket').map((u) => u.at)).toEqual(['A', 'B']);
  });

  it('over-stressed: a stop that names the strut, its section and the force', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, -400);
    const stop = judge(truss, parts, FORCES_OF_FILE, job).findings.find((f) => f.code === 'member-over-stressed')!;
    expect(stop).toMatchObject({ level: 'stop', subject: 'S1', kind: 'strut', limit: 1 });
    expect(stop.value).toBeGreaterThan(1);
    expect(stop.about).toMatchObject({ section: 'beech-8', force_N: -400, combination: 'given' });
  });

  it('a graded section goes by EN 1995-1-1, and tension does not care for length', () => {
    const job = defaultJob();
    const near = oneStrut(job, 5000, { section: 'C24-45x45', length: 500 });
    const far = oneStrut(job, 5000, { section: 'C24-45x45', length: 3000 });
    const [a, b] = [near, far].map(({ truss, parts }) => judge(truss, parts, FORCES_OF_FILE, job).utilisations[0]!);
    expect(a!.rule).toBe('EN 1995-1-1 6.1.2 (6.1)');
    // 5000 / 2025 over 0.6 x 14.5 / 1.3 x kh, kh = (150/45)^0.2 = 1.272.
    expect(a!.utilisation).toBeCloseTo(5000 / 2025 / ((0.6 * 14.5 * (150 / 45) ** 0.2) / 1.3), 9);
    expect(b!.utilisation).toBe(a!.utilisation);
  });

  it('a material without the values of the standard asked for is named, not judged', () => {
    const job = jobWith({ strength: { standard: 'EN 1995-1-1' } });
    const { truss, parts } = oneStrut(job, -100);
    const { utilisations, findings } = judge(truss, parts, FORCES_OF_FILE, job);
    expect(utilisations.some((u) => u.kind === 'strut')).toBe(false);
    const missing = findings.find((f) => f.code === 'material-value-missing')!;
    expect(missing.about).toMatchObject({ material: 'beech-dowel', struts: 1, values: 'fmk, ft0k, fc0k, fvk, E0.05' });
  });

  it('a section whose material nobody knows is named once, with its number of struts', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, -100);
    const struts = parts.struts.map((s) => ({ ...s, material: null }));
    const { findings, utilisations } = judge(truss, { ...parts, struts }, FORCES_OF_FILE, job);
    expect(utilisations).toEqual([]);
    expect(findings).toMatchObject([{ code: 'section-material-unknown', level: 'stop', value: 1 }]);
    expect(findings[0]!.about).toEqual({ section: 'beech-8', material: 'beech-dowel' });
  });

  it('without forces nothing is judged, and it says so', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, 0);
    const unforced = { ...truss, members: truss.members.map((m) => ({ ...m, force: null })) };
    expect(judge(unforced, parts, FORCES_OF_FILE, job)).toMatchObject({
      utilisations: [],
      checked: [],
      notChecked: ['strength'],
    });
  });
});

describe('sockets', () => {
  it('a glued one carries tension and compression by the bond on the engaged length', () => {
    const job = jobWith({ nodes: { bondStrength_MPa: 3 } });
    for (const force of [200, -200]) {
      const { truss, parts } = oneStrut(job, force);
      const socket = judge(truss, parts, FORCES_OF_FILE, job).utilisations.find((u) => u.kind === 'socket')!;
      // By hand: pi 8 (14 - 0.75) = 333.0 mm²; a quarter of 3 MPa for good.
      expect(socket.rule).toBe('socket bond in shear');
      expect(socket.utilisation).toBeCloseTo(200 / 333.01 / 0.75, 4);
    }
  });

  it('an over-stressed one says how deep it would have to be, and is strong enough at that depth', () => {
    const job = jobWith({ nodes: { bondStrength_MPa: 3 } });
    const { truss, parts } = oneStrut(job, 350);
    const stop = judge(truss, parts, FORCES_OF_FILE, job).findings.find((f) => f.code === 'socket-over-stressed')!;
    // By hand: 350 / (pi 8 x 0.75) = 18.57 engaged, 0.75 float: 19.32, up to 19.5.
    expect(stop.about).toMatchObject({ depth_mm: 19.5, strut: 'S1' });
    const hubs = parts.hubs.map((h) => ({ ...h, sockets: h.sockets.map((s) => ({ ...s, depth: 19.5 })) }));
    expect(
      judge(truss, { ...parts, hubs }, FORCES_OF_FILE, job).findings.some((f) => f.code === 'socket-over-stressed'),
    ).toBe(false);
  });

  it('a seated one holds no tension, a loose one nothing: a stop that says which', () => {
    const job = defaultJob();
    for (const [joint, force, stops] of [
      ['seated', 100, true],
      ['seated', -100, false],
      ['loose', 100, true],
      ['loose', -100, true],
      ['pinned', 100, false],
    ] as const) {
      const { truss, parts } = oneStrut(job, force, { joint });
      const found = judge(truss, parts, FORCES_OF_FILE, job).findings.filter((f) => f.code === 'socket-no-path');
      expect(found.length, `${joint} ${force}`).toBe(stops ? 2 : 0);
    }
  });

  it('a glued one that the strut does not reach says why', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, 100);
    const hubs = parts.hubs.map((h) => ({ ...h, sockets: h.sockets.map((s) => ({ ...s, depth: 0.5 })) }));
    const { findings } = judge(truss, { ...parts, hubs }, FORCES_OF_FILE, job);
    const stuck = findings.filter((f) => f.code === 'socket-no-path');
    expect(stuck.length).toBe(2);
    expect(stuck[0]!.about!['why']).toContain('ends before its socket begins');
  });

  it('a pinned one governs by its weakest part in tension', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, 60, { joint: 'pinned' });
    const socket = judge(truss, parts, FORCES_OF_FILE, job).utilisations.find((u) => u.kind === 'socket')!;
    // By hand: plug of the wood behind the pin: 2 x (13.25 - 7) x 8 mm² x fv 6 / 3 = 200 N.
    expect(socket.utilisation).toBeGreaterThanOrEqual(60 / 200 - 1e-9);
  });
});

describe('what the use asks for', () => {
  const codes = (job: Job): readonly string[] => {
    const { truss, parts } = oneStrut(job, -50);
    return judge(truss, parts, FORCES_OF_FILE, job).findings.map((f) => f.code);
  };

  it('a table model: a note on unverified values only', () => {
    expect(codes(defaultJob())).toEqual(['values-unverified']);
  });

  it('outdoors: tested connectors, a plastic that stays hard, a service class', () => {
    expect(codes(jobWith({ use: 'outdoor' }))).toEqual(
      expect.arrayContaining(['connectors-untested', 'softening-low', 'service-class-missing']),
    );
  });

  it('overhead: tested connectors', () => {
    expect(codes(jobWith({ use: 'overhead' }))).toContain('connectors-untested');
    expect(codes(jobWith({ use: 'overhead' }))).not.toContain('softening-low');
  });

  it('the user’s own test value lifts the stop', () => {
    const materials = { 'ASA-print': { strength_MPa: { ft: 30, ftZ: 18, fc: 30, fv: 15 }, source: 'own test 3' } };
    const job = jobWith({ use: 'outdoor', nodes: { material: 'ASA-print' }, materials, strength: { serviceClass: 3 } });
    const found = codes(job);
    for (const code of ['connectors-untested', 'softening-low', 'service-class-missing'])
      expect(found).not.toContain(code);
  });
});

describe('moments at the ends', () => {
  it('each socket feels its own end’s moment, the strut the largest between them', () => {
    const job = defaultJob();
    const { truss, parts } = oneStrut(job, 0);
    const action: MemberActions = {
      ...axialOnly('G', 10, 'permanent'),
      momentY: 900,
      endMoments: [
        [100, 0],
        [400, 300],
      ],
    };
    const solution = { ...NO_SOLUTION, actions: [[action]] };
    const unforced = { ...truss, members: truss.members.map((m) => ({ ...m, force: null })) };
    const { utilisations } = judge(unforced, parts, { forces: null, solution }, job);
    const of = (at: string | null): number => utilisations.find((u) => u.at === at)!.utilisation;
    // By hand: pressure 6 M / (d L²) = 6 x 500 / (8 x 13.25²) MPa on plastic of 47 / 4 MPa, wall (pi/32)(12.45⁴ - 8.45⁴)/12.45 = 149.4 mm³.
    expect(of('B')).toBeGreaterThan(of('A'));
    const wall = 10 / 65.66 / 5.875 + 500 / 149.4 / 5.875;
    expect(of('B')).toBeCloseTo(wall, 2);
    expect(of(null)).toBeGreaterThan((3 * 900) / 50.27 / 55);
  });
});
