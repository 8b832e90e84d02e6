import { dot, subtract } from '../../maths/vec3.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { Truss } from '../../model/truss.js';

/** The nodes that a panel's edges start from, in the panel's frame, mm, in the edges' order. */
export function panelCorners(truss: Truss): (panel: PanelPart) => readonly Point2[] {
  const at = new Map(truss.nodes.map((n) => [n.mark, n.at]));
  return ({ frame, edges }) =>
    edges.map((edge) => {
      const d = subtract(at.get(edge.from)!, frame.origin);
      return [dot(d, frame.x), dot(d, frame.y)];
    });
}
