import { fitPlane } from '../../../maths/plane-fit.js';
import { cross, dot, normalise, perpendicular, subtract, type Vec3 } from '../../../maths/vec3.js';
import { sizeOf, type Topology } from '../../../model/topology.js';

/** Nodes this near to one plane, as a share of the size, lie in it: rounding of exported coordinates. */
const IN_PLANE = 1e-6;

/** A truss whose nodes lie in one plane, with coordinates in it. */
export interface PlaneFigure {
  readonly origin: Vec3;
  /** Right-handed unit vectors, z the plane's normal. */
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
  /** By node: two coordinates in mm from the origin. */
  readonly at: Float64Array;
  readonly size: number;
}

/** The truss as a plane figure; null where its nodes span space or lie on one line. In a coordinate plane the axes are the truss's. */
export function planeFigure(topology: Topology): PlaneFigure | null {
  const { nodes } = topology.truss;
  const size = sizeOf(topology.truss);
  const fit = fitPlane(nodes.map((n) => n.at));
  if (!fit || fit.flatness > IN_PLANE * size || fit.spread[1] <= IN_PLANE * size) return null;
  const z = settledNormal(fit.normal);
  // The truss's own x where the plane is level, so that a drawing of the diagram stands as the truss does.
  const x = Math.abs(z[0]) < 0.9 ? normalise(subtract([1, 0, 0], scaleOf(z, z[0]))) : perpendicular(z);
  const y = cross(z, x);
  const at = new Float64Array(2 * nodes.length);
  nodes.forEach((node, i) => {
    const d = subtract(node.at, fit.origin);
    at[2 * i] = dot(d, x);
    at[2 * i + 1] = dot(d, y);
  });
  return { origin: fit.origin, x, y, z, at, size };
}

/** The same normal whichever way the nodes are listed: up, else to the first axis that it leans to. */
function settledNormal(n: Vec3): Vec3 {
  const first = Math.abs(n[2]) > 1e-9 ? n[2] : Math.abs(n[1]) > 1e-9 ? -n[1] : n[0];
  return first < 0 ? [-n[0], -n[1], -n[2]] : n;
}

const scaleOf = (v: Vec3, s: number): Vec3 => [v[0] * s, v[1] * s, v[2] * s];
