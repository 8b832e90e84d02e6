import { largest } from '../../detailing/systems/sleeve.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { Parts, Socket } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import type { Sag, Standing } from '../../statics/analyse/standing.js';
import { standingSeries } from '../../statics/analyse/standing-series.js';
import { type ClosingEnd, closingEnd } from './closing-way.js';
import { linkRadius, strutHalf } from './fouls.js';
import { type HubRoom, hubRoom } from './hub-room.js';
import { nearLinks } from './near-links.js';

/** One strut as assembly sees it, by node index and strut index. */
export interface Link {
  readonly strut: number;
  readonly ends: readonly [number, number];
  readonly sockets: readonly [Socket | null, Socket | null];
  /** Axis length, mm. */
  readonly length: number;
  /** Travel along its axis before an end is free of a socket, mm: the shallower engagement, less the play of both ends. */
  readonly travel: number;
  /** Sideways movement of an end that its bending limit and its socket's play allow, mm. */
  readonly aside: number;
  /** Closing detail at either end, where the strut can get past the sleeves with it. */
  readonly detail: { readonly end: 0 | 1; readonly kind: 'drop-in' | 'slide' | 'clamp' } | null;
  readonly mass: number;
}

/** What the search for an order works on. */
export interface AssemblySetting {
  readonly topology: Topology;
  readonly job: Job;
  readonly parts: Parts;
  readonly links: readonly Link[];
  /** Links at each node, by node index. */
  readonly linksAt: readonly (readonly Link[])[];
  readonly hubMass: Float64Array;
  /** Largest deflection, mm, of what stands under its own weight; see `standingSeries`. */
  readonly deflection: (standing: Standing) => Sag | 'unstable' | null;
  /** The solid of a node's hub; null where none is made. */
  readonly roomAt: (node: number) => HubRoom | null;
  /** Struts that may come within a distance of a point, a superset. */
  readonly near: (at: Vec3, within: number) => readonly number[];
  /** Largest radius of a strut, mm. */
  readonly thickest: number;
}

export function assemblySetting(topology: Topology, parts: Parts, job: Job): AssemblySetting {
  const sockets = new Map(parts.hubs.flatMap((h) => h.sockets.map((s) => [`${s.strut}@${h.mark}`, s] as const)));
  const systemOf = new Map(parts.hubs.map((h) => [h.mark, h.system]));
  const hubOf = new Map(parts.hubs.map((h) => [h.mark, h]));
  const rooms: (HubRoom | null | undefined)[] = topology.truss.nodes.map(() => undefined);
  const roomAt = (node: number): HubRoom | null => {
    const known = rooms[node];
    if (known !== undefined) return known;
    const hub = hubOf.get(topology.truss.nodes[node]!.mark);
    const made = hub ? hubRoom(hub, job) : null;
    rooms[node] = made;
    return made;
  };
  const links = topology.truss.members.map((member, strut): Link => {
    const part = parts.struts[strut]!;
    const own = member.ends.map((node) => sockets.get(`${member.mark}@${node}`) ?? null) as [
      Socket | null,
      Socket | null,
    ];
    const ends = member.ends.map((node) => topology.nodeIndex.get(node)!) as [number, number];
    const length = topology.axisLength[strut]!;
    // Over the deep side of a tilted mouth.
    const over = (s: Socket | null): number => (s ? s.depth + (s.shallow ?? 0) : 0);
    const depth = Math.min(over(own[0]), over(own[1]));
    const play = (part.ends[0].float ?? 0) + (part.ends[1].float ?? 0);
    const aside = asideOf(own, length, job.assembly.springStrain);
    const closing = ([0, 1] as const).map(
      (end): ClosingEnd => ({
        kind: systemOf.get(member.ends[end]) === 'clamp' ? 'clamp' : part.ends[end].detail,
        sleeve: 0,
      }),
    ) as [ClosingEnd, ClosingEnd];
    const detailed = closing.some((c) => c.kind !== 'plain');
    const section = (own[0] ?? own[1])?.section;
    return {
      strut,
      ends,
      sockets: own,
      length,
      travel: Math.max(0, depth - play),
      aside,
      detail:
        detailed && section
          ? closingEnd(
              closing.map((c, end) => ({
                ...c,
                sleeve: roomAt(ends[end]!)?.sleeveOf(member.mark)?.half ?? 0,
              })) as unknown as [ClosingEnd, ClosingEnd],
              largest(strutHalf(section)),
              aside,
            )
          : null,
      mass: part.mass ?? 0,
    };
  });
  const linksAt: Link[][] = topology.truss.nodes.map(() => []);
  for (const link of links) for (const end of link.ends) linksAt[end]!.push(link);
  const hubMass = new Float64Array(topology.truss.nodes.length);
  for (const hub of parts.hubs) hubMass[topology.nodeIndex.get(hub.mark)!] = hub.mass ?? 0;
  return {
    topology,
    job,
    parts,
    links,
    linksAt,
    hubMass,
    deflection: standingSeries(topology, job, parts),
    roomAt,
    near: nearLinks(topology),
    thickest: links.reduce((most, l) => Math.max(most, linkRadius(l)), 0),
  };
}

/**
 * A cantilever of length L and depth D bent to the strain e at its root stands aside by 2 e L² / (3 D); a strut that is
 * loose by c in a socket of depth s tilts by c / s besides.
 */
function asideOf(sockets: Link['sockets'], length: number, strain: number): number {
  let least = Number.POSITIVE_INFINITY;
  for (const socket of sockets) {
    if (!socket) continue;
    const { shape } = socket.section;
    const depth = shape.kind === 'rectangle' ? Math.min(shape.width, shape.height) : shape.diameter;
    const bore = typeof socket.bore === 'number' ? socket.bore : Math.min(...socket.bore);
    const play = Math.max(0, bore - (socket.section.measured ?? depth));
    least = Math.min(least, (2 * strain * length ** 2) / (3 * depth) + (length * play) / socket.depth);
  }
  return Number.isFinite(least) ? least : 0;
}
