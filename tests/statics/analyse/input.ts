import { axesOfStruts } from '../../../src/detailing/axes.js';
import { faceForms } from '../../../src/detailing/faces.js';
import { detailHubs, weighHubs } from '../../../src/detailing/hubs.js';
import { sectionsOf } from '../../../src/detailing/sections.js';
import { detailStruts } from '../../../src/detailing/struts.js';
import { defaultJob, type Job } from '../../../src/model/job/index.js';
import { topologyOf } from '../../../src/model/topology.js';
import type { Truss } from '../../../src/model/truss.js';
import type { AnalysisInput } from '../../../src/statics/analyse/analyse-truss.js';

/** A job with parts of its sections replaced. */
export function jobWith(change: { [K in keyof Job]?: Partial<Job[K]> | Job[K] }): Job {
  const base = defaultJob('Test');
  const out: Record<string, unknown> = { ...base };
  for (const [key, value] of Object.entries(change)) {
    const old = (base as Record<string, unknown>)[key];
    out[key] =
      typeof value === 'object' && !Array.isArray(value) && typeof old === 'object'
        ? { ...(old as object), ...value }
        : value;
  }
  return out as Job;
}

/** The truss detailed as the pipeline does it, without panels' outlines. */
export function inputOf(truss: Truss, job: Job, given: Float64Array | null = null): AnalysisInput {
  const topology = topologyOf(truss);
  const { sections } = sectionsOf(truss, job);
  const { forms } = faceForms(topology, { flatnessWarn: 1, flatnessStop: null });
  const axes = axesOfStruts(topology, job, forms);
  const hubs = weighHubs(topology, job, detailHubs(topology, job, sections, axes).hubs);
  const { struts } = detailStruts(topology, job, sections, axes, hubs);
  return { topology, job, parts: { struts, hubs, panels: [] }, forms, given };
}
