import { axesOfStruts } from '../detailing/axes.js';
import { deepenSockets } from '../detailing/deepen.js';
import { type FaceForm, faceForms } from '../detailing/faces.js';
import { type DetailedHubs, detailHubs, weighHubs } from '../detailing/hubs.js';
import { detailPanels } from '../detailing/panels/detail-panels.js';
import { flatnessStop } from '../detailing/panels/patches.js';
import { sectionsOf } from '../detailing/sections.js';
import { detailStruts } from '../detailing/struts.js';
import { nodeSystem } from '../detailing/systems/index.js';
import type { Finding } from '../model/finding.js';
import type { Job } from '../model/job/index.js';
import type { Parts, StrutPart } from '../model/parts.js';
import type { Section } from '../model/section.js';
import type { Topology } from '../model/topology.js';

/** What detailing knows before any force is: sections, faces, axes. By the truss's indices. */
export interface Layout {
  readonly topology: Topology;
  readonly job: Job;
  readonly sections: readonly (Section | null)[];
  readonly forms: readonly FaceForm[];
  readonly axes: readonly StrutPart['axes'][];
  readonly findings: readonly Finding[];
}

export function layOut(topology: Topology, job: Job): Layout {
  const sections = sectionsOf(topology.truss, job);
  const faces = faceForms(topology, {
    flatnessWarn: job.fit.flatnessWarn_mm,
    flatnessStop: job.fit.flatnessStop_mm ?? null,
    panelsFrom: flatnessStop(job),
  });
  return {
    topology,
    job,
    sections: sections.sections,
    forms: faces.forms,
    axes: axesOfStruts(topology, job, faces.forms),
    findings: [...faces.findings, ...sections.findings],
  };
}

/** Hubs, not yet weighed, and the struts that end in them. */
export interface Fixings extends Pick<Parts, 'hubs' | 'struts'> {
  readonly findings: readonly Finding[];
}

/** Hubs with sockets as deep as the job's; it may differ from the layout's in the details of strut ends, which change neither sections nor axes. */
export const shallowHubs = ({ topology, sections, axes }: Layout, job: Job): DetailedHubs =>
  detailHubs(topology, job, sections, axes);

/** Hubs and struts as numbers; `depths` asks sockets to be deeper than the job's, in mm by the key of `requiredDepths`. */
export function fix(
  { topology, sections, axes }: Layout,
  shallow: DetailedHubs,
  depths: Parameters<typeof deepenSockets>[1],
  job: Job,
): Fixings {
  const hubs = deepenSockets(shallow.hubs, depths, job);
  const struts = detailStruts(topology, job, sections, axes, hubs);
  return { hubs, struts: struts.struts, findings: [...shallow.findings, ...struts.findings] };
}

/** The same with the hubs weighed and the panels between them. */
export function withPanels(
  layout: Layout,
  fixings: Fixings,
): { readonly parts: Parts; readonly findings: readonly Finding[] } {
  const { topology, job, sections, forms, axes } = layout;
  const { struts } = fixings;
  const hubs = weighHubs(topology, job, fixings.hubs);
  const panels = detailPanels({
    topology,
    job,
    forms,
    sections,
    axes,
    hubs,
    hubOutline: (hub, slab) => nodeSystem(hub.system)?.outline(hub, slab, job) ?? [],
  });
  return { parts: { struts, hubs, panels: panels.panels }, findings: [...fixings.findings, ...panels.findings] };
}
