import { length, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { type FindingCode, finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { loadsOf } from '../equilibrium.js';
import { type ChosenDiagram, chooseDiagram, wantedSigns } from './choose.js';
import type { CellComplex } from './complex.js';
import { countSpace } from './count-diagrams.js';
import { type FunctionSpace, functionSpace, TWIST_LIMIT } from './function-space.js';
import { openOutside } from './open-cells.js';
import { quadraticForces } from './quadratic-forces.js';
import { readPolygons } from './read.js';
import { type DiagramCounts, NOTHING, type ReciprocalResult } from './result.js';
import { settleDiagram } from './settle-diagram.js';

/**
 * A force diagram for a truss that has none: the space of functions over its cells, and out of it the one that the loads, the
 * job and the known forces pick. Loads open the unbounded cell along their lines of action; where no diagram with plane faces
 * along those lines carries them, the faces between open cells may turn.
 */
export function findDiagram(
  topology: Topology,
  job: Job,
  closed: CellComplex,
  given: Float64Array | null,
  analysed: Float64Array | null,
): ReciprocalResult {
  const loads = loadsOf(topology, GIVEN_CASE);
  const largestLoad = loads.reduce((most, p) => Math.max(most, length(p)), 0);
  const loaded = largestLoad > 0;
  const open = loaded ? openOutside(topology, closed, loads) : { complex: closed, lines: new Map<number, Vec3[]>() };
  const { complex } = open;

  let space = functionSpace(topology, complex, open.lines);
  let q = quadraticForces(topology, complex, space.basis);
  const choose = (): ReturnType<typeof chooseDiagram> | null =>
    space.dimension > 0 ? chooseDiagram(topology, job, complex, q, loads, given, analysed) : null;
  let chosen = choose();
  const misses = (c: typeof chosen): boolean =>
    c === null || typeof c === 'string' || c.hardMiss > job.fit.residualWarn * largestLoad;
  if (complex.openEdges.length > 0 && misses(chosen)) {
    const free = functionSpace(topology, complex);
    const before = { space, q, chosen };
    [space, q] = [free, quadraticForces(topology, complex, free.basis)];
    chosen = choose();
    if (misses(chosen) && !misses(before.chosen)) ({ space, q, chosen } = before);
  }

  const counts = countSpace(topology, complex, space, q, loaded);
  const twisted = space.twisted.map((f) =>
    finding('face-too-twisted', topology.truss.faces[f].mark, { value: space.normals.twist[f], limit: TWIST_LIMIT }),
  );
  if (chosen === null) {
    return { ...NOTHING, counts, findings: [...twisted, noReciprocal(topology, space, counts)] };
  }
  if (typeof chosen === 'string') {
    return { ...NOTHING, counts, findings: [...twisted, undecided(chosen, space.dimension, job)] };
  }
  const gradients = q.gradients(chosen.x);
  const vertices = complex.cells.map((_, c): Vec3 => [gradients[3 * c], gradients[3 * c + 1], gradients[3 * c + 2]]);
  const reading = readPolygons(topology, complex, vertices);
  const how = { source: 'found', sign: chosen.sign, newtonPerUnit: 1 } as const;
  const settled = settleDiagram(topology, job, complex, vertices, reading, how);
  const { maxResidual } = settled.residuals;
  if (loaded && maxResidual > job.fit.residualWarn * largestLoad) {
    // Forces that do not carry the loads are of no use to anybody.
    const value = maxResidual / largestLoad;
    const missed = finding('reciprocal-misses-loads', 'truss', { value, limit: job.fit.residualWarn });
    return { ...NOTHING, counts, findings: [...twisted, missed] };
  }
  return {
    ...NOTHING,
    ...settled,
    counts,
    decidedBy: chosen.decidedBy,
    findings: [...twisted, ...settled.findings, ...missFindings(topology, job, chosen, settled.forces)],
  };
}

/** Nothing picks a diagram; or none goes any way towards what is wanted, so that it misses all of it. */
function undecided(code: FindingCode, dimension: number, job: Job): Finding {
  return code === 'reciprocal-misses-loads' || code === 'reciprocal-misses-forces'
    ? finding(code, 'truss', { value: 1, limit: job.fit.residualWarn })
    : finding(code, 'truss', { value: dimension });
}

/** Why there is none: twisted faces, no self-stress at all, or self-stress that no plane-faced function has. */
function noReciprocal(topology: Topology, space: FunctionSpace, counts: DiagramCounts): Finding {
  const { faces } = topology.truss;
  const worst = space.twisted.reduce(
    (w, f) => (space.normals.twist[f] > space.normals.twist[w] ? f : w),
    space.twisted[0],
  );
  const reason =
    space.twisted.length > 0
      ? `${space.twisted.length} of its faces are not plane, ${faces[worst].mark} most of all`
      : counts.selfStressStates === 0
        ? 'it has no state of self-stress'
        : `none of its ${counts.selfStressStates} states of self-stress comes from plane faces`;
  return finding('no-reciprocal', 'truss', {
    value: 0,
    about: { reason, selfStressStates: counts.selfStressStates ?? 0 },
  });
}

function missFindings(topology: Topology, job: Job, chosen: ChosenDiagram, forces: Float64Array): Finding[] {
  const found: Finding[] = [];
  const { residualWarn } = job.fit;
  const largest = forces.reduce((most, t) => Math.max(most, Math.abs(t)), 0);
  if (chosen.hardMiss > residualWarn * largest) {
    found.push(finding('reciprocal-misses-forces', 'truss', { value: chosen.hardMiss / largest, limit: residualWarn }));
  }
  for (const [m, sign] of wantedSigns(topology, job)) {
    if (sign * forces[m] >= -residualWarn * largest) continue;
    const member = topology.truss.members[m];
    found.push(
      finding('pattern-not-kept', member.mark, {
        value: forces[m],
        limit: 0,
        about: { wanted: sign > 0 ? 'tension' : 'compression', group: member.group ?? '' },
      }),
    );
  }
  return found;
}
