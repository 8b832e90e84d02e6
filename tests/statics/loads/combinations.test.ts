import { describe, expect, it } from 'vitest';
import { combinationsOf } from '../../../src/statics/loads/combinations.js';
import { CaseBuilder, type CaseKind } from '../../../src/statics/loads/load-case.js';
import { jobWith } from '../analyse/input.js';

const cases = (list: readonly (readonly [string, CaseKind])[]) =>
  list.map(([name, kind]) => new CaseBuilder(1, 1).done(name, kind));

describe('combinations by EN 1990 (6.10)', () => {
  it('a pavilion under snow and wind: each leads once, and the wind lifts 0.9 G', () => {
    const { combinations } = combinationsOf(
      cases([
        ['self-weight', 'self-weight'],
        ['snow', 'snow'],
        ['wind', 'wind'],
      ]),
      jobWith({}),
    );
    expect(combinations.map((c) => c.name)).toEqual([
      '1.35 G',
      '1.35 G + 1.5 snow',
      '1.35 G + 1.5 snow + 0.9 wind',
      '0.9 G + 1.5 snow',
      '1.35 G + 1.5 wind',
      '1.35 G + 1.5 wind + 0.75 snow',
      '0.9 G + 1.5 wind',
    ]);
    expect(combinations.map((c) => c.duration)).toEqual(['permanent', ...new Array(6).fill('short')]);
  });

  it('the pavilion of the worked example: 11.33 kN down with snow leading, 4.62 kN up (G 1.35, S 5.04, W +2.16 / -3.89 kN)', () => {
    const value: Record<string, number> = { 'self-weight': 1.35, snow: 5.04, pressing: 2.16, lifting: -3.89 };
    const list = cases([
      ['self-weight', 'self-weight'],
      ['snow', 'snow'],
      ['pressing', 'wind'],
      ['lifting', 'wind'],
    ]);
    const { combinations } = combinationsOf(list, jobWith({}));
    const totals = combinations.map((c) => c.factors.reduce((sum, [i, f]) => sum + f * value[list[i].name], 0));
    expect(Math.max(...totals)).toBeCloseTo(1.35 * 1.35 + 1.5 * 5.04 + 0.9 * 2.16, 9);
    expect(Math.max(...totals)).toBeCloseTo(11.33, 2);
    expect(Math.min(...totals)).toBeCloseTo(-4.62, 2);
    // Two winds are never taken together.
    for (const c of combinations) expect(c.factors.filter(([i]) => list[i].kind === 'wind').length).toBeLessThan(2);
  });

  it('imposed loads act alone and all together, by category', () => {
    const list = cases([
      ['G', 'permanent'],
      ['left', 'imposed'],
      ['right', 'imposed'],
      ['snow', 'snow'],
    ]);
    const names = combinationsOf(list, jobWith({})).combinations.map((c) => c.name);
    expect(names).toContain('1.35 G + 1.5 left + 1.5 right + 0.75 snow');
    expect(names).toContain('1.35 G + 1.5 snow + 1.05 left');
    const roof = combinationsOf(list, jobWith({ loads: { category: 'H' } })).combinations.map((c) => c.name);
    expect(roof).not.toContain('1.35 G + 1.5 snow + 1.05 left');
  });

  it('written ones stand as written, and a case that does not exist is named', () => {
    const job = jobWith({
      loads: {
        combinations: [
          { name: 'mine', factors: { snow: 2, rain: 1 } },
          { name: 'none', factors: { hail: 1 } },
        ],
      },
    });
    const { combinations, findings } = combinationsOf(cases([['snow', 'snow']]), job);
    expect(combinations).toEqual([{ name: 'mine', factors: [[0, 2]], duration: 'short', favourable: false }]);
    expect(findings.map((f) => f.about?.['case'])).toEqual(['rain', 'hail']);
  });

  it('written ones that do not let the wind lift get 0.9 G + 1.5 W beside them, once', () => {
    const list = cases([
      ['self-weight', 'self-weight'],
      ['gust', 'wind'],
      ['gale', 'wind'],
    ]);
    const down = { name: 'down', factors: { 'self-weight': 1.35, gust: 1.5 } };
    const weak = { name: 'weak', factors: { 'self-weight': 0.9, gust: 1 } };
    const up = { name: 'up', factors: { 'self-weight': 0.9, gust: 1.5 } };
    const written = (...combinations: { name: string; factors: Record<string, number> }[]) =>
      combinationsOf(list, jobWith({ loads: { combinations } })).combinations;
    expect(written(down, weak).map((c) => c.name)).toEqual(['down', 'weak', '0.9 G + 1.5 gust', '0.9 G + 1.5 gale']);
    expect(written(down, up).map((c) => c.name)).toEqual(['down', 'up', '0.9 G + 1.5 gale']);
    expect(written(down)[1]).toMatchObject({
      factors: [
        [0, 0.9],
        [1, 1.5],
      ],
      duration: 'short',
      favourable: true,
    });
  });
});
