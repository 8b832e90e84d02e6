import type { FaceForm } from '../../detailing/faces.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import { type Topology, topologyOf } from '../../model/topology.js';
import type { Support } from '../../model/truss.js';
import type { Segment } from '../frame/member.js';
import { selfWeightCase } from '../loads/self-weight.js';
import { figureOf } from './figure.js';
import { strutStiffness } from './member-stiffness.js';
import { modelOf, respond } from './model.js';

/** What of the truss stands at some moment, by index, and the nodes that are propped or rest on the bench. */
export interface Standing {
  readonly nodes: readonly number[];
  readonly struts: readonly number[];
  readonly held: readonly number[];
}

/** Where what stands moves most under its own weight, mm, and the node by index. */
export interface Sag {
  readonly most: number;
  readonly node: number;
}

/**
 * Largest displacement in mm of what stands under its own weight (no panels), on the supports that stand and on what else is
 * held. "unstable": it can move without straining; null: a stiffness is unknown.
 */
export function standingDeflection(
  whole: Topology,
  job: Job,
  parts: Parts,
  standing: Standing,
): Sag | 'unstable' | null {
  const { truss } = whole;
  const marks = new Set(standing.nodes.map((n) => truss.nodes[n]!.mark));
  const members = standing.struts.map((s) => truss.members[s]!);
  const names = new Set(members.map((m) => m.mark));
  const props = new Set(standing.held.map((n) => truss.nodes[n]!.mark));
  const topology = topologyOf({
    ...truss,
    nodes: truss.nodes.filter((n) => marks.has(n.mark)),
    members,
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [
      ...truss.supports.filter((s) => marks.has(s.node) && !props.has(s.node)),
      ...[...props]
        .filter((n) => marks.has(n))
        .map((node): Support => ({ node, fixed: { x: true, y: true, z: true } })),
    ],
    loads: [],
  });
  const strutOf = new Map(parts.struts.map((s) => [s.mark, s]));
  const here: Parts = {
    struts: members.map((m) => strutOf.get(m.mark)!),
    hubs: parts.hubs
      .filter((h) => marks.has(h.mark))
      .map((h) => ({ ...h, sockets: h.sockets.filter((s) => names.has(s.strut)) })),
    panels: [],
  };
  const stiffness = members.map((m, e) => strutStiffness(m, here.struts[e]!));
  if (members.length === 0 || stiffness.some((s) => s === null)) return null;
  const model = modelOf(topology, job, here, figureOf(topology), stiffness as readonly Segment[], null);
  if (model.kind === 'mechanism') return 'unstable';
  const weight = selfWeightCase(topology, job, here, NO_FACES);
  const { responses } = respond(model, topology, here, [weight]);
  let [most, at] = [0, 0];
  const d = responses[0]!.displacements;
  for (let i = 0; i < d.length; i += 3) {
    const size = Math.hypot(d[i]!, d[i + 1]!, d[i + 2]!);
    if (size > most) [most, at] = [size, i / 3];
  }
  return { most, node: whole.nodeIndex.get(topology.truss.nodes[at]!.mark)! };
}

const NO_FACES: readonly FaceForm[] = [];
