import { add, addScaled, dot, length, normalise, scale, subtract, type Vec3, ZERO } from '../../../maths/vec3.js';
import type { ForceDiagram, NodePolyhedron, StrutPolygon } from '../../../model/force-diagram.js';
import type { Topology } from '../../../model/topology.js';
import type { PlaneFigure } from './plane-figure.js';
import type { Regions } from './regions.js';

/**
 * Maxwell's reciprocal of a plane truss as a record: a vertex a region (the slope of the surface there), a segment a strut, square
 * to it and as long as its force, a closed polygon a node. `outer`: load and reaction at each node, N.
 */
export function planeDiagram(
  topology: Topology,
  figure: PlaneFigure,
  regions: Regions,
  sides: ReadonlyMap<number, readonly [left: number, right: number]>,
  surface: Float64Array,
  forces: Float64Array,
  outer: readonly Vec3[],
): ForceDiagram {
  const { truss } = topology;
  const vertices = regions.marks.map((cell, r) => ({
    cell,
    at: addScaled(scale(figure.x, surface[3 * r]), figure.y, surface[3 * r + 1]),
  }));
  const segment = (right: number, left: number): Vec3 => subtract(vertices[left].at, vertices[right].at);
  const largest = vertices.reduce((most, v) => Math.max(most, length(v.at)), 0);
  const struts = truss.members.map((member, m): StrutPolygon => {
    const [left, right] = [regions.left[2 * m], regions.left[2 * m + 1]];
    const area = segment(right, left);
    const axis = normalise(subtract(topology.at(member.ends[1]), topology.at(member.ends[0])));
    const lean = length(area) > 1e-7 * largest ? Math.asin(Math.min(1, Math.abs(dot(normalise(area), axis)))) : 0;
    return { mark: member.mark, loop: [right, left], area, force: forces[m], angle: lean };
  });
  const nodes = truss.nodes.map((node, i): NodePolyhedron => {
    const faces: NodePolyhedron['faces'][number][] = [];
    let closure: Vec3 = ZERO;
    let residual = outer[i];
    for (const bar of topology.barsAt[i]) {
      const h = 2 * bar.memberIndex + bar.end;
      const [left, right] = [regions.left[h], regions.left[h ^ 1]];
      const area = segment(right, left);
      faces.push({ strut: bar.member.mark, loop: [right, left], area });
      closure = add(closure, area);
      residual = addScaled(residual, bar.direction, forces[bar.memberIndex]);
    }
    const side = sides.get(i);
    if (side && side[0] !== side[1]) {
      const area = segment(side[1], side[0]);
      faces.push({ strut: null, loop: [side[1], side[0]], area });
      closure = add(closure, area);
    }
    return { mark: node.mark, faces: inOrder(faces), closure, residual };
  });
  return { kind: 'plane', source: 'lifting', sign: 1, newtonPerUnit: 1, vertices, struts, nodes };
}

/** Segments end to end, so that they draw as one polygon. */
function inOrder(faces: NodePolyhedron['faces']): NodePolyhedron['faces'] {
  const rest = [...faces];
  const chain: NodePolyhedron['faces'][number][] = [];
  while (rest.length > 0) {
    const last = chain.at(-1)?.loop[1];
    const k = Math.max(
      0,
      rest.findIndex((f) => f.loop[0] === last),
    );
    chain.push(...rest.splice(k, 1));
  }
  return chain;
}
