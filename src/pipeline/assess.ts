import { crossingFindings } from '../detailing/crossings.js';
import type { Assessment } from '../documents/records.js';
import type { Job } from '../model/job/index.js';
import { scaleTruss } from '../model/scale-truss.js';
import { sectionProperties } from '../model/section.js';
import type { Solution } from '../model/solution.js';
import { topologyOf } from '../model/topology.js';
import type { Truss } from '../model/truss.js';
import { analyseTruss } from '../statics/analyse/analyse-truss.js';
import { equilibriumOf } from '../statics/equilibrium.js';
import { givenForces } from '../statics/given-forces.js';
import { forceSource, reciprocalOf } from '../statics/reciprocal/reciprocal.js';
import { depthFindings, requiredDepths } from '../strength/depths.js';
import { judge } from '../strength/judge.js';
import { detail, layOut } from './detail.js';
import { settle } from './settle.js';

/**
 * All that can be known without solids and plans: numbers of parts, forces, verdicts, findings.
 * `file` is the truss as read, in mm and N; the job's scale is applied here, once.
 */
export function assess(file: Truss, job: Job): Assessment {
  const truss = scaleTruss(file, job);
  const topology = topologyOf(truss);
  const layout = layOut(topology, job);
  const radii = Float64Array.from(layout.sections, (s) => (s ? sectionProperties(s.shape).circumradius : 0));

  const given = givenForces(truss);
  const reciprocal = reciprocalOf(topology, job);
  const source = forceSource(topology, job);
  const claimed = source === 'given' ? given.forces : source === 'reciprocal' ? reciprocal.forces : null;

  // Sockets are as deep as what they carry asks for, and what they carry depends on what the parts weigh: once round.
  const analyse = (made: ReturnType<typeof detail>, buckling: boolean) =>
    analyseTruss({ topology, job, parts: made.parts, forms: layout.forms, given: claimed, buckling });
  let made = detail(layout, new Map());
  const rough = analyse(made, false).solution;
  const depths = requiredDepths(truss, made.parts, { forces: claimed, solution: rough }, job);
  if (depths.size > 0) made = detail(layout, depths);
  const analysis = analyse(made, job.analysis.buckling);
  const { solution } = analysis;
  const equilibrium = claimed ? equilibriumOf(topology, claimed, job.fit) : analysis.equilibrium;
  const judgement = judge(truss, made.parts, { forces: claimed, solution }, job);

  return settle({
    job,
    topology,
    forms: layout.forms,
    parts: made.parts,
    forces: shownForces(source, claimed, solution, truss.members.length),
    equilibrium,
    solution,
    reciprocal: reciprocal.counts ? reciprocal : null,
    utilisations: judgement.utilisations,
    found: [
      // Analysis has a balance of its own; that forces are missing is no news where none were asked for.
      ...(claimed ? [] : given.findings.filter((f) => f.code !== 'forces-missing' || !analysis.equilibrium)),
      ...reciprocal.findings,
      ...(equilibrium?.findings ?? []),
      ...layout.findings,
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
    notChecked: [...(equilibrium ? [] : ['equilibrium']), ...solution.notChecked, ...judgement.notChecked],
  });
}

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
