import type { Job } from '../../model/job/index.js';
import type { Joint, Parts } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import type { Frame, FrameMember, Segment, Spring } from '../frame/member.js';
import type { PinFigure } from '../pin-figure.js';
import { zoneStiffness } from './member-stiffness.js';

/** A joint that passes no moment keeps this share of the strut's own 4 E I / L, so that no freedom is left without stiffness. */
const NO_MOMENT = 1e-5;
/** End zones together may take up this share of a strut's axis at most; longer ones (which detailing has stopped) are cut. */
const LONGEST_ZONES = 0.9;

/** A joint that holds a strut's direction: one that is only seated or loose does not. */
export const holdsMoment = (joint: Joint): boolean => joint === 'glued' || joint === 'pinned';

/**
 * The truss as a space frame: printed end zones as long as the setbacks, a spring at each stop where the job gives the sockets'
 * stiffness, and a strut whose socket holds no moment turns about the node, as in a truss of pins (a pin at the stop would leave a
 * hub that nothing else holds a link between two pins). Supports hold displacements, not rotations.
 */
export function frameOf(
  topology: Topology,
  job: Job,
  parts: Parts,
  figure: PinFigure,
  stiffness: readonly Segment[],
): Frame {
  const { truss } = topology;
  const hubs = new Map(parts.hubs.map((h) => [h.mark, h]));
  const given = job.analysis.socketStiffness_Nmm_per_rad;
  const members = truss.members.map((member, e): FrameMember => {
    const length = topology.axisLength[e]!;
    const strut = stiffness[e]!;
    let zones = member.ends.map((node) => zoneStiffness(hubs.get(node), member.mark));
    const taken = zones.reduce((sum, z) => sum + (z?.length ?? 0), 0);
    if (taken > LONGEST_ZONES * length)
      zones = zones.map((z) => z && { ...z, length: (z.length * LONGEST_ZONES * length) / taken });
    const [a, b] = zones as [Segment | null, Segment | null];
    const [from, to] = [a?.length ?? 0, length - (b?.length ?? 0)];
    const springs: Spring[] = [];
    [from, to].forEach((at, end) => {
      const socket = hubs.get(member.ends[end]!)?.sockets.find((s) => s.strut === member.mark);
      const soft = (NO_MOMENT * 4 * Math.min(strut.bendingY, strut.bendingZ)) / length;
      if (socket && !holdsMoment(socket.joint)) springs.push({ at: end * length, stiffness: soft });
      else if (given !== undefined) springs.push({ at, stiffness: given });
    });
    return {
      ends: [figure.ends[2 * e]!, figure.ends[2 * e + 1]!],
      axes: parts.struts[e]!.axes,
      segments: [...(a ? [a] : []), { ...strut, length: to - from }, ...(b ? [b] : [])],
      springs,
    };
  });
  const fixed = new Uint8Array(6 * truss.nodes.length);
  truss.nodes.forEach((_, i) => {
    for (let k = 0; k < 3; k++) fixed[6 * i + k] = figure.fixed[3 * i + k]!;
    if (topology.barsAt[i]!.length === 0) fixed.fill(1, 6 * i, 6 * i + 6);
  });
  return { nodes: figure.nodes, members, fixed };
}
