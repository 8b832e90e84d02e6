import { describe, expect, it } from 'vitest';
import { check, readJob, readTruss } from '../../src/index.js';

/*
 * Rules that ask for mm (kh, embedding, distances of bolts, size factors) cannot be fed inches: what must hold is that a truss drawn in
 * any unit, turned about the vertical, moved and listed in another order is judged alike, part by part. Invented trusses.
 */
const DRAWN_IN: Readonly<Record<string, number>> = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8 };

interface Drawing {
  readonly unit: keyof typeof DRAWN_IN;
  /** About z, rad. */
  readonly turn: number;
  readonly move: readonly number[];
  readonly backwards: boolean;
}
const AS_DRAWN: Drawing = { unit: 'mm', turn: 0, move: [0, 0, 0], backwards: false };
const OTHERS: readonly (readonly [string, Drawing])[] = [
  ['in inches', { ...AS_DRAWN, unit: 'in' }],
  ['in feet, turned by 0.7 rad', { ...AS_DRAWN, unit: 'ft', turn: 0.7 }],
  ['in metres, moved', { ...AS_DRAWN, unit: 'm', move: [5000, -300, 20] }],
  [
    'in inches, turned by 2 rad, moved and listed backwards',
    { unit: 'in', turn: 2, move: [-700, 900, 0], backwards: true },
  ],
];

/** Posts lean: an upright strut would take its roll from the drawing's x axis. A hut 2 m square and 1.8 m high under a pyramid: braced walls, a roof of four panels. */
const HUT = (() => {
  const nodes: number[][] = [
    [-150, -100, 0],
    [2150, -100, 0],
    [2150, 2100, 0],
    [-150, 2100, 0],
    [0, 0, 1800],
    [2000, 0, 1800],
    [2000, 2000, 1800],
    [0, 2000, 1800],
    [1000, 1000, 2500],
  ];
  const bars: [number, number][] = [];
  for (let k = 0; k < 4; k++) {
    const n = (k + 1) % 4;
    bars.push([k, 4 + k], [4 + k, 4 + n], [k, 4 + n], [4 + k, 8]);
  }
  const faces = [0, 1, 2, 3].map((k) => [4 + k, 4 + ((k + 1) % 4), 8]);
  const loads = [
    [4, [120, 40, -300]],
    [6, [-30, 90, -250]],
    [8, [60, 0, -500]],
  ] as const;
  return { nodes, bars, faces, loads, feet: [0, 1, 2, 3] };
})();

function drawn(d: Drawing): string {
  const [c, s] = [Math.cos(d.turn), Math.sin(d.turn)];
  const turned = ([x, y, z]: readonly number[]): number[] => [c * x - s * y, s * x + c * y, z];
  const per = DRAWN_IN[d.unit];
  const order = <T>(list: T[]): T[] => (d.backwards ? list.reverse() : list);
  return JSON.stringify({
    format: 'strutwright-truss/1',
    units: d.unit,
    nodes: order(HUT.nodes.map((p, i) => ({ id: `N${i}`, at: turned(p).map((v, k) => (v + d.move[k]) / per) }))),
    members: order(HUT.bars.map(([a, b], i) => ({ id: `S${i}`, ends: [`N${a}`, `N${b}`] }))),
    faces: order(HUT.faces.map((f, i) => ({ id: `P${i}`, nodes: f.map((n) => `N${n}`), panel: true }))),
    supports: HUT.feet.map((n) => ({ node: `N${n}`, fixed: 'xyz' })),
    loads: HUT.loads.map(([n, f]) => ({ case: 'people', node: `N${n}`, force: turned(f) })),
  });
}

const SNOW = { name: 'snow', kind: 'snow', pressure_kN_per_m2: 0.3 };
const WIND = { name: 'wind', kind: 'wind', pressure_kN_per_m2: -0.4, direction: 'normal' };
const loads = { cases: [{ name: 'people', kind: 'imposed' }, SNOW, WIND] };
const JOBS: Readonly<Record<string, object>> = {
  'EN 1995-1-1, rectangles in pinned sockets': {
    struts: { section: 'C24-45x70' },
    // Of the least setbacks of two bars at a node either may be the longer one; equal ones leave no choice.
    nodes: { joint: 'pinned', pin_mm: 6, depth_mm: 200, setbacks: 'equal-at-node' },
    loads,
  },
  'EN 1993-1-1, tubes in glued sockets': { struts: { section: 'CHS-33.7x2.6' }, loads },
  'EN 1999-1-1, tubes on pins': { struts: { section: 'alu-30x2' }, analysis: { joints: 'pinned' }, loads },
  'NDS, lumber': { struts: { section: 'DFL-4x4' }, nodes: { setbacks: 'equal-at-node' }, loads },
  'allowable stress, dowels': { struts: { section: 'beech-30' }, loads },
};

async function judged(job: object, d: Drawing) {
  const read = readTruss(drawn(d), 'truss.json');
  const asked = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 'Hut', truss: 'truss.json', ...job }),
    'job.json',
  );
  expect([read.faults, asked.faults]).toEqual([[], []]);
  return check(read.truss!, asked.job!);
}
type Report = Awaited<ReturnType<typeof judged>>;
const byMark = (r: Report) =>
  new Map(r.members.map((m) => [m.mark, [m.governing?.utilisation ?? null, m.governing?.rule ?? ''] as const]));
/** What was found with its figure; a case of the whole names one of several equal parts, so marks are left out there. */
const found = (r: Report): string[] =>
  r.findings.map((f) => `${f.code} ${f.subject} ${f.value === null ? '' : f.value.toPrecision(6)}`).sort();

describe.each(Object.keys(JOBS))('%s', (name) => {
  it('is judged alike in every unit, direction, place and order', async () => {
    const wanted = await judged(JOBS[name], AS_DRAWN);
    const known = byMark(wanted);
    expect([...known.values()].every(([u]) => u !== null && u > 0)).toBe(true);
    for (const [way, drawing] of OTHERS) {
      const got = await judged(JOBS[name], drawing);
      for (const [mark, [utilisation, rule]] of byMark(got)) {
        const [u, r] = known.get(mark)!;
        expect(Math.abs(utilisation! / u! - 1), `${way}, ${mark}`).toBeLessThan(1e-6);
        expect(rule, `${way}, ${mark}`).toBe(r);
      }
      expect(found(got), way).toEqual(found(wanted));
    }
  });
});
