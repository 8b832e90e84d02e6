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
import { deviationOf, sureChance } from './sure-chance.js';
import { singleTailOf, tailOf } from './tails.js';

/** Samples for the spread of movements and locked-in forces: a standard deviation to 5 %. */
const SHAPES = 200;
/** Halvings of the search for the saw's tolerance, to a hundredth of what is found, each with this many samples. */
const SEARCH_STEPS = 12;
const SEARCH_SAMPLES = 200;
const FINE = 0.01;
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
  const ratios = loops.map((l, k) => deviationOf(l, deviation) / capacities[k]!);
  const tails = { single: singleTailOf(job.fit.distribution), sum: tailOf(job.fit.distribution) };
  const sure = sureChance(loops, play, deviation, tails, job.fit.chance);
  // The same draws for every tolerance, so that the chance falls with it.
  const searched = Math.min(job.fit.samples, SEARCH_SAMPLES);
  const chanceFor = (cutFactor: number): number => {
    const wider = deviationsOf(errors, cutFactor);
    const { chance } = sureChance(loops, play, wider, tails, job.fit.chance);
    // Of one loop and normal errors the bound is the chance itself.
    if (chance >= job.fit.chance || (loops.length <= 1 && job.fit.distribution === 'normal')) return chance;
    return sampleChance(wider, searched, closes, job, job.fit.chance);
  };
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
        needed_mm: sure.needed[i]!,
        sideways_mm: angle * topology.axisLength[i]!,
        aside_mm: links[i]!.aside,
      }),
    ),
    loops: loops
      .map((l, k): LoopFit => ({ struts: [...l.indices].map((i) => struts[i]!.mark), ratio: ratios[k]! }))
      .sort((a, b) => b.ratio - a.ratio),
    samples: job.fit.samples,
    chance: sampleChance(deviation, job.fit.samples, closes, job),
    chanceBound: sure.chance,
    wanted: job.fit.chance,
    cutNeeded_mm: cutNeeded(job, chanceFor),
    movedMost: shape.movedMost,
  };
}

/** Standard deviation of each strut's length where the saw errs `cutFactor` times as much. */
const deviationsOf = (errors: StrutErrors, cutFactor: number): Float64Array =>
  Float64Array.from(errors.cut, (c, i) => Math.hypot(cutFactor * c, errors.other[i]!));

/** Share of seeded samples that close; 0 as soon as it is sure to stay below `least`. */
function sampleChance(
  deviation: Float64Array,
  samples: number,
  closes: (e: Float64Array) => boolean,
  job: Job,
  least = 0,
): number {
  const random = seededRandom(job.seed);
  const unit = new Float64Array(deviation.length);
  const e = new Float64Array(deviation.length);
  let closed = 0;
  for (let s = 0; s < samples; s++) {
    drawUnit(unit, random, job.fit.distribution);
    for (let i = 0; i < e.length; i++) e[i] = unit[i]! * deviation[i]!;
    if (closes(e)) closed += 1;
    else if (closed + samples - s - 1 < least * samples) return 0;
  }
  return closed / samples;
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
  for (let step = 0; step < SEARCH_STEPS && bad - good > FINE * good; step++) {
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
