import { addScaled, dot, length, normalise, scale, subtract, type Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { OUTSIDE_CELL } from '../../model/truss.js';
import type { CellComplex, ComplexCell } from './complex.js';

/** A line of action this near to a strut's direction (sine) says nothing of the cells round that strut. */
const ALONG = 1e-9;

/** A complex whose unbounded cell is cut open along the lines of action of loads and reactions. */
export interface OpenComplex {
  readonly complex: CellComplex;
  /** By open edge: directions that the jump between its two open cells must be square to, unit vectors square to the edge. */
  readonly lines: ReadonlyMap<number, readonly Vec3[]>;
}

/**
 * External loads and reactions as cells open to the outside: the unbounded cell falls into one region of the hull for
 * every part that the edges between loaded or supported nodes cut off (Bow's notation in space). The face between two open
 * cells would hold the edge and the lines of action at its two ends; a support that is held in every direction leaves its line free.
 * A complex without such edges, or one that the file gives with open cells, comes back as it was.
 */
export function openOutside(topology: Topology, complex: CellComplex, loads: readonly Vec3[]): OpenComplex {
  const action = actions(topology, loads);
  if (complex.openEdges.length > 0) {
    return {
      complex,
      lines: new Map(complex.openEdges.map((e) => [e, linesAt(topology, complex, e, action)] as const)),
    };
  }
  const hull = complex.used.filter(
    (f) => complex.cells[complex.plus[f]].outer || complex.cells[complex.minus[f]].outer,
  );
  const outer = complex.cells.findIndex((c) => c.outer);
  const region = regionsOf(complex, hull, outer, action);
  const cut = complex.loops.flatMap((loop, e) => {
    if (!action[complex.from[e]] || !action[complex.to[e]]) return [];
    const k = loop.cells.indexOf(outer);
    if (k < 0) return [];
    const [before, after] = [loop.faces[(k + loop.cells.length - 1) % loop.cells.length], loop.faces[k]];
    return region.get(before) !== region.get(after) ? [{ e, k, before, after }] : [];
  });
  if (cut.length === 0) return { complex, lines: new Map() };

  const parts = [...new Set(region.values())];
  const cells: ComplexCell[] = [
    ...complex.cells.filter((_, c) => c !== outer),
    ...parts.map((part) => {
      const faces = hull.filter((f) => region.get(f) === part);
      return { mark: `${OUTSIDE_CELL} ${topology.truss.faces[faces[0]].mark}`, faces, outer: true };
    }),
  ];
  const firstOpen = complex.cells.length - 1;
  const renumber = (c: number, face: number): number => {
    if (c === outer) return firstOpen + parts.indexOf(region.get(face)!);
    return c < outer ? c : c - 1;
  };
  const plus = complex.plus.map((c, f) => (c < 0 ? c : renumber(c, f)));
  const minus = complex.minus.map((c, f) => (c < 0 ? c : renumber(c, f)));
  const cuts = new Map(cut.map((one) => [one.e, one]));
  const loops = complex.loops.map((loop, e) => {
    const one = cuts.get(e);
    const cellsHere: number[] = [];
    const facesHere: number[] = [];
    loop.cells.forEach((c, k) => {
      const before = loop.faces[(k + loop.cells.length - 1) % loop.cells.length];
      cellsHere.push(renumber(c, before));
      if (one && one.k === k) {
        facesHere.push(-1);
        cellsHere.push(renumber(c, loop.faces[k]));
      }
      facesHere.push(loop.faces[k]);
    });
    return { cells: Int32Array.from(cellsHere), faces: Int32Array.from(facesHere) };
  });
  const lines = new Map(cut.map(({ e }) => [e, linesAt(topology, complex, e, action)] as const));
  return { complex: { ...complex, cells, plus, minus, loops, openEdges: cut.map((c) => c.e) }, lines };
}

/** What acts on each node from outside: a direction, any direction, or null. */
function actions(topology: Topology, loads: readonly Vec3[]): (Vec3 | 'any' | null)[] {
  const action: (Vec3 | 'any' | null)[] = loads.map((p) => (length(p) > 0 ? normalise(p) : null));
  for (const { node, fixed } of topology.truss.supports) {
    const i = topology.nodeIndex.get(node)!;
    const held = [fixed.x, fixed.y, fixed.z].filter(Boolean).length;
    if (held === 0) continue;
    // Held in one direction and not loaded, a node can only be pushed that way.
    action[i] = held === 1 && action[i] === null ? [fixed.x ? 1 : 0, fixed.y ? 1 : 0, fixed.z ? 1 : 0] : 'any';
  }
  return action;
}

/** Region of each hull face, by the least face in it: faces hang together across edges that no line of action cuts. */
function regionsOf(
  complex: CellComplex,
  hull: readonly number[],
  outer: number,
  action: readonly (Vec3 | 'any' | null)[],
): Map<number, number> {
  const region = new Map(hull.map((f) => [f, f]));
  const find = (f: number): number => {
    let root = f;
    while (region.get(root) !== root) root = region.get(root)!;
    return root;
  };
  complex.loops.forEach((loop, e) => {
    if (action[complex.from[e]] && action[complex.to[e]]) return;
    const k = loop.cells.indexOf(outer);
    if (k < 0) return;
    const [a, b] = [find(loop.faces[(k + loop.cells.length - 1) % loop.cells.length]), find(loop.faces[k])];
    region.set(Math.max(a, b), Math.min(a, b));
  });
  return new Map(hull.map((f) => [f, find(f)]));
}

function linesAt(
  topology: Topology,
  complex: CellComplex,
  e: number,
  action: readonly (Vec3 | 'any' | null)[],
): Vec3[] {
  const [from, to] = [complex.from[e], complex.to[e]];
  const { nodes } = topology.truss;
  const axis = normalise(subtract(nodes[to].at, nodes[from].at));
  return [action[from], action[to]].flatMap((d) => {
    if (d === null || d === 'any') return [];
    const square = addScaled(d, axis, -dot(d, axis));
    return length(square) > ALONG ? [scale(square, 1 / length(square))] : [];
  });
}
