import { closePairs } from '../../maths/close-pairs.js';
import { clusterPoints } from '../../maths/cluster.js';
import { type PointOnSegment, pointsOnSegments } from '../../maths/points-on-segments.js';
import { type Meeting, segmentMeetings } from '../../maths/segment-meetings.js';
import { addScaled, midpoint, subtract, type Vec3 } from '../../maths/vec3.js';
import type { RawGeometry, RawLine, UpAxis } from '../../model/raw-geometry.js';
import { LENGTH_IN_MM, type LengthUnit } from '../../model/units.js';
import type { ConvertReport } from './report.js';

/** Points, mm and z up, with edges and loops between them by index. */
export interface Network {
  points: Vec3[];
  /** Name of a point in the file; null: none. */
  names: (string | null)[];
  edges: NetworkEdge[];
  loops: { readonly points: number[]; readonly layer: string | null }[];
}

export interface NetworkEdge extends Omit<RawLine, 'ends'> {
  readonly ends: readonly [number, number];
}

/** Ends that are nearer than this share of the figure's size are one node: rounding of exported coordinates to 6 digits. */
const MERGE_SHARE = 1e-6;

/** The raw geometry in mm, z up, its coincident points joined, what has no length or stands twice dropped. */
export function networkOf(
  raw: RawGeometry,
  unit: LengthUnit,
  up: UpAxis,
  merge: number | null,
  report: ConvertReport,
): Network {
  const place = (p: Vec3): Vec3 => {
    const turned: Vec3 = up === 'y' ? [p[0], -p[2], p[1]] : p;
    return turned.map((v) => tidy(v * LENGTH_IN_MM[unit])) as unknown as Vec3;
  };
  const all: Vec3[] = [
    ...raw.points.map((p) => place(p.at)),
    ...raw.lines.flatMap((l) => l.ends.map(place)),
    ...raw.loops.flatMap((l) => l.points.map(place)),
  ];
  report.mergeTolerance_mm = merge ?? MERGE_SHARE * sizeOf(all);
  const { centres, of, farthest } = clusterPoints(all, report.mergeTolerance_mm);
  report.merged = { points: all.length - centres.length, farthest_mm: farthest };

  const names: (string | null)[] = centres.map(() => null);
  raw.points.forEach((p, i) => {
    if (names[of[i]!] !== null && p.mark !== null) report.dropped.nodesAtOnePlace++;
    names[of[i]!] ??= p.mark;
  });
  let next = raw.points.length;
  const edges = raw.lines.map(({ ends: _, ...rest }): NetworkEdge => ({ ...rest, ends: [of[next++]!, of[next++]!] }));
  const loops = raw.loops.map((loop) => ({ layer: loop.layer, points: loop.points.map(() => of[next++]!) }));
  return {
    points: centres.map((p) => p.map(tidy) as unknown as Vec3),
    names,
    edges: soundEdges(edges, report),
    loops: soundLoops(loops, report),
  };
}

/** To a millionth of a micrometre: a conversion of units leaves 569.9999999999999 otherwise. */
const tidy = (v: number): number => (Math.abs(v) < 1e9 ? Math.round(v * 1e9) / 1e9 + 0 : v);

function sizeOf(points: readonly Vec3[]): number {
  let size = 0;
  for (const k of [0, 1, 2] as const) {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const p of points) [low, high] = [Math.min(low, p[k]), Math.max(high, p[k])];
    if (high > low) size = Math.max(size, high - low);
  }
  return size;
}

export const pairKey = (a: number, b: number): string => (a < b ? `${a} ${b}` : `${b} ${a}`);

/** Edges with a length, each pair of points joined once. */
export function soundEdges(edges: readonly NetworkEdge[], report: ConvertReport): NetworkEdge[] {
  const seen = new Set<string>();
  return edges.filter(({ ends: [a, b] }) => {
    if (a === b) {
      report.dropped.strutsWithoutLength++;
      return false;
    }
    if (seen.has(pairKey(a, b))) {
      report.dropped.doubleStruts++;
      return false;
    }
    seen.add(pairKey(a, b));
    return true;
  });
}

/** Loops of at least three different points, each set of corners once. */
function soundLoops(loops: Network['loops'], report: ConvertReport): Network['loops'] {
  const seen = new Set<string>();
  const kept: Network['loops'] = [];
  for (const { points, layer } of loops) {
    const round = points.filter((p, k) => p !== points[(k + points.length - 1) % points.length]);
    const key = [...round].sort((a, b) => a - b).join(' ');
    if (round.length < 3 || new Set(round).size < round.length) report.dropped.facesWithoutArea++;
    else if (seen.has(key)) report.dropped.doubleFaces++;
    else {
      seen.add(key);
      kept.push({ points: round, layer });
    }
  }
  return kept;
}

/** Splits edges where another point lies on them and where two of them cross; a crossing becomes a point. */
export function splitNetwork(network: Network, within: number, report: ConvertReport): void {
  const ends = (): (readonly [number, number])[] => network.edges.map((e) => e.ends);
  const meetings = crossings(network, within);
  const placed = meetings.map((m) => {
    const [[a, b], [c, d]] = [network.edges[m.i]!.ends, network.edges[m.j]!.ends];
    const at = (p: number, q: number, share: number): Vec3 =>
      addScaled(network.points[p]!, subtract(network.points[q]!, network.points[p]!), share);
    return midpoint(at(a, b, m.s), at(c, d, m.t));
  });
  // Three struts that cross at one place make three pairs and one node.
  const centres = withoutKnown(clusterPoints(placed, within).centres, network.points, within);
  for (const at of centres) {
    network.points.push(at.map(tidy) as unknown as Vec3);
    network.names.push(null);
  }
  // Half a crossing's gap is on either side, so a new point lies within reach of both struts.
  const on = pointsOnSegments(network.points, ends(), within);
  const byEdge = new Map<number, PointOnSegment[]>();
  for (const p of on) byEdge.set(p.segment, [...(byEdge.get(p.segment) ?? []), p]);
  report.split = { crossings: centres.length, struts: byEdge.size };
  network.edges = soundEdges(
    network.edges.flatMap((edge, i) => {
      const stops = [edge.ends[0], ...(byEdge.get(i) ?? []).map((p) => p.point), edge.ends[1]];
      // A mark stays on the first piece: two struts cannot share it.
      return stops
        .slice(1)
        .map((to, k): NetworkEdge => ({ ...edge, mark: k === 0 ? edge.mark : null, ends: [stops[k]!, to] }));
    }),
    report,
  );
}

/** The places that are not those of a known point. */
function withoutKnown(places: readonly Vec3[], known: readonly Vec3[], within: number): readonly Vec3[] {
  const at = new Set<number>();
  for (const [i, j] of closePairs([...known, ...places], within)) if (i < known.length) at.add(j - known.length);
  return places.filter((_, i) => !at.has(i));
}

/** Crossings inside both struts. */
export function crossings(network: Network, within: number): Meeting[] {
  const inside = (share: number, edge: NetworkEdge): boolean => {
    const [a, b] = edge.ends;
    const l = Math.hypot(...subtract(network.points[b]!, network.points[a]!));
    return share * l > within && (1 - share) * l > within;
  };
  return segmentMeetings(
    network.points,
    network.edges.map((e) => e.ends),
    within,
  ).filter((m) => inside(m.s, network.edges[m.i]!) && inside(m.t, network.edges[m.j]!));
}
