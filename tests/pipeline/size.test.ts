import { describe, expect, it } from 'vitest';
import { type Job, jobSchema } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { assess } from '../../src/pipeline/assess.js';
import { type SizedRound, sizeSections } from '../../src/pipeline/size.js';
import { trussOf } from '../helpers/truss.js';

const jobWith = (more: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });

/** An invented tetrahedron with edges of about 400 mm, forces not in balance on purpose: only their sizes matter here. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [400, 0, 0],
    [200, 350, 0],
    [200, 115, 330],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
    [0, 3],
    [1, 3],
    [2, 3],
  ],
  forces: [40, 40, 55, -60, -150, -20],
});
const grouped: Truss = {
  ...truss,
  members: truss.members.map((m, i) => ({ ...m, group: i < 3 ? 'base' : null })),
};
const sizes = ['beech-12', 'beech-4', 'beech-8', 'beech-6', 'beech-10'];

const solver = (job: Job) => {
  let calls = 0;
  const solve = (t: Truss): SizedRound => {
    calls++;
    const { parts, utilisations } = assess(t, job);
    return { parts, loading: { forces: null, solution: null }, utilisations };
  };
  return { solve, calls: () => calls };
};

const worstOf = (t: Truss, job: Job, marks: readonly string[]): number =>
  Math.max(
    ...solver(job)
      .solve(t)
      .utilisations.filter((u) => marks.includes(u.mark))
      .map((u) => u.utilisation),
  );

describe('sizing', () => {
  const job = jobWith({ struts: { sizes }, nodes: { bondStrength_MPa: 4 } });

  it('every choice passes, and one size lighter would not', async () => {
    const { choices, truss: sized, findings } = await sizeSections(grouped, job, solver(job).solve);
    const ladder = ['beech-4', 'beech-6', 'beech-8', 'beech-10', 'beech-12'];
    expect(choices.map((c) => c.name)).toEqual(['base', 'S3', 'S4', 'S5']);
    expect(choices[0]!.struts).toEqual(['S0', 'S1', 'S2']);
    expect(findings).toEqual([]);
    for (const c of choices) {
      expect(worstOf(sized, job, c.struts), c.name).toBeLessThanOrEqual(1);
      const rung = ladder.indexOf(c.to);
      if (rung === 0) continue;
      const lighter = {
        ...sized,
        members: sized.members.map((m) => (c.struts.includes(m.mark) ? { ...m, section: ladder[rung - 1]! } : m)),
      };
      expect(worstOf(lighter, job, c.struts), `${c.name} with ${ladder[rung - 1]}`).toBeGreaterThan(1);
    }
    // The strut with 150 N of compression needs more than the one with 20 N.
    expect(ladder.indexOf(choices[2]!.to)).toBeGreaterThan(ladder.indexOf(choices[3]!.to));
  });

  it('says what changed: section and mass before and after', async () => {
    const { choices, massBefore, massAfter } = await sizeSections(grouped, job, solver(job).solve);
    for (const c of choices) expect(c.from).toBe('beech-8');
    expect(massBefore).toBeGreaterThan(0);
    expect(massAfter).toBeGreaterThan(0);
    expect(massAfter).not.toBe(massBefore);
  });

  it('names what no section carries and gives it the heaviest', async () => {
    const heavy = { ...truss, members: truss.members.map((m, i) => (i === 4 ? { ...m, force: -50000 } : m)) };
    const { choices, findings } = await sizeSections(heavy, job, solver(job).solve);
    expect(choices[4]!.to).toBe('beech-12');
    expect(findings).toMatchObject([{ code: 'no-section-passes', subject: 'S4', level: 'stop' }]);
  });

  it('an unknown size is left out by name; none known is a stop', async () => {
    const some = jobWith({ struts: { sizes: ['beech-8', 'oak-9'] } });
    const one = await sizeSections(truss, some, solver(some).solve);
    expect(one.findings.find((f) => f.code === 'size-unknown')!.about).toEqual({ section: 'oak-9' });
    const none = jobWith({ struts: { sizes: ['oak-9'] } });
    const { findings, rounds } = await sizeSections(truss, none, solver(none).solve);
    expect(findings.map((f) => f.code)).toEqual(['sizes-missing']);
    expect(rounds).toBe(0);
  });

  it('without sizes the catalogue’s dowels of the same wood are tried, in few rounds', async () => {
    const job = jobWith({ nodes: { bondStrength_MPa: 4 } });
    const { solve, calls } = solver(job);
    const { choices, rounds } = await sizeSections(truss, job, solve);
    for (const c of choices) expect(c.to).toMatch(/^beech-\d+$/);
    expect(calls()).toBe(rounds + 1);
    expect(rounds).toBeLessThan(15);
  });
});
