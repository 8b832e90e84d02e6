import { areaVector, fitPlane } from '../../maths/plane-fit.js';
import { cross, dot, normalise, perpendicular, scale, subtract, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import { ROUND_OFF } from '../../model/tolerance.js';
import { sizeOf, type Topology } from '../../model/topology.js';
import { OUTSIDE_CELL } from '../../model/truss.js';
import type { CellList } from './complex.js';
import { type EdgeTable, edgeTable } from './edges.js';

/**
 * The cells that a set of faces cuts space into: rotate about each edge, join the sides of faces that look at each
 * other across the wedge between them, and take what hangs together as one cell. The unbounded cell is the one whose
 * volume comes out negative. Faces with the same cell on both sides bound nothing and are left out (noted).
 *
 * This needs a figure that does not overlap itself and hangs together; otherwise `list` is null, with the reason.
 */
export function traceCells(topology: Topology): {
  readonly list: CellList | null;
  readonly findings: readonly Finding[];
} {
  const { truss } = topology;
  const table = edgeTable(topology);
  const size = sizeOf(truss);
  const normals = truss.faces.map((face) => {
    const fit = fitPlane(face.nodes.map((mark) => topology.at(mark)));
    return fit && fit.spread[1] > ROUND_OFF.coincident.value * size ? fit.normal : null;
  });
  const flat = normals.flatMap((n, f) => (n === null ? [finding('face-too-twisted', truss.faces[f].mark)] : []));
  if (flat.length > 0) return { list: null, findings: flat };

  const dangling: number[] = [];
  let active = truss.faces.map((_, f) => f);
  while (active.length > 0) {
    const joined = joinSides(topology, table, active, normals as Vec3[]);
    if (joined.overlap !== null) {
      const mark = truss.faces[joined.overlap].mark;
      return { list: null, findings: [finding('faces-overlap', mark)] };
    }
    const same = active.filter((f) => joined.cellOf(2 * f) === joined.cellOf(2 * f + 1));
    if (same.length === 0) return named(topology, table, active, dangling, joined.cellOf);
    dangling.push(...same);
    const drop = new Set(same);
    active = active.filter((f) => !drop.has(f));
  }
  return { list: null, findings: [finding('cells-not-found', 'truss', { value: 0 })] };
}

/** Sides of faces: 2 f is the side that its normal points to, 2 f + 1 the one behind. */
function joinSides(
  topology: Topology,
  table: EdgeTable,
  active: readonly number[],
  normals: readonly Vec3[],
): { readonly cellOf: (side: number) => number; readonly overlap: number | null } {
  const { nodes } = topology.truss;
  const parent = Int32Array.from({ length: 2 * normals.length }, (_, i) => i);
  const find = (i: number): number => {
    let root = i;
    while (parent[root] !== root) root = parent[root];
    while (parent[i] !== root) [i, parent[i]] = [parent[i], root];
    return root;
  };
  const around: { face: number; along: number; angle: number }[][] = Array.from(table.from, () => []);
  for (const f of active) {
    table.faceEdges[f].forEach((e, k) => {
      const axis = normalise(subtract(nodes[table.to[e]].at, nodes[table.from[e]].at));
      const x = perpendicular(axis);
      const y = cross(axis, x);
      // Into the face from its side: left of the loop's own sense.
      const into = cross(normals[f], scale(axis, table.along[f][k]));
      around[e].push({ face: f, along: table.along[f][k], angle: Math.atan2(dot(into, y), dot(into, x)) });
    });
  }
  for (const faces of around) {
    faces.sort((a, b) => a.angle - b.angle || a.face - b.face);
    for (let k = 0; k < faces.length; k++) {
      const [here, next] = [faces[k], faces[(k + 1) % faces.length]];
      const gap = k + 1 < faces.length ? next.angle - here.angle : next.angle + 2 * Math.PI - here.angle;
      if (faces.length > 1 && gap < ROUND_OFF.crossing.value) return { cellOf: find, overlap: next.face };
      // Anticlockwise of a face whose loop runs along the edge lies its front.
      const front = 2 * here.face + (here.along > 0 ? 0 : 1);
      const back = 2 * next.face + (next.along > 0 ? 1 : 0);
      const [a, b] = [find(front), find(back)];
      parent[Math.max(a, b)] = Math.min(a, b);
    }
  }
  return { cellOf: find, overlap: null };
}

function named(
  topology: Topology,
  table: EdgeTable,
  active: readonly number[],
  dangling: readonly number[],
  cellOf: (side: number) => number,
): { list: CellList | null; findings: Finding[] } {
  const { truss } = topology;
  const facesOf = new Map<number, number[]>();
  const volume = new Map<number, number>();
  const centre = truss.nodes[table.faces[active[0]][0]].at;
  for (const f of active) {
    const loop = Array.from(table.faces[f], (i) => subtract(truss.nodes[i].at, centre));
    const flux = dot(areaVector(loop), loop[0]);
    for (const [side, sense] of [
      [2 * f, -1],
      [2 * f + 1, 1],
    ] as const) {
      const cell = cellOf(side);
      facesOf.set(cell, [...(facesOf.get(cell) ?? []), f]);
      volume.set(cell, (volume.get(cell) ?? 0) + sense * flux);
    }
  }
  const found = dangling.map((f) => finding('face-in-no-cell', truss.faces[f].mark));
  const outer = [...volume].filter(([, v]) => v < 0);
  if (outer.length !== 1)
    return { list: null, findings: [...found, finding('cells-not-found', 'truss', { value: outer.length })] };
  let number = 0;
  const cells = [...facesOf].map(([cell, faces]) => ({
    mark: cell === outer[0][0] ? OUTSIDE_CELL : `C${++number}`,
    faces,
  }));
  return { list: { cells }, findings: found };
}
