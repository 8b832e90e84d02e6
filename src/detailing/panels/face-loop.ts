import { areaVector } from '../../maths/plane-fit.js';
import { addScaled, cross, dot, length, normalise, perpendicular, subtract, type Vec3 } from '../../maths/vec3.js';
import type { PanelFrame, Point2 } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';

/** A face's nodes anticlockwise seen from outside, with the frame of its plane and the corners in it. */
export interface FaceLoop {
  readonly nodes: readonly string[];
  /** Nodes where they are, mm. */
  readonly points: readonly Vec3[];
  readonly frame: PanelFrame;
  /** Nodes dropped onto the plane, in the frame. */
  readonly corners: readonly Point2[];
}

/** Frame at `origin` with z = `normal` and x along the first edge; the loop turned round where it runs clockwise. */
export function faceLoop(topology: Topology, nodes: readonly string[], origin: Vec3, normal: Vec3): FaceLoop {
  const at = nodes.map((mark) => topology.at(mark));
  const clockwise = dot(areaVector(at), normal) < 0;
  // Turned round about its first node, so that the first node stays the first.
  const order = clockwise ? [nodes[0]!, ...nodes.slice(1).reverse()] : [...nodes];
  const points = order.map((mark) => topology.at(mark));
  const along = subtract(points[1]!, points[0]!);
  const flat = addScaled(along, normal, -dot(along, normal));
  const x = length(flat) > 0 ? normalise(flat) : perpendicular(normal);
  const y = normalise(cross(normal, x));
  const frame = { origin, x, y, z: normal };
  const corners = points.map((p): Point2 => {
    const d = subtract(p, origin);
    return [dot(d, x), dot(d, y)];
  });
  return { nodes: order, points, frame, corners };
}

/** Unit vector in the frame's plane from edge i (corner i to i + 1) to the inside, in the truss's axes. */
export function inward(loop: FaceLoop, i: number): Vec3 {
  const [a, b] = [loop.corners[i]!, loop.corners[(i + 1) % loop.corners.length]!];
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
  const [ex, ey] = [-(b[1] - a[1]) / l, (b[0] - a[0]) / l];
  const { x, y } = loop.frame;
  return [ex * x[0] + ey * y[0], ex * x[1] + ey * y[1], ex * x[2] + ey * y[2]];
}
