import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../../src/maths/random.js';
import { drawUnit } from '../../../src/planning/fit-up/errors.js';
import { closer, loopsOf, miss } from '../../../src/planning/fit-up/loops.js';
import { sureChance } from '../../../src/planning/fit-up/sure-chance.js';
import { singleTailOf, tailOf } from '../../../src/planning/fit-up/tails.js';
import { countStates } from '../../../src/statics/state-counts.js';

/** A row of n squares of 400 with both diagonals each, held out of their plane: as many loops, that share uprights. */
const row = (n: number) => {
  const nodes: number[] = [];
  const ends: number[] = [];
  for (let i = 0; i <= n; i++) nodes.push(400 * i, 0, 0, 400 * i, 400, 0);
  for (let i = 0; i <= n; i++) ends.push(2 * i, 2 * i + 1);
  for (let i = 0; i < n; i++) ends.push(2 * i, 2 * i + 2, 2 * i + 1, 2 * i + 3, 2 * i, 2 * i + 3, 2 * i + 1, 2 * i + 2);
  return loopsOf(
    countStates({
      nodes: Float64Array.from(nodes),
      ends: Int32Array.from(ends),
      fixed: Uint8Array.from({ length: nodes.length }, (_, k) => Number(k % 3 === 2)),
    }),
  );
};
const tails = (d: 'normal' | 'uniform') => ({ single: singleTailOf(d), sum: tailOf(d) });

const sampled = (
  loops: ReturnType<typeof row>,
  play: Float64Array,
  deviation: Float64Array,
  distribution: 'normal' | 'uniform',
  samples: number,
): number => {
  const closes = closer(loops, play);
  const random = seededRandom(5);
  const unit = new Float64Array(play.length);
  let closed = 0;
  for (let s = 0; s < samples; s++) {
    drawUnit(unit, random, distribution);
    if (closes(unit.map((u, i) => u * deviation[i]!))) closed += 1;
  }
  return closed / samples;
};

describe.each(['normal', 'uniform'] as const)('the sure chance of several loops, %s errors', (distribution) => {
  const loops = row(4);
  const struts = 5 + 16;
  const play = Float64Array.from({ length: struts }, (_, i) => 1 + 0.5 * ((i * 7) % 3));
  const samples = 4000;

  it('has a loop a square', () => expect(loops).toHaveLength(4));

  it('is never above what samples say, by more than four of their standard errors, and is worth telling', () => {
    let told = 0;
    for (const spread of [0.3, 0.5, 0.7, 0.9, 1.2, 1.8]) {
      const deviation = new Float64Array(struts).fill(spread);
      const { chance } = sureChance(loops, play, deviation, tails(distribution), 0.95);
      const found = sampled(loops, play, deviation, distribution, samples);
      const error = Math.sqrt(Math.max(found * (1 - found), 1 / samples) / samples);
      expect(chance).toBeLessThanOrEqual(found + 4 * error);
      if (chance > 0.9) told += 1;
    }
    expect(told).toBeGreaterThan(0);
  });

  it('struts with the play of their budget close as often as is wanted', () => {
    const deviation = new Float64Array(struts).fill(0.8);
    const { needed } = sureChance(loops, play, deviation, tails(distribution), 0.9);
    expect(needed.every((v) => v > 0)).toBe(true);
    expect(sampled(loops, needed, deviation, distribution, samples)).toBeGreaterThanOrEqual(0.9);
  });

  it('falls as errors grow and rises with play', () => {
    const at = (spread: number, more: number): number =>
      sureChance(
        loops,
        play.map((p) => p * more),
        new Float64Array(struts).fill(spread),
        tails(distribution),
        0.95,
      ).chance;
    expect(at(0.6, 1)).toBeGreaterThanOrEqual(at(0.7, 1));
    expect(at(0.6, 1.2)).toBeGreaterThanOrEqual(at(0.6, 1));
    expect(at(100, 1)).toBeLessThan(0.01);
  });
});

describe('tails', () => {
  it('of a normal error are those of the tables: 5 % beyond 1.95996, 0.27 % beyond 3', () => {
    expect(tailOf('normal')(1.959964)).toBeCloseTo(0.05, 6);
    expect(tailOf('normal')(3)).toBeCloseTo(0.0026998, 6);
  });

  it('of sums of even errors are never below what samples of one, two and eight show', () => {
    const random = seededRandom(3);
    for (const count of [1, 2, 8]) {
      const sums = Array.from({ length: 20_000 }, () => {
        const unit = new Float64Array(count);
        drawUnit(unit, random, 'uniform');
        return unit.reduce((a, b) => a + b, 0) / Math.sqrt(count);
      });
      for (const t of [0.5, 1, 1.5, 2, 2.5, 3]) {
        const beyond = sums.filter((v) => Math.abs(v) > t).length / sums.length;
        expect(tailOf('uniform')(t)).toBeGreaterThanOrEqual(beyond);
      }
    }
  });
});

describe('whether two loops can close', () => {
  // S' p over the box of play is a polygon whose corners and sides are known (a zonotope in the plane): S' e must lie in it.
  const loops = row(2);
  const struts = 3 + 8;
  const play = new Float64Array(struts).fill(1);
  const dense = loops.map((l) => {
    const v = new Float64Array(struts);
    l.indices.forEach((i, p) => {
      v[i] = l.values[p]!;
    });
    return v;
  });
  /** Largest ratio of S' e to the polygon's extent, over its side normals: at most 1 inside. */
  const ratio = (e: Float64Array): number => {
    const m = loops.map((l) => miss(l, e));
    let most = 0;
    for (let i = 0; i < struts; i++) {
      const normal = [-dense[1]![i]!, dense[0]![i]!];
      const extent = dense[0]!.reduce(
        (sum, a, j) => sum + Math.abs(normal[0]! * a + normal[1]! * dense[1]![j]!) * play[j]!,
        0,
      );
      if (extent > 1e-12) most = Math.max(most, Math.abs(normal[0]! * m[0]! + normal[1]! * m[1]!) / extent);
    }
    return most;
  };

  it('agrees with that polygon, but for the last per cent before its edge', () => {
    const closes = closer(loops, play);
    const random = seededRandom(11);
    let [inside, outside] = [0, 0];
    for (let k = 0; k < 3000; k++) {
      const e = Float64Array.from({ length: struts }, () => 6 * (random() - 0.5));
      const r = ratio(e);
      const found = closes(e);
      if (r > 1.001) {
        expect(found).toBe(false);
        outside += 1;
      } else if (r < 0.9) {
        expect(found).toBe(true);
        inside += 1;
      }
    }
    expect(inside).toBeGreaterThan(300);
    expect(outside).toBeGreaterThan(50);
  });
});
