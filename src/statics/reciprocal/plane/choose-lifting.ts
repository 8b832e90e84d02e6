import { leastSquares } from '../../../maths/least-squares.js';
import type { FindingCode } from '../../../model/findings/index.js';
import type { Job } from '../../../model/job/index.js';
import type { Topology } from '../../../model/topology.js';
import { type DecidedBy, wantedSigns } from '../choose.js';
import { applyTerms, type ForceTerm, residualOf, spreadTerms } from '../force-terms.js';

/** Coefficients of the liftings that were picked, with what picked them. */
export interface ChosenLifting {
  readonly x: Float64Array;
  readonly decidedBy: DecidedBy;
}

const HARD = 1000;
const PATTERN_MARGIN = 1e-3;
const PATTERN_ROUNDS = 12;

/**
 * One lifting out of base + sum x_k lifting_k, by forces (N by member, all linear in x): fixed forces first, then nearest in least squares to
 * given, analysed or patterned forces, else the least forces under loads; with one lifting and no loads, by sign and scale.
 */
export function chooseLifting(
  topology: Topology,
  job: Job,
  base: Float64Array | null,
  columns: readonly Float64Array[],
  given: Float64Array | null,
  analysed: Float64Array | null,
): ChosenLifting | FindingCode {
  const { fix, sign, largest_N: largest } = job.forces;
  const members = topology.truss.members.length;
  const one = (m: number, target: number, weight: number): ForceTerm => ({
    edges: [m],
    coefficients: [1],
    target,
    weight,
  });
  const fixed = fix.flatMap(({ strut, force_N }) => {
    const m = topology.memberIndex.get(strut);
    return m === undefined ? [] : [one(m, force_N, HARD)];
  });
  const wanted = wantedSigns(topology, job);
  const all = (forces: Float64Array): ForceTerm[] => Array.from(forces, (t, m) => one(m, t, 1));
  const size = largest ?? 1;
  let [soft, decidedBy]: [ForceTerm[], DecidedBy] = given
    ? [all(given), 'given forces']
    : analysed
      ? [all(analysed), 'analysed forces']
      : wanted.size > 0 && columns.length > 1
        ? [[...wanted].map(([m, s]) => one(m, s * size, 1)), 'pattern']
        : base || fixed.length > 0
          ? [all(new Float64Array(members)), 'loads']
          : [[], 'scale'];
  if (fixed.length > 0) decidedBy = 'fixed forces';
  else if (base) decidedBy = 'loads';
  if (columns.length === 0) return { x: new Float64Array(0), decidedBy };
  if (soft.length === 0) return byScale(columns, wanted, sign, largest);

  const start = base ?? new Float64Array(members);
  const shortest = (terms: readonly ForceTerm[], forces: Float64Array): Float64Array =>
    leastSquares(
      {
        rows: terms.length,
        columns: columns.length,
        forward: (x) => applyTerms(terms, combine(columns, x, members)),
        back: (r) => {
          const h = spreadTerms(terms, r, members);
          return Float64Array.from(columns, (c) => c.reduce((sum, t, m) => sum + t * h[m], 0));
        },
      },
      residualOf(terms, forces).map((r) => -r),
    ).x;
  const forcesAt = (x: Float64Array): Float64Array => combine(columns, x, members).map((t, m) => t + start[m]);
  // Nearest to what is wished, then by the shortest step to where the fixed forces hold exactly.
  const solve = (terms: readonly ForceTerm[]): Float64Array => {
    const x = shortest(terms, start);
    if (fixed.length === 0) return x;
    const step = shortest(fixed, forcesAt(x));
    return x.map((v, k) => v + step[k]);
  };
  let x = solve([...fixed, ...soft]);
  for (let round = 0; round < PATTERN_ROUNDS; round++) {
    const forces = forcesAt(x);
    const most = forces.reduce((a, t) => Math.max(a, Math.abs(t)), 0);
    const violated = [...wanted].filter(([m, s]) => s * forces[m] < 0);
    if (violated.length === 0) break;
    soft = [...soft, ...violated.map(([m, s]) => one(m, s * PATTERN_MARGIN * most, HARD))];
    x = solve([...fixed, ...soft]);
  }
  if (!base && fixed.length === 0) x = resized(columns, x, members, sign, largest, columns.length === 1);
  return { x, decidedBy };
}

/** sum x_k t_k */
export function combine(columns: readonly Float64Array[], x: ArrayLike<number>, members: number): Float64Array {
  const t = new Float64Array(members);
  columns.forEach((column, k) => {
    for (let m = 0; m < members; m++) t[m] += x[k] * column[m];
  });
  return t;
}

/** To the job's largest force; a single lifting also to the job's sign, which turning the surface over gives. */
function resized(
  columns: readonly Float64Array[],
  x: Float64Array,
  members: number,
  sign: 1 | -1 | undefined,
  largest: number | undefined,
  single: boolean,
): Float64Array {
  const forces = combine(columns, x, members);
  const most = forces.reduce((a, t) => Math.max(a, Math.abs(t)), 0);
  let factor = largest !== undefined && most > 0 ? largest / most : 1;
  if (single && sign !== undefined && Math.sign(strongest(forces)) !== sign) factor = -factor;
  return x.map((v) => v * factor);
}

function byScale(
  columns: readonly Float64Array[],
  wanted: ReadonlyMap<number, 1 | -1>,
  sign: 1 | -1 | undefined,
  largest: number | undefined,
): ChosenLifting | FindingCode {
  if (columns.length > 1) return 'reciprocal-undecided';
  const forces = columns[0];
  let votes = 0;
  for (const [m, s] of wanted) votes += s * Math.sign(forces[m]);
  const wish = sign !== undefined ? sign * Math.sign(strongest(forces)) : Math.sign(votes);
  if (wish === 0) return 'reciprocal-unsigned';
  if (largest === undefined) return 'reciprocal-unscaled';
  return { x: Float64Array.of((wish * largest) / Math.abs(strongest(forces))), decidedBy: 'scale' };
}

/** The first of the largest forces: nearly equal ones must not swap by round-off, for the sign hangs on it. */
function strongest(forces: Float64Array): number {
  const most = forces.reduce((a, t) => Math.max(a, Math.abs(t)), 0);
  return forces.find((t) => Math.abs(t) >= most * (1 - 1e-6)) ?? 0;
}
