import { crossingFindings } from '../detailing/crossings.js';
import { nameFindings } from '../detailing/names.js';
import { packChecks } from '../documents/pack-checks.js';
import type { Assessment } from '../documents/records.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import { scaleTruss } from '../model/scale-truss.js';
import { sectionProperties } from '../model/section.js';
import type { Solution } from '../model/solution.js';
import { topologyOf } from '../model/topology.js';
import { GIVEN_CASE, type Truss } from '../model/truss.js';
import { analyseTruss } from '../statics/analyse/analyse-truss.js';
import { equilibriumOf } from '../statics/equilibrium.js';
import { givenForces } from '../statics/given-forces.js';
import { besideAnalysis, forceSource, reciprocalOf } from '../statics/reciprocal/reciprocal.js';
import { depthFindings, requiredDepths } from '../strength/depths.js';
import { judge } from '../strength/judge.js';
import { statedHolds } from '../strength/panel-holds.js';
import { rulesOf } from '../strength/rules.js';
import { giveClosingDetails } from './closing.js';
import { type Fixings, fix, layOut, shallowHubs, withPanels } from './detail.js';
import { settle } from './settle.js';

/**
 * All that can be known without solids and plans: numbers of parts, forces, verdicts, findings.
 * `file` is the truss as read, in mm and N; the job's scale is applied here, once.
 */
export function assess(file: Truss, asked: Job): Assessment {
  const truss = scaleTruss(file, asked);
  const topology = topologyOf(truss);
  const layout = layOut(topology, asked);
  const radii = Float64Array.from(layout.sections, (s) => (s ? sectionProperties(s.shape).circumradius : 0));

  const given = givenForces(truss);
  let reciprocal = reciprocalOf(topology, asked);
  const wanted = forceSource(topology, asked);
  // Without a diagram the analysis takes over.
  const source = wanted === 'reciprocal' && !reciprocal.forces ? 'analysis' : wanted;
  let claimed = source === 'given' ? given.forces : source === 'reciprocal' ? reciprocal.forces : null;

  const analyse = (job: Job, parts: Parts, buckling: boolean) =>
    analyseTruss({ topology, job, parts, forms: layout.forms, given: claimed, buckling });
  // Sockets are as deep as what they carry asks for, and what they carry depends on what the parts weigh: once round, from the ends
  // that the job gives. Panels matter to that by their weight alone, so a truss without supports goes round without them.
  const hubs = shallowHubs(layout, asked);
  const shallow = fix(layout, hubs, NO_DEPTHS, asked);
  const weighed = truss.supports.length > 0 ? withPanels(layout, shallow) : null;
  const rough = analyse(asked, weighed?.parts ?? { ...shallow, panels: [] }, false).solution;
  const underGiven = analysedForces(rough);
  if (source === 'reciprocal' && !given.forces && underGiven && (reciprocal.counts?.dimension ?? 0) > 1) {
    // Several diagrams carry the loads: the one nearest to the analysed forces.
    reciprocal = reciprocalOf(topology, asked, underGiven);
    claimed = reciprocal.forces;
  } else if (underGiven) reciprocal = besideAnalysis(topology, asked, reciprocal, underGiven);
  const deepened = (job: Job): Deepened => {
    const own = job === asked ? hubs : shallowHubs(layout, job);
    const plain = job === asked ? shallow : fix(layout, own, NO_DEPTHS, job);
    const depths = requiredDepths(truss, { ...plain, panels: [] }, { forces: claimed, solution: rough }, job);
    return { job, depths, fixings: depths.size > 0 ? fix(layout, own, depths, job) : plain };
  };
  const { job, depths, fixings } = giveClosingDetails(topology, deepened(asked), deepened);
  const made = weighed && fixings === shallow ? weighed : withPanels({ ...layout, job }, fixings);
  const analysis = analyse(job, made.parts, job.analysis.buckling);
  const { solution } = analysis;
  const equilibrium = claimed ? equilibriumOf(topology, claimed, job.fit) : analysis.equilibrium;
  const judgement = judge(truss, made.parts, { forces: claimed, solution }, job);

  return settle({
    job,
    topology,
    forms: layout.forms,
    parts: { ...made.parts, panels: statedHolds(truss, made.parts.panels, job, rulesOf(job)) },
    forces: shownForces(source, claimed, solution, truss.members.length),
    equilibrium,
    solution,
    reciprocal: reciprocal.counts || reciprocal.comparisons.length > 0 ? reciprocal : null,
    utilisations: judgement.utilisations,
    found: [
      // Analysis has a balance of its own; that forces are missing is no news where none were asked for.
      ...(claimed ? [] : given.findings.filter((f) => f.code !== 'forces-missing' || !analysis.equilibrium)),
      ...reciprocal.findings,
      ...(equilibrium?.findings ?? []),
      ...layout.findings,
      ...nameFindings(truss, job),
      ...crossingFindings(topology, radii),
      ...made.findings,
      ...analysis.findings,
      ...depthFindings(depths, job),
      ...judgement.findings,
    ],
    checked: [
      ...(equilibrium ? ['equilibrium'] : []),
      ...(reciprocal.diagram ? ['reciprocal'] : []),
      'flatness',
      'lengths',
      ...solution.checked,
      ...judgement.checked,
    ],
    notChecked: [
      ...(equilibrium ? [] : ['equilibrium']),
      ...solution.notChecked,
      ...judgement.notChecked,
      ...packChecks(made.parts),
    ],
  });
}

/** Hubs and struts of a job with the depths that its sockets need. */
interface Deepened {
  readonly job: Job;
  readonly depths: ReadonlyMap<string, number>;
  readonly fixings: Fixings;
}

const NO_DEPTHS: ReadonlyMap<string, number> = new Map();

/** Forces of the analysis under the loads that given forces claim to balance; null without such loads. */
const analysedForces = (solution: Solution): Float64Array | null =>
  solution.cases.find((c) => c.name === GIVEN_CASE && c.kind !== 'given')?.forces ?? null;

/** The member forces that papers show: of the job's source; from analysis the largest of all combinations, by member. */
function shownForces(
  source: ReturnType<typeof forceSource>,
  claimed: Float64Array | null,
  solution: Solution,
  members: number,
): Assessment['forces'] {
  if (source !== 'analysis') return claimed && { source, values: claimed };
  if (solution.combinations.length === 0) return null;
  const values = new Float64Array(members);
  solution.actions.forEach((actions, m) => {
    for (const { axial } of actions) if (Math.abs(axial) > Math.abs(values[m]!)) values[m] = axial;
  });
  return { source, values };
}
