import type { FaceForm } from '../../detailing/faces.js';
import { scale, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import { CaseBuilder, type LoadCase } from './load-case.js';
import { heldAtCorners, loadFace, pressureActs } from './panel-loads.js';
import { selfWeightCase } from './self-weight.js';

/** N/mm² for one kN/m². */
const KN_PER_M2 = 1e-3;

export const SELF_STRESS = 'self-stress';

/**
 * Every load case of a job with characteristic values: self-weight, the node loads of the truss file by case, the job's own
 * cases, and the self-stress that a device puts in. A case that the truss file alone names is permanent.
 */
export function loadCases(
  topology: Topology,
  job: Job,
  parts: Parts,
  forms: readonly FaceForm[],
): { readonly cases: readonly LoadCase[]; readonly findings: readonly Finding[] } {
  const { truss } = topology;
  const findings: Finding[] = [];
  const cases: LoadCase[] = [];
  const begin = (): CaseBuilder => new CaseBuilder(truss.nodes.length, truss.members.length);
  if (job.analysis.selfWeight) cases.push(selfWeightCase(topology, job, parts, forms));

  const loadsOfFile = new Map<string, CaseBuilder>();
  for (const load of truss.loads) {
    const builder = loadsOfFile.get(load.case) ?? begin();
    builder.addNode(topology.nodeIndex.get(load.node)!, load.force);
    loadsOfFile.set(load.case, builder);
  }
  const ofJob = new Set(job.loads.cases.map((c) => c.name));
  for (const [name, builder] of loadsOfFile) if (!ofJob.has(name)) cases.push(builder.done(name, 'permanent'));

  for (const c of job.loads.cases) {
    const builder = loadsOfFile.get(c.name) ?? begin();
    for (const { node, force_N } of c.nodes) {
      const index = topology.nodeIndex.get(node);
      if (index === undefined)
        findings.push(finding('load-on-unknown', 'truss', { about: { case: c.name, mark: node } }));
      else builder.addNode(index, force_N);
    }
    if (c.pressure_kN_per_m2 !== undefined) {
      const p = c.pressure_kN_per_m2 * KN_PER_M2;
      let loaded = 0;
      truss.faces.forEach((_, f) => {
        const form = forms[f]!;
        if (!pressureActs(topology, f, c.groups) || form.normal === null) return;
        loaded++;
        const force: Vec3 =
          c.direction === 'vertical'
            ? [0, 0, -p * form.area * Math.abs(form.normal[2])]
            : scale(form.normal, -p * form.area);
        loadFace(builder, topology, form, f, force, heldAtCorners(job));
      });
      if (loaded === 0) findings.push(finding('pressure-without-panels', 'truss', { about: { case: c.name } }));
    }
    if (c.temperature_K !== undefined && c.temperature_K !== 0) {
      const lacking = new Set<string>();
      parts.struts.forEach((strut, e) => {
        const alpha = strut.material?.expansion;
        if (alpha === undefined) lacking.add(strut.material?.title ?? 'a strut without material');
        else builder.addElongation(e, alpha * c.temperature_K! * topology.axisLength[e]!);
      });
      for (const material of lacking)
        findings.push(finding('expansion-unknown', 'truss', { about: { case: c.name, material } }));
    }
    for (const { strut, longer_mm } of c.misfit) {
      const index = topology.memberIndex.get(strut);
      if (index === undefined)
        findings.push(finding('load-on-unknown', 'truss', { about: { case: c.name, mark: strut } }));
      else builder.addElongation(index, longer_mm);
    }
    cases.push(builder.done(c.name, c.kind));
  }

  const device = job.analysis.selfStress;
  if (device) {
    const index = topology.memberIndex.get(device.strut);
    if (index === undefined)
      findings.push(finding('load-on-unknown', 'truss', { about: { case: SELF_STRESS, mark: device.strut } }));
    else {
      const builder = begin();
      builder.addElongation(index, -device.by_mm);
      cases.push(builder.done(SELF_STRESS, 'misfit'));
    }
  }
  return { cases, findings };
}
