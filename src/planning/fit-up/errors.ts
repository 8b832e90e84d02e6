import type { Random } from '../../maths/random.js';
import type { Job } from '../../model/job/index.js';
import type { StrutPart } from '../../model/parts.js';

/** Independent sources of error of each strut's length between its nodes, standard deviations in mm. */
export interface StrutErrors {
  readonly cut: Float64Array;
  /** Hub shrinkage of each end and moisture together. */
  readonly other: Float64Array;
}

/** A tolerance of the job is two standard deviations of a normal error, or the half width of an even one. */
const NORMAL_SHARE = 1 / 2;
const UNIFORM_SHARE = 1 / Math.sqrt(3);

/** Standard deviations from the job's tolerances: the saw; each hub's shrinkage over its setback; moisture along the grain. */
export function strutErrors(struts: readonly StrutPart[], job: Job): StrutErrors {
  const share = job.fit.distribution === 'normal' ? NORMAL_SHARE : UNIFORM_SHARE;
  return {
    cut: Float64Array.from(struts, () => job.fit.cut_mm * share),
    other: Float64Array.from(struts, (s) => {
      const hubs = s.ends.map((e) => (e.setback ?? 0) * job.fit.hubShrinkage * share);
      return Math.hypot(...hubs, (s.cutLength ?? 0) * job.fit.moisture * share);
    }),
  };
}

/** Two independent standard normal numbers (Box and Muller, Ann. Math. Stat. 29 (1958) 610-611). */
export function normalPair(random: Random): readonly [number, number] {
  const radius = Math.sqrt(-2 * Math.log(1 - random()));
  const turn = 2 * Math.PI * random();
  return [radius * Math.cos(turn), radius * Math.sin(turn)];
}

/** One error of unit standard deviation a strut into `out`. */
export function drawUnit(out: Float64Array, random: Random, distribution: Job['fit']['distribution']): void {
  if (distribution === 'uniform') {
    for (let i = 0; i < out.length; i++) out[i] = (2 * random() - 1) * Math.sqrt(3);
    return;
  }
  for (let i = 0; i < out.length; i += 2) {
    const [a, b] = normalPair(random);
    out[i] = a;
    if (i + 1 < out.length) out[i + 1] = b;
  }
}
