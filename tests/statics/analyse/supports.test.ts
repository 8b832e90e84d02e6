import { describe, expect, it } from 'vitest';
import type { Job } from '../../../src/model/job/index.js';
import type { Overturning, SupportDemand } from '../../../src/model/solution.js';
import { overturningFindings, upliftFindings } from '../../../src/statics/analyse/supports.js';
import { jobWith } from './input.js';

const demand = (node: string, combination: string, uplift: number): SupportDemand => ({
  node,
  combination,
  uplift,
  pressure: 0,
  shear: 12,
  ballast: uplift / (0.9 * 9.80665),
});
const DEMANDS = [demand('A', 'c1', 40), demand('B', 'c1', 0), demand('A', 'c2', 90), demand('C', 'c2', 60)];
type Anchorage = NonNullable<Job['loads']['anchorage']>;
const jobOf = (use: Job['use'], anchorage?: Anchorage): Job =>
  jobWith({ use, loads: anchorage ? { anchorage } : {} } as never);
const said = (job: Job) => upliftFindings(DEMANDS, job).map((f) => [f.code, f.subject, f.level, f.value, f.limit]);

describe('what lifts a support', () => {
  it.each([
    ['table', 'note'],
    ['display', 'note'],
    ['outdoor', 'warn'],
    ['overhead', 'warn'],
  ] as const)('is said of its worst combination where nothing says how it is held: %s, a %s', (use, level) => {
    expect(said(jobOf(use))).toEqual([
      ['support-anchor', 'A', level, 90, null],
      ['support-anchor', 'C', level, 60, null],
    ]);
    expect(upliftFindings(DEMANDS, jobOf(use))[0].about).toMatchObject({ combination: 'c2', shear_N: 12 });
  });

  it('is a note where anchors of unknown strength hold it, even outdoors', () => {
    expect(said(jobOf('outdoor', { kind: 'anchors' })).map((f) => f[2])).toEqual(['note', 'note']);
  });

  it.each(['anchors', 'ballast'] as const)('stops beyond the capacity of its %s, and no sooner', (kind) => {
    expect(said(jobOf('outdoor', { kind, capacity_N: 60 }))).toEqual([
      ['support-uplift', 'A', 'stop', 90, 60],
      ['support-anchor', 'C', 'note', 60, null],
    ]);
    expect(said(jobOf('table', { kind, capacity_N: 90 })).map((f) => f[0])).toEqual([
      'support-anchor',
      'support-anchor',
    ]);
  });

  it('stops at once on plain ground, whatever capacity is written beside it', () => {
    for (const anchorage of [{ kind: 'ground-contact' }, { kind: 'ground-contact', capacity_N: 1000 }] as const)
      expect(said(jobOf('table', anchorage))).toEqual([
        ['support-uplift', 'A', 'stop', 90, 0],
        ['support-uplift', 'C', 'stop', 60, 0],
      ]);
  });
});

describe('a truss that tips over', () => {
  const tips = (ratio: number | null): Overturning => ({ ratio, edge: ['A', 'B'], combination: 'c2' });
  const found = (worst: Overturning | null, job: Job) =>
    overturningFindings(worst, job).map((f) => [f.code, f.level, f.value]);

  it.each([
    ['table', 'note'],
    ['display', 'note'],
    ['outdoor', 'stop'],
    ['overhead', 'stop'],
  ] as const)('%s: a %s beyond 1, and where nothing holds it down', (use, level) => {
    expect(found(tips(1.01), jobOf(use))).toEqual([['truss-overturns', level, 1.01]]);
    expect(found(tips(null), jobOf(use))).toEqual([['truss-overturns', level, null]]);
    expect(found(tips(1), jobOf(use))).toEqual([]);
    expect(found(tips(0.5), jobOf(use))).toEqual([]);
    expect(found(null, jobOf(use))).toEqual([]);
  });

  it('is held by anchors or ballast, which their uplift judges, but not by plain ground', () => {
    expect(found(tips(2), jobOf('outdoor', { kind: 'anchors', capacity_N: 1 }))).toEqual([]);
    expect(found(tips(2), jobOf('outdoor', { kind: 'ballast' }))).toEqual([]);
    expect(found(tips(2), jobOf('outdoor', { kind: 'ground-contact' }))).toEqual([['truss-overturns', 'stop', 2]]);
  });
});
