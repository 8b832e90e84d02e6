import { leastSquares } from '../../maths/least-squares.js';
import { multiply, multiplyTransposed } from '../../maths/sparse/multiply.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { FindingCode } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';
import { trussMatrix } from './equilibrium-matrix.js';
import { equilibriumTerms } from './equilibrium-terms.js';
import { type DiagramFit, fitDiagram, refineDiagram } from './fit-diagram.js';
import { type ForceTerm, residualOf } from './force-terms.js';
import type { QuadraticForces } from './quadratic-forces.js';

/** What picked one diagram out of the space of functions. */
export type DecidedBy = 'fixed forces' | 'loads' | 'given forces' | 'analysed forces' | 'pattern' | 'scale';

export interface ChosenDiagram extends DiagramFit {
  readonly decidedBy: DecidedBy;
  /** Largest miss of what must hold (loads, fixed forces, edges without a strut), N. */
  readonly hardMiss: number;
}

/** Wishes that must hold weigh this much more than those that should, until they are met alone at the end. */
const HARD = 100;
/** A force wanted in tension or compression is pulled to this share of the largest on its side. */
const PATTERN_MARGIN = 1e-3;
const PATTERN_ROUNDS = 12;

/**
 * One diagram out of the space, by what the job and the truss say, strongest first: loads and fixed forces (met if they
 * can be), then nearest in least squares to given forces, to analysed forces, to a pattern of signs; or, with one free
 * parameter, by sign and scale alone. A code says what is missing where nothing picks one.
 */
export function chooseDiagram(
  topology: Topology,
  job: Job,
  complex: CellComplex,
  q: QuadraticForces,
  loads: readonly Vec3[],
  given: Float64Array | null,
  analysed: Float64Array | null,
): ChosenDiagram | FindingCode {
  const { truss } = topology;
  const { fix, sign, largest_N: largest } = job.forces;
  const edgeOf = new Map<number, number>();
  complex.member.forEach((m, e) => {
    if (m >= 0) edgeOf.set(m, e);
  });
  const one = (m: number, target: number, weight: number): ForceTerm[] => {
    const e = edgeOf.get(m);
    return e === undefined ? [] : [{ edges: [e], coefficients: [1], target, weight }];
  };
  const bare: ForceTerm[] = complex.loops.flatMap((loop, e) =>
    complex.member[e] < 0 && loop.cells.length > 0 ? [{ edges: [e], coefficients: [1], target: 0, weight: HARD }] : [],
  );
  const fixed = fix.flatMap(({ strut, force_N }) => one(topology.memberIndex.get(strut) ?? -1, force_N, HARD));
  const balance = complex.openEdges.length > 0 ? equilibriumTerms(topology, complex, loads, HARD) : [];
  const hard = [...bare, ...fixed, ...balance];
  const wanted = wantedSigns(topology, job);

  const near = (forces: Float64Array): ForceTerm[] => truss.members.flatMap((_, m) => one(m, forces[m], 1));
  let soft: ForceTerm[] = [];
  let decidedBy: DecidedBy;
  if (given) [soft, decidedBy] = [near(given), 'given forces'];
  else if (analysed) [soft, decidedBy] = [near(analysed), 'analysed forces'];
  else if (balance.length > 0) soft = near(leastForces(topology, loads));
  else if (fixed.length > 0) soft = near(new Float64Array(truss.members.length));
  else if (wanted.size > 0 && q.size > 1) {
    const size = largest ?? 1;
    [soft, decidedBy] = [[...wanted].flatMap(([m, s]) => one(m, s * size, 1)), 'pattern'];
  }
  if (fixed.length > 0) decidedBy = 'fixed forces';
  else if (balance.length > 0) decidedBy = 'loads';
  else decidedBy ??= 'scale';

  if (soft.length === 0) {
    if (q.size > 1) return 'reciprocal-undecided';
    return byScale(q, complex, wanted, sign, largest);
  }
  let fit = fitDiagram(q, [...hard, ...soft], sign);
  if (!fit && sign !== undefined) {
    // The wishes ask for the other sign throughout: the job's sign stands, the sizes come from the wishes.
    const other = fitDiagram(q, [...hard, ...soft], undefined);
    fit = other && { ...other, sign, forces: other.forces.map((t) => -t) };
  }
  if (!fit) return balance.length > 0 ? 'reciprocal-misses-loads' : 'reciprocal-misses-forces';

  let pattern: ForceTerm[] = [];
  for (let round = 0; round < PATTERN_ROUNDS && q.size > 1; round++) {
    const most = largestOf(fit.forces);
    const violated = [...wanted].filter(([m, s]) => edgeOf.has(m) && s * fit!.forces[edgeOf.get(m)!] < 0);
    if (violated.length === 0) break;
    const held = new Set(pattern.map((term) => term.edges[0]));
    pattern = [
      ...pattern,
      ...violated
        .filter(([m]) => !held.has(edgeOf.get(m)!))
        .flatMap(([m, s]) => one(m, s * PATTERN_MARGIN * most, HARD)),
    ];
    fit = refineDiagram(q, [...hard, ...pattern, ...soft], fit.sign, fit.x);
  }
  if (fixed.length + balance.length > 0) fit = refineDiagram(q, [...hard, ...pattern], fit.sign, fit.x);
  else if (largest !== undefined) fit = scaledTo(fit, largest);
  const hardMiss = residualOf(hard, fit.forces).reduce((most, r) => Math.max(most, Math.abs(r) / HARD), 0);
  return { ...fit, decidedBy, hardMiss };
}

/** Sign wanted of each strut whose group has a pattern. */
export function wantedSigns(topology: Topology, job: Job): Map<number, 1 | -1> {
  return new Map(
    topology.truss.members.flatMap((member, m) => {
      const wish = member.group === null ? undefined : job.forces.pattern[member.group];
      return wish === undefined ? [] : [[m, wish === 'tension' ? 1 : -1] as const];
    }),
  );
}

function byScale(
  q: QuadraticForces,
  complex: CellComplex,
  wanted: ReadonlyMap<number, 1 | -1>,
  sign: 1 | -1 | undefined,
  largest: number | undefined,
): ChosenDiagram | FindingCode {
  const x = Float64Array.of(1);
  const a = q.gradients(x);
  const forces = q.polarised(a, a);
  let votes = 0;
  complex.member.forEach((m, e) => {
    const wish = wanted.get(m);
    if (wish !== undefined) votes += wish * Math.sign(forces[e]);
  });
  const s = sign ?? (votes > 0 ? 1 : votes < 0 ? -1 : undefined);
  if (s === undefined) return 'reciprocal-unsigned';
  if (largest === undefined) return 'reciprocal-unscaled';
  const fit = scaledTo({ x, sign: s, forces: forces.map((t) => s * t), misfit: 0 }, largest);
  return { ...fit, decidedBy: 'scale', hardMiss: 0 };
}

function scaledTo(fit: DiagramFit, largest: number): DiagramFit {
  const most = largestOf(fit.forces);
  if (!(most > 0)) return fit;
  const factor = largest / most;
  return { ...fit, x: fit.x.map((v) => v * Math.sqrt(factor)), forces: fit.forces.map((t) => t * factor) };
}

const largestOf = (forces: Float64Array): number => forces.reduce((most, t) => Math.max(most, Math.abs(t)), 0);

/** The forces with the least sum of squares that carry the loads on the supports: where a search can start. */
function leastForces(topology: Topology, loads: readonly Vec3[]): Float64Array {
  const { matrix, freedoms } = trussMatrix(topology, true);
  const right = new Float64Array(matrix.rows);
  freedoms.of.forEach((row, f) => {
    if (row >= 0) right[row] = loads[Math.floor(f / 3)][f % 3];
  });
  return leastSquares(
    {
      rows: matrix.rows,
      columns: matrix.columns,
      forward: (t) => multiply(matrix, t),
      back: (r) => multiplyTransposed(matrix, r),
    },
    right,
  ).x;
}
