import { dot, mean, type Vec3 } from '../../maths/vec3.js';
import type { ForceDiagram, NodePolyhedron } from '../../model/force-diagram.js';
import type { Area } from '../kit/geometry2.js';
import type { Pen } from '../kit/pen.js';
import type { Camera } from '../kit/view/camera.js';
import { planeCamera } from '../kit/view/plane-camera.js';
import type { Stroke } from '../kit/view/stroke.js';
import { drawTrussView, type ViewStrut } from '../kit/view/truss-view.js';

const NEAR: Stroke = { kind: 'plain', width: 0.35 };
const HIDDEN: Stroke = { kind: 'faint' };

/**
 * Draws a node's force polyhedron as large as the area allows: near edges black, hidden ones thin, on each face the mark
 * of the strut whose force is the face's area. Of a plane truss: the closed polygon of the node's forces.
 */
export function drawForcePolyhedron(
  pen: Pen,
  area: Area,
  diagram: ForceDiagram,
  node: NodePolyhedron,
  outside: Camera,
): void {
  const used = [...new Set(node.faces.flatMap((face) => face.loop))];
  const index = new Map(used.map((vertex, i) => [vertex, i]));
  const at = (vertex: number): Vec3 => diagram.vertices[vertex]!.at;
  const edges = new Map<string, { from: number; to: number; near: boolean; strut: string | null }>();
  for (const face of node.faces) {
    const near = diagram.kind === 'plane' || dot(face.area, outside.toward) > 0;
    const count = face.loop.length === 2 ? 1 : face.loop.length;
    for (let k = 0; k < count; k++) {
      const [from, to] = [face.loop[k]!, face.loop[(k + 1) % face.loop.length]!];
      const key = from < to ? `${from} ${to}` : `${to} ${from}`;
      const known = edges.get(key);
      if (known) known.near ||= near;
      else edges.set(key, { from, to, near, strut: face.strut });
    }
  }
  const mark = (strut: string | null): { bold: string; plain: string } => ({ bold: strut ?? 'load', plain: '' });
  drawTrussView(pen, area, {
    camera: diagram.kind === 'plane' ? planeCamera(diagram.vertices.map((v) => v.at)) : outside,
    scale: 'fill',
    edge: 5,
    nodes: used.map((vertex) => ({ mark: diagram.vertices[vertex]!.cell, at: at(vertex), show: 'none' })),
    struts: [...edges.values()].map(
      ({ from, to, near, strut }, i): ViewStrut => ({
        mark: `edge ${i}`,
        from: index.get(from)!,
        to: index.get(to)!,
        stroke: near ? NEAR : HIDDEN,
        label: diagram.kind === 'plane' ? mark(strut) : null,
      }),
    ),
    spots:
      diagram.kind === 'plane'
        ? []
        : node.faces.map((face) => ({ mark: mark(face.strut), at: mean(face.loop.map(at)) })),
  });
}
