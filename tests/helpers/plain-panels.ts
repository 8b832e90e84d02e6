import { axesOfStruts } from '../../src/detailing/axes.js';
import { faceForms } from '../../src/detailing/faces.js';
import { detailPanels } from '../../src/detailing/panels/detail-panels.js';
import type { HubOutline } from '../../src/detailing/panels/setting.js';
import { sectionsOf } from '../../src/detailing/sections.js';
import { dot, subtract } from '../../src/maths/vec3.js';
import type { HubPart, Point2 } from '../../src/model/parts.js';
import { topologyOf } from '../../src/model/topology.js';
import type { Truss } from '../../src/model/truss.js';
import { readJob } from '../../src/readers/job.js';

/** Panels of a truss whose hubs are plain figures about their nodes, given by the node's mark; no figure, no hub. */
export function plainPanels(truss: Truss, wish: object = {}, figure: (node: string) => readonly Point2[] = () => []) {
  const { job, faults } = readJob(
    JSON.stringify({ format: 'strutwright-job/1', title: 't', truss: 't.json', ...wish }),
    'job.json',
  );
  if (!job) throw new Error(JSON.stringify(faults));
  const topology = topologyOf(truss);
  const { forms } = faceForms(topology, { flatnessWarn: 0.5, flatnessStop: null });
  const { sections } = sectionsOf(truss, job);
  const hubOutline: HubOutline = (h, slab) => {
    const d = subtract(h.at, slab.origin);
    const [u, v] = [dot(d, slab.x), dot(d, slab.y)];
    const points = figure(h.mark);
    return points.length > 0 ? [points.map(([x, y]): Point2 => [u + x, v + y])] : [];
  };
  return detailPanels({
    topology,
    job,
    forms,
    sections,
    axes: axesOfStruts(topology, job, forms),
    hubs: truss.nodes.map((n) => ({ mark: n.mark, at: n.at }) as unknown as HubPart),
    hubOutline,
  });
}
