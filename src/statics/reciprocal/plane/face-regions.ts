import type { Topology } from '../../../model/topology.js';
import type { HalfEdges } from './half-edges.js';
import { type Regions, regionMarks } from './regions.js';

/**
 * Regions from the faces of the file, for a plane figure drawn with crossings: every strut lies between two faces, or
 * between one and the outside; neighbours run along their common strut in opposite senses. null where the faces do not make such a
 * surface.
 */
export function faceRegions(topology: Topology, edges: HalfEdges): Regions | null {
  const { faces } = topology.truss;
  const between = new Map<string, number>();
  for (let h = 0; h < edges.count; h++) between.set(`${edges.start[h]} ${edges.end[h]}`, h);
  const loops: number[][] = [];
  for (const face of faces) {
    const nodes = face.nodes.map((mark) => topology.nodeIndex.get(mark)!);
    const loop = nodes.map((node, k) => between.get(`${node} ${nodes[(k + 1) % nodes.length]}`) ?? -1);
    if (loop.includes(-1)) return null;
    loops.push(loop);
  }
  if (loops.length === 0) return null;
  const byStrut = new Map<number, number[]>();
  loops.forEach((loop, r) => {
    for (const h of loop) byStrut.set(h >> 1, [...(byStrut.get(h >> 1) ?? []), r]);
  });
  if (byStrut.size !== edges.count / 2 || [...byStrut.values()].some((list) => list.length > 2)) return null;

  const turned = new Int8Array(loops.length);
  turned[0] = 1;
  const queue = [0];
  for (let r = queue.pop(); r !== undefined; r = queue.pop()) {
    for (const h of loops[r]) {
      for (const s of byStrut.get(h >> 1)!) {
        if (s === r) continue;
        // The neighbour must hold the twin of what this one holds.
        const wanted = loops[s].includes(h) ? -turned[r] : turned[r];
        if (turned[s] === 0) {
          turned[s] = wanted;
          queue.push(s);
        } else if (turned[s] !== wanted) return null;
      }
    }
  }
  if (turned.includes(0)) return null;
  const oriented = loops.map((loop, r) => (turned[r] > 0 ? loop : [...loop].reverse().map((h) => h ^ 1)));
  const left = new Int32Array(edges.count).fill(-1);
  oriented.forEach((loop, r) => {
    for (const h of loop) left[h] = r;
  });
  const rim = outerLoop(edges, left);
  if (rim === null) return null;
  // Faces that close among themselves leave no rim: then the first is the outside.
  if (rim.length === 0)
    return { edges, left, loops: oriented, marks: regionMarks(topology, edges, oriented, 0), outer: 0 };
  for (const h of rim) left[h] = oriented.length;
  const all = [...oriented, rim];
  return { edges, left, loops: all, marks: regionMarks(topology, edges, all, oriented.length), outer: oriented.length };
}

/** The half-edges that no face has, chained into one loop; null where they make several or touch themselves. */
function outerLoop(edges: HalfEdges, left: Int32Array): number[] | null {
  const free: number[] = [];
  for (let h = 0; h < edges.count; h++) if (left[h] < 0) free.push(h);
  if (free.length === 0) return [];
  const from = new Map(free.map((h) => [edges.start[h], h]));
  if (from.size !== free.length) return null;
  const loop: number[] = [];
  let h: number | undefined = free[0];
  do {
    loop.push(h);
    h = from.get(edges.end[h]);
  } while (h !== undefined && h !== free[0] && loop.length <= free.length);
  return h === free[0] && loop.length === free.length ? loop : null;
}
