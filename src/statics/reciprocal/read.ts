import { areaVector, fitPlane } from '../../maths/plane-fit.js';
import { angleBetween, dot, length, normalise, subtract, type Vec3 } from '../../maths/vec3.js';
import { ROUND_OFF } from '../../model/tolerance.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';

/** Force polygons read off a diagram, before a sign is chosen. */
export interface Reading {
  /** By edge: area vector of its polygon, in the diagram's squared unit, anticlockwise about the edge's direction. */
  readonly areas: readonly Vec3[];
  /** By edge: the area's share along the edge, signed, same unit. */
  readonly along: Float64Array;
  /** By edge: angle between the edge and the polygon's normal, rad, 0 to pi/2; 0 where the polygon is a point. */
  readonly angles: Float64Array;
  /** By node: sum of the area vectors of its edges, all turned to point away from it. */
  readonly closures: readonly Vec3[];
}

/**
 * A_e = 1/2 sum a_k x a_(k+1) over the cells k round edge e, anticlockwise about it; a: the diagram's vertices, one a cell
 * (Rankine, On the principle of the equilibrium of polyhedral frames, Phil. Mag. 1864). The order is the complex's,
 * never that of angles, so a polygon may overlap itself and have negative area.
 */
export function readPolygons(topology: Topology, complex: CellComplex, vertices: readonly Vec3[]): Reading {
  const { nodes } = topology.truss;
  const extent = extentOf(vertices);
  const areas: Vec3[] = [];
  const along = new Float64Array(complex.loops.length);
  const angles = new Float64Array(complex.loops.length);
  const closures: [number, number, number][] = nodes.map(() => [0, 0, 0]);
  complex.loops.forEach((loop, e) => {
    const polygon = Array.from(loop.cells, (c) => vertices[c]);
    const area = areaVector(polygon);
    const direction = normalise(subtract(nodes[complex.to[e]].at, nodes[complex.from[e]].at));
    areas.push(area);
    along[e] = dot(area, direction);
    angles[e] = polygonAngle(polygon, direction, extent);
    for (const k of [0, 1, 2] as const) {
      closures[complex.from[e]][k] += area[k];
      closures[complex.to[e]][k] -= area[k];
    }
  });
  return { areas, along, angles, closures };
}

/** Angle between a direction and the nearest normal of a polygon's least-squares plane, rad; polygons may be lines or points. */
export function polygonAngle(polygon: readonly Vec3[], direction: Vec3, extent: number): number {
  const fit = fitPlane(polygon);
  const nought = ROUND_OFF.crossing.value * extent;
  if (!fit || fit.spread[2] <= nought) return 0;
  if (fit.spread[1] <= nought) {
    // A line has a whole plane of normals: what counts is how far it leans out of square.
    const far = polygon.reduce((a, b) => (length(subtract(b, fit.origin)) > length(subtract(a, fit.origin)) ? b : a));
    return Math.abs(Math.PI / 2 - angleBetween(subtract(far, fit.origin), direction));
  }
  const angle = angleBetween(fit.normal, direction);
  return Math.min(angle, Math.PI - angle);
}

/** Forces by member index, N, tension positive, for a sign and a scale; a strut in no cell has none. */
export function memberForces(
  topology: Topology,
  complex: CellComplex,
  reading: Reading,
  newtonPerArea: number,
): Float64Array {
  const forces = new Float64Array(topology.truss.members.length);
  complex.member.forEach((m, e) => {
    if (m >= 0) forces[m] = newtonPerArea * reading.along[e];
  });
  return forces;
}

/** Largest extent of a set of points along any axis. */
export function extentOf(points: readonly Vec3[]): number {
  let extent = 0;
  for (const axis of [0, 1, 2] as const) {
    let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    for (const p of points) {
      low = Math.min(low, p[axis]);
      high = Math.max(high, p[axis]);
    }
    if (high > low) extent = Math.max(extent, high - low);
  }
  return extent;
}
