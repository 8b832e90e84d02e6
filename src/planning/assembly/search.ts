import { seededRandom } from '../../maths/random.js';
import { cross, dot, length, normalise, subtract, type Vec3 } from '../../maths/vec3.js';
import type { StrutEntry } from '../../model/assembly.js';
import { entriesOf } from './entries.js';
import type { AssemblySetting, Link } from './setting.js';
import { type StartUnit, startUnit } from './start.js';

/** One hub added to what stands. */
export interface HubMove {
  readonly node: number;
  readonly entries: readonly StrutEntry[];
  readonly links: readonly Link[];
}

export interface PieceOrder {
  readonly start: StartUnit;
  readonly moves: readonly HubMove[];
  readonly blocked: number;
  /** Nodes that nothing holds when they are added, so that they are propped. */
  readonly props: number;
}

/** Orders tried for one piece: the plain greedy one, then seeded ones; fewer for large trusses, so that time grows with size alone. */
const TRIES = 12;
const STRUTS_FOR_ALL_TRIES = 400;
/** How far a seeded try may look past the best candidate. */
const CHANCE_OF_SECOND = 0.2;

/** The best of several greedy orders for one connected piece: fewest struts blocked, then fewest props. */
export function orderPiece(setting: AssemblySetting, nodes: readonly number[], seed: number): PieceOrder {
  const start = startUnit(setting, nodes);
  const struts = nodes.reduce((sum, n) => sum + setting.linksAt[n]!.length, 0) / 2;
  const tries = Math.max(1, Math.min(TRIES, Math.floor((TRIES * STRUTS_FOR_ALL_TRIES) / Math.max(struts, 1))));
  let best = greedy(setting, start, () => 1);
  for (let t = 1; t < tries && best.blocked > 0; t++) {
    const next = greedy(setting, start, seededRandom(seed + t));
    if (next.blocked < best.blocked || (next.blocked === best.blocked && next.props < best.props)) best = next;
  }
  return best;
}

interface Candidate extends HubMove {
  readonly allowed: number;
  readonly blocked: number;
  readonly held: boolean;
}

/** Adds hubs one at a time: the one that most struts can enter at once, then fewest blocked, then held, then lowest. */
function greedy(setting: AssemblySetting, start: StartUnit, chance: () => number): PieceOrder {
  const standing = new Set(start.nodes);
  const done = new Set(start.links.map((l) => l.strut));
  const stands = (strut: number): boolean => done.has(strut);
  const candidates = new Map<number, Candidate>();
  const refresh = (node: number): void => {
    if (standing.has(node)) return;
    const links = setting.linksAt[node]!.filter((l) => standing.has(other(l, node)) && !done.has(l.strut));
    if (links.length > 0) candidates.set(node, candidate(setting, node, links, stands));
  };
  const neighbours = (node: number): number[] => setting.linksAt[node]!.map((l) => other(l, node));
  for (const node of start.nodes) for (const n of neighbours(node)) refresh(n);

  const moves: HubMove[] = [];
  let [blocked, props] = [0, 0];
  // Struts between hubs of the start unit that its loop leaves out: both ends stand already.
  for (const link of setting.links)
    if (!done.has(link.strut) && standing.has(link.ends[0]) && standing.has(link.ends[1])) {
      const entries = entriesBetweenStanding(setting, link);
      moves.push({ node: -1, entries, links: [link] });
      blocked += entries.filter((e) => e.entry === 'blocked').length;
      done.add(link.strut);
    }
  while (candidates.size > 0) {
    const [first, second] = bestTwo(candidates.values(), setting);
    const likely = second && chance() < CHANCE_OF_SECOND ? second : first!;
    // What has come to stand since it was looked at may be in its way.
    const chosen = candidate(setting, likely.node, likely.links, stands);
    moves.push(chosen);
    blocked += chosen.blocked;
    if (!chosen.held) props += 1;
    standing.add(chosen.node);
    for (const l of chosen.links) done.add(l.strut);
    candidates.delete(chosen.node);
    for (const n of neighbours(chosen.node)) refresh(n);
  }
  return { start, moves, blocked, props };
}

const other = (link: Link, node: number): number => (link.ends[0] === node ? link.ends[1] : link.ends[0]);

/** A strut between two hubs that stand can only be closed by a detail. */
function entriesBetweenStanding(setting: AssemblySetting, link: Link): readonly StrutEntry[] {
  const member = setting.topology.truss.members[link.strut]!;
  const detail = link.detail && { node: member.ends[link.detail.end], kind: link.detail.kind };
  return [{ strut: member.mark, entry: detail ? 'detail' : 'blocked', strain: null, detail }];
}

function candidate(
  setting: AssemblySetting,
  node: number,
  links: readonly Link[],
  stands: (strut: number) => boolean,
): Candidate {
  const entries = entriesOf(setting, node, links, stands);
  const blocked = entries.filter((e) => e.entry === 'blocked').length;
  return { node, entries, links, blocked, allowed: entries.length - blocked, held: isHeld(setting, node, links) };
}

/** Moment-holding sockets hold a hub by one strut; turning ones need three that do not lie in a plane. */
export function isHeld(setting: AssemblySetting, node: number, links: readonly Link[]): boolean {
  const { job, topology } = setting;
  const stiff = job.analysis.joints === 'rigid' && (job.nodes.joint === 'glued' || job.nodes.joint === 'pinned');
  if (stiff && links.length > 0) return true;
  const at = topology.truss.nodes[node]!.at;
  return spansSpace(links.map((l) => normalise(subtract(topology.truss.nodes[other(l, node)]!.at, at))));
}

/** sin of the least angle from a plane that still counts as out of it: 3 degrees, below which a triangle of struts shakes. Common practice, no source. */
const OUT_OF_PLANE = 0.05;

function spansSpace(d: readonly Vec3[]): boolean {
  for (let i = 0; i < d.length; i++)
    for (let j = i + 1; j < d.length; j++) {
      const n = cross(d[i]!, d[j]!);
      if (length(n) < OUT_OF_PLANE) continue;
      for (let k = j + 1; k < d.length; k++) if (Math.abs(dot(normalise(n), d[k]!)) > OUT_OF_PLANE) return true;
    }
  return false;
}

function bestTwo(all: Iterable<Candidate>, setting: AssemblySetting): readonly [Candidate | null, Candidate | null] {
  let [first, second]: [Candidate | null, Candidate | null] = [null, null];
  for (const c of all) {
    if (!first || isBetter(c, first, setting)) [first, second] = [c, first];
    else if (!second || isBetter(c, second, setting)) second = c;
  }
  return [first, second];
}

function isBetter(a: Candidate, b: Candidate, setting: AssemblySetting): boolean {
  const { nodes } = setting.topology.truss;
  return (
    (a.allowed - b.allowed ||
      b.blocked - a.blocked ||
      Number(a.held) - Number(b.held) ||
      nodes[b.node]!.at[2] - nodes[a.node]!.at[2] ||
      b.node - a.node) > 0
  );
}
