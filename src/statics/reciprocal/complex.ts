import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Topology } from '../../model/topology.js';
import { OUTSIDE_CELL } from '../../model/truss.js';
import { type EdgeLoop, edgeLoops } from './edge-loops.js';
import { type EdgeTable, edgeTable } from './edges.js';
import { openEdgesOf } from './open-edges.js';
import { orientCells } from './orient.js';
import { shapeFaults } from './shape-faults.js';

/**
 * A closed 3-complex: nodes, edges, faces, cells, with an unbounded cell, every face between two cells, all cells
 * oriented alike. Its order is combinatorial; the figure may overlap itself in space. Indices run over the truss's own
 * lists for nodes and faces; edges are the sides of faces.
 */
export interface CellComplex extends EdgeTable {
  /** Faces of the complex, by index into the truss's faces; others take no part. */
  readonly used: readonly number[];
  /** By face: the cell on the side that the face's loop is anticlockwise from, and the one behind; -1 for a face not used. */
  readonly plus: Int32Array;
  readonly minus: Int32Array;
  readonly cells: readonly ComplexCell[];
  /** By edge. */
  readonly loops: readonly EdgeLoop[];
  /** Edges where two open cells meet without a face between them: loads and reactions act at their ends. */
  readonly openEdges: readonly number[];
  readonly euler: { readonly V: number; readonly E: number; readonly F: number; readonly C: number };
}

export interface ComplexCell {
  readonly mark: string;
  /** Indices of its faces. */
  readonly faces: readonly number[];
  /** Whether it is the unbounded cell, or a part of it. */
  readonly outer: boolean;
}

/** A list of cells as given or as found from the faces. */
export interface CellList {
  readonly cells: readonly { readonly mark: string; readonly faces: readonly number[] }[];
}

/** The cells of the truss file, faces by index. */
export const givenCells = (topology: Topology): CellList => ({
  cells: topology.truss.cells.map((cell) => ({
    mark: cell.mark,
    faces: cell.faces.map((mark) => topology.faceIndex.get(mark)!),
  })),
});

/**
 * The complex of a truss and a list of cells, or the faults that keep it from being one: an open cell, a face in no
 * cell or in three, cells that cannot be oriented alike, struts whose cells do not go round them once, and Euler's
 * relation V - E + F - C = 0. The unbounded cell may be left out; then it is made of the faces that one cell has. Where loads act
 * it may be given in parts: cells that are open along edges between loaded or supported nodes.
 */
export function complexOf(
  topology: Topology,
  list: CellList,
): { readonly complex: CellComplex | null; readonly findings: readonly Finding[] } {
  const table = edgeTable(topology);
  const all = withOutside(list);
  const open = openEdgesOf(topology, table, all);
  const cells = all.map((cell) => (isOpen(table, cell, open) ? { ...cell, outer: true } : cell));
  const faults = own(shapeFaults(topology, table, cells, open), list);
  if (faults.some((f) => f.level === 'stop')) return { complex: null, findings: faults };

  const { plus, minus, twisted } = orientCells(topology, table, cells);
  if (twisted !== null) {
    return { complex: null, findings: [...faults, finding('cells-not-orientable', cells[twisted].mark)] };
  }
  const used = topology.truss.faces.flatMap((_, f) => (plus[f] >= 0 ? [f] : []));
  const { loops, broken } = edgeLoops(table, plus, minus, open);
  if (broken.length > 0) {
    return { complex: null, findings: [...faults, ...broken.map((e) => notSurrounded(topology, table, e))] };
  }
  const nodes = new Set(used.flatMap((f) => [...table.faces[f]]));
  const euler = {
    V: nodes.size,
    E: loops.filter((loop) => loop.cells.length > 0).length,
    F: used.length,
    // Open cells are parts of one unbounded cell.
    C: cells.filter((c) => !c.outer).length + (cells.some((c) => c.outer) ? 1 : 0),
  };
  const sum = euler.V - euler.E + euler.F - euler.C;
  if (sum !== 0) {
    return {
      complex: null,
      findings: [...faults, finding('euler-not-zero', 'truss', { value: sum, limit: 0, about: { ...euler } })],
    };
  }
  return { complex: { ...table, used, plus, minus, cells, loops, openEdges: [...open], euler }, findings: faults };
}

const isOpen = (table: EdgeTable, cell: ComplexCell, open: ReadonlySet<number>): boolean => {
  const count = new Map<number, number>();
  for (const f of cell.faces) for (const e of table.faceEdges[f]) count.set(e, (count.get(e) ?? 0) + 1);
  return [...count].some(([e, n]) => n === 1 && open.has(e));
};

/** Without the faults of an unbounded cell that was only made from what the faulty others left over. */
function own(faults: readonly Finding[], list: CellList): readonly Finding[] {
  if (list.cells.some((c) => c.mark === OUTSIDE_CELL)) return faults;
  const cause = faults.filter((f) => f.subject !== OUTSIDE_CELL);
  return cause.some((f) => f.level === 'stop') ? cause : faults;
}

/** The cells with the unbounded one among them. */
function withOutside(list: CellList): ComplexCell[] {
  const cells = list.cells.map((c) => ({ mark: c.mark, faces: c.faces, outer: c.mark === OUTSIDE_CELL }));
  if (cells.some((c) => c.outer)) return cells;
  const count = new Map<number, number>();
  for (const cell of cells) for (const f of new Set(cell.faces)) count.set(f, (count.get(f) ?? 0) + 1);
  const faces = [...count].flatMap(([f, n]) => (n === 1 ? [f] : [])).sort((a, b) => a - b);
  // Open cells of the file may share out the whole outside among them.
  return faces.length > 0 ? [...cells, { mark: OUTSIDE_CELL, faces, outer: true }] : cells;
}

function notSurrounded(topology: Topology, table: EdgeTable, edge: number): Finding {
  const member = table.member[edge];
  if (member >= 0) return finding('strut-not-surrounded', topology.truss.members[member].mark);
  const { nodes } = topology.truss;
  return finding('strut-not-surrounded', `${nodes[table.from[edge]].mark}-${nodes[table.to[edge]].mark}`);
}
