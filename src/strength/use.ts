import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import { isTested, type Material } from '../model/material.js';
import type { Parts } from '../model/parts.js';

/** Least softening point of a plastic in the sun, °C. */
const LEAST_SOFTENING = 80;

/** Plastics that the thing is made of, each once, in the order of the parts: hubs, then panels. */
function plastics(parts: Parts): readonly Material[] {
  const all = [...parts.hubs.map((h) => h.material), ...parts.panels.map((p) => p.material)];
  const isPlastic = (m: Material | null): m is Material =>
    m !== null && (m.family === 'plastic-print' || m.family === 'acrylic' || m.family === 'plastic-sheet');
  return [...new Map(all.filter(isPlastic).map((m) => [m.name, m])).values()];
}

/** What the use asks of the materials: tested connectors overhead and outdoors, plastics that stay hard and a service class outdoors. */
export function useFindings(parts: Parts, job: Job, carriesLoad: boolean): readonly Finding[] {
  const { use } = job;
  if (use !== 'outdoor' && use !== 'overhead') return [];
  const found: Finding[] = [];
  const all = plastics(parts);
  if (carriesLoad)
    for (const material of all)
      if (material.family === 'plastic-print' && !isTested(material))
        found.push(finding('connectors-untested', 'truss', { about: { material: material.title, use } }));
  if (use !== 'outdoor') return found;
  for (const material of all) {
    const about = { material: material.title };
    if (material.softening === undefined) found.push(finding('softening-unknown', 'truss', { about }));
    else if (material.softening < LEAST_SOFTENING)
      found.push(finding('softening-low', 'truss', { value: material.softening, limit: LEAST_SOFTENING, about }));
  }
  const timber = parts.struts.some((s) => s.material?.family === 'timber' || s.material?.family === 'glulam');
  if (timber && job.strength.serviceClass === undefined) found.push(finding('service-class-missing', 'truss'));
  return found;
}
