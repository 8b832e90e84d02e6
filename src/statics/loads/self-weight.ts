import type { FaceForm } from '../../detailing/faces.js';
import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import { sectionProperties } from '../../model/section.js';
import type { Topology } from '../../model/topology.js';
import { CaseBuilder, GRAVITY, type LoadCase } from './load-case.js';
import { heldAtCorners, loadFace } from './panel-loads.js';

export const SELF_WEIGHT = 'self-weight';

/**
 * Weight of struts along their axes, of hubs on their nodes, of panels on what holds them, from the parts' masses. A part whose
 * mass is unknown (a node could not be made) is weighed by its nominal size; what has neither section nor material weighs nothing here and has a finding elsewhere.
 */
export function selfWeightCase(topology: Topology, job: Job, parts: Parts, forms: readonly FaceForm[]): LoadCase {
  const { truss } = topology;
  const builder = new CaseBuilder(truss.nodes.length, truss.members.length);
  parts.struts.forEach((strut, e) => {
    const kg = strut.mass ?? nominalStrut(strut, topology.axisLength[e]!);
    if (kg > 0) builder.addLine(e, [0, 0, (-kg * GRAVITY) / topology.axisLength[e]!]);
  });
  for (const hub of parts.hubs) {
    const node = topology.nodeIndex.get(hub.mark);
    if (node !== undefined && hub.mass !== null) builder.addNode(node, [0, 0, -hub.mass * GRAVITY]);
  }
  const panels = new Map(parts.panels.map((p) => [p.face, p]));
  truss.faces.forEach((face, f) => {
    if (!face.panel) return;
    const kg = panels.get(face.mark)?.mass ?? nominalPanel(job, face.group, forms[f]!.area);
    if (kg > 0) loadFace(builder, topology, forms[f]!, f, [0, 0, -kg * GRAVITY], heldAtCorners(job));
  });
  return builder.done(SELF_WEIGHT, 'self-weight');
}

/** kg of a strut from node to node. */
function nominalStrut(strut: Parts['struts'][number], length: number): number {
  if (!strut.section || !strut.material) return 0;
  return sectionProperties(strut.section.shape).area * length * strut.material.density * 1e-9;
}

/** kg of a panel as large as its face. */
function nominalPanel(job: Job, group: string | null, area: number): number {
  const own = group === null ? undefined : job.panels.groups[group];
  const material = materialNamed(job, own?.material ?? job.panels.material);
  return material ? area * (own?.thickness_mm ?? job.panels.thickness_mm) * material.density * 1e-9 : 0;
}
