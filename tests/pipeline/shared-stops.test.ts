import { expect, it } from 'vitest';
import { cutListCsv } from '../../src/documents/struts/cut-list-csv.js';
import { defaultJob } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { withSharedStops } from '../../src/pipeline/shared-stops.js';
import { planFitUp } from '../../src/planning/fit-up/plan-fit-up.js';
import { inventedTruss } from '../documents/invented.js';
import { packRecords } from '../documents/pack-records.js';

const base = defaultJob();
const jobWith = (shareStops: boolean, extra: object = {}) => ({
  ...base,
  struts: { ...base.struts, shareStops, ...extra },
});

it('changes nothing unless the job asks, nor where ends are drilled', () => {
  const assessed = assess(inventedTruss(), jobWith(false));
  expect(withSharedStops(assessed)).toBe(assessed);
  const drilled = assess(inventedTruss(), jobWith(true, { pinDrill: true }));
  expect(withSharedStops(drilled)).toBe(drilled);
});

it('shares stops within the play that the fit-up leaves, and axis = setbacks + floats + cut still holds', () => {
  const assessed = assess(inventedTruss(), jobWith(true));
  const shared = withSharedStops(assessed);
  const fit = new Map(planFitUp(assessed.topology, assessed.parts, assessed.job)!.struts.map((s) => [s.mark, s]));
  const settings = (struts: typeof assessed.parts.struts): number => new Set(struts.map((s) => s.cutLength)).size;
  expect(settings(shared.parts.struts)).toBeLessThanOrEqual(settings(assessed.parts.struts));
  shared.parts.struts.forEach((s, i) => {
    const before = assessed.parts.struts[i]!;
    const { share, play_mm } = fit.get(s.mark)!;
    expect(s.cutLength! - before.cutLength!).toBeCloseTo(s.misfit!, 9);
    expect(Math.abs(s.misfit!)).toBeLessThanOrEqual((Math.max(0, 1 - share) * play_mm) / 2 + 1e-9);
    const sum = s.cutLength! + s.ends.reduce((total, e) => total + e.setback! + e.float!, 0);
    expect(sum).toBeCloseTo(s.axisLength, 9);
    for (const e of s.ends) expect(e.float!).toBeGreaterThanOrEqual(0);
  });
});

it('brings lengths together where the saw is exact and sockets are loose', () => {
  const exact = { ...base.fit, cut_mm: 0, hubShrinkage: 0, moisture: 0 };
  const loose = { ...jobWith(true), fit: exact, saw: { ...base.saw, endFloat_mm: 2 } };
  const assessed = assess(inventedTruss(), loose);
  const shared = withSharedStops(assessed);
  const settings = (struts: typeof assessed.parts.struts): number => new Set(struts.map((s) => s.cutLength)).size;
  expect(settings(shared.parts.struts)).toBeLessThan(0.75 * settings(assessed.parts.struts));
});

it('reports the misfit of every strut in the cut list', () => {
  const records = packRecords({ struts: jobWith(true).struts });
  const text = new TextDecoder().decode(cutListCsv({ ...records, ...withSharedStops(records) }));
  const [head, ...rows] = text.trim().split('\n');
  expect(head!.trim().endsWith(',stop_misfit_mm')).toBe(true);
  expect(rows.every((r) => /,-?\d+\.\d{3}$/.test(r.trim()))).toBe(true);
});
