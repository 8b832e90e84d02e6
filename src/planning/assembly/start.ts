import type { AssemblySetting, Link } from './setting.js';

/** A small closed unit, whose hubs are all loose while it is pushed together. */
export interface StartUnit {
  readonly nodes: readonly number[];
  readonly links: readonly Link[];
  /** Mark of the face it is the edge of; null: a single hub. */
  readonly face: string | null;
}

/** Hubs that two people can hold while they push a closed unit together: common practice, no source. */
const MOST_HUBS = 8;

/**
 * Where to start: the flat face, of those at the wanted node (or with most supports, or lowest), that can be squeezed as a
 * closed loop; else the one node. A loop goes together while, scaled about its middle until its longest strut can enter,
 * every other strut is still held: (s - 1) L <= both engagements.
 */
export function startUnit(setting: AssemblySetting, among: readonly number[]): StartUnit {
  const { topology, job } = setting;
  const allowed = new Set(among);
  const wanted = job.assembly.start === undefined ? undefined : topology.nodeIndex.get(job.assembly.start);
  const supports = new Set(topology.truss.supports.map((s) => topology.nodeIndex.get(s.node)!));
  const height = (n: number): number => topology.truss.nodes[n]!.at[2];
  let best: { unit: StartUnit; supports: number; height: number } | null = null;
  const loops = [
    ...topology.truss.faces.map((f) => ({
      face: f.mark as string | null,
      nodes: f.nodes.map((mark) => topology.nodeIndex.get(mark)!),
    })),
    ...triangles(setting, supports.size > 0 ? [...supports] : []).map((nodes) => ({ face: null, nodes })),
  ];
  for (const { face, nodes } of loops) {
    if (nodes.length > MOST_HUBS || !nodes.every((n) => allowed.has(n))) continue;
    if (wanted !== undefined && !nodes.includes(wanted)) continue;
    const links = loopLinks(setting, nodes);
    if (!links || !canSqueeze(links)) continue;
    const held = nodes.filter((n) => supports.has(n)).length;
    const mean = nodes.reduce((sum, n) => sum + height(n), 0) / nodes.length;
    if (!best || held > best.supports || (held === best.supports && mean < best.height - 1e-9))
      best = { unit: { nodes, links, face }, supports: held, height: mean };
  }
  if (best) return best.unit;
  const lowest = [...among].sort(
    (a, b) => Number(supports.has(b)) - Number(supports.has(a)) || height(a) - height(b) || a - b,
  )[0]!;
  return { nodes: [wanted !== undefined && allowed.has(wanted) ? wanted : lowest], links: [], face: null };
}

/** Triangles of struts at the given nodes. */
function triangles(setting: AssemblySetting, at: readonly number[]): readonly (readonly number[])[] {
  const far = (l: Link, n: number): number => (l.ends[0] === n ? l.ends[1] : l.ends[0]);
  return at.flatMap((n) => {
    const round = setting.linksAt[n]!.map((l) => far(l, n));
    return round.flatMap((a, i) =>
      round.slice(i + 1).flatMap((b) => (setting.linksAt[a]!.some((l) => far(l, a) === b) ? [[n, a, b]] : [])),
    );
  });
}

/** The struts round a loop of nodes; null where one is missing. */
export function loopLinks(setting: AssemblySetting, nodes: readonly number[]): readonly Link[] | null {
  const links: Link[] = [];
  for (const [i, a] of nodes.entries()) {
    const b = nodes[(i + 1) % nodes.length]!;
    const link = setting.linksAt[a]!.find((l) => l.ends[0] === b || l.ends[1] === b);
    if (!link) return null;
    links.push(link);
  }
  return links;
}

/** (s - 1) L_i <= engagement_i with s - 1 = travel / L of the strut that goes in last, the one that asks for the least s. */
export function canSqueeze(links: readonly Link[]): boolean {
  const engagement = (l: Link): number => (l.sockets[0]?.depth ?? 0) + (l.sockets[1]?.depth ?? 0);
  const last = Math.min(...links.map((l) => l.travel / l.length));
  return links.every((l) => last * l.length <= engagement(l));
}
