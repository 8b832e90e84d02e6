import type { EdgeTable } from './edges.js';

/** The cells round one edge, anticlockwise about it by the complex's orientation. */
export interface EdgeLoop {
  readonly cells: Int32Array;
  /** faces[k] lies between cells[k] and cells[k + 1]; -1 where two open cells meet without a face. */
  readonly faces: Int32Array;
}

const NONE: EdgeLoop = { cells: new Int32Array(0), faces: new Int32Array(0) };

/**
 * The loop of cells round every edge, by walking from cell to cell through the faces that hold the edge. A face whose
 * loop runs along the edge is crossed, anticlockwise about the edge, from the cell behind it to the cell before it.
 * `broken` lists the edges whose cells do not form one ring. Edges of no used face have an empty loop. At an
 * edge in `openEdges` two open cells meet without a face between them.
 */
export function edgeLoops(
  table: EdgeTable,
  plus: Int32Array,
  minus: Int32Array,
  openEdges: ReadonlySet<number>,
): { readonly loops: readonly EdgeLoop[]; readonly broken: readonly number[] } {
  const count = table.from.length;
  const facesOf: { face: number; start: number; end: number }[][] = Array.from({ length: count }, () => []);
  table.faces.forEach((_, f) => {
    if (plus[f] < 0) return;
    table.faceEdges[f].forEach((e, k) => {
      const forward = table.along[f][k] > 0;
      facesOf[e].push({ face: f, start: forward ? minus[f] : plus[f], end: forward ? plus[f] : minus[f] });
    });
  });
  const broken: number[] = [];
  const loops = facesOf.map((faces, e) => {
    if (faces.length === 0) return NONE;
    const leaving = new Map(faces.map((step) => [step.start, step]));
    const entered = new Set(faces.map((step) => step.end));
    // Where two open cells meet without a face the ring starts behind the gap: at the cell that no face leads into.
    const first = faces.find((step) => !entered.has(step.start))?.start ?? faces[0].start;
    const ring = [first];
    const crossed: number[] = [];
    for (let step = leaving.get(first); step && crossed.length < faces.length; step = leaving.get(step.end)) {
      crossed.push(step.face);
      if (step.end === first) break;
      ring.push(step.end);
    }
    const open = ring.length === faces.length + 1;
    if (open && openEdges.has(e)) crossed.push(-1);
    if (crossed.length !== ring.length || crossed.length < faces.length || leaving.size !== faces.length) {
      broken.push(e);
      return NONE;
    }
    return { cells: Int32Array.from(ring), faces: Int32Array.from(crossed) };
  });
  return { loops, broken };
}
