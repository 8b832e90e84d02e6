import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Topology } from '../../model/topology.js';
import type { ComplexCell } from './complex.js';
import type { EdgeTable } from './edges.js';

/** How many places a finding names before it says how many more there are. */
const NAMED = 4;

/**
 * What keeps a list of cells from being closed surfaces with every face between exactly two of them. A face that no
 * cell has is a warning: it takes no part. Cells may be open along `openEdges`.
 */
export function shapeFaults(
  topology: Topology,
  table: EdgeTable,
  cells: readonly ComplexCell[],
  openEdges: ReadonlySet<number>,
): Finding[] {
  const { truss } = topology;
  const faults: Finding[] = [];
  const cellsOf: number[][] = truss.faces.map(() => []);
  cells.forEach((cell, c) => {
    for (const f of cell.faces) cellsOf[f].push(c);
  });
  cellsOf.forEach((list, f) => {
    const mark = truss.faces[f].mark;
    const names = list.map((c) => cells[c].mark).join(', ');
    if (list.length === 0) faults.push(finding('face-in-no-cell', mark));
    else if (list.length === 1) faults.push(finding('face-in-one-cell', mark, { about: { cells: names } }));
    else if (list.length > 2)
      faults.push(finding('face-in-three-cells', mark, { value: list.length, about: { cells: names } }));
    else if (list[0] === list[1]) faults.push(finding('face-twice-in-cell', mark, { about: { cells: names } }));
  });
  for (const cell of cells) {
    const count = new Map<number, number>();
    for (const f of new Set(cell.faces)) for (const e of table.faceEdges[f]) count.set(e, (count.get(e) ?? 0) + 1);
    const open = [...count].flatMap(([e, n]) => (n === 1 && !openEdges.has(e) ? [e] : []));
    const pinched = [...count].flatMap(([e, n]) => (n > 2 ? [e] : []));
    if (cell.faces.length === 0) faults.push(finding('cell-empty', cell.mark));
    else if (open.length > 0)
      faults.push(finding('cell-open', cell.mark, { about: { along: names(topology, table, open) } }));
    else if (pinched.length > 0) {
      faults.push(finding('cell-pinched', cell.mark, { about: { along: names(topology, table, pinched) } }));
    } else if (pieces(table, cell.faces) > 1) {
      faults.push(finding('cell-in-pieces', cell.mark, { value: pieces(table, cell.faces) }));
    }
  }
  return faults;
}

/** Edges in words: the strut's mark where there is one, else the two nodes. */
function names(topology: Topology, table: EdgeTable, edges: readonly number[]): string {
  const { nodes, members } = topology.truss;
  const words = edges
    .slice(0, NAMED)
    .map((e) =>
      table.member[e] >= 0 ? members[table.member[e]].mark : `${nodes[table.from[e]].mark}-${nodes[table.to[e]].mark}`,
    );
  const more = edges.length - words.length;
  return words.join(', ') + (more > 0 ? ` and ${more} more` : '');
}

/** Number of pieces that a set of faces falls into when they hold together along edges. */
function pieces(table: EdgeTable, faces: readonly number[]): number {
  const byEdge = new Map<number, number[]>();
  for (const f of faces) for (const e of table.faceEdges[f]) byEdge.set(e, [...(byEdge.get(e) ?? []), f]);
  const seen = new Set<number>();
  let count = 0;
  for (const start of faces) {
    if (seen.has(start)) continue;
    count++;
    const queue = [start];
    seen.add(start);
    for (let f = queue.pop(); f !== undefined; f = queue.pop()) {
      for (const e of table.faceEdges[f]) {
        for (const g of byEdge.get(e)!) {
          if (seen.has(g)) continue;
          seen.add(g);
          queue.push(g);
        }
      }
    }
  }
  return count;
}
