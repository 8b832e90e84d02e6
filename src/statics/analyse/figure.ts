import type { Topology } from '../../model/topology.js';
import type { PinFigure } from '../pin-figure.js';

/** The truss as a pin-jointed figure, one object a truss. Nodes where no strut ends take no part: they are held. */
export function figureOf(topology: Topology): PinFigure {
  let figure = figures.get(topology);
  if (!figure) figures.set(topology, (figure = makeFigure(topology)));
  return figure;
}

/** What is found out about a figure is kept with it, so the same truss gives the same object. */
const figures = new WeakMap<Topology, PinFigure>();

function makeFigure(topology: Topology): PinFigure {
  const { truss } = topology;
  const fixed = new Uint8Array(3 * truss.nodes.length);
  for (const { node, fixed: held } of truss.supports) {
    const at = 3 * topology.nodeIndex.get(node)!;
    if (held.x) fixed[at] = 1;
    if (held.y) fixed[at + 1] = 1;
    if (held.z) fixed[at + 2] = 1;
  }
  truss.nodes.forEach((_, i) => {
    if (topology.barsAt[i]!.length === 0) fixed.fill(1, 3 * i, 3 * i + 3);
  });
  return {
    nodes: Float64Array.from(truss.nodes.flatMap((n) => n.at)),
    ends: Int32Array.from(truss.members.flatMap((m) => m.ends.map((mark) => topology.nodeIndex.get(mark)!))),
    fixed,
  };
}

/** Nodes of each connected piece of two nodes or more. */
export function piecesOf(topology: Topology): number[][] {
  const seen = new Uint8Array(topology.truss.nodes.length);
  const out: number[][] = [];
  topology.truss.nodes.forEach((_, first) => {
    if (seen[first] || topology.barsAt[first]!.length === 0) return;
    const piece = [first];
    seen[first] = 1;
    for (let k = 0; k < piece.length; k++)
      for (const bar of topology.barsAt[piece[k]!]!) {
        const far = topology.nodeIndex.get(bar.far.mark)!;
        if (!seen[far]) {
          seen[far] = 1;
          piece.push(far);
        }
      }
    out.push(piece.sort((a, b) => a - b));
  });
  return out;
}
