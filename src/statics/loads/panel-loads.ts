import type { FaceForm } from '../../detailing/faces.js';
import { scale, type Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { Topology } from '../../model/topology.js';
import type { CaseBuilder } from './load-case.js';
import { tributaryShares } from './tributary.js';

/** Panels on stand-offs hang at their corners; every other way of holding runs along the edges. */
export const heldAtCorners = (job: Job): boolean => job.panels.holdBy === 'stand-offs';

/**
 * Puts a force that is spread evenly over face f on what holds the face: along the struts of its edges by tributary area,
 * or on its nodes. An edge without a strut passes its share to its two nodes.
 */
export function loadFace(
  builder: CaseBuilder,
  topology: Topology,
  form: FaceForm,
  f: number,
  force: Vec3,
  corners: boolean,
): void {
  const face = topology.truss.faces[f]!;
  const nodes = face.nodes.map((mark) => topology.nodeIndex.get(mark)!);
  const n = nodes.length;
  const loop = face.nodes.map((mark) => topology.at(mark));
  if (form.normal === null || !(form.area > 0)) return;
  const shares = tributaryShares(loop, form.normal, form.area, form.convex && !form.crossesItself);
  shares.forEach(({ area, excess }, i) => {
    const own = scale(force, area / form.area);
    const [a, b] = [nodes[i]!, nodes[(i + 1) % n]!];
    const strut = corners ? undefined : topology.barsAt[a]!.find((bar) => topology.nodeIndex.get(bar.far.mark) === b);
    if (!strut) {
      builder.addNode(a, scale(own, 0.5));
      builder.addNode(b, scale(own, 0.5));
      return;
    }
    const l = topology.axisLength[strut.memberIndex]!;
    builder.addLine(strut.memberIndex, scale(own, 1 / l), scale(own, (excess * l) / 8));
  });
}

/** Whether a pressure of the job acts on a face: a panel, and of one of the named groups where any are named. */
export function pressureActs(topology: Topology, f: number, groups: readonly string[] | undefined): boolean {
  const face = topology.truss.faces[f]!;
  return face.panel && (groups === undefined || (face.group !== null && groups.includes(face.group)));
}
