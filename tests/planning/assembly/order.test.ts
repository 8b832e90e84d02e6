import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { packingListCsv } from '../../../src/documents/assembly/packing-list.js';
import type { PackRecords } from '../../../src/documents/records.js';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { endChoice } from '../../../src/model/strut-end.js';
import type { Truss } from '../../../src/model/truss.js';
import { assess } from '../../../src/pipeline/assess.js';
import { planAssembly } from '../../../src/planning/assembly/plan-assembly.js';
import { readJob } from '../../../src/readers/job.js';
import { readTruss } from '../../../src/readers/truss.js';
import { assembled } from '../../helpers/assembled.js';
import { mapped, trussOf } from '../../helpers/truss.js';

/** A regular octahedron of edge a: 6 nodes, 12 struts, 8 faces; no panels. */
const octahedron = (a: number): Truss => {
  const r = a / Math.SQRT2;
  return trussOf({
    nodes: [
      [r, 0, 0],
      [0, r, 0],
      [-r, 0, 0],
      [0, -r, 0],
      [0, 0, r],
      [0, 0, -r],
    ],
    edges: [
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
      [4, 0],
      [4, 1],
      [4, 2],
      [4, 3],
      [5, 0],
      [5, 1],
      [5, 2],
      [5, 3],
    ],
    faces: [
      [0, 1, 4],
      [1, 2, 4],
      [2, 3, 4],
      [3, 0, 4],
      [1, 0, 5],
      [2, 1, 5],
      [3, 2, 5],
      [0, 3, 5],
    ],
  });
};

const order = (truss: Truss, fields: Record<string, unknown> = {}) => {
  const assessed = assembled(truss, fields);
  return { assessed, ...planAssembly(assessed) };
};
const entriesOf = (found: ReturnType<typeof order>) => found.plan.steps.flatMap((s) => s.struts);
const blockedOf = (found: ReturnType<typeof order>) => entriesOf(found).filter((e) => e.entry === 'blocked');
/** A strut's cut length, the way between its sockets' mouths, and their depths, mm. */
const fitOf = (found: ReturnType<typeof order>, strut: string) => {
  const part = found.assessed.parts.struts.find((s) => s.mark === strut)!;
  const sockets = found.assessed.parts.hubs.flatMap((h) => h.sockets.filter((s) => s.strut === strut));
  const depths = sockets.map((s) => s.depth);
  const gap = part.axisLength - sockets.reduce((sum, s) => sum + s.setback! + s.depth, 0);
  return { cut: part.cutLength!, gap, depths };
};
const codes = (found: ReturnType<typeof order>) => found.findings.map((f) => f.code);

describe('whether every strut gets in', () => {
  // An apex over a square of standing hubs must draw back by the engagement along four struts at 45 degrees (an octahedron's):
  // it goes out by s √2 and each strut end stands aside by s. Struts that cannot bend that far stay out.
  it('short stiff struts cannot: the last ones are named, with the remedy', () => {
    const found = order(octahedron(150), { assembly: { springStrain: 1e-6 } });
    expect(blockedOf(found).length).toBeGreaterThan(0);
    expect(found.findings.filter((f) => f.code === 'strut-cannot-enter').map((f) => f.subject)).toEqual(
      blockedOf(found).map((e) => e.strut),
    );
    // A straight bar longer than the way between two mouths and the deeper socket together has no place with one end in and the other out.
    for (const { strut } of blockedOf(found)) {
      const { cut, gap, depths } = fitOf(found, strut);
      expect(cut).toBeGreaterThan(gap + Math.max(...depths));
    }
  });

  it('the long slender struts of a tetrahedron can', () => {
    const h = Math.sqrt(2 / 3);
    const tetrahedron = trussOf({
      nodes: [
        [0, 0, 0],
        [2000, 0, 0],
        [1000, 1000 * Math.sqrt(3), 0],
        [1000, 1000 / Math.sqrt(3), 2000 * h],
      ],
      edges: [
        [0, 1],
        [1, 2],
        [2, 0],
        [0, 3],
        [1, 3],
        [2, 3],
      ],
      faces: [[0, 2, 1]],
    });
    const found = order(tetrahedron);
    expect(blockedOf(found)).toEqual([]);
    expect(
      entriesOf(found)
        .map((e) => e.entry)
        .sort(),
    ).toEqual(['spread', 'spread', 'spread', 'squeezed', 'squeezed', 'squeezed']);
    for (const e of entriesOf(found)) if (e.strain !== null) expect(e.strain).toBeLessThanOrEqual(0.004);
  });

  it('the same short struts can with the closing details that the job lets it give', () => {
    const found = order(octahedron(150), { assembly: { springStrain: 1e-6, closing: 'give' } });
    expect(blockedOf(found)).toEqual([]);
    expect(found.plan.closing.length).toBeGreaterThan(0);
    // No bending at all: an end can only rise by its play, not past a sleeve. So all are laid in at both ends.
    for (const e of found.plan.closing) {
      expect(e.detail?.kind).toBe('drop-in');
      const member = found.assessed.topology.truss.members.find((m) => m.mark === e.strut)!;
      for (const node of member.ends) expect(endChoice(found.assessed.job, e.strut, node).detail).toBe('drop-in');
    }
  });
});

describe('a slide', () => {
  const folder = join(import.meta.dirname, '..', '..', '..', 'examples', 'lantern');
  const { truss } = readTruss(readFileSync(join(folder, 'truss.json'), 'utf8'), 'truss.json');
  const { job } = readJob(readFileSync(join(folder, 'job.json'), 'utf8'), 'job.json');
  const assessed = assess(truss!, { ...job!, assembly: { ...job!.assembly, closing: 'give' } });
  const found = { assessed, ...planAssembly(assessed) };
  const slid = found.plan.closing.filter((e) => e.detail?.kind === 'slide');

  it('is given to struts that can be tilted past their far sleeve', () => {
    expect(blockedOf(found)).toEqual([]);
    expect(slid.length).toBeGreaterThan(0);
  });

  it('is deep enough: with one end all the way in, the other is out of its socket', () => {
    for (const { strut } of slid) {
      const { cut, gap, depths } = fitOf(found, strut);
      expect(cut).toBeLessThanOrEqual(gap + Math.max(...depths));
      // And it could not be without: a bar longer than the way between the mouths and the plain depth together.
      expect(cut).toBeGreaterThan(gap + Math.min(...depths));
    }
  });
});

describe('every part once', () => {
  const found = order({ ...octahedron(500), faces: octahedron(500).faces.map((f) => ({ ...f, panel: true })) });
  const { plan, assessed } = found;
  const all = {
    node: assessed.topology.truss.nodes.map((n) => n.mark).sort(),
    strut: assessed.topology.truss.members.map((m) => m.mark).sort(),
    panel: assessed.parts.panels
      .filter((p) => p.makeable)
      .map((p) => p.mark)
      .sort(),
  };

  it('in the steps', () => {
    expect(plan.steps.flatMap((s) => s.hubs).sort()).toEqual(all.node);
    expect(
      entriesOf(found)
        .map((e) => e.strut)
        .sort(),
    ).toEqual(all.strut);
    expect(all.panel).toHaveLength(8);
    expect(plan.steps.flatMap((s) => s.panels).sort()).toEqual(all.panel);
  });

  it('with both hubs of a strut standing when it comes', () => {
    const standing = new Set<string>();
    for (const step of plan.steps) {
      for (const hub of step.hubs) standing.add(hub);
      for (const { strut } of step.struts)
        for (const end of assessed.topology.truss.members.find((m) => m.mark === strut)!.ends)
          expect(standing).toContain(end);
    }
  });

  it('in the bags, and in the packing list', () => {
    expect(plan.bags.flatMap((b) => b.hubs).sort()).toEqual(all.node);
    expect(plan.bags.flatMap((b) => b.struts).sort()).toEqual(all.strut);
    expect(plan.bags.flatMap((b) => b.panels).sort()).toEqual(all.panel);
    const text = new TextDecoder().decode(
      packingListCsv({ job: assessed.job, assembly: plan } as unknown as PackRecords),
    );
    const rows = text
      .trim()
      .split(/\r?\n/)
      .slice(1)
      .map((line) => line.split(','));
    for (const kind of ['node', 'strut', 'panel'] as const)
      expect(
        rows
          .filter((r) => r[1] === kind)
          .map((r) => r[2])
          .sort(),
      ).toEqual(all[kind]);
    expect(rows.filter((r) => r[1] === 'spare').length).toBeGreaterThan(0);
  });

  it('and the masses of steps and bags are those of the parts', () => {
    const { struts, hubs, panels } = assessed.parts;
    const whole = [...struts, ...hubs, ...panels].reduce((sum, p) => sum + (p.mass ?? 0), 0);
    expect(plan.steps.reduce((sum, s) => sum + s.mass_kg, 0)).toBeCloseTo(whole, 9);
    expect(plan.bags.reduce((sum, b) => sum + b.mass_kg, 0)).toBeCloseTo(whole, 9);
  });
});

describe('what is wrong is named', () => {
  it('a truss in two pieces', () => {
    const a = octahedron(500);
    const twice: Truss = {
      ...a,
      nodes: [
        ...a.nodes,
        ...a.nodes.map((n) => ({ mark: `B${n.mark}`, at: [n.at[0] + 3000, n.at[1], n.at[2]] as Vec3 })),
      ],
      members: [
        ...a.members,
        ...a.members.map((m) => ({
          ...m,
          mark: `B${m.mark}`,
          ends: [`B${m.ends[0]}`, `B${m.ends[1]}`] as [string, string],
        })),
      ],
    };
    const found = order(twice);
    expect(found.findings.find((f) => f.code === 'truss-in-pieces')?.value).toBe(2);
    expect(entriesOf(found)).toHaveLength(24);
    expect(codes(order(a))).not.toContain('truss-in-pieces');
  });

  it('a start that is no node; a node of the truss is started from', () => {
    const unknown = order(octahedron(500), { assembly: { start: 'Q' } });
    expect(unknown.findings.find((f) => f.code === 'start-unknown')?.subject).toBe('Q');
    const known = order(octahedron(500), { assembly: { start: 'N4' } });
    expect(codes(known)).not.toContain('start-unknown');
    expect(known.plan.steps[0]!.hubs).toContain('N4');
  });

  it('a step that nothing makes stable is a stop: a square of pins on four legs sways', () => {
    const table = trussOf({
      nodes: [
        [0, 0, 0],
        [500, 0, 0],
        [500, 500, 0],
        [0, 500, 0],
        [0, 0, 500],
        [500, 0, 500],
        [500, 500, 500],
        [0, 500, 500],
      ],
      edges: [
        [0, 4],
        [1, 5],
        [2, 6],
        [3, 7],
        [4, 5],
        [5, 6],
        [6, 7],
        [7, 4],
      ],
      supports: [0, 1, 2, 3].map((i) => [i, 'xyz'] as const),
    });
    const pinned = order(table, { analysis: { joints: 'pinned' } });
    const stop = pinned.findings.find((f) => f.code === 'step-unstable' && f.value === pinned.plan.steps.length);
    expect(stop?.level).toBe('stop');
    const rigid = order(table, { analysis: { joints: 'rigid' } });
    expect(rigid.plan.steps.at(-1)!.unstable).toBe(false);
  });
});

describe('what would sag is propped', () => {
  // A lattice arm of eight bays from a wall of four nodes to another: until it gets there it is a cantilever.
  const bays = 8;
  const corner = [
    [0, 0],
    [0, 100],
    [100, 100],
    [100, 0],
  ];
  const at = (bay: number, k: number): number => 4 * bay + (k % 4);
  const arm = trussOf({
    nodes: Array.from({ length: 4 * (bays + 1) }, (_, i) => [
      500 * Math.floor(i / 4),
      corner[i % 4]![0]!,
      1000 + corner[i % 4]![1]!,
    ]),
    edges: Array.from({ length: bays }, (_, b) => b).flatMap((b) =>
      [0, 1, 2, 3].flatMap((k) => [
        [at(b, k), at(b + 1, k)],
        [at(b, k), at(b + 1, k + 1)],
        [at(b + 1, k), at(b + 1, k + 1)],
      ]),
    ),
    supports: [0, 1, 2, 3].flatMap((i) => [[i, 'xyz'] as const, [at(bays, i), 'xyz'] as const]),
  });
  const fields = { analysis: { joints: 'pinned' } };

  it('from the sag that the job allows on, and no step sags more with its props', () => {
    const free = order(arm, { ...fields, assembly: { sag: 1 } });
    const sags = free.plan.steps.map((s) => s.deflection_mm ?? 0);
    const worst = Math.max(...sags);
    const ended = sags.at(-1)!;
    const mean = free.assessed.topology.axisLength.reduce((a, b) => a + b, 0) / arm.members.length;
    // Half way between what it comes to at the end and the worst on the way.
    const limit = (ended + worst) / 2;
    expect(worst).toBeGreaterThan(1.5 * ended);
    const held = order(arm, { ...fields, assembly: { sag: limit / mean } });
    const props = held.plan.steps.flatMap((s) => s.props);
    // Props under it, summed over the steps.
    const propped = (found: typeof free): number => {
      let [under, sum] = [0, 0];
      for (const s of found.plan.steps) {
        under += s.props.length - s.release.length;
        sum += under;
      }
      return sum;
    };
    expect(propped(held)).toBeGreaterThan(propped(free));
    for (const s of held.plan.steps) expect(s.deflection_mm!).toBeLessThanOrEqual(limit);
    // All props have gone at the end, and what is left sags as it did without them.
    expect(held.plan.steps.flatMap((s) => s.release).sort()).toEqual([...props].sort());
    expect(held.plan.steps.at(-1)!.deflection_mm).toBeCloseTo(ended, 6);
  });

  it('every step tells its sag', () => {
    for (const s of order(arm, fields).plan.steps.slice(1)) expect(s.deflection_mm).not.toBeNull();
  });
});

describe('the same truss elsewhere', () => {
  const base = octahedron(150);
  const fields = { assembly: { springStrain: 1e-6 } };
  const count = blockedOf(order(base, fields)).length;

  it.each<[string, Truss]>([
    ['turned about z', mapped(base, ([x, y, z]) => [0.8 * x - 0.6 * y, 0.6 * x + 0.8 * y, z])],
    ['moved', mapped(base, ([x, y, z]) => [x + 12_345, y - 678, z + 91])],
    ['renumbered', { ...base, nodes: [...base.nodes].reverse(), members: [...base.members].reverse() }],
  ])('%s: as many struts blocked', (_, truss) => {
    expect(blockedOf(order(truss, fields))).toHaveLength(count);
  });
});

describe('units built on the bench', () => {
  const faces = octahedron(1200).faces;
  const unitsWith = (assembly: Record<string, unknown>) => order({ ...octahedron(1200), faces }, { assembly });

  it('are as large as their hubs make them: a triangle of 1200 mm is 1200 by 1039 between its nodes', () => {
    const { plan, assessed } = unitsWith({});
    expect(plan.units.length).toBeGreaterThan(0);
    const [long, short] = plan.units[0]!.size_mm;
    const mouth = Math.max(...assessed.parts.hubs[0]!.sockets.map((s) => s.setback! + s.depth));
    // Each hub reaches at least as far as its mouths, and not twice as far.
    for (const [size, between] of [
      [long, 1200],
      [short, 1200 * Math.sin(Math.PI / 3)],
    ] as const) {
      expect(size).toBeGreaterThan(between + 2 * mouth);
      expect(size).toBeLessThan(between + 4 * mouth);
    }
  });

  it('go through the door, into the van and are lifted, or not', () => {
    const [long, short] = unitsWith({}).plan.units[0]!.size_mm;
    const door = (width: number) => unitsWith({ door_mm: [width, 300] }).plan.units[0]!.throughDoor;
    expect(door(short + 1)).toBe(true);
    expect(door(short - 1)).toBe(false);
    const van = (length: number) => unitsWith({ van_mm: [300, length, short + 1] }).plan.units[0]!.inVan;
    expect(van(long + 1)).toBe(true);
    expect(van(long - 1)).toBe(false);
    const heavy = unitsWith({ lift_kg: 0.001, people: 2 }).plan.units[0]!;
    expect(heavy.people).toBeGreaterThan(2);
    expect(heavy.lifted).toBe(false);
    expect(unitsWith({}).plan.units[0]!.lifted).toBe(true);
  });
});
