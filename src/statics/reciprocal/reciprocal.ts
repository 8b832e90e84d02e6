import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import { givenForces } from '../given-forces.js';
import { compareForces, comparisonFindings, type ForceSource } from './compare.js';
import { complexOf, givenCells } from './complex.js';
import { countDiagrams } from './count-diagrams.js';
import { fileDiagram } from './file-diagram.js';
import { findDiagram } from './find-diagram.js';
import { planeFigure } from './plane/plane-figure.js';
import { planeReciprocal } from './plane/plane-reciprocal.js';
import { NOTHING, type ReciprocalResult } from './result.js';
import { traceCells } from './trace-cells.js';

/**
 * Forces of a truss from its faces and cells alone: the complex (its cells found from the faces where none are given), the
 * diagram of the truss file or one that is found, what it says of every strut and node, how it compares with the given
 * and the analysed forces (N by member index), and the findings.
 *
 * A plane truss is read by lifting. A truss in space without cells or a diagram, whose job does not ask for one, gives nothing and no findings. Where the forces
 * come from elsewhere a fault of the diagram is a warning, and that there is none is a note.
 */
export function reciprocalOf(
  topology: Topology,
  job: Job,
  analysedForces: Float64Array | null = null,
): ReciprocalResult {
  const given = givenForces(topology.truss).forces;
  const source = forceSource(topology, job);
  const result = diagramOf(topology, job, source, given, analysedForces);
  const unknown = job.forces.fix.filter(({ strut }) => !topology.memberIndex.has(strut));
  const found = [...unknown.map(({ strut }) => finding('fixed-force-unknown', strut)), ...result.findings];
  const figure: ReciprocalResult = {
    ...result,
    findings: source === 'reciprocal' ? found : found.map(softened),
  };
  const beside = given && result.forces ? [[named('given', given), named('reciprocal', result.forces)] as const] : [];
  const compared = withComparisons(topology, job, figure, beside);
  return analysedForces ? besideAnalysis(topology, job, compared, analysedForces) : compared;
}

/** The result with the given and the reciprocal forces held against those of an analysis of the same loads, N by member index. */
export function besideAnalysis(
  topology: Topology,
  job: Job,
  result: ReciprocalResult,
  analysed: Float64Array,
): ReciprocalResult {
  const given = givenForces(topology.truss).forces;
  const second = named('analysis', analysed);
  return withComparisons(topology, job, result, [
    ...(given ? [[named('given', given), second] as const] : []),
    ...(result.forces ? [[named('reciprocal', result.forces), second] as const] : []),
  ]);
}

interface NamedForces {
  readonly source: ForceSource;
  readonly forces: Float64Array;
}

const named = (source: ForceSource, forces: Float64Array): NamedForces => ({ source, forces });

function withComparisons(
  topology: Topology,
  job: Job,
  result: ReciprocalResult,
  pairs: readonly (readonly [NamedForces, NamedForces])[],
): ReciprocalResult {
  const made = pairs.map(([first, second]) => compareForces(topology, first, second));
  return {
    ...result,
    comparisons: [...result.comparisons, ...made],
    findings: [...result.findings, ...made.flatMap((c) => comparisonFindings(topology, c, job.fit.residualWarn))],
  };
}

/** Where the member forces come from: as the job says, else given, else reciprocal where there are cells, else analysis. */
export function forceSource(topology: Topology, job: Job): ForceSource {
  if (job.forces.source) return job.forces.source;
  if (givenForces(topology.truss).forces) return 'given';
  return topology.truss.cells.length > 0 || topology.truss.reciprocal ? 'reciprocal' : 'analysis';
}

function diagramOf(
  topology: Topology,
  job: Job,
  source: ForceSource,
  given: Float64Array | null,
  analysed: Float64Array | null,
): ReciprocalResult {
  const { truss } = topology;
  const figure = truss.cells.length === 0 && !truss.reciprocal ? planeFigure(topology) : null;
  if (figure) return planeReciprocal(topology, job, figure, given, analysed);
  if (source !== 'reciprocal' && !truss.reciprocal && truss.cells.length === 0) return NOTHING;
  const cells = truss.cells.length > 0 ? { list: givenCells(topology), findings: [] } : traceCells(topology);
  if (!cells.list) return { ...NOTHING, findings: cells.findings };
  const { complex, findings } = complexOf(topology, cells.list);
  const faults = [...cells.findings, ...findings];
  if (!complex) return { ...NOTHING, findings: faults };
  const result = truss.reciprocal
    ? { ...fileDiagram(topology, job, complex, truss.reciprocal, given), counts: countDiagrams(topology, complex) }
    : findDiagram(topology, job, complex, given, analysed);
  return { ...result, findings: [...faults, ...result.findings] };
}

/** Of a diagram that nothing depends on: a fault warns, a missing diagram is noted. */
function softened(f: Finding): Finding {
  if (NOTED.has(f.code)) return { ...f, level: 'note' };
  return f.level === 'stop' ? { ...f, level: 'warn' } : f;
}

const NOTED = new Set([
  'no-reciprocal',
  'reciprocal-unsigned',
  'reciprocal-unscaled',
  'reciprocal-undecided',
  'reciprocal-misses-forces',
  'reciprocal-misses-loads',
  'face-in-no-cell',
  'regions-not-found',
]);
