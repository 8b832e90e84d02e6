import { describe, expect, it } from 'vitest';
import { correctCuts } from '../../../src/planning/fit-up/as-built.js';
import { planFitUp } from '../../../src/planning/fit-up/plan-fit-up.js';
import { assembled } from '../../helpers/assembled.js';
import { trussOf } from '../../helpers/truss.js';

const A = 500;
const AT = [
  [0, 0, 0],
  [A, 0, 0],
  [A, A, 0],
  [0, A, 0],
] as const;
/** A square with both diagonals, held out of its plane and determinately in it: one loop. The diagonals pass beside one another. */
const square = trussOf({
  nodes: AT,
  edges: [
    [0, 1],
    [1, 2],
    [2, 3],
    [3, 0],
    [0, 2],
    [1, 3],
  ],
  supports: [
    [0, 'xyz'],
    [1, 'yz'],
    [2, 'z'],
    [3, 'z'],
  ],
});
/** Self-stress of the crossed square: sides 1, diagonals -√2 (joint equilibrium). */
const STATE = [1, 1, 1, 1, -Math.SQRT2, -Math.SQRT2];

/** P(|x| <= t) of a standard normal x by Simpson's rule on its density. */
function within(t: number): number {
  const n = 2000;
  let sum = 0;
  for (let i = 0; i <= n; i++) {
    const x = (t * i) / n;
    sum += Math.exp((-x * x) / 2) * (i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2);
  }
  return (((2 * t) / n / 3) * sum) / Math.sqrt(2 * Math.PI);
}

const fitUp = (fit: Record<string, unknown>) => {
  const { topology, parts, job } = assembled(square, { fit: { hubShrinkage: 0, moisture: 0, ...fit } });
  return planFitUp(topology, parts, job)!;
};
/** The loop's exact chance: its miss is normal with the deviation √Σ(s σ)², its play Σ|s| play. */
const exact = (found: ReturnType<typeof fitUp>, scale = 1): number => {
  const sigma = Math.hypot(...found.struts.map((s, i) => STATE[i]! * s.deviation_mm * scale));
  return within(found.struts.reduce((sum, s, i) => sum + Math.abs(STATE[i]!) * s.play_mm, 0) / sigma);
};

describe('the chance that one loop closes', () => {
  const cut_mm = 6;
  const found = fitUp({ cut_mm, samples: 40_000 });

  it('has one loop, two standard deviations to a tolerance', () => {
    expect(found.loops).toHaveLength(1);
    for (const s of found.struts) expect(s.deviation_mm).toBeCloseTo(cut_mm / 2, 12);
  });

  it('is the normal integral: the samples to four of their standard errors, the bound to 1e-6', () => {
    const p = exact(found);
    expect(p).toBeGreaterThan(0.2);
    expect(p).toBeLessThan(0.999);
    expect(Math.abs(found.chance - p)).toBeLessThan(4 * Math.sqrt((p * (1 - p)) / 40_000));
    expect(found.chanceBound).toBeCloseTo(p, 6);
  });

  it('reaches what is wanted with the tolerance that it asks of the saw, and not with one a hundredth wider', () => {
    const needed = found.cutNeeded_mm!;
    expect(needed).toBeGreaterThan(0);
    expect(exact(found, needed / cut_mm)).toBeGreaterThanOrEqual(0.95 - 1e-6);
    expect(exact(found, (1.01 * needed) / cut_mm)).toBeLessThan(0.95);
    expect(fitUp({ cut_mm: needed, samples: 40_000 }).chance).toBeGreaterThan(0.945);
  });

  it('gives the same figures for the same seed', () => {
    expect(fitUp({ cut_mm, samples: 500 })).toEqual(fitUp({ cut_mm, samples: 500 }));
  });
});

describe('cut lengths as built', () => {
  const { topology, parts, job } = assembled(square, { saw: { step_mm: 0.001 } });
  const planned = new Map(
    parts.struts.map((s) => [s.mark, s.axisLength - s.ends[0].setback! - s.ends[1].setback! - 2 * job.saw.endFloat_mm]),
  );

  it('a side 1 mm long changes the other five so that the loop closes again, by the least change', () => {
    const s0 = parts.struts[0]!;
    const found = correctCuts(topology, parts, job, {
      lengths: new Map([[s0.mark, s0.cutLength! + 1]]),
      nodes: new Map(),
    });
    expect(found.map((c) => c.mark)).toEqual(['S1', 'S2', 'S3', 'S4', 'S5']);
    const change = [1, ...found.map((c) => c.corrected_mm - planned.get(c.mark)!)];
    // Rounded down to 0.001 mm, six struts.
    expect(Math.abs(change.reduce((sum, e, i) => sum + STATE[i]! * e, 0))).toBeLessThan(0.008);
    // Least squares with the constraint: d_i = -s_i (s_0 e_0) / Σ s_j² over the five others, Σ = 3 + 4.
    for (let i = 1; i < 6; i++) expect(Math.abs(change[i]! + STATE[i]! / 7)).toBeLessThan(0.0011);
  });

  it('a strut as planned changes nothing', () => {
    const found = correctCuts(topology, parts, job, {
      lengths: new Map([['S0', parts.struts[0]!.cutLength!]]),
      nodes: new Map(),
    });
    for (const c of found) expect(Math.abs(c.corrected_mm - c.planned_mm)).toBeLessThan(0.0011);
  });

  it('between two measured nodes the strut follows their distance', () => {
    const found = correctCuts(topology, parts, job, {
      lengths: new Map(),
      nodes: new Map([
        ['N0', [0, 0, 0]],
        ['N1', [A + 3, 4, 0]],
      ]),
    });
    const s0 = found.find((c) => c.mark === 'S0')!;
    const wanted = planned.get('S0')! + Math.hypot(A + 3, 4) - A;
    expect(s0.corrected_mm).toBeLessThanOrEqual(wanted + 1e-9);
    expect(s0.corrected_mm).toBeGreaterThan(wanted - 0.0011);
  });
});
