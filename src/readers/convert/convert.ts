import { planarCycles } from '../../maths/planar-cycles.js';
import { pointsOnSegments } from '../../maths/points-on-segments.js';
import { distance, mean, type Vec3 } from '../../maths/vec3.js';
import { markKey } from '../../model/marks.js';
import { bareLine, type RawGeometry } from '../../model/raw-geometry.js';
import type { Truss } from '../../model/truss.js';
import { groupName } from '../geometry/text-lines.js';
import { assignMarks } from './assign-marks.js';
import type { MarkMemory } from './mark-memory.js';
import { crossings, type Network, type NetworkEdge, networkOf, pairKey, splitNetwork } from './network.js';
import type { ConvertOptions } from './options.js';
import { ownMarks } from './own-marks.js';
import { type ConvertReport, emptyReport } from './report.js';

export interface Converted {
  readonly truss: Truss;
  readonly memory: MarkMemory;
  readonly report: ConvertReport;
}

/** How far, as a share of the distance, found faces may be out of plane: what coordinates of 5 digits leave. */
const FLAT = 1e-4;
/** A node that moved by less than this share of the mean strut length keeps its mark. Common practice, no source. */
const REACH = 0.25;

/**
 * Makes a truss of lines and loops: coincident ends joined, double and empty ones dropped, crossings split where asked,
 * faces found where asked, layers as groups, marks by memory and position, forces by node pair. The report counts all of it.
 */
export function convertGeometry(raw: RawGeometry, options: ConvertOptions): Converted {
  const report = emptyReport();
  for (const [name, n] of raw.leftOut) report.leftOut[groupName(name) ?? '?'] = n;
  const network = networkOf(raw, options.unit, options.up, options.merge, report);
  if (network.edges.length === 0) strutsFromLoops(network, report);
  const within = report.mergeTolerance_mm;
  if (options.split) splitNetwork(network, within, report);
  report.left.crossings = crossings(network, within).length;
  report.left.nodesOnStruts = pointsOnSegments(
    network.points,
    network.edges.map((e) => e.ends),
    within,
  ).length;
  if (options.findFaces && network.loops.length === 0) {
    const found = planarCycles(
      network.points,
      network.edges.map((e) => e.ends),
      FLAT,
    );
    network.loops = found.map((points) => ({ points, layer: null }));
    report.facesFound = found.length;
  }
  countEdgesWithoutStrut(network, report);
  return marked(network, options, report);
}

function strutsFromLoops(network: Network, report: ConvertReport): void {
  const seen = new Set<string>();
  for (const { points, layer } of network.loops)
    points.forEach((a, k) => {
      const b = points[(k + 1) % points.length]!;
      if (seen.has(pairKey(a, b))) return;
      seen.add(pairKey(a, b));
      const { ends: _, ...rest } = bareLine([0, 0, 0], [0, 0, 0], layer);
      network.edges.push({ ...rest, ends: [a, b] });
    });
  report.strutsFromFaces = network.edges.length;
}

function countEdgesWithoutStrut(network: Network, report: ConvertReport): void {
  const struts = new Set(network.edges.map((e) => pairKey(...e.ends)));
  const bare = new Set<string>();
  for (const { points } of network.loops)
    points.forEach((a, k) => {
      const key = pairKey(a, points[(k + 1) % points.length]!);
      if (!struts.has(key)) bare.add(key);
    });
  report.faceEdgesWithoutStrut = bare.size;
}

function marked(network: Network, options: ConvertOptions, report: ConvertReport): Converted {
  const { points, edges, loops } = network;
  const reach =
    REACH * (edges.length === 0 ? 0 : edges.reduce((sum, e) => sum + lengthOf(points, e), 0) / edges.length);
  const before = options.memory ?? { format: 'strutwright-marks/1', nodes: {}, struts: {}, faces: {}, withdrawn: [] };
  const own = ownMarks(
    network.names,
    edges.map((e) => e.mark),
  );
  report.marks.prefixed = own.prefixed;

  // From the ground up, then by y, then by x: neighbours get neighbouring numbers whatever order they were drawn in.
  const order = points.map((_, i) => i).sort((i, j) => byPlace(points[i]!, points[j]!, report.mergeTolerance_mm));
  const rank = new Int32Array(points.length);
  order.forEach((point, k) => {
    rank[point] = k;
  });
  const nodes = assignMarks(
    order.map((i) => ({ at: points[i]!, nodes: [], own: own.nodes[i]! })),
    before.nodes,
    before.withdrawn,
    'N',
    reach,
  );
  const nodeMark = (point: number): string => nodes.marks[rank[point]!]!;

  const sortedEdges = edges
    .map((edge, i) => ({ edge, own: own.struts[i]!, key: edge.ends.map((p) => rank[p]!).sort((a, b) => a - b) }))
    .sort((a, b) => a.key[0]! - b.key[0]! || a.key[1]! - b.key[1]!);
  const struts = assignMarks(
    sortedEdges.map(({ edge, own }) => ({
      at: mean(edge.ends.map((p) => points[p]!)),
      nodes: edge.ends.map(nodeMark).sort(),
      own,
    })),
    before.struts,
    before.withdrawn,
    'S',
    reach,
  );
  const sortedLoops = loops
    .map((loop) => ({ loop, key: loop.points.map((p) => rank[p]!).sort((a, b) => a - b) }))
    .sort((a, b) => compareLists(a.key, b.key));
  const faces = assignMarks(
    sortedLoops.map(({ loop }) => ({
      at: mean(loop.points.map((p) => points[p]!)),
      nodes: loop.points.map(nodeMark).sort(),
      own: null,
    })),
    before.faces,
    before.withdrawn,
    'P',
    reach,
  );

  const forceOf = forcesByPair(options, new Map(nameMarks(network, nodeMark)), report);
  const truss: Truss = {
    nodes: order.map((point, k) => ({ mark: nodes.marks[k]!, at: points[point]! })),
    members: sortedEdges.map(({ edge }, k) => {
      const ends = edge.ends.map(nodeMark) as [string, string];
      return {
        mark: struts.marks[k]!,
        ends,
        force: forceOf(ends) ?? edge.force,
        section: edge.section,
        area: null,
        modulus: null,
        roll: null,
        group: edge.layer,
      };
    }),
    faces: sortedLoops.map(({ loop }, k) => ({
      mark: faces.marks[k]!,
      nodes: loop.points.map(nodeMark),
      panel: options.panels,
      group: loop.layer,
    })),
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
  finishReport(truss, [nodes, struts, faces], options, report);
  return { truss, memory: memoryOf(truss, before, [nodes, struts, faces]), report };
}

const lengthOf = (points: readonly Vec3[], { ends: [a, b] }: NetworkEdge): number => distance(points[a]!, points[b]!);

function byPlace(a: Vec3, b: Vec3, within: number): number {
  // Levels are told apart by more than the merge tolerance, in whole steps so that the order has no circles.
  const step = (v: number): number => Math.round(v / Math.max(within * 10, 1e-9));
  return step(a[2]) - step(b[2]) || step(a[1]) - step(b[1]) || step(a[0]) - step(b[0]);
}

function compareLists(a: readonly number[], b: readonly number[]): number {
  for (let k = 0; k < Math.min(a.length, b.length); k++) if (a[k] !== b[k]) return a[k]! - b[k]!;
  return a.length - b.length;
}

/** The file's own names with the marks that the nodes got. */
function* nameMarks(network: Network, nodeMark: (point: number) => string): Generator<[string, string]> {
  for (const [point, name] of network.names.entries()) if (name !== null) yield [markKey(name), nodeMark(point)];
}

function forcesByPair(
  options: ConvertOptions,
  marks: ReadonlyMap<string, string>,
  report: ConvertReport,
): (ends: readonly string[]) => number | undefined {
  const key = (ends: readonly string[]): string =>
    ends
      .map((end) => markKey(marks.get(markKey(end)) ?? end))
      .sort()
      .join(' ');
  const given = new Map(options.forces.map((f) => [key(f.nodes), f.force]));
  const left = new Map(options.forces.map((f) => [key(f.nodes), `${f.nodes[0]} to ${f.nodes[1]}`]));
  report.forces.given = options.forces.length;
  report.forces.unmatched = [...left.values()];
  return (ends) => {
    const force = given.get(key(ends));
    if (left.delete(key(ends))) report.forces.unmatched = [...left.values()];
    return force;
  };
}

type Assignment = ReturnType<typeof assignMarks>;

function finishReport(
  truss: Truss,
  assigned: readonly Assignment[],
  options: ConvertOptions,
  report: ConvertReport,
): void {
  const ends = new Map(truss.nodes.map((n) => [n.mark, 0]));
  for (const m of truss.members) for (const end of m.ends) ends.set(end, ends.get(end)! + 1);
  report.nodes = truss.nodes.length;
  report.struts = truss.members.length;
  report.faces = truss.faces.length;
  report.freeEnds = [...ends].filter(([, n]) => n === 1).map(([mark]) => mark);
  report.looseNodes = [...ends].filter(([, n]) => n === 0).map(([mark]) => mark);
  report.marks.kept = assigned.reduce((sum, a) => sum + a.kept, 0);
  report.marks.new = assigned.reduce((sum, a) => sum + a.marks.length - a.kept, 0);
  report.marks.withdrawn = options.memory ? assigned.flatMap((a) => a.withdrawn) : [];
}

function memoryOf(truss: Truss, before: MarkMemory, assigned: readonly Assignment[]): MarkMemory {
  const at = new Map(truss.nodes.map((n) => [n.mark, n.at]));
  const place = (nodes: readonly string[]): { at: [number, number, number]; nodes: string[] } => ({
    at: [...mean(nodes.map((mark) => at.get(mark)!))] as [number, number, number],
    nodes: [...nodes].sort(),
  });
  return {
    format: 'strutwright-marks/1',
    nodes: Object.fromEntries(truss.nodes.map((n) => [n.mark, { at: [...n.at] as [number, number, number] }])),
    struts: Object.fromEntries(truss.members.map((m) => [m.mark, place(m.ends)])),
    faces: Object.fromEntries(truss.faces.map((f) => [f.mark, place(f.nodes)])),
    withdrawn: [...new Set([...before.withdrawn, ...assigned.flatMap((a) => a.withdrawn)])].sort(),
  };
}
