import { leastSquares } from '../../../maths/least-squares.js';
import { multiply, multiplyTransposed } from '../../../maths/sparse/multiply.js';
import { dot, length } from '../../../maths/vec3.js';
import type { Finding } from '../../../model/finding.js';
import { finding } from '../../../model/findings/index.js';
import type { Job } from '../../../model/job/index.js';
import type { Topology } from '../../../model/topology.js';
import { GIVEN_CASE } from '../../../model/truss.js';
import { equilibriumOf, loadsOf } from '../../equilibrium.js';
import { type DiagramCounts, NOTHING, type ReciprocalResult } from '../result.js';
import { selfStressStates } from '../self-stress.js';
import { outerForces } from '../settle-diagram.js';
import { chooseLifting, combine } from './choose-lifting.js';
import { type Concurrency, concurrencyTests } from './concurrency.js';
import { foldForces, LIFTING_CUT, liftings, spread } from './lifting.js';
import { openRegions } from './open-regions.js';
import { planeDiagram } from './plane-diagram.js';
import type { PlaneFigure } from './plane-figure.js';
import { regionsOf } from './regions.js';

/**
 * A plane truss by lifting: its regions, the plane-faced surfaces over them, which stand one to one for its states of
 * self-stress, and the forces from the folds; loads and reactions in the plane open the outside (Bow's notation). For three struts
 * between two rings, the concurrency test.
 */
export function planeReciprocal(
  topology: Topology,
  job: Job,
  figure: PlaneFigure,
  given: Float64Array | null,
  analysed: Float64Array | null,
): ReciprocalResult {
  const found = regionsOf(topology, figure);
  if (!found.regions)
    return { ...NOTHING, findings: [finding('regions-not-found', 'truss', { about: { reason: found.reason } })] };
  const loads = loadsOf(topology, GIVEN_CASE);
  const across = loads.findIndex((p) => Math.abs(dot(p, figure.z)) > 1e-9 * length(p));
  if (across >= 0) {
    const reason = `the load at ${topology.truss.nodes[across].mark} acts across its plane`;
    return { ...NOTHING, findings: [finding('regions-not-found', 'truss', { about: { reason } })] };
  }
  const largestLoad = loads.reduce((most, p) => Math.max(most, length(p)), 0);
  const loaded = largestLoad > 0;
  const open = loaded ? openRegions(topology, figure, found.regions, loads) : null;
  if (open && 'inner' in open) {
    const reason = `the load or support at ${open.inner} does not lie on its rim`;
    return { ...NOTHING, findings: [finding('regions-not-found', 'truss', { about: { reason } })] };
  }
  const regions = open?.regions ?? found.regions;
  const count = regions.loops.length;
  const lifted = liftings(figure, regions, count, regions.outer, open?.rays ?? []);
  const folds = lifted.basis.map((surface) => foldForces(figure, regions, surface));
  const states = selfStressStates(topology, loaded, LIFTING_CUT);
  const nodes = new Set(Array.from(regions.edges.start));
  const counts: DiagramCounts = {
    nodes: nodes.size,
    edges: regions.edges.count / 2,
    faces: 0,
    cells: count,
    dimension: lifted.basis.length,
    selfStressStates: states,
    reached: lifted.basis.length,
    leastSingular: lifted.leastSingular,
  };
  const concurrency = loaded ? [] : concurrencyTests(topology, figure, regions, job.fit.residualWarn);
  const findings: Finding[] = [
    ...(counts.dimension === states
      ? []
      : [finding('lifting-count-differs', 'truss', { value: counts.dimension, limit: states })]),
    ...concurrency.flatMap((c) => notConcurrent(topology, c, counts.dimension === 0, given, job.fit.residualWarn)),
  ];
  const base = open ? loadedSurface(lifted, open.rays) : null;
  if (!base && folds.length === 0) {
    return { ...NOTHING, counts, concurrency, findings: [...findings, noLifting(concurrency, counts)] };
  }
  const baseForces = base && foldForces(figure, regions, base);
  const chosen = chooseLifting(topology, job, baseForces, folds, given, analysed);
  if (typeof chosen === 'string') {
    return {
      ...NOTHING,
      counts,
      concurrency,
      findings: [...findings, finding(chosen, 'truss', { value: folds.length })],
    };
  }
  const surface = combine(lifted.basis, chosen.x, 3 * count).map((v, i) => v + (base?.[i] ?? 0));
  const forces = foldForces(figure, regions, surface);
  const equilibrium = equilibriumOf(topology, forces, job.fit);
  if (loaded && equilibrium.maxResidual > job.fit.residualWarn * largestLoad) {
    const value = equilibrium.maxResidual / largestLoad;
    const missed = finding('reciprocal-misses-loads', 'truss', { value, limit: job.fit.residualWarn });
    return { ...NOTHING, counts, concurrency, findings: [...findings, missed] };
  }
  const outer = outerForces(topology, equilibrium.reactions);
  const diagram = planeDiagram(topology, figure, regions, open?.sides ?? new Map(), surface, forces, outer);
  return {
    ...NOTHING,
    forces,
    diagram,
    residuals: {
      maxAngle: diagram.struts.reduce((most, s) => Math.max(most, s.angle), 0),
      maxClosure: diagram.nodes.reduce((most, n) => Math.max(most, length(n.closure)), 0),
      maxResidual: equilibrium.maxResidual,
      maxRelative: equilibrium.maxRelative,
    },
    counts,
    decidedBy: chosen.decidedBy,
    concurrency,
    findings,
  };
}

/** The shortest surface that folds across the lines of the loads as they ask, by region; least squares where none does. */
function loadedSurface(lifted: ReturnType<typeof liftings>, rays: readonly { readonly value: number }[]): Float64Array {
  const { equations, column } = lifted;
  const right = new Float64Array(equations.rows);
  rays.forEach((ray, k) => {
    right[equations.rows - rays.length + k] = ray.value;
  });
  const { x } = leastSquares(
    {
      rows: equations.rows,
      columns: equations.columns,
      forward: (v) => multiply(equations, v),
      back: (r) => multiplyTransposed(equations, r),
    },
    right,
    0,
    20 * equations.columns + 100,
  );
  return spread(x, column);
}

/**
 * Only where it matters: the figure stands by self-stress alone and either has none, or is said to have forces in those struts.
 * An ordinary truss has three struts across many a section, and they rest.
 */
function notConcurrent(
  topology: Topology,
  c: Concurrency,
  noStress: boolean,
  given: Float64Array | null,
  share: number,
): Finding[] {
  if (c.miss <= c.limit) return [];
  const largest = given?.reduce((most, t) => Math.max(most, Math.abs(t)), 0) ?? 0;
  const carries = c.struts.some((mark) => Math.abs(given?.[topology.memberIndex.get(mark)!] ?? 0) > share * largest);
  if (given ? !carries : !noStress) return [];
  const [a, b, third] = c.struts;
  return [
    finding('radials-not-concurrent', third, { value: c.miss, limit: c.limit, about: { others: `${a} and ${b}` } }),
  ];
}

function noLifting(concurrency: readonly Concurrency[], counts: DiagramCounts): Finding {
  const missed = concurrency.find((c) => c.miss > c.limit);
  const reason = missed
    ? `${missed.struts.join(', ')} do not meet in one point`
    : counts.selfStressStates === 0
      ? 'no plane-faced surface stands over its regions, and it has no state of self-stress'
      : 'no plane-faced surface stands over its regions';
  return finding('no-reciprocal', 'truss', { value: 0, about: { reason } });
}
