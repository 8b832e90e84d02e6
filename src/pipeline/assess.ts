import { axesOfStruts } from '../detailing/axes.js';
import { crossingFindings } from '../detailing/crossings.js';
import { deepenSockets } from '../detailing/deepen.js';
import { faceForms } from '../detailing/faces.js';
import { detailHubs } from '../detailing/hubs.js';
import { detailPanels } from '../detailing/panels/detail-panels.js';
import { sectionsOf } from '../detailing/sections.js';
import { detailStruts } from '../detailing/struts.js';
import { nodeSystem } from '../detailing/systems/index.js';
import type { Assessment } from '../documents/records.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import { scaleTruss } from '../model/scale-truss.js';
import { sectionProperties } from '../model/section.js';
import { topologyOf } from '../model/topology.js';
import type { Truss } from '../model/truss.js';
import { equilibriumOf } from '../statics/equilibrium.js';
import { givenForces } from '../statics/given-forces.js';
import { forceSource, reciprocalOf } from '../statics/reciprocal/reciprocal.js';
import { depthFindings, requiredDepths } from '../strength/depths.js';
import { judge } from '../strength/judge.js';
import { settle } from './settle.js';

/**
 * All that can be known without solids and plans: numbers of parts, forces, verdicts, findings.
 * `file` is the truss as read, in mm and N; the job's scale is applied here, once.
 */
export function assess(file: Truss, job: Job): Assessment {
  const truss = scaleTruss(file, job);
  const topology = topologyOf(truss);

  const { sections, findings: sectionFindings } = sectionsOf(truss, job);
  const radii = Float64Array.from(sections, (s) => (s ? sectionProperties(s.shape).circumradius : 0));
  const faces = faceForms(topology, {
    flatnessWarn: job.fit.flatnessWarn_mm,
    flatnessStop: job.fit.flatnessStop_mm ?? null,
  });
  const axes = axesOfStruts(topology, job, faces.forms);
  const given = givenForces(truss);
  const reciprocal = reciprocalOf(topology, job);
  const forces = forcesFrom(forceSource(topology, job), given.forces, reciprocal.forces);
  const equilibrium = forces && equilibriumOf(topology, forces.values, job.fit);

  const shallow = detailHubs(topology, job, sections, axes);
  const rough = detailStruts(topology, job, sections, axes, shallow.hubs);
  const solution = null;
  const loading = { forces: forces?.values ?? null, solution };
  const depths = requiredDepths(truss, { struts: rough.struts, hubs: shallow.hubs, panels: [] }, loading, job);
  const hubs = deepenSockets(shallow.hubs, depths, job);
  const struts = depths.size > 0 ? detailStruts(topology, job, sections, axes, hubs) : rough;
  const panels = detailPanels({
    topology,
    job,
    forms: faces.forms,
    sections,
    axes,
    hubs,
    hubOutline: (hub, slab) => nodeSystem(hub.system)?.outline(hub, slab, job) ?? [],
  });
  const parts: Parts = { struts: struts.struts, hubs, panels: panels.panels };
  const judgement = judge(truss, parts, loading, job);

  return settle({
    job,
    topology,
    forms: faces.forms,
    parts,
    forces,
    equilibrium,
    solution,
    reciprocal: reciprocal.counts ? reciprocal : null,
    utilisations: judgement.utilisations,
    found: [
      ...(forces ? [] : given.findings),
      ...reciprocal.findings,
      ...(equilibrium?.findings ?? []),
      ...faces.findings,
      ...crossingFindings(topology, radii),
      ...sectionFindings,
      ...shallow.findings,
      ...struts.findings,
      ...panels.findings,
      ...depthFindings(depths, job),
      ...judgement.findings,
    ],
    checked: [
      ...(equilibrium ? ['equilibrium'] : []),
      ...(reciprocal.diagram ? ['reciprocal'] : []),
      'flatness',
      'lengths',
      ...judgement.checked,
    ],
    notChecked: [...(equilibrium ? [] : ['equilibrium']), ...judgement.notChecked, 'stability'],
  });
}

/** The member forces of the source that the job names. */
function forcesFrom(
  source: ReturnType<typeof forceSource>,
  given: Float64Array | null,
  reciprocal: Float64Array | null,
): Assessment['forces'] {
  if (source === 'given' && given) return { source, values: given };
  if (source === 'reciprocal' && reciprocal) return { source, values: reciprocal };
  return null;
}
