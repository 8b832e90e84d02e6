import type { Finding } from '../../model/finding.js';
import type { ForceDiagram } from '../../model/force-diagram.js';
import type { DecidedBy } from './choose.js';
import type { ForceComparison } from './compare.js';
import type { Concurrency } from './plane/concurrency.js';

/** What the reciprocal figure says of a truss. */
export interface ReciprocalResult {
  /** N by member index, tension positive; null where no diagram settles them. */
  readonly forces: Float64Array | null;
  readonly diagram: ForceDiagram | null;
  readonly residuals: DiagramResiduals | null;
  readonly counts: DiagramCounts | null;
  /** What picked the diagram out of several, or scaled it; null for a diagram that the file gives. */
  readonly decidedBy: DecidedBy | null;
  /** Sources of forces held against each other. */
  readonly comparisons: readonly ForceComparison[];
  /** Of a plane truss: the tests on three struts between two rings. */
  readonly concurrency: readonly Concurrency[];
  readonly findings: readonly Finding[];
}

/** Largest of each over the whole. */
export interface DiagramResiduals {
  /** Between a strut and the normal of its polygon, rad. */
  readonly maxAngle: number;
  /** Sum of a node's area vectors, N. */
  readonly maxClosure: number;
  /** Sum of forces, load and reaction at a node, N; and over the largest force there. */
  readonly maxResidual: number;
  readonly maxRelative: number;
}

export interface DiagramCounts {
  readonly nodes: number;
  readonly edges: number;
  readonly faces: number;
  /** With the unbounded one, or its parts; of a plane truss: the regions. */
  readonly cells: number;
  /** Independent functions over the cells (of a plane truss: liftings), modulo linear ones over the whole. */
  readonly dimension: number | null;
  /** States of self-stress of the equilibrium matrix: of the free figure, or on its supports where loads act. */
  readonly selfStressStates: number | null;
  /** How many of those states the diagrams span; null where not counted. */
  readonly reached: number | null;
  /** Smallest singular value of the closure equations that was not taken as nought. */
  readonly leastSingular: number | null;
}

export const NOTHING: ReciprocalResult = {
  forces: null,
  diagram: null,
  residuals: null,
  counts: null,
  decidedBy: null,
  comparisons: [],
  concurrency: [],
  findings: [],
};
