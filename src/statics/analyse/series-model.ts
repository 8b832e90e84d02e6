import { type Analysis, analyse } from '../../maths/sparse/analyse.js';
import type { SparseMatrix } from '../../maths/sparse/csc.js';
import { elementSum } from '../../maths/sparse/element-sum.js';
import type { Factor } from '../../maths/sparse/factorise.js';
import { refactoriser } from '../../maths/sparse/refactorise.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import { assembleFrame, frameSum } from '../frame/assemble.js';
import { chainStiffness, fixedEndForces } from '../frame/chain-stiffness.js';
import type { Segment } from '../frame/member.js';
import { toGlobal, vectorToGlobal } from '../frame/rotate.js';
import { DOUBTFUL_PIVOT, SINGULAR } from '../frame/solve-frame.js';
import { blockPoints, type Freedoms, numberFreedoms } from '../freedoms.js';
import { selfWeightCase } from '../loads/self-weight.js';
import { barDirections, type PinFigure } from '../pin-figure.js';
import { pinStiffness, SINGULAR_PIVOT } from '../pin-truss.js';
import { figureOf } from './figure.js';
import { frameOf } from './frame-of.js';
import { strutStiffness } from './member-stiffness.js';
import { frameLoads, pinLoads } from './response.js';

/** A truss prepared for the statics of any part of it. */
export interface SeriesModel {
  readonly freedoms: Freedoms;
  /** Node indices, two a strut. */
  readonly ends: Int32Array;
  /** Stiffness of the struts whose factor is 1. */
  readonly sum: (factors: ArrayLike<number>) => SparseMatrix;
  readonly analysis: Analysis;
  /** The factor of a stiffness on that pattern, good until the next one is asked for. */
  readonly factorise: (stiffness: SparseMatrix) => Factor;
  /** What a strut's weight does to the freedoms of its two nodes, N and N mm, 2 x perNode a strut; a hub's, N along z, by node. */
  readonly weights: Float64Array;
  readonly hubWeights: Float64Array;
  /** Least pivot as a share of its own diagonal entry; below the second the least scaled eigenvalue decides. */
  readonly singularPivot: number;
  readonly doubtfulPivot: number;
  readonly singularEigenvalue: number;
}

/** null where the stiffness of a strut is unknown. */
export function pinnedSeries(topology: Topology, job: Job, parts: Parts): SeriesModel | null {
  const stiffness = stiffnesses(topology, parts);
  if (!stiffness) return null;
  const figure = figureOf(topology);
  const freedoms = numberFreedoms(figure.fixed, 3);
  const { lengths, units } = barDirections(figure);
  const k = Float64Array.from(lengths, (l, e) => stiffness[e]!.axial / l);
  const pattern = pinStiffness(figure, freedoms, k, units);
  const elements = stiffness.map((_, e) => ({
    unknowns: Int32Array.from(
      { length: 6 },
      (_, i) => freedoms.of[3 * figure.ends[2 * e + (i < 3 ? 0 : 1)]! + (i % 3)]!,
    ),
    matrix: Float64Array.from({ length: 36 }, (_, p) => {
      const [i, j] = [Math.floor(p / 6), p % 6];
      return (i < 3 === j < 3 ? 1 : -1) * k[e]! * units[3 * e + (i % 3)]! * units[3 * e + (j % 3)]!;
    }),
  }));
  const weight = selfWeightCase(topology, job, parts, []);
  const weights = new Float64Array(6 * stiffness.length);
  for (const e of weight.lines.keys()) {
    const alone = new Map([[e, weight.lines.get(e)!]]);
    const forces = pinLoads(
      { ...weight, nodal: new Float64Array(weight.nodal.length), lines: alone },
      topology,
      figure.ends,
    );
    for (let i = 0; i < 6; i++)
      weights[6 * e + i] = forces.forces[3 * figure.ends[2 * e + (i < 3 ? 0 : 1)]! + (i % 3)]!;
  }
  return {
    freedoms,
    ends: figure.ends,
    sum: elementSum(pattern, elements),
    ...analysed(pattern, freedoms, figure),
    weights,
    hubWeights: alongZ(weight.nodal),
    singularPivot: SINGULAR_PIVOT,
    doubtfulPivot: 0,
    singularEigenvalue: 0,
  };
}

/** null where the stiffness of a strut is unknown. */
export function rigidSeries(topology: Topology, job: Job, parts: Parts): SeriesModel | null {
  const stiffness = stiffnesses(topology, parts);
  if (!stiffness) return null;
  const figure = figureOf(topology);
  const frame = frameOf(topology, job, parts, figure, stiffness);
  const freedoms = numberFreedoms(frame.fixed, 6);
  const matrices = frame.members.map((m) => toGlobal(m, chainStiffness(m)));
  const matrixOf = (e: number): Float64Array => matrices[e]!;
  const pattern = assembleFrame(frame, freedoms, matrixOf);
  const weight = selfWeightCase(topology, job, parts, []);
  const weights = new Float64Array(12 * frame.members.length);
  for (const [e, load] of frameLoads(weight, frame.members).members ?? []) {
    const held = vectorToGlobal(frame.members[e]!, fixedEndForces(frame.members[e]!, load));
    for (let i = 0; i < 12; i++) weights[12 * e + i] = -held[i]!;
  }
  return {
    freedoms,
    ends: figure.ends,
    sum: frameSum(frame, freedoms, pattern, matrixOf),
    ...analysed(pattern, freedoms, figure),
    weights,
    hubWeights: alongZ(weight.nodal),
    singularPivot: 0,
    doubtfulPivot: DOUBTFUL_PIVOT,
    singularEigenvalue: SINGULAR,
  };
}

function stiffnesses(topology: Topology, parts: Parts): readonly Segment[] | null {
  const found = topology.truss.members.map((m, e) => strutStiffness(m, parts.struts[e]!));
  return found.every((s) => s !== null) ? found : null;
}

function analysed(
  pattern: SparseMatrix,
  freedoms: Freedoms,
  figure: PinFigure,
): Pick<SeriesModel, 'analysis' | 'factorise'> {
  const points = blockPoints(freedoms, figure.nodes);
  const analysis = analyse(pattern, { blockStarts: freedoms.blockStarts, points });
  return { analysis, factorise: refactoriser(analysis) };
}

const alongZ = (nodal: Float64Array): Float64Array =>
  Float64Array.from({ length: nodal.length / 3 }, (_, n) => nodal[3 * n + 2]!);
