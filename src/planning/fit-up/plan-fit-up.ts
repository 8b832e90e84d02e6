import { seededRandom } from '../../maths/random.js';
import type { FitUp, LoopFit, StrutFit } from '../../model/fit-up.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import { sectionProperties } from '../../model/section.js';
import type { Topology } from '../../model/topology.js';
import { figureOf } from '../../statics/analyse/figure.js';
import { ROUNDED } from '../../statics/analyse/states.js';
import { countStates } from '../../statics/state-counts.js';
import { assemblySetting } from '../assembly/setting.js';
import { settleErrors } from './elastic.js';
import { drawUnit, type StrutErrors, strutErrors } from './errors.js';
import { capacity, closer, type Loop, loopsOf } from './loops.js';

/** Samples for the spread of movements and locked-in forces: a standard deviation to 5 %. */
const SHAPES = 200;
/** Halvings of the search for the saw's tolerance: to a five-thousandth of its widest. */
const SEARCH_STEPS = 12;
/** The search goes up to this multiple of the job's tolerance of the cut. */
const WIDEST = 20;

/** How the parts' errors meet the play of the joints; null where a strut has no length or the truss no strut. */
export function planFitUp(topology: Topology, parts: Parts, job: Job): FitUp | null {
  const { struts } = parts;
  if (struts.length === 0 || struts.some((s) => s.cutLength === null || !s.material || !s.section)) return null;
  const figure = figureOf(topology);
  const loops = loopsOf(countStates(figure, ROUNDED));
  const links = assemblySetting(topology, parts, job).links;
  // The way that a closing end slides is no play: its pin takes it up.
  const play = Float64Array.from(struts, (s, i) =>
    s.ends.reduce((sum, e, k) => sum + Math.max(0, (e.float ?? 0) - (links[i]!.sockets[k]?.travel ?? 0)), 0),
  );
  const errors = strutErrors(struts, job);
  const deviation = deviationsOf(errors, 1);
  const closes = closer(loops, play);
  const capacities = loops.map((l) => Math.max(capacity(l, play), 1e-12));
  const ratiosFor = (cutFactor: number): number[] =>
    loops.map((l, k) => loopDeviation(l, deviationsOf(errors, cutFactor)) / capacities[k]!);
  const boundFor = (cutFactor: number): number => closingBound(ratiosFor(cutFactor));
  const ratios = ratiosFor(1);
  const shares = sharesOf(loops, ratios, struts.length);
  const shape = shapes(figure, parts, topology, deviation, job);
  const angle =
    ((job.fit.socketAngle_deg * Math.PI) / 180) * (job.fit.distribution === 'normal' ? 0.5 : 1 / Math.sqrt(3));

  return {
    struts: struts.map(
      (s, i): StrutFit => ({
        mark: s.mark,
        deviation_mm: deviation[i]!,
        play_mm: play[i]!,
        share: shares[i]!,
        locked_N: shape.locked[i]!,
        sideways_mm: angle * topology.axisLength[i]!,
        aside_mm: links[i]!.aside,
      }),
    ),
    loops: loops
      .map((l, k): LoopFit => ({ struts: [...l.indices].map((i) => struts[i]!.mark), ratio: ratios[k]! }))
      .sort((a, b) => b.ratio - a.ratio),
    samples: job.fit.samples,
    chance: sampleChance(errors, job.fit.samples, closes, job),
    chanceBound: closingBound(ratios),
    wanted: job.fit.chance,
    cutNeeded_mm: cutNeeded(job, boundFor),
    movedMost: shape.movedMost,
  };
}

/** Standard deviation of each strut's length where the saw errs `cutFactor` times as much. */
const deviationsOf = (errors: StrutErrors, cutFactor: number): Float64Array =>
  Float64Array.from(errors.cut, (c, i) => Math.hypot(cutFactor * c, errors.other[i]!));

/** 1 - sum of P(a loop does not close), from each loop's deviation over what its play makes up (Boole's inequality). */
const closingBound = (ratios: readonly number[]): number =>
  Math.max(0, 1 - ratios.reduce((sum, r) => sum + outside(1 / Math.max(r, 1e-12)), 0));

/** Share of seeded samples that close. */
function sampleChance(errors: StrutErrors, samples: number, closes: (e: Float64Array) => boolean, job: Job): number {
  const random = seededRandom(job.seed);
  const unit = new Float64Array(errors.cut.length);
  const e = new Float64Array(errors.cut.length);
  const deviation = deviationsOf(errors, 1);
  let closed = 0;
  for (let s = 0; s < samples; s++) {
    drawUnit(unit, random, job.fit.distribution);
    for (let i = 0; i < e.length; i++) e[i] = unit[i]! * deviation[i]!;
    if (closes(e)) closed += 1;
  }
  return closed / samples;
}

function loopDeviation(loop: Loop, deviation: Float64Array): number {
  let sum = 0;
  for (let p = 0; p < loop.indices.length; p++) sum += (loop.values[p]! * deviation[loop.indices[p]!]!) ** 2;
  return Math.sqrt(sum);
}

/** P(|normal| > x), by the complementary error function of Numerical Recipes 6.2 (from memory): relative error below 1.2e-7. */
function outside(x: number): number {
  const z = x / Math.SQRT2;
  const t = 1 / (1 + z / 2);
  const c = [
    -1.26551223, 1.00002368, 0.37409196, 0.09678418, -0.18628806, 0.27886807, -1.13520398, 1.48851587, -0.82215223,
    0.17087277,
  ];
  let power = 0;
  for (let i = c.length - 1; i >= 0; i--) power = c[i]! + t * power;
  return t * Math.exp(-z * z + power);
}

/** Two standard deviations of a strut's worst loop over that loop's play. */
function sharesOf(loops: readonly Loop[], ratios: readonly number[], struts: number): Float64Array {
  const shares = new Float64Array(struts);
  loops.forEach((l, k) => {
    for (const i of l.indices) shares[i] = Math.max(shares[i]!, 2 * ratios[k]!);
  });
  return shares;
}

/** The widest spread of the cut that still reaches the wanted chance, by halving; null: not even a perfect saw does. */
function cutNeeded(job: Job, chanceFor: (factor: number) => number): number | null {
  if (job.fit.cut_mm === 0) return chanceFor(0) >= job.fit.chance ? 0 : null;
  if (chanceFor(0) < job.fit.chance) return null;
  let [good, bad] = [0, WIDEST];
  if (chanceFor(WIDEST) >= job.fit.chance) return WIDEST * job.fit.cut_mm;
  for (let step = 0; step < SEARCH_STEPS; step++) {
    const middle = (good + bad) / 2;
    if (chanceFor(middle) >= job.fit.chance) good = middle;
    else bad = middle;
  }
  return good * job.fit.cut_mm;
}

function shapes(
  figure: ReturnType<typeof figureOf>,
  parts: Parts,
  topology: Topology,
  deviation: Float64Array,
  job: Job,
): { readonly locked: Float64Array; readonly movedMost: FitUp['movedMost'] } {
  const random = seededRandom(job.seed + 1);
  const stiffness = Float64Array.from(
    parts.struts,
    (s, i) => (s.material!.modulus * sectionProperties(s.section!.shape).area) / topology.axisLength[i]!,
  );
  const errors = Array.from({ length: SHAPES }, () => {
    const e = new Float64Array(deviation.length);
    drawUnit(e, random, job.fit.distribution);
    for (let i = 0; i < e.length; i++) e[i]! *= deviation[i]!;
    return e;
  });
  const settled = settleErrors(figure, stiffness, errors);
  const locked = new Float64Array(deviation.length);
  const moved = new Float64Array(topology.truss.nodes.length);
  for (const s of settled) {
    for (let i = 0; i < locked.length; i++) locked[i]! += s.forces[i]! ** 2 / SHAPES;
    for (let n = 0; n < moved.length; n++)
      for (let c = 0; c < 3; c++) moved[n]! += s.displacements[3 * n + c]! ** 2 / SHAPES;
  }
  let most = 0;
  for (let n = 1; n < moved.length; n++) if (moved[n]! > moved[most]!) most = n;
  return {
    locked: locked.map(Math.sqrt),
    movedMost:
      settled.length > 0 ? { node: topology.truss.nodes[most]!.mark, deviation_mm: Math.sqrt(moved[most]!) } : null,
  };
}
