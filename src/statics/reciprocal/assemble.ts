import { add, addScaled, negate, scale, type Vec3, ZERO } from '../../maths/vec3.js';
import type { ForceDiagram, NodePolyhedron } from '../../model/force-diagram.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';
import type { Reading } from './read.js';

/**
 * The diagram as a record: a polygon a strut, a closed polyhedron a node, all areas in N by `newtonPerUnit`.
 * `outer` is what else pulls at each node (load and reaction), N.
 */
export function assembleDiagram(
  topology: Topology,
  complex: CellComplex,
  vertices: readonly Vec3[],
  reading: Reading,
  how: Pick<ForceDiagram, 'source' | 'sign' | 'newtonPerUnit'>,
  outer: readonly Vec3[],
): ForceDiagram {
  const { truss } = topology;
  const struts: ForceDiagram['struts'][number][] = [];
  const edgeOfMember = new Int32Array(truss.members.length).fill(-1);
  complex.member.forEach((m, e) => {
    if (m >= 0 && complex.loops[e].cells.length > 0) edgeOfMember[m] = e;
  });
  truss.members.forEach((member, m) => {
    const e = edgeOfMember[m];
    if (e < 0) return;
    struts.push({
      mark: member.mark,
      loop: [...complex.loops[e].cells],
      area: scale(reading.areas[e], how.newtonPerUnit),
      force: how.sign * how.newtonPerUnit * reading.along[e],
      angle: reading.angles[e],
    });
  });
  const nodes = truss.nodes.map((node, i): NodePolyhedron => {
    const faces: NodePolyhedron['faces'][number][] = [];
    let closure: Vec3 = ZERO;
    let residual = outer[i];
    for (const bar of topology.barsAt[i]) {
      const e = edgeOfMember[bar.memberIndex];
      if (e < 0) continue;
      const loop = [...complex.loops[e].cells];
      const area = scale(reading.areas[e], how.newtonPerUnit);
      const outward = bar.end === 0 ? area : negate(area);
      faces.push({ strut: bar.member.mark, loop: bar.end === 0 ? loop : loop.reverse(), area: outward });
      closure = add(closure, outward);
      residual = addScaled(residual, bar.direction, how.sign * how.newtonPerUnit * reading.along[e]);
    }
    const load = loadFace(complex, i);
    if (load.length > 0) {
      const area = negate(closure);
      faces.push({ strut: null, loop: load, area });
      closure = add(closure, area);
    }
    return { mark: node.mark, faces, closure, residual };
  });
  return {
    kind: 'space',
    ...how,
    vertices: complex.cells.map((cell, c) => ({ cell: cell.mark, at: vertices[c] })),
    struts,
    nodes,
  };
}

/**
 * The loop of open cells round a node that a load or a reaction acts on, anticlockwise seen from outside: its area vector
 * closes the node's polyhedron. Empty where no open cells meet at the node.
 */
function loadFace(complex: CellComplex, node: number): number[] {
  const next = new Map<number, number>();
  for (const e of complex.openEdges) {
    const ends = complex.from[e] === node ? 1 : complex.to[e] === node ? -1 : 0;
    if (ends === 0) continue;
    const { cells, faces } = complex.loops[e];
    const gap = faces.indexOf(-1);
    const [a, b] = [cells[gap], cells[(gap + 1) % cells.length]];
    // Each step of the load's loop runs against the strut polygons that it closes.
    if (ends > 0) next.set(b, a);
    else next.set(a, b);
  }
  const first = next.keys().next().value;
  if (first === undefined) return [];
  const loop: number[] = [];
  for (let c = first; !loop.includes(c) && next.has(c); c = next.get(c)!) loop.push(c);
  return loop;
}
